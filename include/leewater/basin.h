/* basin.h - the lake, its axis, and the channel that the solvers take.
 *
 * Heights (bed, level) are metres above the lake's datum, positive up.
 * Chainage x is metres along the axis. Bearings are radians clockwise from
 * north of the way chainage grows. */
#ifndef LEEWATER_BASIN_H
#define LEEWATER_BASIN_H

#include <stdbool.h>
#include <stddef.h>
#include <stdint.h>

#include "leewater/status.h"

/* A level that is constant (n == 1, time ignored) or a series, linear between
 * its times. Owns its columns. */
typedef struct lee_level_series {
    size_t n;
    int64_t *time; /* [n] s since 1970 UTC, increasing; NULL when constant */
    double *level; /* [n] m above the datum                                */
} lee_level_series;

/* A series of one level, m above the datum. What it held before is not freed.
 * Errors: LEE_ERR_MEMORY; the series is then empty. */
lee_status lee_level_constant(double level, lee_level_series *series,
                              lee_error *error);
void lee_level_series_free(lee_level_series *series);

/* Level at time t; held before the first and after the last. NaN if empty. */
double lee_level_at(const lee_level_series *series, double t);

/* Reads a CSV of two columns, time (ISO 8601; the zone or utc_offset given)
 * and "level [unit]", both found by name.
 * Errors: LEE_ERR_FILE, LEE_ERR_FORMAT, LEE_ERR_MEMORY. */
lee_status lee_level_series_read_csv(const char *path, bool has_utc_offset,
                                     int64_t utc_offset,
                                     lee_level_series *series,
                                     lee_error *error);

/* The axis of a lake: bed and width along it, linear between rows. Owns its
 * columns. */
typedef struct lee_profile {
    size_t n;
    double *chainage; /* [n] m, increasing                                  */
    double *bed;      /* [n] m above the datum, section mean                */
    double *width;    /* [n] m at still water, > 0                          */
    double *bearing;  /* [n] rad; each holds to the next row                */
} lee_profile;

/* Gives a profile room for n rows, all 0. What it held before is not freed.
 * Errors: LEE_ERR_MEMORY; the profile is then empty. */
lee_status lee_profile_init(lee_profile *profile, size_t n, lee_error *error);
void lee_profile_free(lee_profile *profile);

/* Two rows at least, chainage increasing, width positive, all finite.
 * Errors: LEE_ERR_DATA, naming the row (from 1). */
lee_status lee_profile_check(const lee_profile *profile, lee_error *error);

/* Reads "chainage [km]; bed [m]; width [km]; bearing [degree]" in any column
 * order, units in the header. Instead of bed a column "depth" (below still
 * water, >= 0) may be given when `still_water` is finite. Without a bearing
 * column every row takes `bearing` (radians; NaN: then a missing column is an
 * error).
 * Errors: LEE_ERR_FILE, LEE_ERR_FORMAT and LEE_ERR_DATA with line and column,
 * LEE_ERR_MEMORY. */
lee_status lee_profile_read_csv(const char *path, double bearing,
                                double still_water, lee_profile *profile,
                                lee_error *error);

/* Bed, width and bearing at x, clamped to the axis. */
double lee_profile_bed(const lee_profile *profile, double x);
double lee_profile_width(const lee_profile *profile, double x);
double lee_profile_bearing(const lee_profile *profile, double x);

/* Wetted length, surface area, volume and mean depth of all water below
 * `level`. */
typedef struct lee_basin_summary {
    double wet_length; /* m  */
    double area;       /* m2 */
    double volume;     /* m3 */
    double mean_depth; /* m, volume over area; 0 when dry */
    double max_depth;  /* m  */
} lee_basin_summary;
lee_basin_summary lee_profile_summary(const lee_profile *profile, double level);

/* The same of the longest connected water; of equals the first. */
lee_basin_summary lee_profile_longest_water(const lee_profile *profile,
                                            double level);

/* One end of the axis. */
typedef struct lee_end {
    bool is_held;           /* a given level; otherwise a wall */
    lee_level_series level; /* when held                       */
} lee_end;

/* A lake as a case gives it. Owns what it points to. */
typedef struct lee_lake {
    char *name;                   /* may be NULL                            */
    char *datum;                  /* name of the zero of levels; NULL when
                                     not given                              */
    lee_level_series still_water; /* m above the datum                      */
    double altitude;              /* m above sea, for air pressure; NaN     */
    double datum_altitude;        /* m above sea of the datum; NaN          */
    double water_density;         /* kg m-3                                 */
    double gravity;               /* m s-2                                  */
    lee_profile profile;
    lee_end start; /* at the first chainage */
    lee_end end;   /* at the last           */
} lee_lake;

void lee_lake_free(lee_lake *lake);

/* What the transient solver takes: nodes that hold water and one level each,
 * links that carry transport between two nodes. A section may have several
 * depth classes: one level, several beds. Arrays with classes are
 * [node or link][class], class fastest, lowest bed first. Owns its arrays.
 *
 * One reach cut from an axis is a chain: link i joins nodes i and i + 1. */
typedef struct lee_channel {
    size_t nodes;
    size_t links;
    size_t classes;
    double *chainage; /* [nodes] centre of the node, m                     */
    double *length;   /* [nodes] its share of the axis, m                  */
    double *area;     /* [nodes][classes] plan area, m2                    */
    double *bed;      /* [nodes][classes] storage bed, m above the datum   */
    size_t *from;     /* [links] node at the end of lower chainage         */
    size_t *to;       /* [links] node at the end of higher chainage        */
    double *spacing;  /* [links] distance of the two nodes, m              */
    double *width;    /* [links][classes] m                                */
    double *link_bed; /* [links][classes] m above the datum                */
    double *bearing;  /* [links] rad                                       */
} lee_channel;

/* Cuts an axis into `cells` equal cells: node areas and beds keep the plan
 * area and, for the fully wet section, the volume of the profile exactly;
 * link beds and widths are the profile's at the faces.
 * Errors: LEE_ERR_ARGUMENT when cells < 2; LEE_ERR_MEMORY. */
lee_status lee_channel_from_profile(const lee_profile *profile, size_t cells,
                                    lee_channel *channel, lee_error *error);
void lee_channel_free(lee_channel *channel);

#endif
