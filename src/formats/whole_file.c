/* whole_file.c - reads a small regular file whole. */
#include "formats/whole_file.h"

#include <errno.h>
#include <fcntl.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>
#include <sys/stat.h>
#include <unistd.h>

static lee_status cannot(const char *path, const char *what, lee_error *error) {
    return lee_fail(error, LEE_ERR_FILE, "%s: cannot be %s: %s", path, what,
                    strerror(errno));
}

/* Opens without waiting on a pipe that nobody writes to. */
static lee_status open_regular(const char *path, FILE **stream, size_t *size,
                               lee_error *error) {
    const int descriptor =
        open(path, O_RDONLY | O_NONBLOCK | O_CLOEXEC | O_NOCTTY);
    if (descriptor < 0) {
        return cannot(path, "opened", error);
    }
    struct stat about;
    lee_status status = LEE_OK;
    if (fstat(descriptor, &about) != 0) {
        status = cannot(path, "opened", error);
    } else if (S_ISDIR(about.st_mode)) {
        status = lee_fail(error, LEE_ERR_FILE,
                          "%s: is a directory; expected a file", path);
    } else if (!S_ISREG(about.st_mode)) {
        status = lee_fail(error, LEE_ERR_FILE,
                          "%s: is a pipe or a device; expected a file", path);
    } else {
        *size = (size_t)about.st_size;
        *stream = fdopen(descriptor, "rb");
        status = *stream == NULL ? cannot(path, "opened", error) : LEE_OK;
    }
    if (status != LEE_OK) {
        (void)close(descriptor);
    }
    return status;
}

lee_status lee_whole_file_read(const char *path, size_t mebibytes, char **bytes,
                               size_t *length, lee_error *error) {
    FILE *stream = NULL;
    size_t size = 0;
    lee_status status = open_regular(path, &stream, &size, error);
    if (status != LEE_OK) {
        return status;
    }
    char *content = NULL;
    if (size > mebibytes << 20U) {
        status =
            lee_fail(error, LEE_ERR_FORMAT,
                     "%s: is larger than %zu MiB, the most that is read here",
                     path, mebibytes);
        goto done;
    }
    content = malloc(size + 1);
    if (content == NULL) {
        status = lee_fail(error, LEE_ERR_MEMORY, "%s: no room to read", path);
        goto done;
    }
    *length = fread(content, 1, size, stream);
    if (ferror(stream) != 0) {
        status = cannot(path, "read", error);
        goto done;
    }
    *bytes = content;
    content = NULL;

done:
    free(content);
    (void)fclose(stream);
    return status;
}
