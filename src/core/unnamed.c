#include "core/unnamed.h"

#include <errno.h>
#include <stdlib.h>
#include <string.h>
#include <unistd.h>

#include "slipcase/text.h"

/* Nobody else can see the file: its name is gone as soon as it is there. */
slip_status slip_unnamed_open(int *fd, const char *purpose, struct slip_error *err)
{
    const char *folder = getenv("TMPDIR");
    struct slip_text path;
    slip_text_init(&path);
    slip_text_format(&path, "%s/slipcase-XXXXXX", folder && *folder ? folder : "/tmp");
    slip_status status = slip_text_ok(&path, err);
    if (status == SLIP_OK) {
        *fd = mkstemp(path.data);
        if (*fd < 0) {
            char reason[128] = "unknown error";
            strerror_r(errno, reason, sizeof reason);
            status = slip_fail(err, SLIP_IO, "%s: %s", purpose, reason);
        } else {
            unlink(path.data);
        }
    }
    slip_text_clear(&path);
    return status;
}
