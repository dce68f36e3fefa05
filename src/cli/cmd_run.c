/* cmd_run.c - "run": levels in time from a wind record or a storm. */
#include <stdio.h>
#include <string.h>

#include "cli/commands.h"
#include "cli/options.h"
#include "cli/progress.h"
#include "cli/target.h"
#include "leewater/case.h"
#include "leewater/output.h"
#include "leewater/series.h"

/* What to leave out or to add. */
typedef struct run_choice {
    lee_target output;
    const char *field; /* NULL: none */
    bool has_no_range;
    bool has_no_error;
    bool with_range; /* columns of low and high */
} run_choice;

/* A run and what it is written with. */
typedef struct outcome {
    const lee_case *from;
    lee_run_result result;
} outcome;

static lee_status write_levels(const void *what, const lee_target *output,
                               lee_error *error) {
    const outcome *out = what;
    return lee_write_run(output, out->from, &out->result, error);
}

static lee_status show_levels(const void *what, const request *asked,
                              lee_error *error) {
    const outcome *out = what;
    return asked->is_json ? lee_json_run(stdout, out->from, &out->result, error)
                          : lee_print_run(stdout, out->from, &out->result,
                                          asked->units, error);
}

/* The file that takes the field of the run, when one is wanted. */
static lee_status open_field(const run_choice *choice, const lee_case *from,
                             lee_run_options *options, lee_field_file **field,
                             lee_error *error) {
    lee_target target = choice->output;
    target.path = choice->field;
    if (target.path == NULL) {
        return LEE_OK;
    }
    const lee_status status = lee_field_file_new(&target, from, field, error);
    options->take_field = lee_field_file_take;
    options->field_user = *field;
    return status;
}

static lee_status run_case(const request *asked, const run_choice *choice,
                           const lee_case *from, lee_error *error) {
    progress at;
    lee_field_file *field = NULL;
    outcome out = {.from = from};
    const delivery results = {&out, write_levels, show_levels};
    lee_run_options options = lee_run_options_default();
    options.has_range = !choice->has_no_range;
    options.keep_range = choice->with_range;
    options.has_own_error = !choice->has_no_error;
    options.keep_going = progress_goes_on;
    options.user = &at;
    lee_status status = open_field(choice, from, &options, &field, error);
    if (status != LEE_OK) {
        return status;
    }
    progress_begin(&at, asked->command, asked->is_quiet);
    status = lee_estimate_run(&from->problem, &options, &out.result, error);
    progress_clear(&at);
    if (status == LEE_OK && field != NULL) {
        status = lee_field_file_finish(field, &out.result, error);
    }
    lee_field_file_free(field);
    if (status == LEE_ERR_INTERRUPTED) {
        return lee_fail(error, status, "interrupted; nothing was written");
    }
    if (is_stdout(choice->output.path)) {
        progress_end(&at); /* a pipe may block: let Ctrl-C end it */
    }
    if (status == LEE_OK) {
        status = deliver(&results, asked, &choice->output, error);
    }
    lee_run_result_free(&out.result);
    progress_end(&at);
    return status;
}

static lee_status check_run_choice(const request *asked, run_choice *choice,
                                   lee_error *error) {
    const bool has_file = choice->output.path != NULL;
    if (choice->with_range && choice->has_no_range) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "--range and --no-range exclude each other");
    }
    if ((choice->with_range || choice->output.with_wind) && !has_file) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "--%s adds columns to a file: name it with -o",
                        choice->with_range ? "range" : "with-wind");
    }
    if (choice->field != NULL && has_file &&
        strcmp(choice->field, choice->output.path) == 0) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "-o and --field name the same file, %s", choice->field);
    }
    return check_choice(asked, &choice->output, choice->field != NULL, error);
}

lee_status cmd_run(int argc, char *argv[], lee_error *error) {
    run_choice choice = {0};
    const option options[] = {
        text_option("o,output", "FILE",
                    "also write the levels: a .csv or .nc; - is CSV",
                    &choice.output.path),
        flag_option("force", "replace FILE, unless the case reads it",
                    &choice.output.force),
        flag_option("range", "in FILE: low and high beside each level",
                    &choice.with_range),
        text_option("field", "FILE.nc",
                    "also write levels and currents along the axis",
                    &choice.field),
        flag_option("with-wind", "in FILE: the wind at 10 m over water",
                    &choice.output.with_wind),
        flag_option("no-range", "faster: without the range",
                    &choice.has_no_range),
        flag_option("no-error", "faster: without the own numerical error",
                    &choice.has_no_error),
        end_of_options(),
    };
    request asked = {.command = "run",
                     .summary = "levels in time from wind or a storm",
                     .has_case = true,
                     .has_levels = true,
                     .options = options};
    lee_status status = options_parse(&asked, argc, argv, error);
    if (status != LEE_OK || asked.is_done) {
        return status;
    }
    lee_case from = {0};
    status = check_run_choice(&asked, &choice, error);
    if (status == LEE_OK) {
        status = lee_case_read_apart(asked.case_path, &from, error);
    }
    if (status == LEE_OK) {
        status = check_target(&choice.output, &from, error);
    }
    if (status == LEE_OK) {
        status = run_case(&asked, &choice, &from, error);
    }
    lee_case_free(&from);
    return status;
}
