/* target.h - the file that results go to beside standard output. */
#ifndef LEEWATER_CLI_TARGET_H
#define LEEWATER_CLI_TARGET_H

#include <stdbool.h>

#include "cli/options.h"
#include "leewater/case.h"
#include "leewater/status.h"

/* Where results go beside standard output. */
typedef struct output_choice {
    const char *path; /* NULL: nowhere; "-": to standard output, alone */
    bool force;
} output_choice;

bool is_stdout(const char *path);

/* Combinations that make no sense. Errors: LEE_ERR_ARGUMENT. */
lee_status check_choice(const request *asked, const output_choice *output,
                        lee_error *error);

/* A file that cannot be written, or that the case itself is read from: better
 * told before a long run than after. Errors: LEE_ERR_ARGUMENT, LEE_ERR_FILE. */
lee_status check_target(const output_choice *output, const lee_case *from,
                        lee_error *error);

#endif
