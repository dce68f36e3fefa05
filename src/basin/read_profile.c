/* read_profile.c - the axis of a lake from a CSV table. */
#include <math.h>
#include <stdlib.h>

#include "base/constants.h"
#include "formats/csv_column.h"
#include "leewater/basin.h"

/* Columns of the table, and what is known beside it. */
typedef struct layout {
    lee_csv_column chainage;
    lee_csv_column bed; /* or depth */
    lee_csv_column width;
    lee_csv_column bearing;
    bool has_depth;   /* the bed column is a depth below still water */
    bool has_bearing; /* else every row takes axis_bearing           */
    double axis_bearing;
    double still_water;
} layout;

static lee_status find_bed(const lee_csv *csv, layout *found,
                           lee_error *error) {
    const bool has_bed = lee_csv_has_column(csv, "bed");
    found->has_depth = lee_csv_has_column(csv, "depth");
    if (has_bed && found->has_depth) {
        return lee_fail(error, LEE_ERR_FORMAT,
                        "%s:%zu: columns 'bed' and 'depth' exclude each other",
                        lee_csv_path(csv), lee_csv_line(csv));
    }
    if (found->has_depth && !isfinite(found->still_water)) {
        return lee_fail(error, LEE_ERR_FORMAT,
                        "%s:%zu: a column 'depth' needs one still-water level "
                        "to count from; give 'bed' instead",
                        lee_csv_path(csv), lee_csv_line(csv));
    }
    return lee_csv_find_column(csv, found->has_depth ? "depth" : "bed", "m",
                               &found->bed, error);
}

static lee_status find_bearing(const lee_csv *csv, layout *found,
                               lee_error *error) {
    found->has_bearing = lee_csv_has_column(csv, "bearing");
    if (found->has_bearing) {
        return lee_csv_find_column(csv, "bearing", "radian", &found->bearing,
                                   error);
    }
    if (isnan(found->axis_bearing)) {
        return lee_fail(error, LEE_ERR_FORMAT,
                        "%s:%zu: no column 'bearing' and no bearing of the "
                        "axis in the case",
                        lee_csv_path(csv), lee_csv_line(csv));
    }
    return LEE_OK;
}

static lee_status find_layout(const lee_csv *csv, layout *found,
                              lee_error *error) {
    lee_status status =
        lee_csv_find_column(csv, "chainage", "m", &found->chainage, error);
    if (status == LEE_OK) {
        status = find_bed(csv, found, error);
    }
    if (status == LEE_OK) {
        status = lee_csv_find_column(csv, "width", "m", &found->width, error);
    }
    return status == LEE_OK ? find_bearing(csv, found, error) : status;
}

/* One row as read, SI. */
typedef struct row {
    double chainage;
    double bed;
    double width;
    double bearing;
} row;

static lee_status read_numbers(const lee_csv *csv, const lee_csv_field fields[],
                               const layout *found, row *read,
                               lee_error *error) {
    lee_status status = lee_csv_column_number(csv, fields, &found->chainage,
                                              &read->chainage, error);
    if (status == LEE_OK) {
        status =
            lee_csv_column_number(csv, fields, &found->bed, &read->bed, error);
    }
    if (status == LEE_OK) {
        status = lee_csv_column_number(csv, fields, &found->width, &read->width,
                                       error);
    }
    read->bearing = found->axis_bearing;
    if (status == LEE_OK && found->has_bearing) {
        status = lee_csv_column_number(csv, fields, &found->bearing,
                                       &read->bearing, error);
    }
    return status;
}

static lee_status read_row(const lee_csv *csv, const lee_csv_field fields[],
                           const layout *found, double last, row *read,
                           lee_error *error) {
    const lee_status status = read_numbers(csv, fields, found, read, error);
    if (status != LEE_OK) {
        return status;
    }
    if (!(read->chainage > last)) {
        return lee_csv_fail(csv, &fields[found->chainage.index], error,
                            "chainage %g m does not lie beyond the row before "
                            "it, %g m",
                            read->chainage, last);
    }
    if (!(read->width > 0.0)) {
        return lee_csv_fail(csv, &fields[found->width.index], error,
                            "width %g m is not positive", read->width);
    }
    if (found->has_depth && !(read->bed >= 0.0)) {
        return lee_csv_fail(csv, &fields[found->bed.index], error,
                            "depth %g m is negative; land above the still "
                            "water is told as 'bed'",
                            read->bed);
    }
    if (found->has_depth) {
        read->bed = found->still_water - read->bed;
    }
    if (found->has_bearing &&
        !(read->bearing >= 0.0 && read->bearing <= 2.0 * lee_pi + 1e-9)) {
        return lee_csv_fail(csv, &fields[found->bearing.index], error,
                            "bearing %g degree is not in [0, 360]",
                            read->bearing * 180.0 / lee_pi);
    }
    return LEE_OK;
}

static lee_status read_rows(lee_csv *csv, const layout *found, row **rows,
                            size_t *count, lee_error *error) {
    size_t room = 0;
    for (;;) {
        const lee_csv_field *fields = NULL;
        lee_status status = lee_csv_next(csv, &fields, error);
        if (status != LEE_OK || fields == NULL) {
            return status;
        }
        if (*count == room) {
            room = 2 * room + 16;
            row *grown = realloc(*rows, room * sizeof *grown);
            if (grown == NULL) {
                return lee_fail(error, LEE_ERR_MEMORY, "no room for %zu rows",
                                room);
            }
            *rows = grown;
        }
        const double last =
            *count == 0 ? -INFINITY : (*rows)[*count - 1].chainage;
        status = read_row(csv, fields, found, last, &(*rows)[*count], error);
        if (status != LEE_OK) {
            return status;
        }
        (*count)++;
    }
}

static lee_status fill_profile(const char *path, const row rows[], size_t count,
                               lee_profile *profile, lee_error *error) {
    if (count < 2) {
        return lee_fail(error, LEE_ERR_DATA,
                        "%s: an axis needs two rows at least, found %zu", path,
                        count);
    }
    const lee_status status = lee_profile_init(profile, count, error);
    for (size_t i = 0; i < count && status == LEE_OK; i++) {
        profile->chainage[i] = rows[i].chainage;
        profile->bed[i] = rows[i].bed;
        profile->width[i] = rows[i].width;
        profile->bearing[i] = rows[i].bearing;
    }
    return status;
}

lee_status lee_profile_read_csv(const char *path, double bearing,
                                double still_water, lee_profile *profile,
                                lee_error *error) {
    lee_csv *csv = NULL;
    row *rows = NULL;
    size_t count = 0;
    layout found = {.axis_bearing = bearing, .still_water = still_water};
    *profile = (lee_profile){0};
    lee_status status = lee_csv_open(path, &csv, error);
    if (status == LEE_OK) {
        status = find_layout(csv, &found, error);
    }
    if (status == LEE_OK) {
        status = read_rows(csv, &found, &rows, &count, error);
    }
    if (status == LEE_OK) {
        status = fill_profile(path, rows, count, profile, error);
    }
    free(rows);
    lee_csv_close(csv);
    return status;
}
