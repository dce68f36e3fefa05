/* A record may be one file or a list of files. */
#include "support/case_text.h"

#define HEAD "time,speed [m/s],from [degree]\n"

static void write_files(void **state) {
    (void)folder_write(*state, "a.csv",
                       HEAD "2031-01-01T00:00Z,4,10\n"
                            "2031-01-01T01:00Z,,\n");
    (void)folder_write(*state, "b.csv",
                       HEAD "2031-01-01T01:00Z,5,20\n"
                            "2031-01-01T02:00Z,6,30\n");
}

static void a_list_of_one_file_is_that_file(void **state) {
    write_files(state);
    lee_case c = read_case(state, LAKE "wind: {record: [b.csv]}\n");
    assert_int_equal(c.problem.wind.record_count, 1);
    assert_int_equal(c.problem.wind.record.n, 2);
    lee_case_free(&c);
}

/* Three hours, of which one stands in both files and has no wind in one. */
static void files_are_joined_whatever_their_order(void **state) {
    write_files(state);
    lee_case c = read_case(state, LAKE "wind: {record: [b.csv, a.csv]}\n");
    const lee_wind_source *wind = &c.problem.wind;
    assert_int_equal(wind->kind, LEE_WIND_RECORD);
    assert_int_equal(wind->record.n, 3);
    assert_int_equal(wind->record.merged, 1);
    assert_int_equal(wind->record.completed, 1);
    assert_near(hypot(wind->record.east[1], wind->record.north[1]), 5.0, 1e-12);
    lee_case_free(&c);
}

static void every_file_is_kept_by_its_path_in_the_order_named(void **state) {
    write_files(state);
    lee_case c = read_case(state, LAKE "wind: {record: [b.csv, a.csv]}\n");
    const lee_wind_source *wind = &c.problem.wind;
    assert_int_equal(wind->record_count, 2);
    assert_string_equal(strrchr(wind->record_path[0], '/'), "/b.csv");
    assert_string_equal(strrchr(wind->record_path[1], '/'), "/a.csv");
    lee_case_free(&c);
}

static void what_a_join_remarks_belongs_to_the_case(void **state) {
    write_files(state);
    (void)folder_write(*state, "c.csv",
                       "time,speed [m/s],from [degree],ice\n"
                       "2031-01-01T03:00Z,5,20,0.5\n");
    lee_case c = read_case(state, LAKE "wind: {record: [b.csv, c.csv], "
                                       "ice: ice}\n");
    assert_int_equal(c.notes.n, 1);
    assert_string_equal(c.notes.text[0],
                        "ice: in 1 of the 2 files there is none, the first "
                        "of them b.csv; it is missing there");
    assert_near(c.problem.wind.record.ice[2], 0.5, 0.0);
    lee_case_free(&c);
    assert_told(state, LAKE "wind: {record: [a.csv, b.csv], ice: frost}\n",
                "a.yaml:4:16: 'wind.record' names 2 files, and none of them "
                "has the column 'frost'");
}

static void files_that_differ_are_refused(void **state) {
    write_files(state);
    (void)folder_write(*state, "c.csv",
                       HEAD "2031-01-01T02:00Z,6.1,30\n"
                            "2031-01-01T03:00Z,6,30\n");
    assert_told_as(state, LAKE "wind: {record: [b.csv, c.csv]}\n", LEE_ERR_DATA,
                   "b.csv and c.csv both have a sample at "
                   "2031-01-01T02:00:00Z, with different wind (named at "
                   "a.yaml:4:16)");
}

static void each_file_that_cannot_be_read_is_told_at_its_place(void **state) {
    write_files(state);
    assert_told_as(
        state, LAKE "wind: {record: [x.csv, b.csv, y.nc]}\n", LEE_ERR_FILE,
        "x.csv: cannot be opened: No such file or directory (named at "
        "a.yaml:4:17)\n"
        "y.nc: cannot be opened: No such file or directory (named at "
        "a.yaml:4:31)");
}

static void a_list_of_files_is_neither_empty_nor_repeats_one(void **state) {
    assert_told(state, LAKE "wind: {record: []}\n",
                "a.yaml:4:16: 'wind.record' is an empty list; expected a file "
                "or a list of files");
    assert_told(state, LAKE "wind: {record: [a.csv, b.csv, a.csv]}\n",
                "a.yaml:4:16: 'wind.record' names 'a.csv' twice");
}

int main(void) {
    const struct CMUnitTest tests[] = {
        CASE_TEST(a_list_of_one_file_is_that_file),
        CASE_TEST(files_are_joined_whatever_their_order),
        CASE_TEST(every_file_is_kept_by_its_path_in_the_order_named),
        CASE_TEST(what_a_join_remarks_belongs_to_the_case),
        CASE_TEST(files_that_differ_are_refused),
        CASE_TEST(each_file_that_cannot_be_read_is_told_at_its_place),
        CASE_TEST(a_list_of_files_is_neither_empty_nor_repeats_one),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
