/* formulas.h - the handbook formulas and closed forms beside an estimate. */
#ifndef LEEWATER_OUTPUT_FORMULAS_H
#define LEEWATER_OUTPUT_FORMULAS_H

#include <stdbool.h>

#include "leewater/case.h"
#include "leewater/series.h"
#include "output/json_parts.h"
#include "output/print.h"

/* What formulas are asked: one wind over the length and the mean depth of a
 * lake, of its longest water when it is parted at rest. The vector stress
 * along a fixed axis gives the cosine once. */
typedef struct lee_formula_question {
    double speed; /* 10 m over open water, m s-1 */
    double along; /* share of the stress along the axis, 0 to 1 */
    double fetch; /* m */
    double depth; /* m */
    bool is_part; /* of the longest of several waters */
    double gravity;
    double pull; /* lambda tau/(rho g) along the axis, m */
} lee_formula_question;

lee_formula_question lee_ask_formulas(const lee_case *from,
                                      const lee_steady_result *result,
                                      const lee_wind_estimate *wind);

/* A table, each row saying whether its source calls the number a rise or a
 * tilt, and what it equals. */
void lee_print_formulas(const lee_printer *to,
                        const lee_formula_question *asked);

/* The list "formulas" of the object that is open. */
void lee_json_put_formulas(lee_json *json, const lee_formula_question *asked);

#endif
