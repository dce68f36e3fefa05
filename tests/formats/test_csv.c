/* CSV is read with the liberties people take, or refused with its place. */
#include "support/check.h"
#include "support/files.h"

#include <string.h>
#include <sys/stat.h>

#include "formats/csv.h"

static lee_csv *opened(const char *text) {
    const char *path = folder_write(&folder, "good.csv", text);
    lee_csv *csv = NULL;
    lee_error error = {0};
    const lee_status status = lee_csv_open(path, &csv, &error);
    assert_string_equal(error.message, "");
    assert_int_equal(status, LEE_OK);
    return csv;
}

static const lee_csv_field *next_row(lee_csv *csv) {
    const lee_csv_field *fields = NULL;
    lee_error error = {0};
    const lee_status status = lee_csv_next(csv, &fields, &error);
    assert_string_equal(error.message, "");
    assert_int_equal(status, LEE_OK);
    return fields;
}

/* Fails unless the next row is these fields, parted by '|'. */
static void assert_row(lee_csv *csv, const char *expected) {
    const lee_csv_field *fields = next_row(csv);
    assert_non_null(fields);
    char row[512] = "";
    for (size_t i = 0; i < lee_csv_columns(csv); i++) {
        strcat(row, i == 0 ? "" : "|");
        strncat(row, fields[i].bytes, fields[i].length);
    }
    assert_string_equal(row, expected);
}

static void assert_no_row(lee_csv *csv) {
    assert_null(next_row(csv));
    lee_csv_close(csv);
}

/* Reads a file to its first failure and fails unless the message is the path
 * and `expected`. */
static void refused_bytes(size_t length, const char bytes[],
                          const char *expected) {
    const char *path = folder_write_bytes(&folder, "bad.csv", length, bytes);
    lee_csv *csv = NULL;
    lee_error error = {0};
    lee_status status = lee_csv_open(path, &csv, &error);
    const lee_csv_field *fields = NULL;
    do {
        if (status == LEE_OK) {
            status = lee_csv_next(csv, &fields, &error);
        }
    } while (status == LEE_OK && fields != NULL);
    char message[256];
    (void)snprintf(message, sizeof message, "%s%s", path, expected);
    assert_string_equal(error.message, message);
    assert_int_equal(status, LEE_ERR_FORMAT);
    assert_null(fields);
    lee_csv_close(csv);
}

static void refused(const char *text, const char *expected) {
    refused_bytes(strlen(text), text, expected);
}

static void a_header_parts_into_names_and_units(void **state) {
    (void)state;
    lee_csv *csv = opened("time,speed [knots], from[ degree ] ,flag []\n");
    assert_int_equal(lee_csv_columns(csv), 4);
    assert_string_equal(lee_csv_header_at(csv, 0)->name, "time");
    assert_null(lee_csv_header_at(csv, 0)->unit);
    assert_string_equal(lee_csv_header_at(csv, 1)->name, "speed");
    assert_string_equal(lee_csv_header_at(csv, 1)->unit, "knots");
    assert_string_equal(lee_csv_header_at(csv, 2)->name, "from");
    assert_string_equal(lee_csv_header_at(csv, 2)->unit, "degree");
    assert_null(lee_csv_header_at(csv, 3)->unit);
    assert_null(lee_csv_header_at(csv, 4));
    assert_no_row(csv);
}

static void a_file_with_only_a_header_has_no_rows(void **state) {
    (void)state;
    assert_no_row(opened("time,speed"));
}

static void rows_come_in_order_with_their_lines(void **state) {
    (void)state;
    lee_csv *csv = opened("a,b\n1,2\n\n3,4\n");
    assert_int_equal(lee_csv_line(csv), 1);
    assert_row(csv, "1|2");
    assert_int_equal(lee_csv_line(csv), 2);
    assert_row(csv, "3|4");
    assert_int_equal(lee_csv_line(csv), 4);
    assert_no_row(csv);
}

static void the_last_line_may_lack_its_end(void **state) {
    (void)state;
    lee_csv *csv = opened("a,b\n1,2");
    assert_row(csv, "1|2");
    assert_no_row(csv);
}

static void lines_may_end_as_on_windows(void **state) {
    (void)state;
    lee_csv *csv = opened("a,b\r\n1,2\r\n\"3\",\"4\"\r\n5,\r\n\r\n");
    assert_row(csv, "1|2");
    assert_row(csv, "3|4");
    assert_row(csv, "5|");
    assert_no_row(csv);
}

static void blank_lines_and_remarks_are_passed_over(void **state) {
    (void)state;
    lee_csv *csv = opened("# made by \"hand\n\n  \na,b\n# a remark\n1,2\n \t \n"
                          "#\n\n\n");
    assert_int_equal(lee_csv_line(csv), 4);
    assert_row(csv, "1|2");
    assert_int_equal(lee_csv_line(csv), 6);
    assert_no_row(csv);
}

static void blanks_around_fields_do_not_count(void **state) {
    (void)state;
    lee_csv *csv = opened(" a ,\tb\n  1\t, 2 x \n\" 3 \" ,   \n");
    assert_string_equal(lee_csv_header_at(csv, 1)->name, "b");
    assert_row(csv, "1|2 x");
    assert_row(csv, "3|");
    assert_no_row(csv);
}

static void a_byte_order_mark_is_no_part_of_a_name(void **state) {
    (void)state;
    lee_csv *csv = opened("\xEF\xBB\xBF"
                          "time,speed\n1,2\n");
    assert_string_equal(lee_csv_header_at(csv, 0)->name, "time");
    assert_row(csv, "1|2");
    assert_no_row(csv);
}

static void quotes_hold_separators_quotes_and_line_breaks(void **state) {
    (void)state;
    lee_csv *csv = opened("a,\"b, or c\"\n\"1,5\",\"say \"\"lee\"\"\"\n"
                          "\"two\nlines\",\"\"\n3,4\n");
    assert_string_equal(lee_csv_header_at(csv, 1)->name, "b, or c");
    assert_row(csv, "1,5|say \"lee\"");
    assert_row(csv, "two\nlines|");
    assert_int_equal(lee_csv_line(csv), 3);
    assert_row(csv, "3|4");
    assert_int_equal(lee_csv_line(csv), 5);
    assert_no_row(csv);
}

static void the_separator_is_the_one_the_header_has_most_of(void **state) {
    (void)state;
    lee_csv *csv = opened("a;b, c;\"d,,,,\"\n1;2;3\n");
    assert_row(csv, "1|2|3");
    assert_no_row(csv);
    csv = opened("a\tb,c\td\n1\t\t 3\n");
    assert_row(csv, "1||3");
    assert_no_row(csv);
}

static void one_column_needs_no_separator(void **state) {
    (void)state;
    lee_csv *csv = opened("level\n1.5\n2.5\n");
    assert_row(csv, "1.5");
    assert_row(csv, "2.5");
    assert_no_row(csv);
}

static char decimal_of(const char *text) {
    lee_csv *csv = opened(text);
    const char decimal = lee_csv_decimal(csv);
    lee_csv_close(csv);
    return decimal;
}

static void the_first_numbers_choose_the_decimal_sign(void **state) {
    (void)state;
    assert_int_equal(decimal_of("t;u\n2031-01-10;1,5\n"), ',');
    assert_int_equal(decimal_of("t\tu\n7\t\"1,5\"\r\n"), ',');
    assert_int_equal(decimal_of("t;u\n2031-01-10;1.5\n"), '.');
    assert_int_equal(decimal_of("t;u\n7;8\n"), '.');
    assert_int_equal(decimal_of("t;u\n06.30;1,5\n06.40;2,5\n7;3,5\n"), ',');
    assert_int_equal(decimal_of("t,u\n\"1,5\",2\n"), '.');
}

static void numbers_are_read_with_the_sign_of_the_file(void **state) {
    (void)state;
    lee_csv *csv = opened("t;u\n-1,5;2e3\n");
    const lee_csv_field *fields = next_row(csv);
    double value = 0.0;
    assert_int_equal(lee_csv_number(csv, &fields[0], &value, NULL), LEE_OK);
    assert_near(value, -1.5, 0.0);
    assert_int_equal(lee_csv_number(csv, &fields[1], &value, NULL), LEE_OK);
    assert_near(value, 2000.0, 0.0);
    lee_csv_close(csv);
}

/* Fails unless the second field of the second line is refused like this. */
static void refused_number(const char *text, const char *expected) {
    lee_csv *csv = opened(text);
    const lee_csv_field *fields = next_row(csv);
    double value = 42.0;
    lee_error error = {0};
    assert_int_equal(lee_csv_number(csv, &fields[1], &value, &error),
                     LEE_ERR_FORMAT);
    assert_near(value, 42.0, 0.0);
    char message[256];
    (void)snprintf(message, sizeof message, "%s%s", lee_csv_path(csv),
                   expected);
    assert_string_equal(error.message, message);
    lee_csv_close(csv);
}

static void what_is_no_finite_number_is_refused_with_its_place(void **state) {
    (void)state;
    refused_number("time,speed [m/s]\n2031-01-10,calm\n",
                   ":2:12: 'speed' is 'calm'; expected a number");
    refused_number("t,speed\n1,\n",
                   ":2:3: 'speed' is empty; expected a number");
    refused_number("t,speed\n1,NaN\n",
                   ":2:3: 'speed' is 'NaN'; expected a number");
    refused_number("t,speed\n1,1e999\n",
                   ":2:3: 'speed' is 1e999, too large for a number");
    refused_number("t,speed\n1,\"2,5\"\n",
                   ":2:4: 'speed' is '2,5'; expected the decimal sign '.'");
    refused_number("t;speed\n1,5;2.5\n2,5;3,5",
                   ":2:5: 'speed' is '2.5'; expected the decimal sign ','");
    refused_number("t,speed\n1,\x1B[2J\n",
                   ":2:3: 'speed' is '?[2J'; expected a number");
}

static void a_field_behind_a_line_break_has_its_own_place(void **state) {
    (void)state;
    refused_number("t,speed\n\"a\nb\nc\", x\n",
                   ":4:5: 'speed' is 'x'; expected a number");
}

static void a_row_of_another_width_is_refused(void **state) {
    (void)state;
    refused("a,b\n1,2\n1,2,3\n", ":3:1: a row of 3 fields; the header has 2");
    refused("a,b\n\n1\n", ":3:1: a row of 1 field; the header has 2");
    refused("a,b\n1,\"2\",\n", ":2:1: a row of 3 fields; the header has 2");
    refused("a\n1,2\n", ":2:1: a row of 2 fields; the header has 1");
}

static void a_quote_left_open_is_refused_where_it_opened(void **state) {
    (void)state;
    refused("a,b\n1,2\n3,\"4\n5,6\n", ":3:3: a quote that is never closed");
    refused("a,\"b\n1,2\n", ":1:3: a quote that is never closed");
    refused("a,b\n\"x\ny\",\"", ":3:4: a quote that is never closed");
    refused("a,b\n1,\"2\"\"", ":2:3: a quote that is never closed");
}

static void a_quote_out_of_place_is_refused(void **state) {
    (void)state;
    refused("a,b\n1,2\"\n",
            ":2:4: a quote inside a field that does not begin with one");
    refused("a,b\n\"1\"x,2\n", ":2:4: text behind a closing quote");
    refused("a,b\r\n\"1\"\r,2\n", ":2:4: text behind a closing quote");
}

static void a_nul_byte_is_refused_with_its_place(void **state) {
    (void)state;
    static const char bytes[] = "a,b\n1,2\n3,\0\n";
    refused_bytes(sizeof bytes - 1, bytes,
                  ":3:3: a NUL byte: this is a binary file; expected text");
}

static void utf_16_is_refused_by_its_name(void **state) {
    (void)state;
    refused("\xFF\xFE"
            "a,b\n",
            ":1:1: this is UTF-16 text; expected UTF-8");
    refused("\xFE\xFF"
            "a,b\n",
            ":1:1: this is UTF-16 text; expected UTF-8");
}

static void carriage_returns_alone_end_no_lines(void **state) {
    (void)state;
    const char *message = ":1:4: a carriage return without a line feed; "
                          "expected lines that end with LF or CR LF";
    refused("a,b\r1,2\r", message);
    refused("a,b\r\r\n1,2\r\r\n", message);
}

static void a_file_without_a_row_is_refused(void **state) {
    (void)state;
    refused("", ":1:1: the file is empty; expected a header row");
    refused("\xEF\xBB\xBF", ":1:1: the file is empty; expected a header row");
    refused("\n# only\n", ":3:1: no row at all; expected a header row");
}

static void a_file_that_begins_with_numbers_lacks_its_header(void **state) {
    (void)state;
    const char *message = ":1:1: no name in the first row; expected a header "
                          "such as time,speed [m/s]";
    refused("2031-01-10,1.5,-2\n", message);
    refused(",,\n", message);
}

static void a_name_given_twice_is_refused(void **state) {
    (void)state;
    refused("a,speed [m/s],c,Speed [knots]\n",
            ":1:17: column 'Speed' is there already, as number 2");
}

static void columns_without_a_name_may_stand_beside_each_other(void **state) {
    (void)state;
    lee_csv *csv = opened("a,,\n1,2,3\n");
    assert_row(csv, "1|2|3");
    assert_no_row(csv);
}

static void more_columns_than_anyone_has_are_refused(void **state) {
    (void)state;
    char text[4200];
    memset(text, ',', sizeof text - 1);
    text[0] = 'a';
    text[4097] = '\n';
    text[4098] = '\0';
    refused(text, ":1:1: 4097 columns; at most 4096 are read");
}

static size_t found(const lee_csv *csv, const char *name) {
    size_t column = 99;
    assert_int_equal(lee_csv_find(csv, name, &column, NULL), LEE_OK);
    return column;
}

static void a_column_is_found_by_name_and_by_number(void **state) {
    (void)state;
    lee_csv *csv = opened("time,Speed [m/s],#1,\n");
    assert_int_equal(found(csv, "time"), 0);
    assert_int_equal(found(csv, "speed"), 1);
    assert_int_equal(found(csv, "#1"), 2); /* a name goes before a number */
    assert_int_equal(found(csv, "#2"), 1);
    assert_int_equal(found(csv, "#4"), 3);
    lee_csv_close(csv);
}

static void not_found(const lee_csv *csv, const char *name,
                      const char *expected) {
    size_t column = 99;
    lee_error error = {0};
    assert_int_equal(lee_csv_find(csv, name, &column, &error), LEE_ERR_FORMAT);
    assert_int_equal(column, 99);
    char message[256];
    (void)snprintf(message, sizeof message, "%s%s", lee_csv_path(csv),
                   expected);
    assert_string_equal(error.message, message);
}

static void
a_column_that_is_not_there_is_named_beside_the_others(void **state) {
    (void)state;
    lee_csv *csv = opened("\ntime,speed,from\n");
    not_found(csv, "sped",
              ":2: no column 'sped'; did you mean 'speed'? The columns are "
              "time, speed, from");
    not_found(csv, "pressure",
              ":2: no column 'pressure'; the columns are time, speed, from");
    not_found(csv, "", ":2: no column ''; the columns are time, speed, from");
    not_found(csv, "#4", ":2: no column #4; there are 3, #1 to #3");
    not_found(csv, "#0", ":2: no column #0; there are 3, #1 to #3");
    lee_csv_close(csv);
}

static void refused_path(const char *path, const char *expected) {
    lee_csv *csv = NULL;
    lee_error error = {0};
    assert_int_equal(lee_csv_open(path, &csv, &error), LEE_ERR_FILE);
    assert_string_equal(error.message, expected);
    assert_null(csv);
}

static void what_is_no_file_is_refused(void **state) {
    (void)state;
    refused_path("no/such.csv",
                 "no/such.csv: cannot be opened: No such file or directory");
    refused_path(".", ".: is a directory; expected a file");
    refused_path("/dev/null",
                 "/dev/null: is a pipe or a device; expected a file");
}

static void a_pipe_is_refused_without_waiting_for_it(void **state) {
    (void)state;
    char path[FOLDER_PATH];
    (void)snprintf(path, sizeof path, "%s/pipe", folder.path);
    char message[2 * FOLDER_PATH];
    (void)snprintf(message, sizeof message,
                   "%s: is a pipe or a device; expected a file", path);
    assert_int_equal(mkfifo(path, 0600), 0);
    refused_path(path, message);
    (void)remove(path);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(a_header_parts_into_names_and_units),
        cmocka_unit_test(a_file_with_only_a_header_has_no_rows),
        cmocka_unit_test(rows_come_in_order_with_their_lines),
        cmocka_unit_test(the_last_line_may_lack_its_end),
        cmocka_unit_test(lines_may_end_as_on_windows),
        cmocka_unit_test(blank_lines_and_remarks_are_passed_over),
        cmocka_unit_test(blanks_around_fields_do_not_count),
        cmocka_unit_test(a_byte_order_mark_is_no_part_of_a_name),
        cmocka_unit_test(quotes_hold_separators_quotes_and_line_breaks),
        cmocka_unit_test(the_separator_is_the_one_the_header_has_most_of),
        cmocka_unit_test(one_column_needs_no_separator),
        cmocka_unit_test(the_first_numbers_choose_the_decimal_sign),
        cmocka_unit_test(numbers_are_read_with_the_sign_of_the_file),
        cmocka_unit_test(what_is_no_finite_number_is_refused_with_its_place),
        cmocka_unit_test(a_field_behind_a_line_break_has_its_own_place),
        cmocka_unit_test(a_row_of_another_width_is_refused),
        cmocka_unit_test(a_quote_left_open_is_refused_where_it_opened),
        cmocka_unit_test(a_quote_out_of_place_is_refused),
        cmocka_unit_test(a_nul_byte_is_refused_with_its_place),
        cmocka_unit_test(utf_16_is_refused_by_its_name),
        cmocka_unit_test(carriage_returns_alone_end_no_lines),
        cmocka_unit_test(a_file_without_a_row_is_refused),
        cmocka_unit_test(a_file_that_begins_with_numbers_lacks_its_header),
        cmocka_unit_test(a_name_given_twice_is_refused),
        cmocka_unit_test(columns_without_a_name_may_stand_beside_each_other),
        cmocka_unit_test(more_columns_than_anyone_has_are_refused),
        cmocka_unit_test(a_column_is_found_by_name_and_by_number),
        cmocka_unit_test(a_column_that_is_not_there_is_named_beside_the_others),
        cmocka_unit_test(what_is_no_file_is_refused),
        cmocka_unit_test(a_pipe_is_refused_without_waiting_for_it),
    };
    return cmocka_run_group_tests(tests, make_folder, remove_folder);
}
