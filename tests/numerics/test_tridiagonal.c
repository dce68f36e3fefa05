/* Eigenvalues of matrices whose eigenvalues are known in closed form. */
#include "support/check.h"

#include "numerics/tridiagonal.h"

enum { N = 40 };
static const double pi = 3.14159265358979323846;

/* Diagonal 2, off-diagonal -1: 2 - 2 cos(k pi/(n + 1)). */
static void the_second_difference_has_its_cosine_spectrum(void **state) {
    (void)state;
    double d[N];
    double e[N - 1];
    for (size_t i = 0; i < N; i++) {
        d[i] = 2.0;
        e[i > 0 ? i - 1 : 0] = -1.0;
    }
    for (size_t k = 0; k < N; k++) {
        const double expected =
            2.0 - 2.0 * cos((double)(k + 1) * pi / (N + 1.0));
        /* a few roundings of the largest eigenvalue, 4 */
        assert_near(lee_tridiagonal_eigenvalue(N, d, e, k), expected, 8e-15);
    }
}

static void a_diagonal_matrix_returns_its_sorted_diagonal(void **state) {
    (void)state;
    const double d[] = {3.0, -1.0, 2.0};
    const double e[] = {0.0, 0.0};
    assert_near(lee_tridiagonal_eigenvalue(3, d, e, 0), -1.0, 2e-15);
    assert_near(lee_tridiagonal_eigenvalue(3, d, e, 1), 2.0, 2e-15);
    assert_near(lee_tridiagonal_eigenvalue(3, d, e, 2), 3.0, 2e-15);
}

static void a_single_number_is_its_own_eigenvalue(void **state) {
    (void)state;
    const double d[] = {0.25};
    assert_near(lee_tridiagonal_eigenvalue(1, d, NULL, 0), 0.25, 1e-16);
}

/* [[1, 2], [2, 1]]: -1 and 3. */
static void the_sign_of_the_off_diagonal_does_not_matter(void **state) {
    (void)state;
    const double d[] = {1.0, 1.0};
    const double plus[] = {2.0};
    const double minus[] = {-2.0};
    assert_near(lee_tridiagonal_eigenvalue(2, d, plus, 0), -1.0, 2e-15);
    assert_near(lee_tridiagonal_eigenvalue(2, d, minus, 1), 3.0, 2e-15);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(the_second_difference_has_its_cosine_spectrum),
        cmocka_unit_test(a_diagonal_matrix_returns_its_sorted_diagonal),
        cmocka_unit_test(a_single_number_is_its_own_eigenvalue),
        cmocka_unit_test(the_sign_of_the_off_diagonal_does_not_matter),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
