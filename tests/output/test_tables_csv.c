/* CSV files say what they hold, quote what must be quoted, and appear whole
 * or not at all. */
#include "support/captured.h"
#include "support/results.h"

#include <unistd.h>

/* A directory of its own for each test; the file in it. */
typedef struct place {
    char folder[64];
    char file[96];
} place;

static void place_open(place *here) {
    static const char head[] = "test-csv-";
    memcpy(here->folder, head, sizeof head);
    memset(here->folder + sizeof head - 1, 'X', 6);
    here->folder[sizeof head + 5] = '\0';
    assert_non_null(mkdtemp(here->folder));
    (void)snprintf(here->file, sizeof here->file, "%s/levels.csv",
                   here->folder);
}

static void place_close(const place *here) {
    (void)unlink(here->file);
    assert_int_equal(rmdir(here->folder), 0); /* nothing else is left in it */
}

static void read_back(const place *here, size_t size, char text[]) {
    FILE *file = fopen(here->file, "r");
    assert_non_null(file);
    const size_t n = fread(text, 1, size - 1, file);
    text[n] = '\0';
    (void)fclose(file);
}

static const char *body_of(const char *text) {
    while (*text == '#') {
        text = strchr(text, '\n') + 1;
    }
    return text;
}

static void write_run(const place *here, const hand_made *made, bool wind) {
    lee_error error = {0};
    if (lee_write_run(&(lee_target){.path = here->file, .with_wind = wind},
                      &made->from, &made->run, &error) != LEE_OK) {
        fail_msg("%s", error.message);
    }
}

static void the_head_says_case_datum_method_and_caution(void **state) {
    (void)state;
    hand_made made;
    place here;
    char text[8192];
    make(&made);
    place_open(&here);
    write_run(&here, &made, false);
    read_back(&here, sizeof text, text);
    place_close(&here);
    assert_contains(text, "# leewater ");
    assert_contains(text, "\n# case: marrow.yaml\n");
    assert_contains(text, "\n# levels above: Marrow gauge zero\n");
    assert_contains(text, "\n# drag: garratt-linear-1977\n");
    assert_contains(text, "\n# correction: height x 1.0940, neutral log");
    assert_contains(text, "\n# caution: Planning estimates. ");
}

/* The second station is dry at the last time, the first time is spin-up. */
static void
the_head_says_whom_the_case_is_about_and_what_is_not_used(void **state) {
    (void)state;
    hand_made made;
    place here;
    char text[8192];
    char office[] = "Marrow harbour office";
    char ice[] = "ice of the record";
    char *not_used[] = {ice};
    make(&made);
    made.from.institution = office;
    made.run.method.not_used = (lee_notes){.n = 1, .text = not_used};
    place_open(&here);
    write_run(&here, &made, false);
    read_back(&here, sizeof text, text);
    assert_non_null(strstr(text, "# institution: Marrow harbour office\n"));
    assert_null(strstr(text, "# license"));
    assert_non_null(strstr(text, "# read, not used: ice of the record\n"));
    place_close(&here);
}

static void a_series_has_a_column_a_station_and_dry_is_empty(void **state) {
    (void)state;
    hand_made made;
    place here;
    char text[8192];
    make(&made);
    place_open(&here);
    write_run(&here, &made, false);
    read_back(&here, sizeof text, text);
    place_close(&here);
    assert_string_equal(body_of(text),
                        "time,spin-up,North quay [m],Lee landing [m]\n"
                        "2031-01-14T00:00:00Z,1,101.0000,101.7000\n"
                        "2031-01-14T00:10:00Z,0,101.1000,101.6000\n"
                        "2031-01-14T00:20:00Z,0,101.2000,\n");
}

static void low_and_high_stand_beside_a_level_when_kept(void **state) {
    (void)state;
    hand_made made;
    place here;
    char text[8192];
    make(&made);
    made.series[0].low = made.low;
    made.series[0].high = made.high;
    place_open(&here);
    write_run(&here, &made, false);
    read_back(&here, sizeof text, text);
    place_close(&here);
    assert_contains(text,
                    "time,spin-up,North quay [m],North quay_low [m],North "
                    "quay_high [m],Lee landing [m]\n");
    assert_contains(text, "00:10:00Z,0,101.1000,101.0500,101.1500,101.6000\n");
}

static void the_wind_stands_in_front_on_request(void **state) {
    (void)state;
    hand_made made;
    place here;
    char text[8192];
    make(&made);
    made.wind_from[0] = degrees(-90.0);
    place_open(&here);
    write_run(&here, &made, true);
    read_back(&here, sizeof text, text);
    place_close(&here);
    assert_contains(text, "time,spin-up,wind 10 m over water [m s-1],wind from "
                          "[degree],North quay [m]");
    assert_contains(text, "00:00:00Z,1,20.000,270.0,101.0000");
    assert_contains(text, "00:10:00Z,0,21.000,241.0,101.1000");
}

static void a_name_with_commas_and_quotes_is_quoted(void **state) {
    (void)state;
    hand_made made;
    place here;
    char text[8192];
    make(&made);
    (void)word(&made, 0, "Quay, \"old\"");
    place_open(&here);
    write_run(&here, &made, false);
    read_back(&here, sizeof text, text);
    place_close(&here);
    assert_contains(text,
                    "time,spin-up,\"Quay, \"\"old\"\" [m]\",Lee landing [m]\n");
}

static void a_title_of_two_lines_stays_in_its_head_line(void **state) {
    (void)state;
    hand_made made;
    place here;
    char text[8192];
    make(&made);
    (void)word(&made, 3, "January\x1Fgale");
    place_open(&here);
    write_run(&here, &made, false);
    read_back(&here, sizeof text, text);
    place_close(&here);
    assert_contains(text, "\n# title: January gale\n");
}

static void a_steady_table_has_a_row_a_wind(void **state) {
    (void)state;
    hand_made made;
    place here;
    char text[8192];
    make(&made);
    place_open(&here);
    assert_int_equal(lee_write_steady(&(lee_target){.path = here.file},
                                      &made.from, &made.steady, NULL),
                     LEE_OK);
    read_back(&here, sizeof text, text);
    place_close(&here);
    assert_contains(text, "\nwind [m s-1],wind from [degree],");
    assert_contains(text, ",North quay [m],North quay_low [m],");
    assert_contains(text, "\n22.000,240.00,24.070,0.002360,1.67500,0.9800,"
                          "0.4120,0.3100,0.5500,12000.0,"
                          "-0.4300,-0.6000,-0.3200,0.0,"
                          "0.8420,0.6300,1.1500,0.0210,0.0,"
                          "100.9500,100.8000,101.0500,"
                          "101.7550,101.6500,101.8900,range,no,\n");
    assert_contains(text, ",Lee landing above 101.8 m,Lee landing below 100.9 "
                          "m,warnings\n");
}

static void a_steady_row_carries_the_warnings_of_its_wind(void **state) {
    (void)state;
    hand_made made;
    place here;
    char text[8192];
    make(&made);
    lee_notes *notes = &made.wind[0].warnings;
    assert_int_equal(lee_notes_add(notes, NULL, "12 m fall dry"), LEE_OK);
    assert_int_equal(lee_notes_add(notes, NULL, "a \"sill\", told"), LEE_OK);
    place_open(&here);
    assert_int_equal(lee_write_steady(&(lee_target){.path = here.file},
                                      &made.from, &made.steady, NULL),
                     LEE_OK);
    read_back(&here, sizeof text, text);
    place_close(&here);
    lee_notes_free(notes);
    assert_contains(text,
                    ",range,no,\"12 m fall dry; a \"\"sill\"\", told\"\n");
}

static void a_file_that_exists_is_kept_unless_forced(void **state) {
    (void)state;
    hand_made made;
    place here;
    char text[8192];
    lee_error error = {0};
    make(&made);
    place_open(&here);
    FILE *old = fopen(here.file, "w");
    assert_non_null(old);
    (void)fputs("old", old);
    (void)fclose(old);
    assert_int_equal(lee_write_steady(&(lee_target){.path = here.file},
                                      &made.from, &made.steady, &error),
                     LEE_ERR_FILE);
    read_back(&here, sizeof text, text);
    assert_string_equal(text, "old");
    assert_int_equal(
        lee_write_steady(&(lee_target){.path = here.file, .force = true},
                         &made.from, &made.steady, &error),
        LEE_OK);
    read_back(&here, sizeof text, text);
    place_close(&here);
    assert_contains(text, "# leewater ");
}

static void another_ending_than_csv_or_nc_is_refused(void **state) {
    (void)state;
    hand_made made;
    lee_error error = {0};
    make(&made);
    assert_int_equal(lee_write_run(&(lee_target){.path = "levels.txt"},
                                   &made.from, &made.run, &error),
                     LEE_ERR_ARGUMENT);
    assert_string_equal(
        error.message,
        "levels.txt: results are written as .csv or .nc; name the file so");
}

static void asking_for_a_target_leaves_nothing(void **state) {
    (void)state;
    hand_made made;
    place here;
    make(&made);
    place_open(&here);
    assert_int_equal(
        lee_check_target(&(lee_target){.path = here.file}, &made.from, NULL),
        LEE_OK);
    assert_int_equal(access(here.file, F_OK), -1);
    place_close(&here);
}

static void a_target_in_no_folder_is_refused_ahead(void **state) {
    (void)state;
    hand_made made;
    make(&made);
    assert_int_equal(
        lee_check_target(&(lee_target){.path = "/nowhere/at/all.csv"},
                         &made.from, NULL),
        LEE_ERR_FILE);
}

static void a_file_the_case_reads_is_no_target_even_forced(void **state) {
    (void)state;
    hand_made made;
    place here;
    lee_error error = {0};
    make(&made);
    place_open(&here);
    write_run(&here, &made, false);
    char *inputs[] = {here.file};
    made.from.inputs = (lee_notes){.n = 1, .text = inputs};
    assert_int_equal(
        lee_write_run(&(lee_target){.path = here.file, .force = true},
                      &made.from, &made.run, &error),
        LEE_ERR_FILE);
    assert_non_null(strstr(error.message, ": is read by this case; name "));
    assert_int_equal(
        lee_write_steady(&(lee_target){.path = here.file, .force = true},
                         &made.from, &made.steady, NULL),
        LEE_ERR_FILE);
    place_close(&here);
}

static void another_name_of_a_file_the_case_reads_is_no_target(void **state) {
    (void)state;
    hand_made made;
    place here;
    char other[112];
    lee_error error = {0};
    make(&made);
    place_open(&here);
    write_run(&here, &made, false);
    (void)snprintf(other, sizeof other, "%s/other.csv", here.folder);
    assert_int_equal(link(here.file, other), 0);
    char *inputs[] = {here.file};
    made.from.inputs = (lee_notes){.n = 1, .text = inputs};
    const lee_status status = lee_check_target(
        &(lee_target){.path = other, .force = true}, &made.from, &error);
    (void)unlink(other);
    assert_int_equal(status, LEE_ERR_FILE);
    assert_non_null(strstr(error.message, "/other.csv: is the same file as "));
    assert_non_null(strstr(error.message, here.file));
    place_close(&here);
}

static void an_ending_alone_is_no_name(void **state) {
    (void)state;
    hand_made made;
    make(&made);
    assert_int_equal(
        lee_check_target(&(lee_target){.path = ".csv"}, &made.from, NULL),
        LEE_ERR_ARGUMENT);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(the_head_says_case_datum_method_and_caution),
        cmocka_unit_test(
            the_head_says_whom_the_case_is_about_and_what_is_not_used),
        cmocka_unit_test(a_series_has_a_column_a_station_and_dry_is_empty),
        cmocka_unit_test(low_and_high_stand_beside_a_level_when_kept),
        cmocka_unit_test(the_wind_stands_in_front_on_request),
        cmocka_unit_test(a_name_with_commas_and_quotes_is_quoted),
        cmocka_unit_test(a_title_of_two_lines_stays_in_its_head_line),
        cmocka_unit_test(a_steady_table_has_a_row_a_wind),
        cmocka_unit_test(a_steady_row_carries_the_warnings_of_its_wind),
        cmocka_unit_test(a_file_that_exists_is_kept_unless_forced),
        cmocka_unit_test(another_ending_than_csv_or_nc_is_refused),
        cmocka_unit_test(asking_for_a_target_leaves_nothing),
        cmocka_unit_test(a_target_in_no_folder_is_refused_ahead),
        cmocka_unit_test(a_file_the_case_reads_is_no_target_even_forced),
        cmocka_unit_test(another_name_of_a_file_the_case_reads_is_no_target),
        cmocka_unit_test(an_ending_alone_is_no_name),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
