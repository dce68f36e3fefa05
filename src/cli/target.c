/* target.c - the file that results go to beside standard output. */
#include "cli/target.h"

#include <errno.h>
#include <stdlib.h>
#include <string.h>
#include <time.h>

#include "base/text.h"

#include "leewater/output.h"

bool is_stdout(const char *path) {
    return path != NULL && strcmp(path, "-") == 0;
}

static lee_status find_date(int64_t *date, lee_error *error) {
    const char *fixed = getenv("SOURCE_DATE_EPOCH");
    if (fixed == NULL) {
        *date = (int64_t)time(NULL);
        return LEE_OK;
    }
    char *end;
    errno = 0;
    const long long read = strtoll(fixed, &end, 10);
    const bool is_whole = *fixed >= '0' && *fixed <= '9' && *end == '\0';
    /* the last second that a year of four digits can tell */
    if (!is_whole || errno != 0 || read > INT64_C(253402300799)) {
        char shown[LEE_SHOWN];
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "SOURCE_DATE_EPOCH is '%s'; expected seconds since "
                        "1970 as a whole number",
                        lee_text_show(strlen(fixed), fixed, shown));
    }
    *date = read;
    return LEE_OK;
}

lee_status check_choice(const request *asked, lee_target *output,
                        bool has_other_file, lee_error *error) {
    if (output->force && output->path == NULL && !has_other_file) {
        return lee_fail(error, LEE_ERR_ARGUMENT, "--force goes with -o FILE");
    }
    if (asked->is_json && is_stdout(output->path)) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "-o - and --json both want standard output");
    }
    return find_date(&output->date, error);
}

lee_status check_target(const lee_target *output, const lee_case *from,
                        lee_error *error) {
    return output->path == NULL ? LEE_OK
                                : lee_check_target(output, from, error);
}

lee_status deliver(const delivery *results, const request *asked,
                   const lee_target *output, lee_error *error) {
    lee_status status = LEE_OK;
    if (output->path != NULL) {
        status = results->write(results->what, output, error);
    }
    return status == LEE_OK && !is_stdout(output->path)
               ? results->show(results->what, asked, error)
               : status;
}
