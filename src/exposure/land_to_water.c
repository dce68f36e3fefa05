/* land_to_water.c - how much faster the wind blows over open water. */
#include "leewater/exposure.h"

#include <math.h>
#include <stddef.h>

/* Saville, McClendon & Cochran (1962), as tabled in EM 1110-2-1420 ch. 15
 * [saville1962] (from memory): fetch in statute miles, ratio. 1 without any
 * fetch is our own start of the table. */
static const struct {
    double miles;
    double ratio;
} reservoir[] = {
    {0.0, 1.00},
    {0.5, 1.08},
    {1.0, 1.13},
    {2.0, 1.21},
    {3.0, 1.26},
    {4.0, 1.28},
    {5.0, 1.30},
};

static const double mile = 1609.344; /* m, definition */

double lee_reservoir_ratio(double fetch) {
    const size_t rows = sizeof reservoir / sizeof reservoir[0];
    const double miles = fetch / mile;
    if (!(miles >= 0.0)) {
        return NAN;
    }
    for (size_t i = 1; i < rows; i++) {
        const double left = reservoir[i - 1].miles;
        const double right = reservoir[i].miles;
        if (miles <= right) {
            const double share = (miles - left) / (right - left);
            return reservoir[i - 1].ratio +
                   share * (reservoir[i].ratio - reservoir[i - 1].ratio);
        }
    }
    return reservoir[rows - 1].ratio;
}

double lee_hsu_1980(double speed) {
    return speed >= 0.0 ? 3.0 * pow(speed, 2.0 / 3.0) : NAN;
}

double lee_hsu_1981(double speed) {
    return speed >= 0.0 ? 1.62 + 1.17 * speed : NAN;
}
