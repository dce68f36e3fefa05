/* options.c - reads a command line by the table of its command. */
#include "cli/options.h"

#include <stdio.h>
#include <string.h>

#include "base/number.h"
#include "base/text.h"
#include "leewater/units.h"

enum { MOST_OPTIONS = 40 };

/* Options of the command and of every command, with what was seen of them. */
typedef struct parser {
    request *asked;
    const option *all[MOST_OPTIONS];
    bool is_given[MOST_OPTIONS];
    size_t count;
    int argc;
    char **argv;
    int next; /* word to be read next */
} parser;

static lee_status usage(const parser *at, lee_error *error) {
    char message[sizeof error->message];
    if (error != NULL) {
        (void)snprintf(message, sizeof message, "%s", error->message);
        (void)lee_fail(error, LEE_ERR_ARGUMENT,
                       "%.1900s\ntry 'leewater %.20s --help'", message,
                       at->asked->command);
    }
    return LEE_ERR_ARGUMENT;
}

static const char *shown(const char *text, char room[LEE_SHOWN]) {
    return lee_text_show(strlen(text), text, room);
}

static lee_status read_real(const option *found, const char *text,
                            lee_error *error) {
    double value;
    char room[LEE_SHOWN];
    const lee_status status =
        lee_quantity_parse(text, found->unit, &value, error);
    if (status != LEE_OK) {
        lee_context(error, "--%s: ", option_name(found));
        return status;
    }
    if (found->kind == OPTION_POSITIVE && !(value > 0.0)) {
        return lee_fail(error, LEE_ERR_ARGUMENT, "--%s: '%s' is not positive",
                        option_name(found), shown(text, room));
    }
    if (found->most > 0.0 && !(value <= found->most)) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "--%s: '%s' is beyond %g %s, the most that makes "
                        "sense here",
                        option_name(found), shown(text, room), found->most,
                        found->unit);
    }
    *(double *)found->target = value;
    return LEE_OK;
}

static lee_status read_count(const option *found, const char *text,
                             lee_error *error) {
    int64_t value;
    char room[LEE_SHOWN];
    if (!lee_integer_parse(strlen(text), text, &value) || value < 1 ||
        (double)value > found->most) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "--%s: '%s' is not a whole number from 1 to %g",
                        option_name(found), shown(text, room), found->most);
    }
    *(size_t *)found->target = (size_t)value;
    return LEE_OK;
}

static lee_status read_list(const option *found, const char *text,
                            lee_error *error) {
    option_list *list = found->target;
    if (list->n == OPTION_LIST_ROOM) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "--%s is given more than %d times", option_name(found),
                        (int)OPTION_LIST_ROOM);
    }
    list->text[list->n++] = text;
    return LEE_OK;
}

static lee_status read_value(const option *found, const char *text,
                             lee_error *error) {
    switch (found->kind) {
    case OPTION_TEXT:
        *(const char **)found->target = text;
        return LEE_OK;
    case OPTION_LIST:
        return read_list(found, text, error);
    case OPTION_COUNT:
        return read_count(found, text, error);
    case OPTION_QUANTITY:
    case OPTION_POSITIVE:
        return read_real(found, text, error);
    case OPTION_FLAG:
    case OPTION_END:
        break;
    }
    return LEE_OK;
}

/* The option that a misspelt or shortened name may have meant, or NULL. */
static const char *meant(const parser *at, const char *name) {
    const char *names[MOST_OPTIONS];
    const char *begun = NULL;
    size_t matches = 0;
    for (size_t i = 0; i < at->count; i++) {
        names[i] = option_name(at->all[i]);
        if (strncmp(names[i], name, strlen(name)) == 0) {
            begun = names[i];
            matches++;
        }
    }
    return matches == 1 ? begun : lee_text_nearest(name, at->count, names);
}

static lee_status unknown(const parser *at, const char *word, size_t length,
                          lee_error *error) {
    char name[LEE_SHOWN];
    (void)lee_text_show(length, word, name);
    const bool is_long = name[0] == '-' && name[1] == '-';
    const char *nearest = is_long ? meant(at, name + 2) : NULL;
    if (nearest == NULL) {
        return lee_fail(error, LEE_ERR_ARGUMENT, "unknown option '%s'", name);
    }
    return lee_fail(error, LEE_ERR_ARGUMENT,
                    "unknown option '%s'; did you mean '--%s'?", name, nearest);
}

/* Index of the option that a word of this length names, or `count`. */
static size_t find(const parser *at, const char *word, size_t length) {
    for (size_t i = 0; i < at->count; i++) {
        const option *each = at->all[i];
        if (length == strlen(option_name(each)) + 2 &&
            strncmp(word + 2, option_name(each), length - 2) == 0) {
            return i;
        }
    }
    return at->count;
}

/* The value of an option: behind '=' or the next word. */
static lee_status take_value(parser *at, const option *found,
                             const char *attached, const char **value,
                             lee_error *error) {
    if (attached != NULL) {
        *value = attached;
        return LEE_OK;
    }
    const bool is_missing =
        at->next >= at->argc || strncmp(at->argv[at->next], "--", 2) == 0;
    if (is_missing) {
        return lee_fail(error, LEE_ERR_ARGUMENT, "--%s needs a value: %s",
                        option_name(found), found->value);
    }
    *value = at->argv[at->next++];
    return LEE_OK;
}

static lee_status apply(parser *at, size_t index, const char *attached,
                        lee_error *error) {
    const option *found = at->all[index];
    if (at->is_given[index] && found->kind != OPTION_LIST) {
        return lee_fail(error, LEE_ERR_ARGUMENT, "--%s is given twice",
                        option_name(found));
    }
    at->is_given[index] = true;
    if (found->kind == OPTION_FLAG) {
        if (attached != NULL) {
            return lee_fail(error, LEE_ERR_ARGUMENT, "--%s takes no value",
                            option_name(found));
        }
        *(bool *)found->target = true;
        return LEE_OK;
    }
    const char *value = NULL;
    const lee_status status = take_value(at, found, attached, &value, error);
    return status == LEE_OK ? read_value(found, value, error) : status;
}

static lee_status read_long(parser *at, const char *word, lee_error *error) {
    const char *equals = strchr(word, '=');
    const size_t length =
        equals != NULL ? (size_t)(equals - word) : strlen(word);
    const size_t index = find(at, word, length);
    if (index == at->count) {
        return unknown(at, word, length, error);
    }
    return apply(at, index, equals != NULL ? equals + 1 : NULL, error);
}

static lee_status read_short(parser *at, const char *word, lee_error *error) {
    for (size_t i = 0; i < at->count; i++) {
        if (option_letter(at->all[i]) == word[1]) {
            const bool is_flag = at->all[i]->kind == OPTION_FLAG;
            if (is_flag && word[2] != '\0') {
                break;
            }
            return apply(at, i, word[2] != '\0' ? word + 2 : NULL, error);
        }
    }
    return unknown(at, word, strlen(word), error);
}

static lee_status read_operand(parser *at, const char *word, lee_error *error) {
    char room[LEE_SHOWN];
    if (!at->asked->has_case) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "'%s' is not an option, and %s reads no case",
                        shown(word, room), at->asked->command);
    }
    if (at->asked->case_path != NULL) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "'%s' is a second case; give one", shown(word, room));
    }
    at->asked->case_path = word;
    return LEE_OK;
}

static lee_status read_words(parser *at, lee_error *error) {
    bool has_options = true;
    while (at->next < at->argc) {
        const char *word = at->argv[at->next++];
        lee_status status = LEE_OK;
        if (has_options && strcmp(word, "--") == 0) {
            has_options = false;
        } else if (has_options && strncmp(word, "--", 2) == 0) {
            status = read_long(at, word, error);
        } else if (has_options && word[0] == '-' && word[1] != '\0') {
            status = read_short(at, word, error);
        } else {
            status = read_operand(at, word, error);
        }
        if (status != LEE_OK) {
            return status;
        }
    }
    return LEE_OK;
}

static void add_options(parser *at, const option *options) {
    for (; options->kind != OPTION_END && at->count < MOST_OPTIONS; options++) {
        at->all[at->count++] = options;
    }
}

static lee_status set_units(request *asked, const char *name,
                            lee_error *error) {
    char room[LEE_SHOWN];
    if (name == NULL || strcmp(name, "si") == 0) {
        asked->units = LEE_UNITS_SI;
        return LEE_OK;
    }
    if (strcmp(name, "us") == 0) {
        asked->units = LEE_UNITS_US;
        return LEE_OK;
    }
    return lee_fail(error, LEE_ERR_ARGUMENT,
                    "--units: '%s' is not known; expected si or us",
                    shown(name, room));
}

lee_status options_parse(request *asked, int argc, char *argv[],
                         lee_error *error) {
    bool is_help = false;
    const char *units = NULL;
    const option common[] = {
        text_option("units", "si|us", "units of the text; JSON and CSV stay SI",
                    &units),
        flag_option("json", "a summary for machines instead of text",
                    &asked->is_json),
        flag_option("q,quiet", "no progress is told", &asked->is_quiet),
        flag_option("h,help", "this help", &is_help),
        end_of_options(),
    };
    parser at = {.asked = asked, .argc = argc, .argv = argv, .next = 1};
    add_options(&at, asked->options);
    add_options(&at, common);
    lee_status status = read_words(&at, error);
    if (is_help) {
        asked->is_done = true;
        return options_help(asked, common, error);
    }
    if (status == LEE_OK) {
        status = set_units(asked, units, error);
    }
    if (status == LEE_OK && asked->has_case && asked->case_path == NULL) {
        status = lee_fail(error, LEE_ERR_ARGUMENT, "which case? Give a file");
    }
    return status == LEE_OK ? LEE_OK : usage(&at, error);
}
