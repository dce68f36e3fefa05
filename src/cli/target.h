/* target.h - the file that results go to beside standard output. */
#ifndef LEEWATER_CLI_TARGET_H
#define LEEWATER_CLI_TARGET_H

#include <stdbool.h>

#include "cli/options.h"
#include "leewater/case.h"
#include "leewater/output.h"
#include "leewater/status.h"

bool is_stdout(const char *path);

/* Refuses combinations that make no sense, and dates the file: from
 * SOURCE_DATE_EPOCH in the environment (a specification of
 * reproducible-builds.org), else now. A path of NULL is no file.
 * Errors: LEE_ERR_ARGUMENT. */
lee_status check_choice(const request *asked, lee_target *output,
                        bool has_other_file, lee_error *error);

/* A file that cannot be written, or that the case itself is read from: better
 * told before a long run than after. Errors: LEE_ERR_ARGUMENT, LEE_ERR_FILE. */
lee_status check_target(const lee_target *output, const lee_case *from,
                        lee_error *error);

/* Results on their way out: how they are written to a file and shown. */
typedef struct delivery {
    const void *what; /* passed to both */
    lee_status (*write)(const void *what, const lee_target *output,
                        lee_error *error);
    lee_status (*show)(const void *what, const request *asked,
                       lee_error *error);
} delivery;

/* Writes results to the file that was chosen, if any, and shows them unless
 * standard output is the file. */
lee_status deliver(const delivery *results, const request *asked,
                   const lee_target *output, lee_error *error);

#endif
