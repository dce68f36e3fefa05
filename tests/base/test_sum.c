/* A compensated sum keeps what plain addition loses. */
#include "support/check.h"

#include "base/sum.h"

static double sum_of(size_t n, const double terms[]) {
    lee_sum sum = {0};
    for (size_t i = 0; i < n; i++) {
        lee_sum_add(&sum, terms[i]);
    }
    return lee_sum_value(&sum);
}

static void an_empty_sum_is_zero(void **state) {
    (void)state;
    assert_near(sum_of(0, NULL), 0.0, 0.0);
}

/* The case that Kahan's sum loses and Neumaier's keeps [neumaier1974]. */
static void a_small_term_survives_between_two_large_ones(void **state) {
    (void)state;
    const double terms[] = {1.0, 1e100, 1.0, -1e100};
    assert_near(sum_of(4, terms), 2.0, 0.0);
}

static void ten_million_tenths_make_a_million(void **state) {
    (void)state;
    enum { TERMS = 10000000 };
    lee_sum sum = {0};
    double plain = 0.0;
    for (int i = 0; i < TERMS; i++) {
        lee_sum_add(&sum, 0.1);
        plain += 0.1;
    }
    /* The double 0.1 is 0.1 + 5.55e-18; 1e7 of them are 1e6 + 5.6e-11, nearer
     * to 1e6 than half a unit in its last place, 5.8e-11. */
    assert_near(lee_sum_value(&sum), 1e6, 0.0);
    assert_true(fabs(plain - 1e6) > 1e-6); /* the sum had something to mend */
}

static void the_order_of_terms_does_not_matter(void **state) {
    (void)state;
    enum { TERMS = 1000 };
    lee_sum up = {0};
    lee_sum down = {0};
    for (int i = 0; i < TERMS; i++) {
        lee_sum_add(&up, ldexp(i % 2 ? 1.0 : -1.0, i % 90));
        lee_sum_add(&down, ldexp((TERMS - 1 - i) % 2 ? 1.0 : -1.0,
                                 (TERMS - 1 - i) % 90));
    }
    assert_near(lee_sum_value(&up), lee_sum_value(&down), 0.0);
}

static void a_missing_term_makes_the_sum_missing(void **state) {
    (void)state;
    const double terms[] = {1.0, NAN, 2.0};
    assert_true(isnan(sum_of(3, terms)));
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(an_empty_sum_is_zero),
        cmocka_unit_test(a_small_term_survives_between_two_large_ones),
        cmocka_unit_test(ten_million_tenths_make_a_million),
        cmocka_unit_test(the_order_of_terms_does_not_matter),
        cmocka_unit_test(a_missing_term_makes_the_sum_missing),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
