/* file.c - looks at a NetCDF file before the library opens it. */
#include "formats/netcdf/length.h"

#include <errno.h>
#include <stdbool.h>
#include <stdlib.h>
#include <string.h>
#include <unistd.h>

#include "formats/regular_file.h"

enum {
    FIRST_LOOK = 65536,        /* bytes; most headers are shorter     */
    LONGEST_HEADER = 67108864, /* bytes; no sane header is longer     */
    MAGIC = 8
};

/* Reads up to `wanted` bytes from the beginning of the file. */
static lee_status read_start(const char *path, int descriptor, size_t wanted,
                             unsigned char bytes[], size_t *got,
                             lee_error *error) {
    *got = 0;
    while (*got < wanted) {
        const ssize_t more =
            pread(descriptor, bytes + *got, wanted - *got, (off_t)*got);
        if (more < 0 && errno != EINTR) {
            return lee_fail(error, LEE_ERR_FILE, "%s: cannot be read: %s", path,
                            strerror(errno));
        }
        if (more == 0) {
            return LEE_OK;
        }
        *got += more > 0 ? (size_t)more : 0;
    }
    return LEE_OK;
}

static lee_status judge(const char *path, lee_netcdf_head state,
                        uint64_t needed, uint64_t size, lee_error *error) {
    switch (state) {
    case LEE_NETCDF_HEAD_WHOLE:
        if (needed > size) {
            return lee_fail(error, LEE_ERR_FORMAT,
                            "%s: is cut short: its header promises %llu "
                            "bytes, the file has %llu",
                            path, (unsigned long long)needed,
                            (unsigned long long)size);
        }
        return LEE_OK;
    case LEE_NETCDF_HEAD_OPEN:
        return lee_fail(error, LEE_ERR_FORMAT,
                        "%s: does not say how many records it holds; it was "
                        "not closed by the program that wrote it",
                        path);
    case LEE_NETCDF_HEAD_LONGER:
        return lee_fail(error, LEE_ERR_FORMAT,
                        "%s: is damaged or cut short: its header has no end",
                        path);
    case LEE_NETCDF_HEAD_DAMAGED:
        return lee_fail(error, LEE_ERR_FORMAT,
                        "%s: is damaged: its header makes no sense", path);
    case LEE_NETCDF_HEAD_NO_MEMORY:
        break;
    }
    return lee_fail(error, LEE_ERR_MEMORY, "%s: no room to read", path);
}

/* Looks at more and more of the file, until the header is whole. */
static lee_status check_classic(const char *path, int descriptor, uint64_t size,
                                lee_error *error) {
    lee_netcdf_head state = LEE_NETCDF_HEAD_LONGER;
    uint64_t needed = 0;
    bool is_all = false;
    for (size_t look = FIRST_LOOK; state == LEE_NETCDF_HEAD_LONGER && !is_all;
         look *= 8) {
        unsigned char *bytes = malloc(look);
        if (bytes == NULL) {
            return judge(path, LEE_NETCDF_HEAD_NO_MEMORY, 0, size, error);
        }
        size_t got = 0;
        const lee_status status =
            read_start(path, descriptor, look, bytes, &got, error);
        if (status == LEE_OK) {
            state = lee_netcdf_read_head(got, bytes, &needed);
        }
        free(bytes);
        if (status != LEE_OK) {
            return status;
        }
        is_all = got < look || look >= LONGEST_HEADER;
    }
    return judge(path, state, needed, size, error);
}

static lee_status check_open(const char *path, int descriptor, uint64_t size,
                             lee_error *error) {
    static const unsigned char hdf5[MAGIC] = {0x89U, 'H',  'D',   'F',
                                              '\r',  '\n', 0x1aU, '\n'};
    unsigned char magic[MAGIC] = {0};
    size_t got = 0;
    const lee_status status =
        read_start(path, descriptor, MAGIC, magic, &got, error);
    if (status != LEE_OK || memcmp(magic, hdf5, MAGIC) == 0) {
        return status;
    }
    if (memcmp(magic, "CDF", 3) == 0) {
        return check_classic(path, descriptor, size, error);
    }
    return lee_fail(error, LEE_ERR_FORMAT, "%s: %s", path,
                    size == 0 ? "is empty; expected a NetCDF file"
                              : "does not begin like a NetCDF file");
}

lee_status lee_netcdf_check_file(const char *path, lee_error *error) {
    if (strstr(path, "://") != NULL || strchr(path, '#') != NULL ||
        path[0] == '[') {
        return lee_fail(error, LEE_ERR_FILE,
                        "%s: is an address, or its name has a '#'; only files "
                        "on this machine are read",
                        path);
    }
    int descriptor = -1;
    size_t size = 0;
    lee_status status = lee_regular_open(path, &descriptor, &size, error);
    if (status == LEE_OK) {
        status = check_open(path, descriptor, size, error);
    }
    if (descriptor >= 0) {
        (void)close(descriptor);
    }
    return status;
}
