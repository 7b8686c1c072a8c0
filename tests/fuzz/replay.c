/* Hands every file of a folder to a fuzz target, and every beginning of every file:
 *   replay_NAME FOLDER */
#include <dirent.h>
#include <string.h>

#include "fuzz.h"

/* Each beginning in memory of its own size, so that the sanitizers see a byte read too far. */
static void hand_over(const uint8_t *data, size_t size)
{
    for (size_t length = 0; length <= size; length++) {
        uint8_t *copy = malloc(length ? length : 1);
        require(copy != NULL, "memory");
        memcpy(copy, data, length);
        LLVMFuzzerTestOneInput(copy, length);
        free(copy);
    }
}

static void replay(const char *folder, const char *name)
{
    static uint8_t data[1 << 16];
    char path[4096];
    snprintf(path, sizeof path, "%s/%s", folder, name);
    FILE *file = fopen(path, "rb");
    require(file != NULL, "the file can be opened");
    size_t size = fread(data, 1, sizeof data, file);
    fclose(file);
    hand_over(data, size);
}

int main(int argc, char **argv)
{
    require(argc == 2, "usage: replay_NAME FOLDER");
    DIR *folder = opendir(argv[1]);
    require(folder != NULL, "the folder can be opened");
    unsigned files = 0;
    for (struct dirent *entry; (entry = readdir(folder)); files += entry->d_name[0] != '.')
        if (entry->d_name[0] != '.')
            replay(argv[1], entry->d_name);
    closedir(folder);
    printf("%u files\n", files);
    return files == 0;
}
