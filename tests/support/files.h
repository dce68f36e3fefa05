/* files.h - a folder of small files that a test writes and removes. */
#ifndef LEEWATER_TESTS_FILES_H
#define LEEWATER_TESTS_FILES_H

#include <stdio.h>
#include <stdlib.h>
#include <string.h>
#include <unistd.h>

#include "support/check.h"

enum { FOLDER_FILES = 16, FOLDER_PATH = 64 };

/* Lives in the directory the test runs in. {0} is no folder. */
typedef struct test_folder {
    char path[FOLDER_PATH / 2];
    size_t count;
    char file[FOLDER_FILES][FOLDER_PATH];
} test_folder;

static inline void folder_make(test_folder *in) {
    static const char head[] = "test-";
    *in = (test_folder){0};
    memcpy(in->path, head, sizeof head);
    memset(in->path + sizeof head - 1, 'X', 6);
    assert_non_null(mkdtemp(in->path));
}

/* Writes bytes[length] to a file of the folder; returns its path, which lives
 * as long as the folder. */
static inline const char *folder_write_bytes(test_folder *in, const char *name,
                                             size_t length,
                                             const char bytes[]) {
    char path[FOLDER_PATH];
    (void)snprintf(path, sizeof path, "%s/%s", in->path, name);
    size_t i = 0;
    while (i < in->count && strcmp(in->file[i], path) != 0) {
        i++;
    }
    assert_true(i < FOLDER_FILES);
    if (i == in->count) {
        memcpy(in->file[in->count++], path, sizeof path);
    }
    FILE *stream = fopen(path, "wb");
    assert_non_null(stream);
    assert_int_equal(fwrite(bytes, 1, length, stream), length);
    assert_int_equal(fclose(stream), 0);
    return in->file[i];
}

static inline const char *folder_write(test_folder *in, const char *name,
                                       const char *text) {
    return folder_write_bytes(in, name, strlen(text), text);
}

static inline void folder_remove(test_folder *in) {
    for (size_t i = 0; i < in->count; i++) {
        (void)remove(in->file[i]);
    }
    (void)rmdir(in->path);
    in->count = 0;
}

/* The folder of the test, or of the group of tests, that runs: made and removed
 * around it, and its state. */
static test_folder folder;

static inline int make_folder(void **state) {
    folder_make(&folder);
    *state = &folder;
    return 0;
}

static inline int remove_folder(void **state) {
    (void)state;
    folder_remove(&folder);
    return 0;
}

#define FOLDER_TEST(name) \
    cmocka_unit_test_setup_teardown(name, make_folder, remove_folder)

#endif
