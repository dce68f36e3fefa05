/* yaml.c - builds the tree of a YAML file from libyaml's events. */
#include "formats/yaml.h"

#include <stdlib.h>
#include <string.h>

#include <yaml.h>

#include "base/text.h"
#include "formats/whole_file.h"

enum {
    LARGEST_FILE = 1, /* MiB */
    MOST_NODES = 200000,
    DEEPEST = 32
};

typedef struct builder {
    const char *path;
    yaml_parser_t parser;
    lee_yaml_node *root;
    lee_yaml_node *open[DEEPEST]; /* borrowed from the tree */
    size_t depth;
    size_t nodes;
    bool has_key; /* a key waits for its value */
    char *key;
    yaml_mark_t key_mark;
    bool has_ended;
    lee_error *error;
} builder;

/* The two say their status outright: a compiler that inlines what calls them
 * then sees that a node is there whenever it is used. */
static lee_status refuse(const builder *b, yaml_mark_t mark, const char *what) {
    (void)lee_fail(b->error, LEE_ERR_FORMAT, "%s:%zu:%zu: %s", b->path,
                   mark.line + 1, mark.column + 1, what);
    return LEE_ERR_FORMAT;
}

static lee_status no_room(const builder *b) {
    (void)lee_fail(b->error, LEE_ERR_MEMORY, "%s: no room for its content",
                   b->path);
    return LEE_ERR_MEMORY;
}

void lee_yaml_free(lee_yaml_node *root) {
    if (root == NULL) {
        return;
    }
    for (size_t i = 0; i < root->count; i++) {
        lee_yaml_free(root->child[i]);
    }
    free(root->child);
    free(root->key);
    free(root->text);
    free(root);
}

const lee_yaml_node *lee_yaml_get(const lee_yaml_node *mapping,
                                  const char *key) {
    for (size_t i = 0; i < mapping->count; i++) {
        const char *name = mapping->child[i]->key;
        if (name != NULL && strcmp(name, key) == 0) {
            return mapping->child[i];
        }
    }
    return NULL;
}

/* Hands `node` to the innermost open collection. Room doubles: it runs out
 * when the count is a power of two. */
static bool attach(builder *b, lee_yaml_node *node) {
    if (b->depth == 0) {
        b->root = node;
        return true;
    }
    lee_yaml_node *parent = b->open[b->depth - 1];
    if ((parent->count & (parent->count - 1)) == 0) {
        const size_t room = parent->count == 0 ? 1 : 2 * parent->count;
        lee_yaml_node **grown =
            realloc(parent->child, room * sizeof(lee_yaml_node *));
        if (grown == NULL) {
            return false;
        }
        parent->child = grown;
    }
    parent->child[parent->count++] = node;
    return true;
}

/* A new node at `mark`, attached to the tree, with the key that waits. */
static lee_status add_node(builder *b, lee_yaml_kind kind, yaml_mark_t mark,
                           lee_yaml_node **added) {
    if (++b->nodes > MOST_NODES) {
        return refuse(b, mark, "more than 200000 values in one file");
    }
    lee_yaml_node *node = calloc(1, sizeof *node);
    if (node == NULL) {
        return no_room(b);
    }
    node->kind = kind;
    node->line = mark.line + 1;
    node->column = mark.column + 1;
    node->key = b->key;
    node->key_line = b->has_key ? b->key_mark.line + 1 : 0;
    node->key_column = b->has_key ? b->key_mark.column + 1 : 0;
    b->key = NULL;
    b->has_key = false;
    if (!attach(b, node)) {
        lee_yaml_free(node);
        return no_room(b);
    }
    *added = node;
    return LEE_OK;
}

static bool expects_key(const builder *b) {
    return b->depth > 0 && !b->has_key &&
           b->open[b->depth - 1]->kind == LEE_YAML_MAPPING;
}

static lee_status take_key(builder *b, const yaml_event_t *event) {
    const char *key = (const char *)event->data.scalar.value;
    const yaml_scalar_style_t style = event->data.scalar.style;
    if (style == YAML_LITERAL_SCALAR_STYLE ||
        style == YAML_FOLDED_SCALAR_STYLE) {
        return refuse(b, event->start_mark, "a key has to be a single word");
    }
    if (key[0] == '\0') {
        return refuse(b, event->start_mark, "a key is missing before ':'");
    }
    if (strcmp(key, "<<") == 0) {
        return refuse(b, event->start_mark,
                      "merge keys ('<<') are not allowed here");
    }
    b->key = lee_text_copy(key);
    b->key_mark = event->start_mark;
    b->has_key = true;
    return b->key == NULL ? no_room(b) : LEE_OK;
}

static lee_status take_scalar(builder *b, const yaml_event_t *event) {
    if (expects_key(b)) {
        return take_key(b, event);
    }
    lee_yaml_node *node = NULL;
    const lee_status status =
        add_node(b, LEE_YAML_SCALAR, event->start_mark, &node);
    if (status != LEE_OK) {
        return status;
    }
    node->is_plain = event->data.scalar.style == YAML_PLAIN_SCALAR_STYLE;
    node->text = lee_text_copy((const char *)event->data.scalar.value);
    return node->text == NULL ? no_room(b) : LEE_OK;
}

static lee_status open_collection(builder *b, lee_yaml_kind kind,
                                  yaml_mark_t mark) {
    if (expects_key(b)) {
        return refuse(b, mark, "a key has to be a single word");
    }
    if (b->depth == DEEPEST) {
        return refuse(b, mark, "more than 32 levels inside one another");
    }
    lee_yaml_node *node = NULL;
    const lee_status status = add_node(b, kind, mark, &node);
    if (status == LEE_OK) {
        b->open[b->depth++] = node;
    }
    return status;
}

/* By key, and equal keys by their place. */
static int compare_keys(const void *left, const void *right) {
    const lee_yaml_node *const *a = left;
    const lee_yaml_node *const *b = right;
    const int order = strcmp((*a)->key, (*b)->key);
    if (order != 0) {
        return order;
    }
    if ((*a)->key_line != (*b)->key_line) {
        return (*a)->key_line < (*b)->key_line ? -1 : 1;
    }
    return (*a)->key_column < (*b)->key_column ? -1 : 1;
}

static bool is_before(const lee_yaml_node *a, const lee_yaml_node *b) {
    return a->key_line < b->key_line ||
           (a->key_line == b->key_line && a->key_column < b->key_column);
}

static lee_status refuse_repeat(const builder *b, const lee_yaml_node *first,
                                const lee_yaml_node *again) {
    char shown[LEE_SHOWN];
    lee_text_show(strlen(again->key), again->key, shown);
    return lee_fail(b->error, LEE_ERR_FORMAT,
                    "%s:%zu:%zu: key '%s' is given twice (first on line %zu)",
                    b->path, again->key_line, again->key_column, shown,
                    first->key_line);
}

/* Sorting keeps this cheap for a file of nothing but keys. */
static lee_status check_repeats(const builder *b,
                                const lee_yaml_node *mapping) {
    const size_t n = mapping->count;
    if (n < 2) {
        return LEE_OK;
    }
    const lee_yaml_node **sorted = calloc(n, sizeof(lee_yaml_node *));
    if (sorted == NULL) {
        return no_room(b);
    }
    for (size_t i = 0; i < n; i++) {
        sorted[i] = mapping->child[i];
    }
    qsort(sorted, n, sizeof(lee_yaml_node *), compare_keys);
    const lee_yaml_node *first = NULL;
    const lee_yaml_node *again = NULL;
    for (size_t i = 1; i < n; i++) {
        if (strcmp(sorted[i - 1]->key, sorted[i]->key) == 0 &&
            (again == NULL || is_before(sorted[i], again))) {
            first = sorted[i - 1];
            again = sorted[i];
        }
    }
    free(sorted);
    return again == NULL ? LEE_OK : refuse_repeat(b, first, again);
}

static lee_status close_collection(builder *b) {
    const lee_yaml_node *closed = b->open[--b->depth];
    return closed->kind == LEE_YAML_MAPPING ? check_repeats(b, closed) : LEE_OK;
}

static lee_status open_document(builder *b, const yaml_event_t *event) {
    if (b->root != NULL) {
        return refuse(b, event->start_mark,
                      "a second document begins; expected one");
    }
    return LEE_OK;
}

/* Anchors and tags would let a file mean more than it shows. */
static lee_status check_plainness(const builder *b, const yaml_event_t *event,
                                  const yaml_char_t *anchor,
                                  const yaml_char_t *tag) {
    if (anchor != NULL) {
        return refuse(b, event->start_mark,
                      "anchors ('&') are not allowed here");
    }
    if (tag != NULL) {
        return refuse(b, event->start_mark, "tags ('!') are not allowed here");
    }
    return LEE_OK;
}

static lee_status check_event(const builder *b, const yaml_event_t *event) {
    if (event->type == YAML_SCALAR_EVENT) {
        return check_plainness(b, event, event->data.scalar.anchor,
                               event->data.scalar.tag);
    }
    if (event->type == YAML_SEQUENCE_START_EVENT) {
        return check_plainness(b, event, event->data.sequence_start.anchor,
                               event->data.sequence_start.tag);
    }
    if (event->type == YAML_MAPPING_START_EVENT) {
        return check_plainness(b, event, event->data.mapping_start.anchor,
                               event->data.mapping_start.tag);
    }
    return LEE_OK;
}

static lee_status take_event(builder *b, const yaml_event_t *event) {
    const lee_status status = check_event(b, event);
    if (status != LEE_OK) {
        return status;
    }
    switch (event->type) {
    case YAML_ALIAS_EVENT:
        return refuse(b, event->start_mark,
                      "aliases ('*') are not allowed here");
    case YAML_SCALAR_EVENT:
        return take_scalar(b, event);
    case YAML_SEQUENCE_START_EVENT:
        return open_collection(b, LEE_YAML_LIST, event->start_mark);
    case YAML_MAPPING_START_EVENT:
        return open_collection(b, LEE_YAML_MAPPING, event->start_mark);
    case YAML_SEQUENCE_END_EVENT:
    case YAML_MAPPING_END_EVENT:
        return close_collection(b);
    case YAML_DOCUMENT_START_EVENT:
        return open_document(b, event);
    case YAML_STREAM_END_EVENT:
        b->has_ended = true;
        return LEE_OK;
    case YAML_NO_EVENT:
    case YAML_STREAM_START_EVENT:
    case YAML_DOCUMENT_END_EVENT:
        return LEE_OK;
    }
    return LEE_OK;
}

/* libyaml gives bad bytes an offset only: finds their line and column,
 * counting characters, not bytes. */
static yaml_mark_t mark_of_byte(size_t length, const char bytes[],
                                size_t offset) {
    yaml_mark_t mark = {0};
    for (size_t i = 0; i < offset && i < length; i++) {
        const unsigned char byte = (unsigned char)bytes[i];
        if (byte == '\n') {
            mark.line++;
            mark.column = 0;
        } else if ((byte & 0xC0U) != 0x80U) {
            mark.column++;
        }
    }
    return mark;
}

static lee_status explain(const builder *b, size_t length, const char bytes[]) {
    const yaml_parser_t *p = &b->parser;
    if (p->error == YAML_MEMORY_ERROR) {
        return no_room(b);
    }
    if (p->error == YAML_READER_ERROR) {
        return refuse(b, mark_of_byte(length, bytes, p->problem_offset),
                      p->problem);
    }
    if (p->context == NULL) {
        return refuse(b, p->problem_mark, p->problem);
    }
    return lee_fail(b->error, LEE_ERR_FORMAT,
                    "%s:%zu:%zu: %s (%s that began on line %zu)", b->path,
                    p->problem_mark.line + 1, p->problem_mark.column + 1,
                    p->problem, p->context, p->context_mark.line + 1);
}

static lee_status take_all(builder *b, size_t length, const char bytes[]) {
    while (!b->has_ended) {
        yaml_event_t event;
        if (yaml_parser_parse(&b->parser, &event) == 0) {
            return explain(b, length, bytes);
        }
        const lee_status status = take_event(b, &event);
        yaml_event_delete(&event);
        if (status != LEE_OK) {
            return status;
        }
    }
    if (b->root == NULL || (b->root->kind == LEE_YAML_SCALAR &&
                            b->root->is_plain && b->root->text[0] == '\0')) {
        return lee_fail(b->error, LEE_ERR_FORMAT, "%s:1:1: the file is empty",
                        b->path);
    }
    return LEE_OK;
}

static lee_status build(const char *path, size_t length, const char bytes[],
                        lee_yaml_node **root, lee_error *error) {
    builder b = {.path = path, .error = error};
    if (yaml_parser_initialize(&b.parser) == 0) {
        return no_room(&b);
    }
    yaml_parser_set_input_string(&b.parser, (const unsigned char *)bytes,
                                 length);
    const lee_status status = take_all(&b, length, bytes);
    yaml_parser_delete(&b.parser);
    free(b.key);
    if (status != LEE_OK) {
        lee_yaml_free(b.root);
        return status;
    }
    *root = b.root;
    return LEE_OK;
}

lee_status lee_yaml_read(const char *path, lee_yaml_node **root,
                         lee_error *error) {
    char *bytes = NULL;
    size_t length = 0;
    lee_status status =
        lee_whole_file_read(path, LARGEST_FILE, &bytes, &length, error);
    if (status == LEE_OK) {
        status = build(path, length, bytes, root, error);
    }
    free(bytes);
    return status;
}
