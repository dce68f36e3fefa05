/* Units convert as UDUNITS converts them, and where UDUNITS misreads what
 * this trade writes, as their definitions say. */
#include "support/check.h"

#include <locale.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>

#include <udunits2.h>

#include "leewater/units.h"

/* Definitions: international nautical mile 1852 m (Monaco 1929), knot one of
 * them an hour; international mile 1609.344 m and foot 0.3048 m (1959); the
 * bar 1e5 Pa, the hour 3600 s (BIPM, The International System of Units). */
static const double knot = 1852.0 / 3600.0;
static const double mile_per_hour = 1609.344 / 3600.0;
static const double kilometre_per_hour = 1000.0 / 3600.0;
static const double degree = 3.14159265358979323846 / 180.0;

static lee_conversion conversion(const char *from, const char *to) {
    lee_conversion found = {NAN, NAN};
    lee_error error = {0};
    const lee_status status = lee_unit_conversion(from, to, &found, &error);
    assert_string_equal(error.message, "");
    assert_int_equal(status, LEE_OK);
    return found;
}

/* Comes first: the database, once read, is kept. */
static void a_missing_database_is_an_error_that_can_be_mended(void **state) {
    (void)state;
    assert_int_equal(setenv("UDUNITS2_XML_PATH", "no/such.xml", 1), 0);
    lee_conversion found = {42.0, 43.0};
    lee_error error = {0};
    assert_int_equal(lee_unit_conversion("km", "m", &found, &error),
                     LEE_ERR_FILE);
    assert_string_equal(error.message,
                        "the unit database of UDUNITS-2 cannot be read; "
                        "install libudunits2-0 or set UDUNITS2_XML_PATH");
    assert_near(found.factor, 42.0, 0.0);
    assert_int_equal(unsetenv("UDUNITS2_XML_PATH"), 0);
    assert_near(conversion("km", "m").factor, 1000.0, 0.0);
}

static const struct {
    const char *from;
    const char *to;
    double factor;
} rows[] = {
    {"mph",                            "m s-1",      mile_per_hour      },
    {"MPH",                            "m s-1",      mile_per_hour      },
    {"kph",                            "m s-1",      kilometre_per_hour },
    {"kmh",                            "m s-1",      kilometre_per_hour },
    {"kmph",                           "m s-1",      kilometre_per_hour },
    {"KM/H",                           "m s-1",      kilometre_per_hour },
    {"kn",                             "m s-1",      knot               },
    {"KN",                             "m s-1",      knot               },
    {"kt",                             "m s-1",      knot               },
    {"KT",                             "m s-1",      knot               },
    {"Kts",                            "m s-1",      knot               },
    {"M/S",                            "m s-1",      1.0                },
    {"mps",                            "m s-1",      1.0                },
    {"fps",                            "m s-1",      0.3048             },
    {"nmi",                            "m",          1852.0             },
    {"NMI",                            "m",          1852.0             },
    {"KM",                             "m",          1000.0             },
    {"FT",                             "m",          0.3048             },
    {"mb",                             "Pa",         100.0              },
    {"MB",                             "Pa",         100.0              },
    {"mbs",                            "Pa",         100.0              },
    {"hpa",                            "Pa",         100.0              },
    {"HPA",                            "Pa",         100.0              },
    {"deg",                            "radian",     degree             },
    {"Deg",                            "radian",     degree             },
    {"degT",                           "radian",     degree             },
    {"deg true",                       "radian",     degree             },
    {"Degrees True",                   "radian",     degree             },
    {"\xC2\xB0",                       "radian",     degree             },
    {"\xC2\xB0T",                      "radian",     degree             },
    {"\xB0",                           "radian",     degree             },
    {"pct",                            "1",          0.01               },
    {"hrs",                            "s",          3600.0             },
    {"mins",                           "s",          60.0               },
 /* Within a unit of several words. */
    {"nmi/h",                          "m s-1",      knot               },
    {"nmi h-1",                        "m s-1",      knot               },
    {"deg/hrs",                        "radian s-1", degree / 3600.0    },
    {"m/mb",                           "m Pa-1",     0.01               },
    {"m mph-1",                        "s",          1.0 / mile_per_hour},
    {"m/mph",                          "s",          1.0 / mile_per_hour},
 /* Characters of print. */
    {"m s\xE2\x81\xBB\xC2\xB9",        "m s-1",      1.0                },
    {"m\xC2\xB7s\xE2\x81\xBB\xC2\xB9", "m s-1",      1.0                },
    {"kg/m\xC2\xB3",                   "kg m-3",     1.0                },
    {"km\xC2\xB2",                     "m2",         1e6                },
    {"\xC2\xB5m",                      "m",          1e-6               },
};

static void what_this_trade_writes_reads_by_its_definition(void **state) {
    (void)state;
    for (size_t i = 0; i < sizeof rows / sizeof rows[0]; i++) {
        const lee_conversion found = conversion(rows[i].from, rows[i].to);
        /* Two or three roundings, here and in UDUNITS. */
        assert_near_share(found.factor, rows[i].factor, 1e-15 * 4.0);
        assert_near(found.offset, 0.0, 0.0);
    }
}

/* Spellings that UDUNITS reads right by itself. */
static const struct {
    const char *from;
    const char *to;
} judged[] = {
    {"knots",         "m s-1" },
    {"knot",          "m s-1" },
    {"kts",           "m s-1" },
    {"Knots",         "m s-1" },
    {"KNOTS",         "m s-1" },
    {"m s-1",         "m s-1" },
    {"m/s",           "m s-1" },
    {"m.s-1",         "m s-1" },
    {"m s^-1",        "m s-1" },
    {"m s**-1",       "m s-1" },
    {"m/sec",         "m s-1" },
    {"meters/second", "m s-1" },
    {"km/h",          "m s-1" },
    {"km h-1",        "m s-1" },
    {"mi/h",          "m s-1" },
    {"ft/s",          "m s-1" },
    {"cm/s",          "m s-1" },
    {"ft",            "m"     },
    {"feet",          "m"     },
    {"km",            "m"     },
    {"miles",         "m"     },
    {"nautical_mile", "m"     },
    {"cm",            "m"     },
    {"mm",            "m"     },
    {"yard",          "m"     },
    {"inch",          "m"     },
    {"hPa",           "Pa"    },
    {"mbar",          "Pa"    },
    {"millibar",      "Pa"    },
    {"kPa",           "Pa"    },
    {"N m-2",         "Pa"    },
    {"atm",           "Pa"    },
    {"inHg",          "Pa"    },
    {"mmHg",          "Pa"    },
    {"psi",           "Pa"    },
    {"degC",          "K"     },
    {"celsius",       "K"     },
    {"degF",          "K"     },
    {"K",             "K"     },
    {"\302\260C",     "K"     },
    {"degree",        "radian"},
    {"degrees_true",  "radian"},
    {"radian",        "degree"},
    {"percent",       "1"     },
    {"%",             "1"     },
    {"g/kg",          "1"     },
    {"day",           "s"     },
    {"h",             "s"     },
    {"hours",         "s"     },
    {"min",           "s"     },
    {"week",          "s"     },
    {"kg m-3",        "kg m-3"},
    {"g cm-3",        "kg m-3"},
    {"m3/s",          "m3 s-1"},
    {"1/s",           "s-1"   },
    {"hectare",       "m2"    },
    {"ft",            "cm"    },
    {"Pa",            "mbar"  },
    {"K",             "degC"  },
    {"degF",          "degC"  },
};

/* Value of `value` of one unit in another, by UDUNITS alone. */
static double judge(ut_system *system, const char *from, const char *to,
                    double value) {
    ut_unit *source = ut_parse(system, from, UT_UTF8);
    ut_unit *target = ut_parse(system, to, UT_UTF8);
    cv_converter *converter = ut_get_converter(source, target);
    assert_non_null(converter);
    const double converted = cv_convert_double(converter, value);
    cv_free(converter);
    ut_free(source);
    ut_free(target);
    return converted;
}

static void other_units_convert_as_udunits_says(void **state) {
    ut_system *system = *state;
    static const double values[] = {0.0, 1.0, -40.0, 12.34, 98765.4};
    for (size_t i = 0; i < sizeof judged / sizeof judged[0]; i++) {
        const lee_conversion found = conversion(judged[i].from, judged[i].to);
        for (size_t k = 0; k < sizeof values / sizeof values[0]; k++) {
            const double expected =
                judge(system, judged[i].from, judged[i].to, values[k]);
            /* Factor and offset each carry a few roundings. */
            assert_near(found.factor * values[k] + found.offset, expected,
                        1e-15 * 8.0 * (fabs(expected) + fabs(found.offset)));
        }
    }
}

static void a_conversion_there_and_back_changes_nothing(void **state) {
    (void)state;
    for (size_t i = 0; i < sizeof judged / sizeof judged[0]; i++) {
        const lee_conversion there = conversion(judged[i].from, judged[i].to);
        const lee_conversion back = conversion(judged[i].to, judged[i].from);
        const double away = there.factor * 7.5 + there.offset;
        assert_near(back.factor * away + back.offset, 7.5,
                    1e-15 * 8.0 * (fabs(back.offset) + 7.5));
    }
}

static void blanks_around_a_unit_do_not_count(void **state) {
    (void)state;
    assert_near(conversion("\t km ", " m").factor, 1000.0, 0.0);
}

static void
degrees_celsius_written_apart_are_no_degrees_of_charge(void **state) {
    (void)state;
    static const char *const spellings[] = {"deg C", "Deg C", "degree C",
                                            "degrees C", "\260C"};
    for (size_t i = 0; i < sizeof spellings / sizeof spellings[0]; i++) {
        const lee_conversion found = conversion(spellings[i], "K");
        assert_near(found.factor, 1.0, 0.0);
        assert_near(found.offset, 273.15, 0.0);
    }
}

/* Fails unless `from` is refused with this message and nothing found. */
static void refused(const char *from, const char *to, const char *message) {
    lee_conversion found = {42.0, 43.0};
    lee_error error = {0};
    assert_int_equal(lee_unit_conversion(from, to, &found, &error),
                     LEE_ERR_FORMAT);
    assert_string_equal(error.message, message);
    assert_near(found.factor, 42.0, 0.0);
    assert_near(found.offset, 43.0, 0.0);
}

static void a_blank_unit_is_refused(void **state) {
    (void)state;
    refused("", "m", "the unit is blank");
    refused(" \t", "m", "the unit is blank");
}

static void what_is_no_unit_is_refused_and_named(void **state) {
    (void)state;
    static const char *const units[] = {
        "knotz", "15 knots", "-1 m",         ".5 m", "m @ 5",
        "m/",    "m//s",     "s since 2020", "10",   "reed",
    };
    for (size_t i = 0; i < sizeof units / sizeof units[0]; i++) {
        char message[64];
        (void)snprintf(message, sizeof message, "unit '%s' is not known",
                       units[i]);
        refused(units[i], "m", message);
    }
}

static void a_control_character_in_a_unit_is_not_printed(void **state) {
    (void)state;
    refused("m\x1B[31m", "m", "unit 'm?[31m' is not known");
}

static void a_unit_that_nobody_means_is_refused_with_a_hint(void **state) {
    (void)state;
    refused("C", "K", "unit 'C' means coulomb; write degC");
    refused("F", "K", "unit 'F' means farad; write degF");
    refused("nm", "m",
            "unit 'nm' means nanometre; write nmi for nautical miles");
    refused("ms-1", "m s-1",
            "unit 'ms-1' means one in a millisecond; write m s-1 or m/s");
    refused("months", "s", "unit 'months' means no fixed time; write days");
}

static const struct {
    const char *from;
    const char *to;
} strangers[] = {
    {"kg",          "m"          },
    {"km",          "m s-1"      },
    {"kN",          "m s-1"      },
 /* Convertible to UDUNITS, as reciprocals. */
    {"s",           "Hz"         },
    {"s m-1",       "m s-1"      },
 /* Convertible to UDUNITS, as plain numbers. */
    {"percent",     "degree"     },
    {"1",           "degree"     },
    {"degree s-1",  "s-1"        },
 /* Convertible to UDUNITS, but not by a straight line. */
    {"lg(re 1 mW)", "W"          },
    {"W",           "lg(re 1 mW)"},
};

static void units_of_different_things_do_not_convert(void **state) {
    (void)state;
    for (size_t i = 0; i < sizeof strangers / sizeof strangers[0]; i++) {
        char message[96];
        (void)snprintf(message, sizeof message,
                       "unit '%s' cannot be converted to %s", strangers[i].from,
                       strangers[i].to);
        refused(strangers[i].from, strangers[i].to, message);
    }
}

static void a_length_or_an_angle_is_no_plain_number(void **state) {
    (void)state;
    refused("m", "1", "unit 'm' cannot be converted to a plain number");
    refused("degree", "1",
            "unit 'degree' cannot be converted to a plain number");
}

static void a_unit_as_long_as_a_book_is_refused(void **state) {
    (void)state;
    char unit[20000];
    memset(unit, 'k', sizeof unit - 1);
    unit[sizeof unit - 1] = '\0';
    lee_conversion found;
    assert_int_equal(lee_unit_conversion(unit, "m", &found, NULL),
                     LEE_ERR_FORMAT);
}

static void finding_a_unit_leaves_the_locale_of_the_thread_alone(void **state) {
    (void)state;
    const locale_t mine = newlocale(LC_ALL_MASK, "C", (locale_t)0);
    const locale_t before = uselocale(mine);
    (void)conversion("knots", "m s-1");
    assert_true(uselocale(before) == mine);
    freelocale(mine);
}

static int read_udunits(void **state) {
    (void)ut_set_error_message_handler(ut_ignore);
    *state = ut_read_xml(NULL);
    return *state == NULL;
}

static int free_udunits(void **state) {
    ut_free_system(*state);
    return 0;
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(a_missing_database_is_an_error_that_can_be_mended),
        cmocka_unit_test(what_this_trade_writes_reads_by_its_definition),
        cmocka_unit_test(other_units_convert_as_udunits_says),
        cmocka_unit_test(a_conversion_there_and_back_changes_nothing),
        cmocka_unit_test(blanks_around_a_unit_do_not_count),
        cmocka_unit_test(
            degrees_celsius_written_apart_are_no_degrees_of_charge),
        cmocka_unit_test(a_blank_unit_is_refused),
        cmocka_unit_test(what_is_no_unit_is_refused_and_named),
        cmocka_unit_test(a_control_character_in_a_unit_is_not_printed),
        cmocka_unit_test(a_unit_that_nobody_means_is_refused_with_a_hint),
        cmocka_unit_test(units_of_different_things_do_not_convert),
        cmocka_unit_test(a_length_or_an_angle_is_no_plain_number),
        cmocka_unit_test(a_unit_as_long_as_a_book_is_refused),
        cmocka_unit_test(finding_a_unit_leaves_the_locale_of_the_thread_alone),
    };
    return cmocka_run_group_tests(tests, read_udunits, free_udunits);
}
