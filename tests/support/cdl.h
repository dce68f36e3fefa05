/* cdl.h - NetCDF files from their text form, by ncgen. */
#ifndef LEEWATER_TESTS_CDL_H
#define LEEWATER_TESTS_CDL_H

#include <stdio.h>
#include <sys/wait.h>

#include "support/files.h"

/* Writes a file of the folder. kind: "classic", "64-bit-offset", "64-bit-data"
 * (CDF-5) or "netCDF-4". The text stands between "netcdf x {" and "}". */
static inline const char *folder_write_cdl(test_folder *in, const char *name,
                                           const char *kind, const char *text) {
    const char *path = folder_write(in, name, "");
    char command[160];
    (void)snprintf(command, sizeof command, "ncgen -k '%s' -o %s", kind, path);
    FILE *pipe = popen(command, "w");
    assert_non_null(pipe);
    (void)fprintf(pipe, "netcdf x {\n%s\n}\n", text);
    const int ended = pclose(pipe);
    assert_true(WIFEXITED(ended) && WEXITSTATUS(ended) == 0);
    return path;
}

#endif
