/* regular_file.c - the files that are read: regular ones, and no others. */
#include "formats/regular_file.h"

#include <errno.h>
#include <fcntl.h>
#include <string.h>
#include <sys/stat.h>
#include <unistd.h>

static lee_status judge(const char *path, int descriptor, size_t *size,
                        lee_error *error) {
    struct stat about;
    if (descriptor < 0 || fstat(descriptor, &about) != 0) {
        return lee_fail(error, LEE_ERR_FILE, "%s: cannot be opened: %s", path,
                        strerror(errno));
    }
    if (S_ISDIR(about.st_mode)) {
        return lee_fail(error, LEE_ERR_FILE,
                        "%s: is a directory; expected a file", path);
    }
    if (!S_ISREG(about.st_mode)) {
        return lee_fail(error, LEE_ERR_FILE,
                        "%s: is a pipe or a device; expected a file", path);
    }
    *size = (size_t)about.st_size;
    return LEE_OK;
}

lee_status lee_regular_open(const char *path, int *descriptor, size_t *size,
                            lee_error *error) {
    const int opened = open(path, O_RDONLY | O_NONBLOCK | O_CLOEXEC | O_NOCTTY);
    const lee_status status = judge(path, opened, size, error);
    *descriptor = opened;
    if (status != LEE_OK && opened >= 0) {
        (void)close(opened);
        *descriptor = -1;
    }
    return status;
}

bool lee_is_same_file(const char *left, const char *right) {
    struct stat one;
    struct stat other;
    return stat(left, &one) == 0 && stat(right, &other) == 0 &&
           one.st_dev == other.st_dev && one.st_ino == other.st_ino;
}
