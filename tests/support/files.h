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

static inline void folder_make(test_folder *folder) {
    static const char head[] = "test-";
    *folder = (test_folder){0};
    memcpy(folder->path, head, sizeof head);
    memset(folder->path + sizeof head - 1, 'X', 6);
    assert_non_null(mkdtemp(folder->path));
}

/* Writes bytes[length] to a file of the folder; returns its path, which lives
 * as long as the folder. */
static inline const char *folder_write_bytes(test_folder *folder,
                                             const char *name, size_t length,
                                             const char bytes[]) {
    char path[FOLDER_PATH];
    (void)snprintf(path, sizeof path, "%s/%s", folder->path, name);
    size_t i = 0;
    while (i < folder->count && strcmp(folder->file[i], path) != 0) {
        i++;
    }
    assert_true(i < FOLDER_FILES);
    if (i == folder->count) {
        memcpy(folder->file[folder->count++], path, sizeof path);
    }
    FILE *stream = fopen(path, "wb");
    assert_non_null(stream);
    assert_int_equal(fwrite(bytes, 1, length, stream), length);
    assert_int_equal(fclose(stream), 0);
    return folder->file[i];
}

static inline const char *folder_write(test_folder *folder, const char *name,
                                       const char *text) {
    return folder_write_bytes(folder, name, strlen(text), text);
}

static inline void folder_remove(test_folder *folder) {
    for (size_t i = 0; i < folder->count; i++) {
        (void)remove(folder->file[i]);
    }
    (void)rmdir(folder->path);
    folder->count = 0;
}

#endif
