/* Errors and notes say what they were told, once. */
#include "support/check.h"

#include "leewater/status.h"

static void a_failure_keeps_its_status_and_message(void **state) {
    (void)state;
    lee_error error = {0};
    assert_int_equal(lee_fail(&error, LEE_ERR_DATA, "%d gaps", 3),
                     LEE_ERR_DATA);
    assert_int_equal(error.status, LEE_ERR_DATA);
    assert_string_equal(error.message, "3 gaps");
}

static void a_failure_without_a_listener_returns_its_status(void **state) {
    (void)state;
    assert_int_equal(lee_fail(NULL, LEE_ERR_FILE, "unheard"), LEE_ERR_FILE);
}

static void a_context_stands_in_front_of_the_message(void **state) {
    (void)state;
    lee_error error = {0};
    lee_fail(&error, LEE_ERR_FORMAT, "not a number");
    lee_context(&error, "%s:%d: ", "wind.csv", 42);
    assert_string_equal(error.message, "wind.csv:42: not a number");
}

static void a_context_without_a_failure_adds_nothing(void **state) {
    (void)state;
    lee_error error = {0};
    lee_context(&error, "wind.csv: ");
    assert_string_equal(error.message, "");
}

static void a_note_told_twice_is_kept_once(void **state) {
    (void)state;
    lee_notes notes = {0};
    assert_int_equal(lee_notes_add(&notes, NULL, "%d gaps", 2), LEE_OK);
    assert_int_equal(lee_notes_add(&notes, NULL, "2 gaps"), LEE_OK);
    assert_int_equal(lee_notes_add(&notes, NULL, "3 gaps"), LEE_OK);
    assert_int_equal(notes.n, 2);
    assert_string_equal(notes.text[1], "3 gaps");
    lee_notes_free(&notes);
    assert_int_equal(notes.n, 0);
}

static void an_interruption_exits_as_a_shell_expects(void **state) {
    (void)state;
    assert_int_equal(lee_status_exit_code(LEE_OK), 0);
    assert_int_equal(lee_status_exit_code(LEE_ERR_ARGUMENT), 2);
    assert_int_equal(lee_status_exit_code(LEE_ERR_INTERRUPTED), 130);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(a_failure_keeps_its_status_and_message),
        cmocka_unit_test(a_failure_without_a_listener_returns_its_status),
        cmocka_unit_test(a_context_stands_in_front_of_the_message),
        cmocka_unit_test(a_context_without_a_failure_adds_nothing),
        cmocka_unit_test(a_note_told_twice_is_kept_once),
        cmocka_unit_test(an_interruption_exits_as_a_shell_expects),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
