/* whole_file.c - reads a small regular file whole. */
#include "formats/whole_file.h"

#include <errno.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>
#include <unistd.h>

#include "formats/regular_file.h"

static lee_status open_stream(const char *path, FILE **stream, size_t *size,
                              lee_error *error) {
    int descriptor = -1;
    const lee_status status = lee_regular_open(path, &descriptor, size, error);
    if (status != LEE_OK) {
        return status;
    }
    *stream = fdopen(descriptor, "rb");
    if (*stream == NULL) {
        (void)close(descriptor);
        return lee_fail(error, LEE_ERR_FILE, "%s: cannot be opened: %s", path,
                        strerror(errno));
    }
    return LEE_OK;
}

lee_status lee_whole_file_read(const char *path, size_t mebibytes, char **bytes,
                               size_t *length, lee_error *error) {
    FILE *stream = NULL;
    size_t size = 0;
    lee_status status = open_stream(path, &stream, &size, error);
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
        status = lee_fail(error, LEE_ERR_FILE, "%s: cannot be read: %s", path,
                          strerror(errno));
        goto done;
    }
    *bytes = content;
    content = NULL;

done:
    free(content);
    (void)fclose(stream);
    return status;
}
