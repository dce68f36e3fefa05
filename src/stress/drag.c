/* drag.c - the drag of an estimate: a relation, a constant or a table. */
#include "leewater/stress.h"

#include <math.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>

#include "base/constants.h"

lee_drag lee_drag_default(void) {
    return (lee_drag){
        .relation = lee_drag_find("garratt-linear-1977"),
        .cap = 3.0e-3,
    };
}

lee_drag_input lee_drag_input_default(void) {
    return (lee_drag_input){
        .air_density = 1.225,
        .water_density = 1000.0,
        .gravity = lee_standard_gravity,
        .air_viscosity = lee_air_viscosity(lee_celsius_zero + 15.0),
    };
}

void lee_drag_free(lee_drag *drag) {
    free(drag->speed);
    free(drag->coefficient);
    free(drag->bend);
    free(drag->bin);
    *drag = (lee_drag){0};
}

/* Index of the last row at or below speed, for a speed inside the table. */
static size_t row_below(const lee_drag *drag, double speed) {
    size_t low = 0;
    size_t high = drag->n - 1;
    while (high - low > 1) {
        const size_t middle = low + (high - low) / 2;
        if (drag->speed[middle] <= speed) {
            low = middle;
        } else {
            high = middle;
        }
    }
    return low;
}

/* The same in a solved table, where the bin says where to begin. */
static size_t row_in_bin(const lee_drag *drag, double speed) {
    const double *u = drag->speed;
    const double width = u[drag->n - 1] / (double)drag->bins;
    const size_t k = (size_t)(speed / width);
    size_t row = drag->bin[k < drag->bins ? k : drag->bins - 1];
    while (row + 2 < drag->n && u[row + 1] <= speed) {
        row++;
    }
    return row;
}

static double from_table(const lee_drag *drag, double speed) {
    const double *u = drag->speed;
    const double *c = drag->coefficient;
    if (speed <= u[0]) {
        return c[0];
    }
    if (speed >= u[drag->n - 1]) {
        return c[drag->n - 1];
    }
    const size_t i =
        drag->bins > 0 ? row_in_bin(drag, speed) : row_below(drag, speed);
    const double share = (speed - u[i]) / (u[i + 1] - u[i]);
    const double bend = drag->bend != NULL ? drag->bend[i] : 0.0;
    return c[i] + share * (c[i + 1] - c[i] + 4.0 * (1.0 - share) * bend);
}

static double uncapped(const lee_drag *drag, const lee_drag_input *in) {
    if (drag->n > 0) {
        return from_table(drag, in->speed);
    }
    return drag->relation != NULL ? drag->relation->coefficient(in)
                                  : drag->constant;
}

static bool is_outside(double speed, double low, double high) {
    return speed < low || speed > high;
}

/* A constant has no range, so it never extrapolates. */
static bool is_extrapolated(const lee_drag *drag, double speed) {
    if (drag->relation != NULL) {
        return is_outside(speed, drag->relation->speed_min,
                          drag->relation->speed_max);
    }
    return drag->n > 0 &&
           is_outside(speed, drag->speed[0], drag->speed[drag->n - 1]);
}

double lee_drag_coefficient(const lee_drag *drag, const lee_drag_input *in,
                            bool *extrapolated, bool *capped) {
    const double c10 = isnan(in->speed) ? NAN : uncapped(drag, in);
    const bool is_capped = c10 > drag->cap;
    if (extrapolated != NULL) {
        *extrapolated = is_extrapolated(drag, in->speed);
    }
    if (capped != NULL) {
        *capped = is_capped;
    }
    return is_capped ? drag->cap : c10;
}

/* A coefficient as people write it: four decimals, more when they are
 * needed to tell it. */
static void show_coefficient(double c10, size_t size, char text[]) {
    (void)snprintf(text, size, "%.4f", c10);
    for (int decimals = 5; decimals <= 9; decimals++) {
        if (fabs(strtod(text, NULL) - c10) <= 1e-9) {
            return;
        }
        (void)snprintf(text, size, "%.*f", decimals, c10);
    }
}

static void describe_source(const lee_drag *drag, size_t size, char text[]) {
    char shown[32];
    if (drag->relation != NULL) {
        (void)snprintf(text, size, "%s", drag->relation->name);
    } else if (drag->n > 0) {
        (void)snprintf(text, size, "table of %zu %s", drag->n,
                       drag->n == 1 ? "row" : "rows");
    } else if (drag->constant > 0.0) {
        show_coefficient(drag->constant, sizeof shown, shown);
        (void)snprintf(text, size, "constant %s", shown);
    } else {
        (void)snprintf(text, size, "no drag");
    }
}

static bool is_none(const lee_drag *drag) {
    return drag->relation == NULL && drag->n == 0 && !(drag->constant > 0.0);
}

char *lee_drag_describe(const lee_drag *drag, size_t size, char text[]) {
    describe_source(drag, size, text);
    const size_t length = strlen(text);
    if (isfinite(drag->cap) && !is_none(drag)) {
        char shown[32];
        show_coefficient(drag->cap, sizeof shown, shown);
        (void)snprintf(text + length, size - length, ", capped at %s", shown);
    }
    return text;
}
