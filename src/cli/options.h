/* options.h - one table a command: it parses, and it prints the help.
 *
 * "--name value", "--name=value", "-o value" and "-ovalue" are understood;
 * "--" ends the options, "-" is a word like any other. Names are written in
 * full: an abbreviation that works today breaks with tomorrow's option. */
#ifndef LEEWATER_CLI_OPTIONS_H
#define LEEWATER_CLI_OPTIONS_H

#include <stdbool.h>
#include <stddef.h>

#include "leewater/output.h"
#include "leewater/status.h"

typedef enum option_kind {
    OPTION_END,
    OPTION_FLAG,     /* bool, no value                   */
    OPTION_TEXT,     /* const char *, borrowed from argv */
    OPTION_LIST,     /* option_list: may be repeated     */
    OPTION_COUNT,    /* size_t, from 1                   */
    OPTION_QUANTITY, /* double                           */
    OPTION_POSITIVE  /* double, > 0                      */
} option_kind;

/* A kind of quantity as people type it: how the help calls the value, the SI
 * unit it is read in, and the most that makes sense. */
typedef struct quantity {
    const char *value; /* "SPEED" */
    const char *unit;  /* "m s-1" */
    double most;
} quantity;

extern const quantity quantity_speed;
extern const quantity quantity_fetch;
extern const quantity quantity_depth;
extern const quantity quantity_height;
extern const quantity quantity_roughness;
extern const quantity quantity_duration;
extern const quantity quantity_direction;
extern const quantity quantity_density;

typedef struct option {
    option_kind kind;
    const char *name;  /* "fetch", or "o,output" with a letter: -o */
    const char *value; /* how the help calls the value             */
    const char *help;  /* one line                                 */
    const char *unit;
    double most;
    void *target; /* what `kind` says; keeps its default if not given */
} option;

enum { OPTION_LIST_ROOM = 32 };

typedef struct option_list {
    size_t n;
    const char *text[OPTION_LIST_ROOM];
} option_list;

/* The rows of a table. */
option flag_option(const char *name, const char *help, bool *target);
option text_option(const char *name, const char *value, const char *help,
                   const char **target);
option list_option(const char *name, const char *value, const char *help,
                   option_list *target);
option count_option(const char *name, const char *help, double most,
                    size_t *target);
option quantity_option(const char *name, const quantity *what, const char *help,
                       double *target);
option positive_option(const char *name, const quantity *what, const char *help,
                       double *target);
option end_of_options(void);

/* What a command asks of its command line, and what it got. */
typedef struct request {
    const char *command;
    const char *summary;   /* one sentence                               */
    bool has_case;         /* takes exactly one CASE                     */
    bool has_levels;       /* its results are levels: the help says the
                              caution and the limits                     */
    const option *options; /* ends with OPTION_END                       */

    bool is_done; /* out: the help was asked for and printed    */
    bool is_json;
    bool is_quiet;
    lee_unit_system units;
    const char *case_path;
} request;

/* Reads argv[1] to argv[argc - 1] into the targets of asked->options and the
 * common options into `asked`; prints the help when that is asked for.
 * Errors: LEE_ERR_ARGUMENT, LEE_ERR_FILE when the help cannot be written. */
lee_status options_parse(request *asked, int argc, char *argv[],
                         lee_error *error);

/* The name of an option without its letter, and the letter or 0. */
const char *option_name(const option *each);
char option_letter(const option *each);

/* Help of one command, on standard output. `common` are the options that
 * every command takes. */
lee_status options_help(const request *asked, const option *common,
                        lee_error *error);

/* Caution and limits in a few lines, on standard output. */
void print_caution(void);

/* LEE_OK when all of standard output could be written so far. */
lee_status check_output(lee_error *error);

#endif
