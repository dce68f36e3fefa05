/* Work done apart gives its result, its error, or one message: never an end
 * of this process. */
#include "support/check.h"

#include <signal.h>
#include <stdbool.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>
#include <unistd.h>

#include "support/files.h"

#include "formats/apart.h"

static const lee_apart_limits limits = {
    .processor_seconds = 20, .seconds = 60, .mebibytes = 4096};

static lee_status bring(const void *subject, lee_parcel *found,
                        lee_error *error) {
    return lee_parcel_add(found, subject, strlen(subject), error);
}

static lee_status bring_much(const void *subject, lee_parcel *found,
                             lee_error *error) {
    lee_status status = LEE_OK;
    (void)subject;
    for (int i = 0; i < 1000000 && status == LEE_OK; i++) {
        status = lee_parcel_add(found, &i, sizeof i, error);
    }
    return status;
}

static lee_status refuse(const void *subject, lee_parcel *found,
                         lee_error *error) {
    (void)found;
    return lee_fail(error, LEE_ERR_DATA, "%s: holds nothing",
                    (const char *)subject);
}

static lee_status crash(const void *subject, lee_parcel *found,
                        lee_error *error) {
    (void)found;
    (void)error;
    (void)raise(*(const int *)subject);
    return LEE_OK;
}

static lee_status end(const void *subject, lee_parcel *found,
                      lee_error *error) {
    (void)found;
    (void)error;
    _exit(*(const int *)subject);
}

static lee_status spin(const void *subject, lee_parcel *found,
                       lee_error *error) {
    volatile bool is_endless = true;
    (void)subject;
    (void)found;
    (void)error;
    while (is_endless) {
    }
    return LEE_OK;
}

static lee_status sleep_long(const void *subject, lee_parcel *found,
                             lee_error *error) {
    (void)subject;
    (void)found;
    (void)error;
    (void)sleep(100);
    return LEE_OK;
}

/* Long enough for a limit of a second, and over by itself. */
static lee_status sleep_briefly(const void *subject, lee_parcel *found,
                                lee_error *error) {
    (void)subject;
    (void)found;
    (void)error;
    (void)sleep(3);
    return LEE_OK;
}

static void assert_told(const lee_apart_limits *within, lee_apart_work *work,
                        const void *subject, lee_status status,
                        const char *message) {
    lee_parcel found = {0};
    lee_error error = {0};
    assert_int_equal(lee_apart("a.nc", within, work, subject, &found, &error),
                     status);
    assert_string_equal(error.message, message);
    assert_null(found.bytes);
    assert_int_equal(found.length, 0);
}

static void a_result_comes_back(void **state) {
    (void)state;
    lee_parcel found = {0};
    assert_int_equal(lee_apart("a.nc", &limits, bring, "levels", &found, NULL),
                     LEE_OK);
    assert_int_equal(found.length, 6);
    assert_memory_equal(found.bytes, "levels", 6);
    lee_parcel_free(&found);
}

static void a_result_larger_than_a_pipe_comes_back_whole(void **state) {
    (void)state;
    lee_parcel found = {0};
    assert_int_equal(lee_apart("a.nc", &limits, bring_much, NULL, &found, NULL),
                     LEE_OK);
    assert_int_equal(found.length, 1000000 * sizeof(int));
    for (int i = 0; i < 1000000; i += 777) {
        int value = 0;
        memcpy(&value, found.bytes + (size_t)i * sizeof value, sizeof value);
        assert_int_equal(value, i);
    }
    lee_parcel_free(&found);
}

static void an_error_comes_back_as_it_was_told(void **state) {
    (void)state;
    assert_told(&limits, refuse, "b.nc", LEE_ERR_DATA, "b.nc: holds nothing");
}

static void a_crash_is_one_message(void **state) {
    (void)state;
    static const int ends[] = {SIGSEGV, SIGBUS, SIGABRT, SIGFPE, SIGILL};
    for (size_t i = 0; i < sizeof ends / sizeof ends[0]; i++) {
        assert_told(&limits, crash, &ends[i], LEE_ERR_FORMAT,
                    "a.nc: is damaged: the library that reads it broke down "
                    "over it");
    }
}

static void an_end_without_report_is_one_message(void **state) {
    (void)state;
    static const int ends[] = {0, 1, 77};
    for (size_t i = 0; i < sizeof ends / sizeof ends[0]; i++) {
        assert_told(&limits, end, &ends[i], LEE_ERR_FORMAT,
                    "a.nc: is damaged: the library that reads it broke down "
                    "over it");
    }
}

static void endless_work_is_stopped(void **state) {
    (void)state;
    const lee_apart_limits short_ones = {.processor_seconds = 1};
    assert_told(&short_ones, spin, NULL, LEE_ERR_FORMAT,
                "a.nc: is damaged, or too slow to read: nothing came of it "
                "within 1 seconds");
}

static void work_that_waits_for_ever_is_stopped(void **state) {
    (void)state;
    const lee_apart_limits short_ones = {.seconds = 1};
    assert_told(&short_ones, sleep_long, NULL, LEE_ERR_FORMAT,
                "a.nc: is damaged, or too slow to read: nothing came of it "
                "within 1 seconds");
}

static void an_interruption_is_told_as_such(void **state) {
    (void)state;
    const int interrupt = SIGINT;
    assert_told(&limits, crash, &interrupt, LEE_ERR_INTERRUPTED,
                "a.nc: reading was interrupted");
}

/* As under nohup, or in the background of a shell without job control. */
static void an_interruption_that_the_caller_ignores_is_ignored(void **state) {
    (void)state;
    static const int ends[] = {SIGINT, SIGTERM, SIGHUP};
    for (size_t i = 0; i < sizeof ends / sizeof ends[0]; i++) {
        lee_parcel found = {0};
        void (*const before)(int) = signal(ends[i], SIG_IGN);
        const lee_status status =
            lee_apart("a.nc", &limits, crash, &ends[i], &found, NULL);
        (void)signal(ends[i], before);
        assert_int_equal(status, LEE_OK);
        lee_parcel_free(&found);
    }
}

static void a_limit_holds_where_the_caller_blocks_its_signal(void **state) {
    (void)state;
    const lee_apart_limits short_ones = {.seconds = 1};
    sigset_t alarm_only;
    sigset_t before;
    (void)sigemptyset(&alarm_only);
    (void)sigaddset(&alarm_only, SIGALRM);
    assert_int_equal(sigprocmask(SIG_BLOCK, &alarm_only, &before), 0);
    assert_told(&short_ones, sleep_briefly, NULL, LEE_ERR_FORMAT,
                "a.nc: is damaged, or too slow to read: nothing came of it "
                "within 1 seconds");
    (void)sigprocmask(SIG_SETMASK, &before, NULL);
}

static void a_kill_from_outside_is_no_damage(void **state) {
    (void)state;
    const int kill_it = SIGKILL;
    assert_told(&limits, crash, &kill_it, LEE_ERR_MEMORY,
                "a.nc: reading was killed from outside, as a system short of "
                "memory does");
}

/* The pipe then takes the numbers of standard output and standard error. */
static void a_result_comes_back_where_the_streams_are_closed(void **state) {
    (void)state;
    lee_parcel found = {0};
    (void)fflush(NULL);
    const int output = dup(STDOUT_FILENO);
    const int errors = dup(STDERR_FILENO);
    (void)close(STDOUT_FILENO);
    (void)close(STDERR_FILENO);
    const lee_status status =
        lee_apart("a.nc", &limits, bring, "levels", &found, NULL);
    (void)dup2(output, STDOUT_FILENO);
    (void)dup2(errors, STDERR_FILENO);
    (void)close(output);
    (void)close(errors);
    assert_int_equal(status, LEE_OK);
    assert_int_equal(found.length, 6);
    lee_parcel_free(&found);
}

static void limits_grow_with_the_file(void **state) {
    const lee_apart_limits none = lee_apart_usual_limits("no-such-file.nc");
    assert_int_equal(none.processor_seconds, 10);
    assert_true(none.seconds > none.processor_seconds);
    const char *path = folder_write(*state, "a.nc", "");
    assert_int_equal(truncate(path, 200 * 1000 * 1000), 0); /* all hole */
    const lee_apart_limits own = lee_apart_usual_limits(path);
    assert_int_equal(own.processor_seconds, 110);
    assert_int_equal(own.seconds, 660);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(a_result_comes_back),
        cmocka_unit_test(a_result_larger_than_a_pipe_comes_back_whole),
        cmocka_unit_test(an_error_comes_back_as_it_was_told),
        cmocka_unit_test(a_crash_is_one_message),
        cmocka_unit_test(an_end_without_report_is_one_message),
        cmocka_unit_test(endless_work_is_stopped),
        cmocka_unit_test(work_that_waits_for_ever_is_stopped),
        cmocka_unit_test(an_interruption_is_told_as_such),
        cmocka_unit_test(an_interruption_that_the_caller_ignores_is_ignored),
        cmocka_unit_test(a_limit_holds_where_the_caller_blocks_its_signal),
        cmocka_unit_test(a_kill_from_outside_is_no_damage),
        cmocka_unit_test(a_result_comes_back_where_the_streams_are_closed),
        FOLDER_TEST(limits_grow_with_the_file),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
