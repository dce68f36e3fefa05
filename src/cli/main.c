/* main.c - finds the command, tells what went wrong, sets the exit code. */
#include <signal.h>
#include <stdio.h>
#include <string.h>

#include "base/text.h"
#include "cli/commands.h"
#include "cli/options.h"
#include "leewater/status.h"

typedef struct command {
    const char *name;
    const char *operands;
    lee_status (*run)(int argc, char *argv[], lee_error *error);
    const char *summary;
} command;

static const command commands[] = {
    {"estimate", "",     cmd_estimate, "set-up from fetch, depth and wind"  },
    {"check",    "CASE", cmd_check,    "say what was understood of a case"  },
    {"drag",     "",     cmd_drag,     "compare the drag relations"         },
    {"steady",   "CASE", cmd_steady,   "equilibrium levels for given winds" },
    {"run",      "CASE", cmd_run,      "levels in time from wind or a storm"},
};
enum { COMMANDS = sizeof commands / sizeof commands[0] };

static const command *find(const char *name) {
    for (size_t i = 0; i < COMMANDS; i++) {
        if (strcmp(commands[i].name, name) == 0) {
            return &commands[i];
        }
    }
    return NULL;
}

/* Every line of a message names the program and the command. */
static void report(const char *name, const lee_error *error) {
    const char *line = error->message;
    while (*line != '\0') {
        const size_t length = strcspn(line, "\n");
        (void)fprintf(stderr, "leewater%s%s: %.*s\n",
                      name[0] != '\0' ? " " : "", name, (int)length, line);
        line += length;
        line += *line == '\n';
    }
}

static lee_status print_help(lee_error *error) {
    (void)puts("leewater - wind set-up on lakes and reservoirs\n\n"
               "usage: leewater COMMAND [CASE] [options]\n");
    for (size_t i = 0; i < COMMANDS; i++) {
        (void)printf("  %-8s  %-4s  %s\n", commands[i].name,
                     commands[i].operands, commands[i].summary);
    }
    (void)puts("\n  leewater COMMAND --help says more; leewater --version\n\n"
               "Results go to standard output, all else to standard error.\n"
               "exit: 0 done, 2 usage, 3 file, 4 format, 5 data do not "
               "support the estimate,\n"
               "      6 no convergence, 7 memory, 130 interrupted\n");
    print_caution();
    return check_output(error);
}

static lee_status print_version(lee_error *error) {
    (void)printf("leewater %s\n", lee_version());
    return check_output(error);
}

static lee_status refuse(const char *name, lee_error *error) {
    const char *names[COMMANDS];
    char shown[LEE_SHOWN];
    for (size_t i = 0; i < COMMANDS; i++) {
        names[i] = commands[i].name;
    }
    (void)lee_text_show(strlen(name), name, shown);
    if (name[0] == '-') {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "'%s' stands where the command should; options follow "
                        "it\ntry 'leewater --help'",
                        shown);
    }
    const char *nearest = lee_text_nearest(name, COMMANDS, names);
    if (nearest == NULL) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "unknown command '%s'\ntry 'leewater --help'", shown);
    }
    return lee_fail(error, LEE_ERR_ARGUMENT,
                    "unknown command '%s'; did you mean '%s'?\n"
                    "try 'leewater --help'",
                    shown, nearest);
}

static lee_status help_of(int argc, char *argv[], lee_error *error) {
    char help[] = "--help";
    if (argc < 3) {
        return print_help(error);
    }
    const command *asked = find(argv[2]);
    if (asked == NULL) {
        return refuse(argv[2], error);
    }
    char *words[] = {argv[2], help, NULL};
    return asked->run(2, words, error);
}

static lee_status dispatch(int argc, char *argv[], lee_error *error) {
    if (argc < 2) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "which command?\ntry 'leewater --help'");
    }
    const char *name = argv[1];
    if (strcmp(name, "--version") == 0) {
        return print_version(error);
    }
    if (strcmp(name, "--help") == 0 || strcmp(name, "-h") == 0) {
        return print_help(error);
    }
    if (strcmp(name, "help") == 0) {
        return help_of(argc, argv, error);
    }
    const command *asked = find(name);
    return asked != NULL ? asked->run(argc - 1, argv + 1, error)
                         : refuse(name, error);
}

int main(int argc, char *argv[]) {
    lee_error error = {0};
    lee_quiet_gsl();
    /* A file that hits its size limit is a failed write, told as one. */
    (void)signal(SIGXFSZ, SIG_IGN);
    const lee_status status = dispatch(argc, argv, &error);
    if (status != LEE_OK) {
        const command *asked = argc > 1 ? find(argv[1]) : NULL;
        report(asked != NULL ? asked->name : "", &error);
    }
    return lee_status_exit_code(status);
}
