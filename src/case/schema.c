/* schema.c - reads a mapping of the case file by a table of its keys. */
#include "case/schema.h"

#include <stdarg.h>
#include <stdio.h>
#include <string.h>

#include "base/text.h"

enum {
    MOST_SUGGESTED = 64, /* keys a section may have    */
    FEW = 8              /* keys a message may list    */
};

const char *lee_key_kind(const lee_yaml_node *node) {
    static const char *const kinds[] = {"a single value", "a list",
                                        "a mapping"};
    return kinds[node->kind];
}

static void add_problem(lee_case_reader *reader, size_t line, size_t column,
                        const char *text) {
    lee_case_problems_add(&reader->problems, LEE_ERR_FORMAT, reader->path, line,
                          column, text);
}

void lee_key_problem(lee_case_reader *reader, const lee_yaml_node *node,
                     const char *name, const char *format, ...) {
    char text[LEE_PROBLEM_TEXT];
    const int head = snprintf(text, sizeof text, "'%s%s%s' ", reader->where,
                              reader->where[0] == '\0' ? "" : ".", name);
    if (head < 0 || (size_t)head >= sizeof text) {
        return;
    }
    va_list arguments;
    va_start(arguments, format);
    (void)vsnprintf(text + head, sizeof text - (size_t)head, format, arguments);
    va_end(arguments);
    add_problem(reader, node->line, node->column, text);
}

/* "lake" in quotes, or the words for the top of the file. */
static const char *section_name(const lee_case_reader *reader, size_t size,
                                char text[]) {
    if (reader->where[0] == '\0') {
        return "the case file";
    }
    (void)snprintf(text, size, "'%s'", reader->where);
    return text;
}

static const lee_key *find_key(const lee_key_section *section,
                               const char *name) {
    for (size_t i = 0; i < section->count; i++) {
        if (strcmp(section->keys[i].name, name) == 0) {
            return &section->keys[i];
        }
    }
    return NULL;
}

static void list_keys(const lee_key_section *section, lee_text *list) {
    for (size_t i = 0; i < section->count; i++) {
        lee_text_add(list, "%s%s", i == 0 ? "" : ", ", section->keys[i].name);
    }
}

static void refuse_unknown(lee_case_reader *reader, const lee_yaml_node *node,
                           const lee_key_section *section) {
    const char *names[MOST_SUGGESTED];
    size_t count = 0;
    while (count < section->count && count < MOST_SUGGESTED) {
        names[count] = section->keys[count].name;
        count++;
    }
    char shown[LEE_SHOWN];
    char inside[sizeof reader->where + 2];
    lee_text text = {0};
    lee_text_add(&text, "unknown key '%s' in %s",
                 lee_text_show(strlen(node->key), node->key, shown),
                 section_name(reader, sizeof inside, inside));
    const char *nearest = lee_text_nearest(node->key, count, names);
    if (nearest != NULL) {
        lee_text_add(&text, "; did you mean '%s'?", nearest);
    } else if (count <= FEW) {
        lee_text_add(&text, "; expected ");
        list_keys(section, &text);
    }
    if (text.has_failed) {
        reader->has_no_room = true;
    } else {
        add_problem(reader, node->key_line, node->key_column, text.bytes);
    }
    lee_text_free(&text);
}

static void miss_required(lee_case_reader *reader, const lee_yaml_node *node,
                          const lee_key_section *section) {
    for (size_t i = 0; i < section->count; i++) {
        const lee_key *key = &section->keys[i];
        if (!key->is_required || lee_yaml_get(node, key->name) != NULL) {
            continue;
        }
        char inside[sizeof reader->where + 2];
        char text[LEE_PROBLEM_TEXT];
        (void)snprintf(text, sizeof text,
                       "required key '%s' is missing from %s", key->name,
                       section_name(reader, sizeof inside, inside));
        add_problem(reader, node->line, node->column, text);
    }
}

static void check_excluded(lee_case_reader *reader, const lee_yaml_node *node,
                           const lee_key_pair pairs[]) {
    for (size_t i = 0; pairs != NULL && pairs[i].key != NULL; i++) {
        const lee_yaml_node *one = lee_yaml_get(node, pairs[i].key);
        const lee_yaml_node *other = lee_yaml_get(node, pairs[i].other);
        if (one == NULL || other == NULL) {
            continue;
        }
        char inside[sizeof reader->where + 2];
        char text[LEE_PROBLEM_TEXT];
        (void)snprintf(text, sizeof text,
                       "'%s' and '%s' exclude each other in %s", pairs[i].key,
                       pairs[i].other,
                       section_name(reader, sizeof inside, inside));
        const bool is_later = one->key_line > other->key_line ||
                              (one->key_line == other->key_line &&
                               one->key_column > other->key_column);
        const lee_yaml_node *later = is_later ? one : other;
        add_problem(reader, later->key_line, later->key_column, text);
    }
}

static void check_needs(lee_case_reader *reader, const lee_yaml_node *node,
                        const lee_key_pair pairs[]) {
    for (size_t i = 0; pairs != NULL && pairs[i].key != NULL; i++) {
        const lee_yaml_node *one = lee_yaml_get(node, pairs[i].key);
        if (one == NULL || lee_yaml_get(node, pairs[i].other) != NULL) {
            continue;
        }
        char inside[sizeof reader->where + 2];
        char text[LEE_PROBLEM_TEXT];
        (void)snprintf(text, sizeof text,
                       "'%s' needs '%s', which is missing from %s",
                       pairs[i].key, pairs[i].other,
                       section_name(reader, sizeof inside, inside));
        add_problem(reader, one->key_line, one->key_column, text);
    }
}

static void read_keys(lee_case_reader *reader, const lee_yaml_node *node,
                      const lee_key_section *section, void *into) {
    for (size_t i = 0; i < node->count; i++) {
        const lee_yaml_node *value = node->child[i];
        const lee_key *key = find_key(section, value->key);
        if (key == NULL) {
            refuse_unknown(reader, value, section);
        } else {
            key->read(reader, value, key, into);
        }
    }
    miss_required(reader, node, section);
    check_excluded(reader, node, section->excluded);
    check_needs(reader, node, section->needs);
}

void lee_key_read_mapping(lee_case_reader *reader, const lee_yaml_node *node,
                          const char *where, const lee_key_section *section,
                          void *into) {
    if (node->kind != LEE_YAML_MAPPING) {
        char text[LEE_PROBLEM_TEXT];
        const bool is_whole = where[0] == '\0';
        (void)snprintf(
            text, sizeof text, "%s%s%s should hold keys%s, but is %s",
            is_whole ? "the case file" : "'", where, is_whole ? "" : "'",
            is_whole ? " such as 'lake:' and 'wind:'" : "", lee_key_kind(node));
        add_problem(reader, node->line, node->column, text);
        return;
    }
    char above[sizeof reader->where];
    memcpy(above, reader->where, sizeof above);
    const lee_yaml_node *outer = reader->mapping;
    (void)snprintf(reader->where, sizeof reader->where, "%s", where);
    reader->mapping = node;
    read_keys(reader, node, section, into);
    reader->mapping = outer;
    memcpy(reader->where, above, sizeof above);
}

void lee_key_section_of(lee_case_reader *reader, const lee_yaml_node *node,
                        const lee_key *key, void *into) {
    char where[sizeof reader->where];
    (void)snprintf(where, sizeof where, "%.96s%s%s", reader->where,
                   reader->where[0] == '\0' ? "" : ".", key->name);
    lee_key_read_mapping(reader, node, where, key->section,
                         (char *)into + key->offset);
}
