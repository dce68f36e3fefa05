/* help.c - the help of a command, from its table of options. */
#include "cli/options.h"

#include <errno.h>
#include <stdio.h>
#include <string.h>

#include "leewater/status.h"

static void print_options(const option *each) {
    for (; each->kind != OPTION_END; each++) {
        const char letter = option_letter(each);
        const char dash[] = {'-', letter, ',', '\0'};
        char left[64];
        (void)snprintf(left, sizeof left, "%3s --%s%s%s",
                       letter != 0 ? dash : "", option_name(each),
                       each->value != NULL ? " " : "",
                       each->value != NULL ? each->value : "");
        (void)printf("  %-26s  %s\n", left, each->help);
    }
}

/* Words of `text` in lines of at most 80 characters. */
static void print_wrapped(const char *text) {
    size_t used = 0;
    while (*text != '\0') {
        const size_t length = strcspn(text, " ");
        if (used > 0 && used + 1 + length > 80) {
            (void)putchar('\n');
            used = 0;
        }
        (void)printf("%s%.*s", used > 0 ? " " : "", (int)length, text);
        used += length + (used > 0);
        text += length;
        text += strspn(text, " ");
    }
    (void)putchar('\n');
}

void print_caution(void) {
    const char *limit;
    (void)puts("limits");
    for (size_t i = 0; (limit = lee_limit_at(i)) != NULL; i++) {
        (void)printf("  - %s\n", limit);
    }
    (void)putchar('\n');
    print_wrapped(lee_caution());
}

lee_status check_output(lee_error *error) {
    if (fflush(stdout) != 0 || ferror(stdout)) {
        return lee_fail(error, LEE_ERR_FILE,
                        "cannot write to standard output: %s",
                        errno != 0 ? strerror(errno) : "output failed");
    }
    return LEE_OK;
}

lee_status options_help(const request *asked, const option *common,
                        lee_error *error) {
    (void)printf("leewater %s - %s\n\nusage: leewater %s%s [options]\n\n",
                 asked->command, asked->summary, asked->command,
                 asked->has_case ? " CASE" : "");
    print_options(asked->options);
    print_options(common);
    if (asked->has_levels) {
        (void)putchar('\n');
        print_caution();
    }
    return check_output(error);
}
