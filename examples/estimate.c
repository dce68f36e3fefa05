/* estimate.c - set-up of an invented lake, through the library alone.
 *
 * cc estimate.c $(pkg-config --cflags --libs leewater) */
#include <math.h>
#include <stdio.h>
#include <stdlib.h>

#include <leewater/leewater.h>

/* A trough 12 km long, 5 m deep and 1.5 km wide that runs to the east. */
static lee_status dig(lee_lake *lake, lee_error *error) {
    lee_status status = lee_level_constant(100.0, &lake->still_water, error);
    if (status == LEE_OK) {
        status = lee_profile_init(&lake->profile, 2, error);
    }
    for (size_t i = 0; status == LEE_OK && i < 2; i++) {
        lake->profile.chainage[i] = 12e3 * (double)i;
        lake->profile.bed[i] = 95.0;
        lake->profile.width[i] = 1500.0;
        lake->profile.bearing[i] = 0.5 * 3.14159265358979324;
    }
    return status;
}

/* One wind of 20 m/s from the west, as long as it takes. */
static lee_status blow(lee_wind_source *wind, lee_error *error) {
    wind->given = calloc(1, sizeof *wind->given);
    if (wind->given == NULL) {
        return lee_fail(error, LEE_ERR_MEMORY, "no room for a wind");
    }
    wind->kind = LEE_WIND_GIVEN;
    wind->given_count = 1;
    wind->given[0] = (lee_given_wind){
        .speed = 20.0, .from = 1.5 * 3.14159265358979324, .duration = NAN};
    return LEE_OK;
}

static void print_levels(const lee_wind_estimate *levels) {
    printf("set-up   %+.2f m, %.2f to %.2f m\n", levels->set_up.value,
           levels->set_up.low, levels->set_up.high);
    printf("set-down %+.2f m, %.2f to %.2f m\n", levels->set_down.value,
           levels->set_down.low, levels->set_down.high);
    puts(lee_caution());
}

int main(void) {
    lee_error error = {0};
    lee_problem problem = lee_problem_default();
    lee_steady_result result = {0};
    lee_quiet_gsl();
    if (dig(&problem.lake, &error) == LEE_OK &&
        blow(&problem.wind, &error) == LEE_OK &&
        lee_estimate_steady(&problem, &result, &error) == LEE_OK) {
        print_levels(&result.wind[0]);
    } else {
        fprintf(stderr, "estimate: %s\n", error.message);
    }
    lee_steady_result_free(&result);
    lee_problem_free(&problem);
    return lee_status_exit_code(error.status);
}
