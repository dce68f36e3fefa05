/* values.c - reads the single values of the case file. */
#include <math.h>
#include <stdio.h>
#include <string.h>

#include "base/number.h"
#include "base/text.h"
#include "case/schema.h"

#include "leewater/units.h"

enum { LONGEST_TEXT = 500 }; /* bytes of a title or a name */

static const char *example(const lee_key *key, size_t size, char text[]) {
    if (key->words != NULL) {
        return key->words[0];
    }
    if (key->unit == NULL) {
        return "some text";
    }
    (void)snprintf(text, size, "%g%s%s", key->high < 12.0 ? key->high : 12.0,
                   strcmp(key->unit, "1") == 0 ? "" : " ",
                   strcmp(key->unit, "1") == 0 ? "" : key->unit);
    return text;
}

const char *lee_key_scalar(lee_case_reader *reader, const lee_yaml_node *node,
                           const lee_key *key) {
    char text[48];
    if (node->kind != LEE_YAML_SCALAR) {
        lee_key_problem(reader, node, key->name,
                        "should be a single value such as '%s', but is %s",
                        example(key, sizeof text, text), lee_key_kind(node));
        return NULL;
    }
    if (node->text[0] == '\0') {
        lee_key_problem(reader, node, key->name,
                        "is empty; expected a value such as '%s'",
                        example(key, sizeof text, text));
        return NULL;
    }
    return node->text;
}

void lee_key_unreadable(lee_case_reader *reader, const lee_yaml_node *node,
                        const lee_key *key, const lee_error *error) {
    if (error->status == LEE_ERR_MEMORY) {
        reader->has_no_room = true;
        return;
    }
    lee_key_problem(reader, node, key->name, "cannot be read: %s",
                    error->message);
}

/* "auto, or more than 0 and up to 2000 m" */
static void say_range(const lee_key *key, size_t size, char text[]) {
    const bool is_pure = strcmp(key->unit, "1") == 0;
    char low[32];
    char high[32];
    (void)snprintf(low, sizeof low, key->is_above ? "more than %.10g" : "%.10g",
                   key->low);
    (void)snprintf(high, sizeof high, "%.10g", key->high);
    (void)snprintf(text, size, "%s%s%s %s %s%s%s",
                   key->word == NULL ? "" : key->word,
                   key->word == NULL ? "" : ", or ", low,
                   key->is_above ? "and up to" : "to", high, is_pure ? "" : " ",
                   is_pure ? "" : key->unit);
}

static bool is_in_range(const lee_key *key, double value) {
    const bool is_high_enough =
        key->is_above ? value > key->low : value >= key->low;
    return is_high_enough && value <= key->high;
}

static void refuse_range(lee_case_reader *reader, const lee_yaml_node *node,
                         const lee_key *key) {
    char range[160];
    char shown[LEE_SHOWN];
    say_range(key, sizeof range, range);
    lee_key_problem(reader, node, key->name, "is '%s'; expected %s",
                    lee_text_show(strlen(node->text), node->text, shown),
                    range);
}

bool lee_key_value(lee_case_reader *reader, const lee_yaml_node *node,
                   const lee_key *key, double *value) {
    const char *text = lee_key_scalar(reader, node, key);
    if (text == NULL) {
        return false;
    }
    if (key->word != NULL && strcmp(text, key->word) == 0) {
        *value = key->word_value;
        return true;
    }
    lee_error error = {0};
    double shown = 0.0;
    if (lee_quantity_parse(text, key->unit, &shown, &error) != LEE_OK) {
        lee_key_unreadable(reader, node, key, &error);
        return false;
    }
    if (!is_in_range(key, shown)) {
        refuse_range(reader, node, key);
        return false;
    }
    if (key->si == NULL) {
        *value = shown;
        return true;
    }
    if (lee_quantity_parse(text, key->si, value, &error) != LEE_OK) {
        lee_key_unreadable(reader, node, key, &error);
        return false;
    }
    return true;
}

void lee_key_quantity(lee_case_reader *reader, const lee_yaml_node *node,
                      const lee_key *key, void *into) {
    double *target = (void *)((char *)into + key->offset);
    double value = 0.0;
    if (lee_key_value(reader, node, key, &value)) {
        *target = value;
    }
}

void lee_key_seconds(lee_case_reader *reader, const lee_yaml_node *node,
                     const lee_key *key, void *into) {
    int64_t *target = (void *)((char *)into + key->offset);
    double value = 0.0;
    if (!lee_key_value(reader, node, key, &value)) {
        return;
    }
    const double whole = round(value);
    const bool is_nothing = key->is_above && !(whole > key->low);
    if (fabs(value - whole) > 1e-6 || is_nothing) {
        lee_key_problem(reader, node, key->name,
                        "is '%s'; expected whole seconds", node->text);
        return;
    }
    *target = (int64_t)whole;
}

void lee_key_count(lee_case_reader *reader, const lee_yaml_node *node,
                   const lee_key *key, void *into) {
    size_t *target = (void *)((char *)into + key->offset);
    const char *text = lee_key_scalar(reader, node, key);
    if (text == NULL) {
        return;
    }
    int64_t value = 0;
    if (key->word != NULL && strcmp(text, key->word) == 0) {
        *target = (size_t)key->word_value;
    } else if (lee_integer_parse(strlen(text), text, &value) &&
               is_in_range(key, (double)value)) {
        *target = (size_t)value;
    } else {
        char range[160];
        char shown[LEE_SHOWN];
        say_range(key, sizeof range, range);
        lee_key_problem(reader, node, key->name,
                        "is '%s'; expected %s, a whole number",
                        lee_text_show(strlen(text), text, shown), range);
    }
}

static size_t find_word(const char *const words[], const char *text) {
    size_t i = 0;
    while (words[i] != NULL && strcmp(words[i], text) != 0) {
        i++;
    }
    return i;
}

static void refuse_word(lee_case_reader *reader, const lee_yaml_node *node,
                        const lee_key *key, const char *const words[]) {
    char list[160] = "";
    size_t length = 0;
    for (size_t i = 0; words[i] != NULL && length < sizeof list; i++) {
        length += (size_t)snprintf(list + length, sizeof list - length, "%s%s",
                                   i == 0 ? "" : ", ", words[i]);
    }
    char shown[LEE_SHOWN];
    lee_key_problem(reader, node, key->name, "is '%s'; expected one of %s",
                    lee_text_show(strlen(node->text), node->text, shown), list);
}

void lee_key_choice(lee_case_reader *reader, const lee_yaml_node *node,
                    const lee_key *key, void *into) {
    if (lee_key_scalar(reader, node, key) == NULL) {
        return;
    }
    const size_t index = find_word(key->words, node->text);
    if (key->words[index] == NULL) {
        refuse_word(reader, node, key, key->words);
        return;
    }
    const int chosen = (int)index;
    memcpy((char *)into + key->offset, &chosen, sizeof chosen);
}

void lee_key_flag(lee_case_reader *reader, const lee_yaml_node *node,
                  const lee_key *key, void *into) {
    static const char *const words[] = {"on",   "off",   "yes", "no",
                                        "true", "false", NULL};
    bool *target = (void *)((char *)into + key->offset);
    if (lee_key_scalar(reader, node, key) == NULL) {
        return;
    }
    const size_t index = find_word(words, node->text);
    if (words[index] == NULL) {
        refuse_word(reader, node, key, words);
        return;
    }
    *target = index % 2 == 0;
}

/* Line breaks and control bytes would break the heads of output files. */
static bool is_printable(const char *text) {
    for (const char *c = text; *c != '\0'; c++) {
        const unsigned char byte = (unsigned char)*c;
        if (byte < 0x20U || byte == 0x7FU) {
            return false;
        }
    }
    return true;
}

static const char *printable(lee_case_reader *reader, const lee_yaml_node *node,
                             const lee_key *key) {
    const char *text = lee_key_scalar(reader, node, key);
    if (text == NULL) {
        return NULL;
    }
    if (strlen(text) > LONGEST_TEXT) {
        lee_key_problem(reader, node, key->name,
                        "is longer than %d bytes, the most that is kept",
                        (int)LONGEST_TEXT);
        return NULL;
    }
    if (!is_printable(text)) {
        lee_key_problem(reader, node, key->name,
                        "holds a line break, a tab or a control character");
        return NULL;
    }
    return text;
}

void lee_key_text(lee_case_reader *reader, const lee_yaml_node *node,
                  const lee_key *key, void *into) {
    char **target = (void *)((char *)into + key->offset);
    const char *text = printable(reader, node, key);
    if (text == NULL) {
        return;
    }
    *target = lee_text_copy(text);
    if (*target == NULL) {
        reader->has_no_room = true;
    }
}

void lee_key_borrow(lee_case_reader *reader, const lee_yaml_node *node,
                    const lee_key *key, void *into) {
    const char **target = (void *)((char *)into + key->offset);
    const char *text = printable(reader, node, key);
    if (text != NULL) {
        *target = text;
    }
}
