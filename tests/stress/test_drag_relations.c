/* Every drag relation gives what its paper's equation gives, worked by hand. */
#include "support/check.h"

#include <ctype.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>

#include "leewater/stress.h"

/* Worked from the printed equations to six significant digits, outside of
 * this program; where six digits are not needed the rest are zeros. */
static const struct {
    const char *name;
    double speed;    /* m s-1    */
    double expected; /* 1000 C10 */
} worked[] = {
    {"wu-1982",                    5.0,    1.125   },
    {"wu-1982",                    10.0,   1.45    },
    {"wu-1982",                    15.0,   1.775   },
    {"wu-1982",                    20.0,   2.1     },
    {"wu-1982",                    30.0,   2.75    },
    {"wu-1982",                    40.0,   3.4     },
    {"wu-low-wind-1982",           2.0,    1.2875  },
    {"wu-low-wind-1982",           5.0,    1.2875  },
    {"wu-low-wind-1982",           7.0,    1.2875  },
    {"wu-low-wind-1982",           7.5,    1.2875  },
    {"wu-low-wind-1982",           10.0,   1.45    },
    {"garratt-linear-1977",        4.0,    1.018   },
    {"garratt-linear-1977",        8.0,    1.286   },
    {"garratt-linear-1977",        10.0,   1.42    },
    {"garratt-linear-1977",        15.0,   1.755   },
    {"garratt-linear-1977",        20.0,   2.09    },
    {"garratt-linear-1977",        21.0,   2.157   },
    {"garratt-power-1977",         4.0,    0.964979},
    {"garratt-power-1977",         8.0,    1.32737 },
    {"garratt-power-1977",         10.0,   1.47086 },
    {"garratt-power-1977",         15.0,   1.77244 },
    {"garratt-power-1977",         20.0,   2.02322 },
    {"garratt-power-1977",         21.0,   2.06915 },
    {"smith-banke-1975",           3.0,    0.828   },
    {"smith-banke-1975",           6.0,    1.026   },
    {"smith-banke-1975",           10.0,   1.29    },
    {"smith-banke-1975",           15.0,   1.62    },
    {"smith-banke-1975",           21.0,   2.016   },
    {"smith-1980",                 6.0,    0.988   },
    {"smith-1980",                 10.0,   1.24    },
    {"smith-1980",                 15.0,   1.555   },
    {"smith-1980",                 20.0,   1.87    },
    {"smith-1980",                 22.0,   1.996   },
    {"large-pond-1981",            4.0,    1.2     },
    {"large-pond-1981",            10.0,   1.2     },
    {"large-pond-1981",            10.99,  1.2     },
    {"large-pond-1981",            11.0,   1.205   },
    {"large-pond-1981",            15.0,   1.465   },
    {"large-pond-1981",            20.0,   1.79    },
    {"large-pond-1981",            25.0,   2.115   },
    {"trenberth-1990",             4.0,    1.14    },
    {"trenberth-1990",             9.99,   1.14    },
    {"trenberth-1990",             10.0,   1.14    },
    {"trenberth-1990",             15.0,   1.465   },
    {"trenberth-1990",             20.0,   1.79    },
    {"trenberth-1990",             25.0,   2.115   },
    {"heaps-1965",                 3.0,    0.565   },
    {"heaps-1965",                 5.0,    0.565   },
    {"heaps-1965",                 10.0,   1.25    },
    {"heaps-1965",                 15.0,   1.935   },
    {"heaps-1965",                 19.22,  2.513   },
    {"heaps-1965",                 25.0,   2.513   },
    {"trenberth-1990",             0.5,    2.18    },
    {"trenberth-1990",             1.0,    2.18    },
    {"trenberth-1990",             2.0,    1.4     },
    {"trenberth-1990",             3.0,    1.14    },
    {"trenberth-1990",             5.0,    1.14    },
    {"anderson-1993",              4.5,    0.8095  },
    {"anderson-1993",              8.0,    1.058   },
    {"anderson-1993",              10.0,   1.2     },
    {"anderson-1993",              15.0,   1.555   },
    {"anderson-1993",              21.0,   1.981   },
    {"yelland-taylor-1996",        3.0,    2.17889 },
    {"yelland-taylor-1996",        4.0,    1.54625 },
    {"yelland-taylor-1996",        5.99,   1.02213 },
    {"yelland-taylor-1996",        6.0,    1.02    },
    {"yelland-taylor-1996",        10.0,   1.3     },
    {"yelland-taylor-1996",        15.0,   1.65    },
    {"yelland-taylor-1996",        20.0,   2.0     },
    {"yelland-taylor-1996",        26.0,   2.42    },
    {"yelland-1998",               6.0,    0.926   },
    {"yelland-1998",               10.0,   1.21    },
    {"yelland-1998",               15.0,   1.565   },
    {"yelland-1998",               20.0,   1.92    },
    {"yelland-1998",               26.0,   2.346   },
    {"large-yeager-2004",          1.0,    2.9184  },
    {"large-yeager-2004",          2.0,    1.6448  },
    {"large-yeager-2004",          5.0,    1.064   },
    {"large-yeager-2004",          10.0,   1.176   },
    {"large-yeager-2004",          20.0,   1.805   },
    {"large-yeager-2004",          30.0,   2.524   },
    {"large-yeager-2009",          0.5,    5.5802  },
    {"large-yeager-2009",          1.0,    2.91839 },
    {"large-yeager-2009",          2.0,    1.64479 },
    {"large-yeager-2009",          5.0,    1.06397 },
    {"large-yeager-2009",          10.0,   1.17563 },
    {"large-yeager-2009",          20.0,   1.78474 },
    {"large-yeager-2009",          30.0,   2.29433 },
    {"large-yeager-2009",          32.99,  2.33826 },
    {"large-yeager-2009",          33.0,   2.34    },
    {"large-yeager-2009",          40.0,   2.34    },
    {"amorocho-devries-1980",      2.0,    1.04179 },
    {"amorocho-devries-1980",      5.0,    1.05215 },
    {"amorocho-devries-1980",      10.0,   1.29144 },
    {"amorocho-devries-1980",      12.5,   1.79    },
    {"amorocho-devries-1980",      15.0,   2.28856 },
    {"amorocho-devries-1980",      20.0,   2.52785 },
    {"amorocho-devries-1980",      30.0,   2.53998 },
    {"amorocho-devries-1980",      40.0,   2.54    },
    {"zijlema-2012",               5.0,    0.983888},
    {"zijlema-2012",               10.0,   1.34269 },
    {"zijlema-2012",               15.0,   1.62642 },
    {"zijlema-2012",               20.0,   1.83506 },
    {"zijlema-2012",               31.394, 2.03002 },
    {"zijlema-2012",               40.0,   1.91881 },
    {"zijlema-2012",               50.0,   1.51019 },
    {"andreas-2012",               2.0,    1.00219 },
    {"andreas-2012",               5.0,    0.897285},
    {"andreas-2012",               8.271,  0.968666},
    {"andreas-2012",               10.0,   1.19492 },
    {"andreas-2012",               15.0,   1.78064 },
    {"andreas-2012",               20.0,   2.13332 },
    {"andreas-2012",               25.0,   2.36184 },
    {"wuest-lorke-low-2003",       0.5,    9.76421 },
    {"wuest-lorke-low-2003",       1.0,    4.4     },
    {"wuest-lorke-low-2003",       2.0,    1.98275 },
    {"wuest-lorke-low-2003",       3.0,    1.24384 },
    {"wuest-lorke-low-2003",       3.85,   0.933626},
    {"wuest-lorke-low-2003",       5.0,    0.691253},
    {"wuest-lorke-quadratic-2003", 3.85,   0.934346},
    {"wuest-lorke-quadratic-2003", 5.0,    1.01205 },
    {"wuest-lorke-quadratic-2003", 10.0,   1.328   },
    {"wuest-lorke-quadratic-2003", 15.0,   1.60835 },
    {"wuest-lorke-quadratic-2003", 20.0,   1.8531  },
};

/* As above, for relations printed as friction velocity, m s-1. */
static const struct {
    const char *name;
    double speed;
    double expected;
} worked_friction[] = {
    {"andreas-2012",       2.0,   0.0633149},
    {"andreas-2012",       5.0,   0.149774 },
    {"andreas-2012",       8.271, 0.257422 },
    {"andreas-2012",       10.0,  0.345677 },
    {"andreas-2012",       15.0,  0.632965 },
    {"andreas-2012",       20.0,  0.923757 },
    {"andreas-2012",       25.0,  1.21497  },
    {"andreas-lines-2012", 5.0,   0.14663  },
    {"andreas-lines-2012", 8.271, 0.239199 },
    {"andreas-lines-2012", 8.8,   0.27004  },
    {"andreas-lines-2012", 10.0,  0.34     },
    {"andreas-lines-2012", 15.0,  0.6315   },
    {"andreas-lines-2012", 20.0,  0.923    },
};

/* As above, for relations printed as a share of the water's density, 1e-6. */
static const struct {
    const char *name;
    double speed;
    double expected;
} worked_share[] = {
    {"van-dorn-1953",     3.0,  1.2   },
    {"van-dorn-1953",     5.6,  1.2   },
    {"van-dorn-1953",     10.0, 1.6356},
    {"van-dorn-1953",     15.0, 2.0836},
    {"van-dorn-1953",     20.0, 2.3664},
    {"van-dorn-1953",     30.0, 2.6884},
    {"van-dorn-spm-1984", 3.0,  1.1   },
    {"van-dorn-spm-1984", 7.2,  1.1   },
    {"van-dorn-spm-1984", 10.0, 1.296 },
    {"van-dorn-spm-1984", 15.0, 1.776 },
    {"van-dorn-spm-1984", 20.0, 2.124 },
    {"van-dorn-spm-1984", 30.0, 2.544 },
};

/* Where a relation changes its branch or meets its guard, and the jump in
 * 1000 C10 that the rounding of its printed numbers leaves there: 0.137 times
 * half of 0.01 m s-1, half a digit of 0.29, half a digit of 2.34. */
static const struct {
    const char *name;
    double speed; /* m s-1 */
    double jump;
} breaks[] = {
    {"van-dorn-1953",              5.6,    0.0   },
    {"heaps-1965",                 5.0,    0.0   },
    {"heaps-1965",                 19.22,  0.0007},
    {"garratt-power-1977",         0.5,    0.0   },
    {"wu-low-wind-1982",           7.5,    0.0   },
    {"van-dorn-spm-1984",          7.2,    0.0   },
    {"trenberth-1990",             1.0,    0.0   },
    {"trenberth-1990",             3.0,    0.0   },
    {"trenberth-1990",             10.0,   0.0   },
    {"yelland-taylor-1996",        3.0,    0.0   },
    {"yelland-taylor-1996",        6.0,    0.005 },
    {"wuest-lorke-low-2003",       0.1,    0.0   },
    {"wuest-lorke-quadratic-2003", 51.875, 0.0   },
    {"large-yeager-2004",          0.5,    0.0   },
    {"large-yeager-2009",          0.5,    0.0   },
    {"large-yeager-2009",          33.0,   0.005 },
    {"andreas-2012",               0.5,    0.0   },
    {"andreas-lines-2012",         0.5,    0.0   },
    {"andreas-lines-2012",         8.271,  0.0   },
    {"zijlema-2012",               60.0,   0.0   },
};

#define COUNT(array) (sizeof(array) / sizeof(array)[0])

/* Half a unit of the sixth significant digit, and a few roundings. */
static double sixth_digit(double expected) {
    return 0.5 * pow(10.0, floor(log10(expected)) - 5.0) + 1e-12;
}

static double coefficient(const char *name, double speed) {
    const lee_drag_relation *relation = lee_drag_find(name);
    if (relation == NULL) {
        print_error("no relation is called %s\n", name);
        return NAN;
    }
    const lee_drag_input in = {speed, 1.225, 1000.0, 9.81, 1.5e-5};
    return relation->coefficient(&in);
}

static void each_relation_gives_what_its_equation_gives(void **state) {
    (void)state;
    for (size_t i = 0; i < COUNT(worked); i++) {
        assert_near(1e3 * coefficient(worked[i].name, worked[i].speed),
                    worked[i].expected, sixth_digit(worked[i].expected));
    }
}

static void each_friction_velocity_is_the_printed_one(void **state) {
    (void)state;
    for (size_t i = 0; i < COUNT(worked_friction); i++) {
        const double u = worked_friction[i].speed;
        assert_near(u * sqrt(coefficient(worked_friction[i].name, u)),
                    worked_friction[i].expected,
                    sixth_digit(worked_friction[i].expected));
    }
}

static void each_share_of_the_water_is_the_printed_one(void **state) {
    (void)state;
    for (size_t i = 0; i < COUNT(worked_share); i++) {
        const double c10 =
            coefficient(worked_share[i].name, worked_share[i].speed);
        assert_near(1e6 * c10 * 1.225 / 1000.0, worked_share[i].expected,
                    sixth_digit(worked_share[i].expected));
    }
}

/* 1000 C10 for water of 1000 and air of 1.225 kg m-3, worked from k. */
static void van_dorn_scales_with_water_over_air(void **state) {
    (void)state;
    assert_near(1e3 * coefficient("van-dorn-1953", 5.6), 0.979592, 5e-7);
    assert_near(1e3 * coefficient("van-dorn-1953", 10.0), 1.33518, 5e-6);
    assert_near(1e3 * coefficient("van-dorn-1953", 20.0), 1.93176, 5e-6);
    assert_near(1e3 * coefficient("van-dorn-1953", 30.0), 2.19461, 5e-6);
}

/* -b/2a of 2.97 x - 1.49 x^2 with x = U/31.5, and the parabola's value. */
static void zijlema_is_greatest_at_the_top_of_its_parabola(void **state) {
    (void)state;
    const double top = 31.5 * 2.97 / (2.0 * 1.49);
    const double most = 0.55 + 2.97 * 2.97 / (4.0 * 1.49);
    assert_near(1e3 * coefficient("zijlema-2012", top), most, 1e-12);
    assert_true(coefficient("zijlema-2012", top + 0.5) < 1e-3 * most);
    assert_true(coefficient("zijlema-2012", top - 0.5) < 1e-3 * most);
}

/* C10 tends to (0.0433 (1 + sqrt(0.120)))^2, the square of its slope. */
static void andreas_tends_to_the_square_of_its_slope(void **state) {
    (void)state;
    const double slope = 0.0433 * (1.0 + sqrt(0.120));
    /* At 1e7 m s-1 the offsets of 10 m s-1 are 1e-6 of the speed. */
    assert_near_share(coefficient("andreas-2012", 1e7), slope * slope, 4e-6);
}

static void each_relation_is_continuous_at_its_breaks(void **state) {
    (void)state;
    const double step = 1e-9; /* m s-1; slopes are below 100 in 1000 C10 */
    for (size_t i = 0; i < COUNT(breaks); i++) {
        const double u = breaks[i].speed;
        const double below = 1e3 * coefficient(breaks[i].name, u - step);
        const double above = 1e3 * coefficient(breaks[i].name, u + step);
        assert_near(above, below, breaks[i].jump + 1e-6);
    }
}

static void large_and_pond_jump_as_printed(void **state) {
    (void)state;
    assert_near(1e3 * coefficient("large-pond-1981", 11.0) -
                    1e3 * coefficient("large-pond-1981", 11.0 - 1e-9),
                0.005, 1e-9);
}

static void each_relation_can_be_found_by_its_own_name(void **state) {
    (void)state;
    const lee_drag_relation *relation;
    for (size_t i = 0; (relation = lee_drag_at(i)) != NULL; i++) {
        assert_ptr_equal(lee_drag_find(relation->name), relation);
    }
}

static void an_unknown_name_finds_nothing(void **state) {
    (void)state;
    assert_null(lee_drag_find("garratt"));
    assert_null(lee_drag_find(""));
}

static void a_misspelt_relation_has_a_nearest_one(void **state) {
    (void)state;
    assert_string_equal(lee_drag_nearest("garrat-linear-1977"),
                        "garratt-linear-1977");
    assert_null(lee_drag_nearest("nothing of the kind"));
}

/* From rest to half as much again as any wind at a lake. */
static void each_relation_is_positive_and_finite_at_any_speed(void **state) {
    (void)state;
    const lee_drag_relation *relation;
    for (size_t i = 0; (relation = lee_drag_at(i)) != NULL; i++) {
        for (int k = 0; k <= 1200; k++) {
            const lee_drag_input in = {0.1 * k, 1.225, 1000.0, 9.81, 1.5e-5};
            const double c10 = relation->coefficient(&in);
            if (!(isfinite(c10) && c10 > 0.0)) {
                print_error("%s at %g m/s: %g\n", relation->name, in.speed,
                            c10);
                fail();
            }
        }
    }
}

/* Within an order of magnitude of the 1 to 3 per thousand of the sea. */
static void each_relation_is_plausible_within_its_range(void **state) {
    (void)state;
    const lee_drag_relation *relation;
    for (size_t i = 0; (relation = lee_drag_at(i)) != NULL; i++) {
        for (double u = fmax(1.0, relation->speed_min);
             u <= relation->speed_max; u += 0.5) {
            const double c10 = coefficient(relation->name, u);
            assert_true(c10 > 0.4e-3 && c10 < 5e-3);
        }
    }
}

static void each_relation_keeps_a_missing_speed_missing(void **state) {
    (void)state;
    const lee_drag_relation *relation;
    for (size_t i = 0; (relation = lee_drag_at(i)) != NULL; i++) {
        assert_true(isnan(coefficient(relation->name, NAN)));
    }
}

static void each_range_is_in_order(void **state) {
    (void)state;
    const lee_drag_relation *relation;
    for (size_t i = 0; (relation = lee_drag_at(i)) != NULL; i++) {
        assert_true(relation->speed_min >= 0.0);
        assert_true(relation->speed_max > relation->speed_min);
        assert_true(isfinite(relation->speed_max));
    }
}

static bool is_kebab_case(const char *name) {
    bool was_hyphen = true;
    for (const char *c = name; *c != '\0'; c++) {
        const bool is_hyphen = *c == '-';
        const bool is_word =
            islower((unsigned char)*c) || isdigit((unsigned char)*c);
        if ((is_hyphen && was_hyphen) || !(is_hyphen || is_word)) {
            return false;
        }
        was_hyphen = is_hyphen;
    }
    return !was_hyphen;
}

static void each_name_is_in_kebab_case(void **state) {
    (void)state;
    const lee_drag_relation *relation;
    for (size_t i = 0; (relation = lee_drag_at(i)) != NULL; i++) {
        assert_true(is_kebab_case(relation->name));
    }
}

/* Year that closes a name. */
static int year_of(const lee_drag_relation *relation) {
    const char *last = strrchr(relation->name, '-');
    return last == NULL ? 0 : (int)strtol(last + 1, NULL, 10);
}

static void the_relations_stand_in_order_of_publication(void **state) {
    (void)state;
    int latest = 1900;
    const lee_drag_relation *relation;
    for (size_t i = 0; (relation = lee_drag_at(i)) != NULL; i++) {
        assert_true(year_of(relation) >= latest);
        latest = year_of(relation);
    }
}

static char *references(void) {
    char path[1024];
    (void)snprintf(path, sizeof path, "%s/docs/references.md",
                   getenv("LEE_SOURCE"));
    FILE *file = fopen(path, "rb");
    char *text = calloc(1, 1 << 20);
    if (file == NULL || text == NULL) {
        fail_msg("cannot read %s", path);
        return NULL;
    }
    (void)fread(text, 1, (1 << 20) - 1, file);
    (void)fclose(file);
    return text;
}

static void each_paper_stands_in_the_references(void **state) {
    (void)state;
    char *text = references();
    const lee_drag_relation *relation;
    for (size_t i = 0; (relation = lee_drag_at(i)) != NULL; i++) {
        char key[80];
        (void)snprintf(key, sizeof key, "- **%s** ", relation->paper);
        if (strstr(text, key) == NULL) {
            print_error("%s is not in docs/references.md\n", relation->paper);
            fail();
        }
    }
    free(text);
}

static void a_paper_takes_part_in_the_range_once(void **state) {
    (void)state;
    const lee_drag_relation *one;
    for (size_t i = 0; (one = lee_drag_at(i)) != NULL; i++) {
        const lee_drag_relation *other;
        for (size_t k = 0; k < i && (other = lee_drag_at(k)) != NULL; k++) {
            assert_false(one->is_for_range && other->is_for_range &&
                         strcmp(one->paper, other->paper) == 0);
        }
    }
}

static void
a_relation_that_holds_the_return_flow_is_not_in_the_range(void **state) {
    (void)state;
    const lee_drag_relation *relation;
    for (size_t i = 0; (relation = lee_drag_at(i)) != NULL; i++) {
        assert_false(relation->is_for_range && relation->includes_return_flow);
    }
    assert_true(lee_drag_find("van-dorn-1953")->includes_return_flow);
    assert_true(lee_drag_find("heaps-1965")->includes_return_flow);
}

/* The range may not narrow below five relations that were fitted there. */
static void five_relations_were_fitted_wherever_a_gale_blows(void **state) {
    (void)state;
    for (double u = 6.0; u <= 25.0; u += 0.5) {
        int fitted = 0;
        const lee_drag_relation *relation;
        for (size_t i = 0; (relation = lee_drag_at(i)) != NULL; i++) {
            fitted += relation->is_for_range && u >= relation->speed_min &&
                      u <= relation->speed_max;
        }
        assert_true(fitted >= 5);
    }
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(each_relation_gives_what_its_equation_gives),
        cmocka_unit_test(each_friction_velocity_is_the_printed_one),
        cmocka_unit_test(each_share_of_the_water_is_the_printed_one),
        cmocka_unit_test(van_dorn_scales_with_water_over_air),
        cmocka_unit_test(zijlema_is_greatest_at_the_top_of_its_parabola),
        cmocka_unit_test(andreas_tends_to_the_square_of_its_slope),
        cmocka_unit_test(each_relation_is_continuous_at_its_breaks),
        cmocka_unit_test(large_and_pond_jump_as_printed),
        cmocka_unit_test(each_relation_can_be_found_by_its_own_name),
        cmocka_unit_test(an_unknown_name_finds_nothing),
        cmocka_unit_test(a_misspelt_relation_has_a_nearest_one),
        cmocka_unit_test(each_relation_is_positive_and_finite_at_any_speed),
        cmocka_unit_test(each_relation_is_plausible_within_its_range),
        cmocka_unit_test(each_relation_keeps_a_missing_speed_missing),
        cmocka_unit_test(each_range_is_in_order),
        cmocka_unit_test(each_name_is_in_kebab_case),
        cmocka_unit_test(the_relations_stand_in_order_of_publication),
        cmocka_unit_test(each_paper_stands_in_the_references),
        cmocka_unit_test(a_paper_takes_part_in_the_range_once),
        cmocka_unit_test(
            a_relation_that_holds_the_return_flow_is_not_in_the_range),
        cmocka_unit_test(five_relations_were_fitted_wherever_a_gale_blows),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
