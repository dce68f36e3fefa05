/* JSON is valid whatever is put in, and keeps the order of its keys. */
#include "support/captured.h"

#include <jansson.h>

#include "formats/json.h"

static void keys_stand_in_the_order_in_which_they_were_put(void **state) {
    (void)state;
    captured out;
    lee_json json = {0};
    capture_begin(&out);
    lee_json_open_object(&json, NULL);
    lee_json_put_text(&json, "zulu", "first");
    lee_json_put_flag(&json, "alpha", true);
    lee_json_put_count(&json, "mike", 3);
    assert_int_equal(lee_json_write(&json, out.stream, NULL), LEE_OK);
    assert_string_equal(capture_end(&out),
                        "{\n  \"zulu\": \"first\",\n  \"alpha\": true,\n"
                        "  \"mike\": 3\n}\n");
    capture_free(&out);
}

static void lists_nest_in_objects_and_objects_in_lists(void **state) {
    (void)state;
    captured out;
    lee_json json = {0};
    capture_begin(&out);
    lee_json_open_object(&json, NULL);
    lee_json_open_list(&json, "winds");
    lee_json_open_object(&json, NULL);
    lee_json_put_number(&json, "speed", 22.5);
    lee_json_close(&json);
    lee_json_close(&json);
    lee_json_put_text(&json, "last", "here");
    assert_int_equal(lee_json_write(&json, out.stream, NULL), LEE_OK);
    json_t *root = json_loads(capture_end(&out), 0, NULL);
    assert_non_null(root);
    const json_t *wind = json_array_get(json_object_get(root, "winds"), 0);
    assert_near(json_real_value(json_object_get(wind, "speed")), 22.5, 0.0);
    assert_string_equal(json_string_value(json_object_get(root, "last")),
                        "here");
    json_decref(root);
    capture_free(&out);
}

static void numbers_that_are_not_finite_become_null(void **state) {
    (void)state;
    captured out;
    lee_json json = {0};
    capture_begin(&out);
    lee_json_open_list(&json, NULL);
    lee_json_put_number(&json, NULL, (double)NAN);
    lee_json_put_number(&json, NULL, (double)INFINITY);
    lee_json_put_text(&json, NULL, NULL);
    assert_int_equal(lee_json_write(&json, out.stream, NULL), LEE_OK);
    assert_string_equal(capture_end(&out), "[\n  null,\n  null,\n  null\n]\n");
    capture_free(&out);
}

/* Latin-1 e acute between two letters, and a truncated three-byte sequence. */
static void broken_text_is_mended_with_the_replacement_character(void **state) {
    (void)state;
    captured out;
    lee_json json = {0};
    capture_begin(&out);
    lee_json_open_list(&json, NULL);
    lee_json_put_text(&json, NULL, "a\xE9z \xC3\xA9");
    lee_json_put_text(&json, NULL, "\xE2\x82");
    assert_int_equal(lee_json_write(&json, out.stream, NULL), LEE_OK);
    assert_string_equal(capture_end(&out),
                        "[\n  \"a\xEF\xBF\xBDz \xC3\xA9\",\n"
                        "  \"\xEF\xBF\xBD\xEF\xBF\xBD\"\n]\n");
    capture_free(&out);
}

static void a_full_device_is_a_file_error(void **state) {
    (void)state;
    lee_error error = {0};
    lee_json json = {0};
    FILE *full = fopen("/dev/full", "w");
    assert_non_null(full);
    setbuf(full, NULL);
    lee_json_open_object(&json, NULL);
    assert_int_equal(lee_json_write(&json, full, &error), LEE_ERR_FILE);
    assert_string_equal(error.message, "cannot write: No space left on device");
    assert_int_equal(json.depth, 0);
    (void)fclose(full);
}

static void a_document_that_was_never_begun_is_not_written(void **state) {
    (void)state;
    captured out;
    lee_json json = {0};
    capture_begin(&out);
    assert_int_equal(lee_json_write(&json, out.stream, NULL), LEE_ERR_MEMORY);
    assert_string_equal(capture_end(&out), "");
    capture_free(&out);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(keys_stand_in_the_order_in_which_they_were_put),
        cmocka_unit_test(lists_nest_in_objects_and_objects_in_lists),
        cmocka_unit_test(numbers_that_are_not_finite_become_null),
        cmocka_unit_test(broken_text_is_mended_with_the_replacement_character),
        cmocka_unit_test(a_full_device_is_a_file_error),
        cmocka_unit_test(a_document_that_was_never_begun_is_not_written),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
