/* shortage.h - allocations that fail when a test says so.
 *
 * The program is linked with --wrap for malloc, calloc, realloc and free, so
 * that what the library allocates passes here; libyaml and jansson are led here
 * by the names that they offer for it. */
#ifndef LEEWATER_TESTS_SHORTAGE_H
#define LEEWATER_TESTS_SHORTAGE_H

#include <stdbool.h>
#include <stdlib.h>

#include <jansson.h>

#include "support/check.h"

enum { MOST_HELD = 1 << 14 };

/* What is allocated while a job runs. */
static struct {
    bool is_watching;
    size_t left;      /* allocations that still succeed */
    bool is_for_good; /* all after the first refused one fail too */
    size_t refused;
    size_t count; /* blocks held */
    void *held[MOST_HELD];
} shortage;

void *__real_malloc(size_t size);
void *__real_calloc(size_t count, size_t size);
void *__real_realloc(void *block, size_t size);
void __real_free(void *block);
void *__wrap_malloc(size_t size);
void *__wrap_calloc(size_t count, size_t size);
void *__wrap_realloc(void *block, size_t size);
void __wrap_free(void *block);
void *yaml_malloc(size_t size);
void *yaml_realloc(void *block, size_t size);
void yaml_free(void *block);

static bool is_refused(void) {
    if (!shortage.is_watching) {
        return false;
    }
    if (shortage.left > 0) {
        shortage.left--;
        return false;
    }
    shortage.refused++;
    shortage.left = shortage.is_for_good ? 0 : SIZE_MAX;
    return true;
}

static void *held(void *block) {
    if (shortage.is_watching && block != NULL) {
        assert_true(shortage.count < MOST_HELD);
        shortage.held[shortage.count++] = block;
    }
    return block;
}

/* A block that came from elsewhere, as realpath's does, is none of ours. */
static void let_go(const void *block) {
    for (size_t i = shortage.count; i-- > 0;) {
        if (shortage.held[i] == block) {
            shortage.held[i] = shortage.held[--shortage.count];
            return;
        }
    }
}

void *__wrap_malloc(size_t size) {
    return is_refused() ? NULL : held(__real_malloc(size));
}

void *__wrap_calloc(size_t count, size_t size) {
    return is_refused() ? NULL : held(__real_calloc(count, size));
}

void *__wrap_realloc(void *block, size_t size) {
    if (is_refused()) {
        return NULL;
    }
    let_go(block);
    return held(__real_realloc(block, size));
}

void __wrap_free(void *block) {
    let_go(block);
    __real_free(block);
}

void *yaml_malloc(size_t size) {
    return __wrap_malloc(size > 0 ? size : 1);
}

void *yaml_realloc(void *block, size_t size) {
    return __wrap_realloc(block, size > 0 ? size : 1);
}

void yaml_free(void *block) {
    __wrap_free(block);
}

/* From now on `left` allocations succeed, then one or all that follow fail. */
static void shortage_begin(size_t left, bool is_for_good) {
    json_set_alloc_funcs(__wrap_malloc, __wrap_free);
    shortage.is_watching = true;
    shortage.left = left;
    shortage.is_for_good = is_for_good;
    shortage.refused = 0;
    shortage.count = 0;
}

/* How many allocations failed. */
static size_t shortage_end(void) {
    shortage.is_watching = false;
    return shortage.refused;
}

#endif
