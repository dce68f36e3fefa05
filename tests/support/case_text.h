/* case_text.h - reading a case that stands as text in a test. */
#ifndef LEEWATER_TESTS_CASE_TEXT_H
#define LEEWATER_TESTS_CASE_TEXT_H

#include "support/files.h"

#include "leewater/case.h"

/* Three lines that every small case begins with: 12 km, 4 m deep, level
 * 100 m. */
#define LAKE                                                             \
    "lake:\n"                                                            \
    "  still_water: 100 m\n"                                             \
    "  axis: {bearing: 65 degree, uniform: {length: 12 km, depth: 4 m, " \
    "width: 1 km}}\n"

#define CASE_TEST(name) FOLDER_TEST(name)

/* The case in `text`, which has to be in order. Free with lee_case_free. */
static inline lee_case read_case(void **state, const char *text) {
    lee_case read = {0};
    lee_error error = {0};
    const char *path = folder_write(*state, "a.yaml", text);
    if (lee_case_read(path, &read, &error) != LEE_OK) {
        print_error("%s\n", error.message);
        fail();
    }
    return read;
}

/* Takes "FOLDER/" out of a message wherever it stands. */
static inline void hide_folder(const test_folder *in, char message[]) {
    const size_t length = strlen(in->path) + 1;
    char *found;
    while ((found = strstr(message, in->path)) != NULL) {
        memmove(found, found + length, strlen(found + length) + 1);
    }
}

/* The case is refused with this status and message; nothing is handed out. */
static inline void assert_told_as(void **state, const char *text,
                                  lee_status expected_status,
                                  const char *expected) {
    lee_case read = {0};
    lee_error error = {0};
    const char *path = folder_write(*state, "a.yaml", text);
    const lee_status status = lee_case_read(path, &read, &error);
    hide_folder(*state, error.message);
    assert_string_equal(error.message, expected);
    assert_int_equal(status, expected_status);
    assert_null(read.path);
}

static inline void assert_told(void **state, const char *text,
                               const char *expected) {
    assert_told_as(state, text, LEE_ERR_FORMAT, expected);
}

/* Something wrong in a case, and what the user reads. */
typedef struct case_slip {
    const char *text;
    const char *message;
} case_slip;

/* A row of slips: a call, whose layout the formatter leaves alone. */
#define SLIP(text, message) \
    { (text), (message) }

#define assert_all_told(state, slips) \
    tell_all((state), sizeof(slips) / sizeof(slips)[0], (slips))

static inline void tell_all(void **state, size_t count,
                            const case_slip slips[]) {
    for (size_t i = 0; i < count; i++) {
        assert_told(state, slips[i].text, slips[i].message);
    }
}

#endif
