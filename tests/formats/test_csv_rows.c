/* Rows are the same wherever a block of the file ends, and whatever happens
 * to the file. */
#include "support/check.h"
#include "support/dice.h"
#include "support/files.h"

#include <string.h>

#include "base/text.h"
#include "formats/csv.h"

/* Opens a file and fails unless that works. */
static lee_csv *opened(const char *path) {
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

/* Writes the row numbered `row`: five fields of lengths that change from row
 * to row, with quotes in some rows or in none. */
static void add_row(lee_text *text, int row, bool with_quotes) {
    static const char *const letters = "abcdefghijklmnopqrstuvwxyz";
    const bool is_quoted = with_quotes && row % 3 == 0;
    lee_text_add(text, "%d,%.*s,", row, row % 27, letters);
    lee_text_add(text, is_quoted ? "\"%d\n\"\"%d\"\"\"," : "%d:%d,", row,
                 7 * row);
    lee_text_add(text, "%.*s%.*s,%d%s", row % 23, letters, row % 19, letters,
                 row % 1000, row % 2 == 0 ? "\r\n" : "\n");
}

static void assert_field(const lee_csv_field *field, const char *expected) {
    assert_int_equal(field->length, strlen(expected));
    assert_memory_equal(field->bytes, expected, field->length);
}

static void assert_row(const lee_csv_field *fields, int row, bool with_quotes) {
    const bool is_quoted = with_quotes && row % 3 == 0;
    char expected[64];
    (void)snprintf(expected, sizeof expected, "%d", row);
    assert_field(&fields[0], expected);
    assert_int_equal(fields[1].length, row % 27);
    (void)snprintf(expected, sizeof expected,
                   is_quoted ? "%d\n\"%d\"" : "%d:%d", row, 7 * row);
    assert_field(&fields[2], expected);
    assert_int_equal(fields[3].length, row % 23 + row % 19);
    (void)snprintf(expected, sizeof expected, "%d", row % 1000);
    assert_field(&fields[4], expected);
}

/* Some megabytes: rows of all lengths fall on the ends of blocks. */
static void many_rows_come_back_as_written(bool with_quotes) {
    enum { MANY = 60000 };
    lee_text text = {0};
    lee_text_add(&text, "n,a,b,c,d\n");
    for (int row = 0; row < MANY; row++) {
        add_row(&text, row, with_quotes);
    }
    assert_false(text.has_failed);
    lee_csv *csv = opened(
        folder_write_bytes(&folder, "many.csv", text.length, text.bytes));
    lee_text_free(&text);
    for (int row = 0; row < MANY; row++) {
        const lee_csv_field *fields = next_row(csv);
        assert_non_null(fields);
        assert_row(fields, row, with_quotes);
    }
    assert_null(next_row(csv));
    lee_csv_close(csv);
}

static void plain_rows_come_back_across_blocks(void **state) {
    (void)state;
    many_rows_come_back_as_written(false);
}

static void quoted_rows_come_back_across_blocks(void **state) {
    (void)state;
    many_rows_come_back_as_written(true);
}

/* A row of `columns` fields of `width` bytes each, below a header; every
 * third field between quotes if wanted. */
static const char *write_wide(int columns, int width, bool with_quotes) {
    lee_text text = {0};
    for (int i = 0; i < columns; i++) {
        lee_text_add(&text, "%sc%d", i == 0 ? "" : ",", i);
    }
    lee_text_add(&text, "\n");
    for (int i = 0; i < columns; i++) {
        const char *quote = with_quotes && i % 3 == 0 ? "\"" : "";
        lee_text_add(&text, "%s%s%0*d%s", i == 0 ? "" : ",", quote, width, i,
                     quote);
    }
    lee_text_add(&text, "\n");
    assert_false(text.has_failed);
    const char *path =
        folder_write_bytes(&folder, "wide.csv", text.length, text.bytes);
    lee_text_free(&text);
    return path;
}

static void a_row_longer_than_a_block_is_read(void **state) {
    (void)state;
    for (int with_quotes = 0; with_quotes <= 1; with_quotes++) {
        lee_csv *csv = opened(write_wide(40, 60000, with_quotes == 1));
        const lee_csv_field *fields = next_row(csv);
        assert_int_equal(fields[39].length, 60000);
        assert_memory_equal(fields[39].bytes + 59998, "39", 2);
        assert_null(next_row(csv));
        lee_csv_close(csv);
    }
}

static void refused(const char *path, const char *expected) {
    lee_csv *csv = NULL;
    lee_error error = {0};
    lee_status status = lee_csv_open(path, &csv, &error);
    if (status == LEE_OK) {
        const lee_csv_field *fields = NULL;
        status = lee_csv_next(csv, &fields, &error);
    }
    assert_int_equal(status, LEE_ERR_FORMAT);
    char message[256];
    (void)snprintf(message, sizeof message, "%s%s", path, expected);
    assert_string_equal(error.message, message);
    lee_csv_close(csv);
}

static void a_field_of_64_kib_is_read(void **state) {
    (void)state;
    for (int with_quotes = 0; with_quotes <= 1; with_quotes++) {
        lee_csv *csv = opened(write_wide(2, 65536, with_quotes == 1));
        assert_int_equal(next_row(csv)[1].length, 65536);
        lee_csv_close(csv);
    }
}

static void a_longer_field_is_refused(void **state) {
    (void)state;
    refused(write_wide(2, 65537, false), ":2:1: a field longer than 64 KiB");
    refused(write_wide(2, 65537, true),
            ":2:1: a field longer than 64 KiB; is its quote closed?");
}

static void a_row_of_more_than_16_mib_is_refused(void **state) {
    (void)state;
    refused(write_wide(300, 60000, false), ":2:1: a row longer than 16 MiB");
}

/* 700 names of 500 bytes each, behind one with a line break or without. */
static const char *write_long_header(const char *first) {
    lee_text text = {0};
    lee_text_add(&text, "%s", first);
    for (int i = 0; i < 700; i++) {
        lee_text_add(&text, ",c%0499d", i);
    }
    assert_false(text.has_failed);
    const char *path =
        folder_write_bytes(&folder, "header.csv", text.length, text.bytes);
    lee_text_free(&text);
    return path;
}

static void a_long_header_is_read_when_it_is_one_line(void **state) {
    (void)state;
    lee_csv *csv = opened(write_long_header("\"a\""));
    assert_int_equal(lee_csv_columns(csv), 701);
    assert_int_equal(strlen(lee_csv_header_at(csv, 700)->name), 500);
    assert_null(next_row(csv));
    lee_csv_close(csv);
    refused(write_long_header("\"a\nb\""),
            ":1:1: a header with line breaks and more than 256 KiB");
}

/* A good record with all liberties, to be damaged. */
static const char record[] =
    "# invented\r\n"
    "time,speed [m/s],\"from [degree]\",remark\r\n"
    "2031-01-10T00:00Z,12.5,240,\"gusty, \"\"very\"\"\"\r\n"
    "2031-01-10T01:00Z, 13.25 ,245.5,\r\n"
    "\r\n"
    "2031-01-10T02:00Z,1e1,\"250\",\"two\r\nlines\"\r\n"
    "2031-01-10T03:00Z,-0.5,0,\xC3\xBC\r\n"
    "2031-01-10T04:00Z,7,359.9,\"end\"";

/* Changes, takes out, doubles or puts in a few bytes; returns the length. */
static size_t damage(dice *d, char bytes[2 * sizeof record]) {
    static const char loved[] = "\"\"\",;\t\n\r\0#.e-9\xFF";
    size_t length = sizeof record - 1;
    memcpy(bytes, record, length);
    for (int wounds = draw(d, 3); wounds >= 0 && length > 0; wounds--) {
        char *at = bytes + draw(d, (int)length - 1);
        const size_t behind = (size_t)(bytes + length - at);
        switch (draw(d, 3)) {
        case 0:
            *at = loved[draw(d, sizeof loved - 2)];
            break;
        case 1:
            memmove(at, at + 1, behind - 1);
            length--;
            break;
        case 2:
            memmove(at + 1, at, behind);
            *at = loved[draw(d, sizeof loved - 2)];
            length++;
            break;
        default:
            length = (size_t)(at - bytes);
            break;
        }
    }
    return length;
}

/* Reads all numbers of a file; the status of the first failure. */
static lee_status read_all(const char *path, size_t *numbers,
                           lee_error *error) {
    lee_csv *csv = NULL;
    lee_status status = lee_csv_open(path, &csv, error);
    const lee_csv_field *fields = NULL;
    do {
        if (status == LEE_OK) {
            status = lee_csv_next(csv, &fields, error);
        }
        for (size_t i = 1; status == LEE_OK && fields != NULL && i < 3 &&
                           i < lee_csv_columns(csv);
             i++) {
            double value = NAN;
            status = lee_csv_number(csv, &fields[i], &value, error);
            *numbers += status == LEE_OK && isfinite(value);
        }
    } while (status == LEE_OK && fields != NULL);
    lee_csv_close(csv);
    return status;
}

/* One line that begins with the path, a line number in the file and a
 * column, and can be printed. */
static void assert_honest(const char *message, const char *path) {
    size_t line = 0;
    size_t column = 0;
    const size_t length = strlen(path);
    assert_memory_equal(message, path, length);
    assert_int_equal(sscanf(message + length, ":%zu:%zu: ", &line, &column), 2);
    assert_in_range(line, 1, 20);
    assert_in_range(column, 1, sizeof record);
    for (const char *p = message; *p != '\0'; p++) {
        assert_true((unsigned char)*p >= ' ' && *p != 0x7F);
    }
}

static void a_damaged_file_is_read_or_refused_with_its_place(void **state) {
    (void)state;
    enum { FILES = 4000 };
    dice d = {4};
    size_t refusals = 0;
    size_t numbers = 0;
    for (int i = 0; i < FILES; i++) {
        char bytes[2 * sizeof record];
        const size_t length = damage(&d, bytes);
        const char *path =
            folder_write_bytes(&folder, "damaged.csv", length, bytes);
        lee_error error = {0};
        const lee_status status = read_all(path, &numbers, &error);
        (void)remove(path); /* writing over a file costs a write to disk */
        if (status != LEE_OK) {
            assert_int_equal(status, LEE_ERR_FORMAT);
            assert_honest(error.message, path);
            refusals++;
        }
    }
    /* Both ways were taken often, or the test proves little. */
    assert_in_range(refusals, FILES / 4, FILES - FILES / 20);
    assert_true(numbers > FILES);
}

static void the_undamaged_file_is_read_whole(void **state) {
    (void)state;
    const char *path = folder_write(&folder, "whole.csv", record);
    size_t numbers = 0;
    lee_error error = {0};
    assert_int_equal(read_all(path, &numbers, &error), LEE_OK);
    assert_int_equal(numbers, 10);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(plain_rows_come_back_across_blocks),
        cmocka_unit_test(quoted_rows_come_back_across_blocks),
        cmocka_unit_test(a_row_longer_than_a_block_is_read),
        cmocka_unit_test(a_field_of_64_kib_is_read),
        cmocka_unit_test(a_longer_field_is_refused),
        cmocka_unit_test(a_row_of_more_than_16_mib_is_refused),
        cmocka_unit_test(a_long_header_is_read_when_it_is_one_line),
        cmocka_unit_test(a_damaged_file_is_read_or_refused_with_its_place),
        cmocka_unit_test(the_undamaged_file_is_read_whole),
    };
    return cmocka_run_group_tests(tests, make_folder, remove_folder);
}
