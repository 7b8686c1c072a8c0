#include "slipcase/hooks.h"

#include "core/size.h"

slip_status slip_hooks_poll(const struct slip_hooks *hooks, struct slip_error *err)
{
    if (hooks && hooks->interrupted && hooks->interrupted(hooks->context))
        return slip_fail(err, SLIP_INTERRUPTED, "interrupted");
    return SLIP_OK;
}

void slip_hooks_progress(const struct slip_hooks *hooks, double done, double all)
{
    if (hooks && hooks->progress)
        hooks->progress(hooks->context, done, all);
}

slip_status slip_hooks_afford(const struct slip_hooks *hooks, double bytes, const char *purpose,
                              struct slip_error *err)
{
    if (!hooks || !hooks->memory || bytes <= (double)hooks->memory)
        return SLIP_OK;
    char needed[32], allowed[32];
    slip_size_write(needed, sizeof needed, bytes);
    slip_size_write(allowed, sizeof allowed, (double)hooks->memory);
    return slip_fail(err, SLIP_LIMIT, "%s would need about %s of memory; %s are allowed", purpose,
                     needed, allowed);
}
