/* A quantity is a number and its unit; either alone is refused. */
#include "support/check.h"

#include <stdio.h>
#include <string.h>

#include "leewater/units.h"

static const struct {
    const char *text;
    const char *to;
    double value;
} readings[] = {
    {"12 km",        "m",      12000.0               },
    {"12km",         "m",      12000.0               },
    {"  12\tkm ",    "m",      12000.0               },
    {"+12 km",       "m",      12000.0               },
    {"-0.5 m",       "m",      -0.5                  },
    {".5 m",         "m",      0.5                   },
    {"5. m",         "m",      5.0                   },
    {"1e3 m",        "m",      1000.0                },
    {"1E+3m",        "m",      1000.0                },
    {"15 knots",     "m s-1",  15.0 * 1852.0 / 3600.0},
    {"15 kn",        "m s-1",  15.0 * 1852.0 / 3600.0},
    {"22 m/s",       "m s-1",  22.0                  },
    {"1e-4 s-1",     "s-1",    1e-4                  },
    {"1e-4 1/s",     "s-1",    1e-4                  },
    {"0 degC",       "K",      273.15                },
    {"-40 degF",     "degC",   -40.0                 },
    {"10 percent",   "1",      0.1                   },
    {"10 %",         "1",      0.1                   },
    {"10%",          "1",      0.1                   },
    {"0.022",        "1",      0.022                 },
    {"-3e2",         "1",      -300.0                },
    {"2 1",          "1",      2.0                   },
    {"65 degree",    "degree", 65.0                  },
    {"65 deg",       "degree", 65.0                  },
    {"999.7 kg m-3", "kg m-3", 999.7                 },
    {"1013.25 mb",   "Pa",     101325.0              },
    {"10 min",       "s",      600.0                 },
    {"1 day",        "s",      86400.0               },
};

static void each_quantity_reads_in_the_wanted_unit(void **state) {
    (void)state;
    for (size_t i = 0; i < sizeof readings / sizeof readings[0]; i++) {
        double value = NAN;
        lee_error error = {0};
        const lee_status status = lee_quantity_parse(
            readings[i].text, readings[i].to, &value, &error);
        assert_string_equal(error.message, "");
        assert_int_equal(status, LEE_OK);
        /* A few roundings; those of a temperature are as large as those of
         * 459.67, the offset of degrees Fahrenheit. */
        const double size = readings[i].value < 0.0 ? 459.67 : 0.0;
        assert_near(value, readings[i].value,
                    1e-15 * (fabs(readings[i].value) + size));
    }
}

static const struct {
    const char *text;
    const char *to;
    const char *message;
} refusals[] = {
    {"12",         "m",     "'12' has no unit; write 12 m"                    },
    {" 12 ",       "m s-1", "'12' has no unit; write 12 m s-1"                },
    {"nan",        "1",     "'nan' is not a number; expected one such as 12.5"},
    {"1e999 m",    "m",     "'1e999 m' is not a finite number"                },
    {"-1e999",     "1",     "'-1e999' is not a finite number"                 },
    {"1e308 km",   "m",     "'1e308 km' is not a finite number"               },
    {"0x10 m",     "m",     "unit 'x10 m' is not known"                       },
    {"12 knotz",   "m s-1", "unit 'knotz' is not known"                       },
    {"12 kg",      "m",     "unit 'kg' cannot be converted to m"              },
    {"12 m",       "1",     "unit 'm' cannot be converted to a plain number"  },
    {"10 percent", "m",     "unit 'percent' cannot be converted to m"         },
    {"12 C",       "K",     "unit 'C' means coulomb; write degC"              },
};

static void refused(const char *text, const char *to, const char *message) {
    double value = 42.0;
    lee_error error = {0};
    assert_int_equal(lee_quantity_parse(text, to, &value, &error),
                     LEE_ERR_FORMAT);
    assert_string_equal(error.message, message);
    assert_near(value, 42.0, 0.0);
}

static void what_is_no_quantity_is_refused_and_left_alone(void **state) {
    (void)state;
    for (size_t i = 0; i < sizeof refusals / sizeof refusals[0]; i++) {
        refused(refusals[i].text, refusals[i].to, refusals[i].message);
    }
}

static void what_begins_with_no_number_or_half_of_one_is_refused(void **state) {
    (void)state;
    static const char *const texts[] = {
        "", "km", "nan m", "inf m", "- 5 m", "12,5 m", "1 000 m", "1.2.3 m"};
    for (size_t i = 0; i < sizeof texts / sizeof texts[0]; i++) {
        char message[128];
        (void)snprintf(message, sizeof message,
                       "'%s' is not a number with its unit; expected one such "
                       "as 12 m",
                       texts[i]);
        refused(texts[i], "m", message);
    }
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(each_quantity_reads_in_the_wanted_unit),
        cmocka_unit_test(what_is_no_quantity_is_refused_and_left_alone),
        cmocka_unit_test(what_begins_with_no_number_or_half_of_one_is_refused),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
