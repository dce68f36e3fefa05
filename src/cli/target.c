/* target.c - the file that results go to beside standard output. */
#include "cli/target.h"

#include <string.h>

#include "leewater/output.h"

bool is_stdout(const char *path) {
    return path != NULL && strcmp(path, "-") == 0;
}

lee_status check_choice(const request *asked, const output_choice *output,
                        lee_error *error) {
    if (output->force && output->path == NULL) {
        return lee_fail(error, LEE_ERR_ARGUMENT, "--force goes with -o FILE");
    }
    if (asked->is_json && is_stdout(output->path)) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "-o - and --json both want standard output");
    }
    return LEE_OK;
}

lee_status check_target(const output_choice *output, const lee_case *from,
                        lee_error *error) {
    return output->path == NULL
               ? LEE_OK
               : lee_check_target(output->path, output->force, from, error);
}

lee_status deliver(const delivery *results, const request *asked,
                   const output_choice *output, lee_error *error) {
    lee_status status = LEE_OK;
    if (output->path != NULL) {
        status = results->write(results->what, output, error);
    }
    return status == LEE_OK && !is_stdout(output->path)
               ? results->show(results->what, asked, error)
               : status;
}
