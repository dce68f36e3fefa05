/* Only regular files are opened, and one file is known by all its names. */
#include "support/check.h"
#include "support/files.h"

#include <sys/stat.h>
#include <unistd.h>

#include "formats/regular_file.h"

static lee_status open_one(const char *path, lee_error *error) {
    int descriptor = 0;
    size_t size = 0;
    const lee_status status = lee_regular_open(path, &descriptor, &size, error);
    if (status == LEE_OK) {
        (void)close(descriptor);
    } else {
        assert_int_equal(descriptor, -1);
    }
    return status;
}

static void a_regular_file_opens_and_tells_its_size(void **state) {
    const char *path = folder_write(*state, "a.txt", "seven b");
    int descriptor = -1;
    size_t size = 0;
    assert_int_equal(lee_regular_open(path, &descriptor, &size, NULL), LEE_OK);
    assert_true(descriptor >= 0);
    assert_int_equal(close(descriptor), 0);
    assert_int_equal(size, 7);
}

static void a_directory_is_refused(void **state) {
    (void)state;
    lee_error error = {0};
    assert_int_equal(open_one(folder.path, &error), LEE_ERR_FILE);
    assert_non_null(strstr(error.message, ": is a directory; expected a file"));
}

static void a_pipe_is_refused_without_waiting(void **state) {
    const char *path = folder_write(*state, "pipe", "");
    lee_error error = {0};
    assert_int_equal(unlink(path), 0);
    assert_int_equal(mkfifo(path, 0600), 0);
    assert_int_equal(open_one(path, &error), LEE_ERR_FILE);
    assert_non_null(strstr(error.message, ": is a pipe or a device"));
}

static void a_device_is_refused(void **state) {
    (void)state;
    lee_error error = {0};
    assert_int_equal(open_one("/dev/null", &error), LEE_ERR_FILE);
    assert_string_equal(error.message,
                        "/dev/null: is a pipe or a device; expected a file");
}

static void a_missing_file_is_refused_with_the_reason(void **state) {
    (void)state;
    lee_error error = {0};
    assert_int_equal(open_one("not-there", &error), LEE_ERR_FILE);
    assert_string_equal(
        error.message,
        "not-there: cannot be opened: No such file or directory");
}

static void
a_file_is_the_same_through_links_and_roundabout_paths(void **state) {
    const char *file = folder_write(*state, "one.txt", "1");
    const char *hard = folder_write(*state, "hard.txt", "");
    const char *soft = folder_write(*state, "soft.txt", "");
    char round[2 * FOLDER_PATH];
    assert_int_equal(unlink(hard), 0);
    assert_int_equal(link(file, hard), 0);
    assert_int_equal(unlink(soft), 0);
    assert_int_equal(symlink("one.txt", soft), 0);
    (void)snprintf(round, sizeof round, "./%s/../%s", folder.path, file);
    assert_true(lee_is_same_file(file, file));
    assert_true(lee_is_same_file(file, hard));
    assert_true(lee_is_same_file(soft, hard));
    assert_true(lee_is_same_file(round, file));
}

static void two_files_of_one_content_are_not_the_same(void **state) {
    const char *one = folder_write(*state, "one.txt", "1");
    const char *other = folder_write(*state, "other.txt", "1");
    assert_false(lee_is_same_file(one, other));
}

static void a_file_that_is_not_there_is_the_same_as_none(void **state) {
    (void)state;
    assert_false(lee_is_same_file("not-there", "not-there"));
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(a_regular_file_opens_and_tells_its_size),
        cmocka_unit_test(a_directory_is_refused),
        cmocka_unit_test(a_pipe_is_refused_without_waiting),
        cmocka_unit_test(a_device_is_refused),
        cmocka_unit_test(a_missing_file_is_refused_with_the_reason),
        cmocka_unit_test(a_file_is_the_same_through_links_and_roundabout_paths),
        cmocka_unit_test(two_files_of_one_content_are_not_the_same),
        cmocka_unit_test(a_file_that_is_not_there_is_the_same_as_none),
    };
    return cmocka_run_group_tests(tests, make_folder, remove_folder);
}
