/* formulas.c - handbook formulas of set-up, national constants and all.
 *
 * Each is a number times U^2 F/D and is offered beside the steady solver, not
 * instead of it. Their sources define the result as the rise above still
 * water; with the drag coefficients of today the number equals the whole tilt
 * (docs/theory.md), so every row says both.
 *
 * To add one: write its function, add its row, add its check value to
 * tests/setup/test_formulas.c and its source to docs/references.md. */
#include "leewater/setup.h"

#include <math.h>
#include <string.h>

/* Exact definitions of the units of the sources. */
static const double foot = 0.3048;   /* m */
static const double mile = 1609.344; /* m */
static const double mph = 0.44704;   /* m s-1 */
static const double km = 1000.0;     /* m */
static const double kmh = 1.0 / 3.6; /* m s-1 */

/* S = U^2 F/(1400 D) in feet, miles per hour and miles. */
static double zuiderzee(double speed, double fetch, double depth,
                        double gravity) {
    (void)gravity;
    const double u = speed / mph;
    return foot * (u * u * (fetch / mile) / (1400.0 * (depth / foot)));
}

/* S = U^2 F/(K D) in km/h, km and m. */
static double metric_zuiderzee(double constant, double speed, double fetch,
                               double depth) {
    const double u = speed / kmh;
    return u * u * (fetch / km) / (constant * depth);
}

static double metric_62000(double speed, double fetch, double depth,
                           double gravity) {
    (void)gravity;
    return metric_zuiderzee(62000.0, speed, fetch, depth);
}

static double metric_63000(double speed, double fetch, double depth,
                           double gravity) {
    (void)gravity;
    return metric_zuiderzee(63000.0, speed, fetch, depth);
}

/* S = U^2 F/(4.861e6 D), m and s. */
static double dvwk(double speed, double fetch, double depth, double gravity) {
    (void)gravity;
    return speed * speed * fetch / (4.861e6 * depth);
}

/* S = 2e-6 U^2 F/(g D). */
static double novak(double speed, double fetch, double depth, double gravity) {
    return 2e-6 * speed * speed * fetch / (gravity * depth);
}

/* dh = c U^2 F/(2 g D), c = 3.5e-6. */
static double triatmodjo(double speed, double fetch, double depth,
                         double gravity) {
    return 3.5e-6 * speed * speed * fetch / (2.0 * gravity * depth);
}

/* e = K W^2 D/(2 g H), K = 3.6e-6. */
static double sl_274(double speed, double fetch, double depth, double gravity) {
    return 3.6e-6 * speed * speed * fetch / (2.0 * gravity * depth);
}

/* k_w = 2.1, 3.0, 3.9, 4.8e-6 at 20, 30, 40, 50 m/s: a line, held outside. */
static double snip_coefficient(double speed) {
    const double held = speed < 20.0 ? 20.0 : speed > 50.0 ? 50.0 : speed;
    return 2.1e-6 + 0.09e-6 * (held - 20.0);
}

/* dh = k_w U^2 L/[g (d + dh/2)], the positive root of its quadratic. */
static double snip(double speed, double fetch, double depth, double gravity) {
    const double drive =
        snip_coefficient(speed) * speed * speed * fetch / gravity;
    return 2.0 * drive / (depth + sqrt(depth * depth + 2.0 * drive));
}

/* Every source says "rise"; every number matches a whole tilt. */
#define RISE_TILT LEE_RESULT_RISE, LEE_RESULT_TILT

/* No range is stated. */
#define ANY 0.0, INFINITY

/* The ends of the table of k_w. */
#define TABLE 20.0, 50.0

static const lee_formula formulas[] = {
    {"zuiderzee",       "em1420",     RISE_TILT, ANY,   false, zuiderzee   },
    {"is-6512",         "is6512",     RISE_TILT, ANY,   false, metric_62000},
    {"zuiderzee-63000", "freeboard",  RISE_TILT, ANY,   false, metric_63000},
    {"novak",           "novak",      RISE_TILT, ANY,   false, novak       },
    {"dvwk-246",        "dvwk246",    RISE_TILT, ANY,   true,  dvwk        },
    {"snip-148",        "snip",       RISE_TILT, TABLE, true,  snip        },
    {"sl-274",          "sl274",      RISE_TILT, ANY,   true,  sl_274      },
    {"triatmodjo",      "triatmodjo", RISE_TILT, ANY,   false, triatmodjo  },
};

const lee_formula *lee_formula_at(size_t index) {
    const size_t count = sizeof formulas / sizeof formulas[0];
    return index < count ? &formulas[index] : NULL;
}

const lee_formula *lee_formula_find(const char *name) {
    const lee_formula *formula;
    for (size_t i = 0; (formula = lee_formula_at(i)) != NULL; i++) {
        if (strcmp(formula->name, name) == 0) {
            return formula;
        }
    }
    return NULL;
}
