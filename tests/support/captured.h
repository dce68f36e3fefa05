/* captured.h - what a function prints, as a string. */
#ifndef LEEWATER_TESTS_CAPTURED_H
#define LEEWATER_TESTS_CAPTURED_H

#include "support/check.h"

#include <stdio.h>
#include <stdlib.h>
#include <string.h>

typedef struct captured {
    FILE *stream; /* print here */
    char *text;   /* valid after capture_end */
    size_t length;
} captured;

static inline void capture_begin(captured *into) {
    *into = (captured){0};
    into->stream = open_memstream(&into->text, &into->length);
    assert_non_null(into->stream);
}

static inline const char *capture_end(captured *into) {
    assert_int_equal(fclose(into->stream), 0);
    return into->text;
}

static inline void capture_free(captured *into) {
    free(into->text);
}

#define assert_contains(text, part) \
    check_contains((text), (part), __FILE__, __LINE__)
#define assert_lacks(text, part) check_lacks((text), (part), __FILE__, __LINE__)

static inline void check_contains(const char *text, const char *part,
                                  const char *file, int line) {
    if (strstr(text, part) == NULL) {
        print_error("'%s' is not in:\n%s\n", part, text);
        _fail(file, line);
    }
}

static inline void check_lacks(const char *text, const char *part,
                               const char *file, int line) {
    if (strstr(text, part) != NULL) {
        print_error("'%s' is in:\n%s\n", part, text);
        _fail(file, line);
    }
}

#endif
