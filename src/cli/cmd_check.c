/* cmd_check.c - "check": says what was understood of a case. */
#include <stdio.h>

#include "cli/commands.h"
#include "cli/options.h"
#include "leewater/case.h"
#include "leewater/output.h"
#include "leewater/series.h"

static lee_status check_case(const request *asked, const lee_case *from,
                             lee_error *error) {
    lee_problem_check check = {0};
    lee_status status = lee_check_problem(&from->problem, &check, error);
    if (status == LEE_OK && asked->is_json) {
        status = lee_json_check(stdout, from, &check, error);
    } else if (status == LEE_OK) {
        status = lee_print_check(stdout, from, &check, asked->units, error);
    }
    lee_problem_check_free(&check);
    return status;
}

lee_status cmd_check(int argc, char *argv[], lee_error *error) {
    const option options[] = {end_of_options()};
    request asked = {.command = "check",
                     .summary = "say what was understood of a case",
                     .has_case = true,
                     .has_levels = true,
                     .options = options};
    lee_status status = options_parse(&asked, argc, argv, error);
    if (status != LEE_OK || asked.is_done) {
        return status;
    }
    lee_case from = {0};
    status = lee_case_read_apart(asked.case_path, &from, error);
    if (status == LEE_OK) {
        status = check_case(&asked, &from, error);
    }
    lee_case_free(&from);
    return status;
}
