/* Numbers read as the C library reads them, and nothing else is a number. */
#include "support/check.h"
#include "support/dice.h"

#include <locale.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>

#include "base/number.h"

static double parse(const char *text, char decimal) {
    double value = NAN;
    assert_true(lee_number_parse(strlen(text), text, decimal, &value));
    return value;
}

/* Fails unless both are the same double, sign of zero included. */
static void assert_same_double(double actual, double expected,
                               const char *text) {
    if (memcmp(&actual, &expected, sizeof actual) != 0) {
        print_error("'%s' reads %.17g, strtod reads %.17g\n", text, actual,
                    expected);
        fail();
    }
}

/* Writes a decimal of random shape: up to 20 digits before the point, up to
 * 20 behind it, an exponent that reaches past both ends of the doubles. */
static void write_decimal(dice *d, char text[64]) {
    static const char *const signs[] = {"", "", "-", "+"};
    char *p = text + sprintf(text, "%s", signs[draw(d, 3)]);
    const int whole = draw(d, 3) == 0 ? draw(d, 20) : draw(d, 4);
    for (int i = 0; i < whole; i++) {
        *p++ = (char)('0' + draw(d, 9));
    }
    const int fraction = draw(d, 3) == 0 ? draw(d, 20) : draw(d, 5);
    if (whole == 0 || draw(d, 1) == 0) {
        *p++ = '.';
        for (int i = 0; i < fraction + (whole == 0); i++) {
            *p++ = (char)('0' + draw(d, 9));
        }
    }
    *p = '\0';
    if (draw(d, 3) == 0) {
        (void)sprintf(p, "%c%d", draw(d, 1) ? 'e' : 'E', draw(d, 700) - 350);
    }
}

static void random_decimals_read_as_strtod_reads_them(void **state) {
    (void)state;
    enum { DECIMALS = 400000 };
    dice d = {1};
    for (int i = 0; i < DECIMALS; i++) {
        char text[64];
        write_decimal(&d, text);
        assert_same_double(parse(text, '.'), strtod(text, NULL), text);
    }
}

/* 17 significant digits bring every double back (IEEE 754). */
static void any_double_printed_with_17_digits_comes_back(void **state) {
    (void)state;
    dice d = {2};
    for (int i = 0; i < 100000; i++) {
        uint64_t bits = 0;
        for (int k = 0; k < 4; k++) {
            bits = bits << 16 | (uint64_t)draw(&d, 65535);
        }
        double value = 0.0;
        memcpy(&value, &bits, sizeof value);
        if (isfinite(value)) {
            char text[64];
            (void)snprintf(text, sizeof text, "%.17g", value);
            assert_same_double(parse(text, '.'), value, text);
        }
    }
}

/* Where the one exact division or multiplication ends and strtod begins. */
static void the_edges_of_the_fast_path_read_as_strtod_reads_them(void **state) {
    (void)state;
    static const char *const edges[] = {
        "9007199254740991",
        "9007199254740992",
        "9007199254740993",
        "9007199254740993e1",
        "9007199254740992e22",
        "9007199254740992e-22",
        "1e22",
        "1e23",
        "1e-22",
        "1e-23",
        "999999999999999999",
        "1000000000000000000",
        "9223372036854775807",
        "9223372036854775808",
        "0.000000000000000001",
        "0.1",
        "-0",
        "-0.0e400",
        "4.9e-324",
        "2.4e-324",
        "1.7976931348623157e308",
        "1.7976931348623159e308",
    };
    for (size_t i = 0; i < sizeof edges / sizeof edges[0]; i++) {
        assert_same_double(parse(edges[i], '.'), strtod(edges[i], NULL),
                           edges[i]);
    }
}

static void thousands_of_digits_are_read_correctly(void **state) {
    (void)state;
    enum { DIGITS = 5000 };
    char text[DIGITS + 1];
    memset(text, '3', DIGITS);
    text[1] = '.';
    text[DIGITS] = '\0';
    /* 3.333...3 is nearer to the double 10/3 than to any other. */
    assert_near(parse(text, '.'), 10.0 / 3.0, 0.0);
}

static void a_number_out_of_range_reads_infinite(void **state) {
    (void)state;
    assert_true(isinf(parse("1e999", '.')));
    assert_true(isinf(parse("-1e99999999999999999999", '.')));
    assert_near(parse("1e-99999999999999999999", '.'), 0.0, 0.0);
}

static void a_decimal_comma_reads_as_a_point_does(void **state) {
    (void)state;
    assert_near(parse("12,5", ','), 12.5, 0.0);
    assert_near(parse("-,5e1", ','), -5.0, 0.0);
    /* More digits than the fast path takes. */
    assert_near(parse("0,12345678901234567890", ','), 0.12345678901234567890,
                0.0);
}

static void what_is_no_decimal_number_is_refused(void **state) {
    (void)state;
    static const char *const others[] = {
        "",     "+",     "-",   ".",     "e5",  "1e",  "1e+",  "1 ",
        " 1",   "1.2.3", "1,5", "0x10",  "inf", "nan", "NaN",  "-inf",
        "1e5x", "--1",   "+-1", "1_000", "1d5", "12m", "1e5.", "\xD9\xA1",
    };
    for (size_t i = 0; i < sizeof others / sizeof others[0]; i++) {
        double value = 42.0;
        assert_false(
            lee_number_parse(strlen(others[i]), others[i], '.', &value));
        assert_near(value, 42.0, 0.0);
    }
}

static void a_point_is_no_decimal_sign_where_the_comma_is(void **state) {
    (void)state;
    double value = 42.0;
    assert_false(lee_number_parse(4, "12.5", ',', &value));
    assert_near(value, 42.0, 0.0);
}

static void only_the_bytes_of_the_number_are_looked_at(void **state) {
    (void)state;
    double value = 0.0;
    assert_true(lee_number_parse(2, "12345", '.', &value));
    assert_near(value, 12.0, 0.0);
}

static void reading_leaves_the_locale_of_the_thread_alone(void **state) {
    (void)state;
    const locale_t mine = newlocale(LC_ALL_MASK, "C", (locale_t)0);
    const locale_t before = uselocale(mine);
    (void)parse("1e300", '.'); /* not on the fast path */
    assert_true(uselocale(before) == mine);
    freelocale(mine);
}

static int64_t integer(const char *text) {
    int64_t value = 0;
    assert_true(lee_integer_parse(strlen(text), text, &value));
    return value;
}

static void integers_read_up_to_both_ends(void **state) {
    (void)state;
    assert_true(integer("0") == 0);
    assert_true(integer("-7") == -7);
    assert_true(integer("+0042") == 42);
    assert_true(integer("9223372036854775807") == INT64_MAX);
    assert_true(integer("-9223372036854775808") == INT64_MIN);
}

static void what_is_no_integer_is_refused(void **state) {
    (void)state;
    static const char *const others[] = {
        "",
        "-",
        "+",
        "1.",
        "1.0",
        "1e3",
        " 1",
        "1 ",
        "ab",
        "0x1",
        "--1",
        "9223372036854775808",
        "-9223372036854775809",
        "99999999999999999999",
    };
    for (size_t i = 0; i < sizeof others / sizeof others[0]; i++) {
        int64_t value = 42;
        assert_false(lee_integer_parse(strlen(others[i]), others[i], &value));
        assert_true(value == 42);
    }
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(random_decimals_read_as_strtod_reads_them),
        cmocka_unit_test(any_double_printed_with_17_digits_comes_back),
        cmocka_unit_test(the_edges_of_the_fast_path_read_as_strtod_reads_them),
        cmocka_unit_test(thousands_of_digits_are_read_correctly),
        cmocka_unit_test(a_number_out_of_range_reads_infinite),
        cmocka_unit_test(a_decimal_comma_reads_as_a_point_does),
        cmocka_unit_test(what_is_no_decimal_number_is_refused),
        cmocka_unit_test(a_point_is_no_decimal_sign_where_the_comma_is),
        cmocka_unit_test(only_the_bytes_of_the_number_are_looked_at),
        cmocka_unit_test(reading_leaves_the_locale_of_the_thread_alone),
        cmocka_unit_test(integers_read_up_to_both_ends),
        cmocka_unit_test(what_is_no_integer_is_refused),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
