/* thresholds.c - the thresholds of all stations, one after another. */
#include "output/netcdf/parts.h"

static size_t count_thresholds(const lee_problem *problem) {
    size_t count = 0;
    for (size_t i = 0; i < problem->station_count; i++) {
        count += problem->station[i].threshold_count;
    }
    return count;
}

static int define_side(lee_netcdf_out *out, int dimension) {
    static const lee_nc_variable side = {
        .name = "threshold_side",
        .long_name = "does it count when the level goes over or under it",
        .content = "referenceInformation",
    };
    static const signed char values[] = {0, 1};
    const lee_netcdf_shape shape = {
        .kind = LEE_NETCDF_BYTE,
        .dimensions = 1,
        .dimension = {dimension},
    };
    const int id = lee_nc_define(out, &side, &shape);
    lee_netcdf_put_bytes(out, id, "flag_values", 2, values);
    lee_netcdf_put_text(out, id, "flag_meanings", "above below");
    return id;
}

lee_nc_thresholds lee_nc_define_thresholds(lee_netcdf_out *out,
                                           const lee_problem *problem) {
    static const lee_nc_variable station = {
        .name = "threshold_station",
        .units = "1",
        .long_name = "number of its station, counted from 0",
        .content = "referenceInformation",
    };
    static const lee_nc_variable level = {
        .name = "threshold_level",
        .units = "m",
        .long_name = "threshold above the datum of levels",
        .content = "referenceInformation",
    };
    lee_nc_thresholds thresholds = {.n = count_thresholds(problem)};
    if (thresholds.n == 0) {
        return thresholds;
    }
    thresholds.dimension = lee_netcdf_dimension(out, "threshold", thresholds.n);
    const lee_netcdf_shape shape = {
        .dimensions = 1,
        .dimension = {thresholds.dimension},
    };
    thresholds.station = lee_nc_define(out, &station, &shape);
    thresholds.level = lee_nc_define(out, &level, &shape);
    thresholds.side = define_side(out, thresholds.dimension);
    return thresholds;
}

void lee_nc_put_thresholds(lee_netcdf_out *out,
                           const lee_nc_thresholds *thresholds,
                           const lee_problem *problem) {
    const size_t one = 1;
    size_t row = 0;
    for (size_t i = 0; i < problem->station_count; i++) {
        const lee_station *station = &problem->station[i];
        for (size_t k = 0; k < station->threshold_count; k++, row++) {
            const lee_threshold *threshold = &station->threshold[k];
            const double of = (double)i;
            const double side = threshold->is_below ? 1.0 : 0.0;
            lee_netcdf_put_block(out, thresholds->station, &row, &one, &of);
            lee_netcdf_put_block(out, thresholds->side, &row, &one, &side);
            lee_netcdf_put_block(out, thresholds->level, &row, &one,
                                 &threshold->level);
        }
    }
}
