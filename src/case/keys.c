/* keys.c - every key of the case file: kind, unit, range, what it excludes.
 *
 * To add one: a row here, its line in docs/formats.md, its tests in
 * tests/case. Ranges are wide: they catch slips of unit and sign, they do not
 * judge lakes. Mappings stand below what they hold. */
#include "case/keys.h"

#include <math.h>

#include "case/draft.h"

#include "leewater/case.h"

/* A key read into `member` of a `base`; the rest are fields of lee_key. */
#define KEY(key, reader, base, member, ...) \
    { (key), (reader), .offset = offsetof(base, member), __VA_ARGS__ }
#define REQUIRED .is_required = true
#define OPTIONAL .is_required = false
#define BETWEEN(u, lowest, highest) \
    .unit = (u), .low = (lowest), .high = (highest)
#define ABOVE(u, lowest, highest) BETWEEN(u, lowest, highest), .is_above = true
#define OR_WORD(w, value)         .word = (w), .word_value = (value)
#define STORED(u)                 .si = (u)

#define LEVEL       BETWEEN("m", -500.0, 9000.0)
#define SPEED       BETWEEN("m/s", 0.0, 100.0)
#define DIRECTION   BETWEEN("degree", 0.0, 360.0), STORED("rad")
#define HOURS(most) BETWEEN("h", 0.0, most), STORED("s")
#define MINUTES     ABOVE("min", 0.0, 44640.0), STORED("s")

/* A mapping whose keys read into what its own key was handed. */
#define INSIDE(key, need, keys) \
    { (key), lee_key_section_of, need, .section = &(keys) }
/* A key of the whole draft whose value may be a mapping of these keys. */
#define OR_MAPPING(key, reader, keys, ...) \
    { (key), (reader), .section = &(keys), __VA_ARGS__ }
#define SECTION(rows, not_together, not_alone) \
    { (rows), sizeof(rows) / sizeof(rows)[0], (not_together), (not_alone) }

/* The lake. */

static const lee_key level_rows[] = {
    KEY("level", lee_key_quantity, lee_level_draft, level, OPTIONAL, LEVEL),
    KEY("file", lee_key_borrow, lee_level_draft, file, OPTIONAL),
    KEY("utc_offset", lee_key_utc_offset, lee_level_draft, utc_offset,
        OPTIONAL),
};
static const lee_key_pair level_excluded[] = {
    {"level", "file"},
    {NULL,    NULL  },
};
static const lee_key_pair level_needs[] = {
    {"utc_offset", "file"},
    {NULL,         NULL  },
};
static const lee_key_section level_keys =
    SECTION(level_rows, level_excluded, level_needs);

static const lee_key uniform_rows[] = {
    KEY("length", lee_key_quantity, lee_case_draft, axis.length, REQUIRED,
        ABOVE("m", 0.0, 2e6)),
    KEY("depth", lee_key_quantity, lee_case_draft, axis.depth, REQUIRED,
        ABOVE("m", 0.0, 2000.0)),
    KEY("width", lee_key_quantity, lee_case_draft, axis.width, REQUIRED,
        ABOVE("m", 0.0, 1e6)),
};
static const lee_key_section uniform_keys = SECTION(uniform_rows, NULL, NULL);

static const lee_key axis_rows[] = {
    KEY("bearing", lee_key_quantity, lee_case_draft, axis.bearing, OPTIONAL,
        DIRECTION),
    KEY("profile", lee_key_borrow, lee_case_draft, axis.profile, OPTIONAL),
    INSIDE("uniform", OPTIONAL, uniform_keys),
    KEY("made_for", lee_key_quantity, lee_case_draft, axis.made_for, OPTIONAL,
        LEVEL),
    KEY("start", lee_key_end, lee_case_draft, axis.start, OPTIONAL,
        .section = &level_keys),
    KEY("end", lee_key_end, lee_case_draft, axis.end, OPTIONAL,
        .section = &level_keys),
};
static const lee_key_pair axis_excluded[] = {
    {"profile", "uniform"},
    {NULL,      NULL     },
};
static const lee_key_pair axis_needs[] = {
    {"uniform", "bearing"},
    {NULL,      NULL     },
};
static const lee_key_section axis_keys =
    SECTION(axis_rows, axis_excluded, axis_needs);

/* Manning's n and Chezy's C are written without their odd units. */
static const lee_key bed_rows[] = {
    KEY("manning", lee_key_bed_value, lee_bed_law, value, OPTIONAL,
        ABOVE("1", 0.0, 0.5), .stands_for = LEE_BED_MANNING),
    KEY("chezy", lee_key_bed_value, lee_bed_law, value, OPTIONAL,
        BETWEEN("1", 1.0, 500.0), .stands_for = LEE_BED_CHEZY),
    KEY("roughness_length", lee_key_bed_value, lee_bed_law, value, OPTIONAL,
        ABOVE("m", 0.0, 10.0), .stands_for = LEE_BED_ROUGHNESS),
    KEY("drag", lee_key_bed_value, lee_bed_law, value, OPTIONAL,
        ABOVE("1", 0.0, 1.0), .stands_for = LEE_BED_DRAG),
    KEY("linear", lee_key_bed_value, lee_bed_law, value, OPTIONAL,
        ABOVE("s-1", 0.0, 1.0), .stands_for = LEE_BED_LINEAR),
};
static const lee_key_section bed_keys = SECTION(bed_rows, NULL, NULL);

static const lee_key lake_rows[] = {
    KEY("name", lee_key_text, lee_case_draft, result.problem.lake.name,
        OPTIONAL),
    KEY("still_water", lee_key_level, lee_case_draft, still_water, REQUIRED,
        LEVEL, .section = &level_keys),
    KEY("datum", lee_key_text, lee_case_draft, result.problem.lake.datum,
        OPTIONAL),
    KEY("datum_altitude", lee_key_quantity, lee_case_draft,
        result.problem.lake.datum_altitude, OPTIONAL,
        BETWEEN("m", -500.0, 9000.0)),
    KEY("altitude", lee_key_quantity, lee_case_draft,
        result.problem.lake.altitude, OPTIONAL, BETWEEN("m", -500.0, 9000.0)),
    KEY("water_density", lee_key_quantity, lee_case_draft,
        result.problem.lake.water_density, OPTIONAL,
        BETWEEN("kg m-3", 900.0, 1400.0)),
    KEY("water_temperature", lee_key_quantity, lee_case_draft,
        water_temperature, OPTIONAL, BETWEEN("degC", 0.0, 50.0), STORED("K")),
    KEY("gravity", lee_key_quantity, lee_case_draft,
        result.problem.lake.gravity, OPTIONAL, BETWEEN("m s-2", 9.0, 11.0)),
    INSIDE("axis", REQUIRED, axis_keys),
    KEY("bed", lee_key_bed, lee_case_draft, result.problem.bed, OPTIONAL,
        .section = &bed_keys),
};
static const lee_key_pair lake_excluded[] = {
    {"water_density", "water_temperature"},
    {NULL,            NULL               },
};
static const lee_key_section lake_keys =
    SECTION(lake_rows, lake_excluded, NULL);

/* The wind. */

static const lee_key column_rows[] = {
    KEY("column", lee_key_borrow, lee_column_draft, column, REQUIRED),
    KEY("unit", lee_key_borrow, lee_column_draft, unit, OPTIONAL),
    KEY("file", lee_key_borrow, lee_column_draft, file, OPTIONAL),
};
static const lee_key_section column_keys = SECTION(column_rows, NULL, NULL);

#define COLUMN(key, which)                                                   \
    KEY(key, lee_key_column, lee_case_draft, wind.column[(which)], OPTIONAL, \
        .stands_for = (which), .section = &column_keys)

static const lee_key given_rows[] = {
    KEY("speed", lee_key_quantity, lee_given_wind, speed, REQUIRED, SPEED),
    KEY("from", lee_key_quantity, lee_given_wind, from, REQUIRED, DIRECTION),
    KEY("duration", lee_key_quantity, lee_given_wind, duration, OPTIONAL,
        ABOVE("h", 0.0, 8784.0), STORED("s")),
};
static const lee_key_section given_keys = SECTION(given_rows, NULL, NULL);

static const char *const gust_classes[] = {"in-land", "off-land", "off-sea",
                                           "at-sea", NULL};

static const lee_key gust_rows[] = {
    KEY("duration", lee_key_quantity, lee_case_draft,
        result.problem.exposure.gust_duration, REQUIRED,
        BETWEEN("s", 1.0, 3600.0)),
    KEY("period", lee_key_quantity, lee_case_draft,
        result.problem.exposure.gust_period, REQUIRED,
        BETWEEN("min", 1.0, 60.0), STORED("s")),
    KEY("exposure", lee_key_choice, lee_case_draft,
        result.problem.exposure.gust_class, REQUIRED, .words = gust_classes),
};
static const lee_key_section gust_keys = SECTION(gust_rows, NULL, NULL);

static const lee_key to_water_rows[] = {
    KEY("fetch", lee_key_quantity, lee_case_draft,
        result.problem.exposure.to_water_fetch, OPTIONAL, ABOVE("m", 0.0, 2e6)),
    KEY("table", lee_key_borrow, lee_case_draft, to_water_table, OPTIONAL),
};
static const lee_key_pair to_water_excluded[] = {
    {"fetch", "table"},
    {NULL,    NULL   },
};
static const lee_key_section to_water_keys =
    SECTION(to_water_rows, to_water_excluded, NULL);

static const lee_key land_rows[] = {
    KEY("roughness_length", lee_key_quantity, lee_case_draft,
        result.problem.exposure.land_roughness, REQUIRED, ABOVE("m", 0.0, 5.0)),
    OR_MAPPING("to_water", lee_key_to_water, to_water_keys, REQUIRED,
               BETWEEN("1", 0.5, 3.0)),
};
static const lee_key_section land_keys = SECTION(land_rows, NULL, NULL);

static const lee_key over_rows[] = {
    INSIDE("land", REQUIRED, land_keys),
};
static const lee_key_section over_keys = SECTION(over_rows, NULL, NULL);

/* In the order of lee_stability_method, and of lee_stability_functions_at. */
static const char *const stability_methods[] = {"none", "monin-obukhov",
                                                "air-water-ratio", NULL};
static const char *const stability_sets[] = {"coare-3.5", "coare-3.0",
                                             "businger-dyer", NULL};

static const lee_key stability_rows[] = {
    KEY("method", lee_key_choice, lee_case_draft,
        result.problem.exposure.stability, REQUIRED,
        .words = stability_methods),
    KEY("air_temperature", lee_key_quantity, lee_case_draft,
        result.problem.exposure.air_temperature, OPTIONAL,
        BETWEEN("degC", -60.0, 60.0), STORED("K")),
    KEY("water_temperature", lee_key_quantity, lee_case_draft,
        result.problem.exposure.water_temperature, OPTIONAL,
        BETWEEN("degC", -5.0, 45.0), STORED("K")),
    KEY("temperature_height", lee_key_quantity, lee_case_draft,
        result.problem.exposure.temperature_height, OPTIONAL,
        BETWEEN("m", 0.5, 50.0)),
    KEY("functions", lee_key_choice, lee_case_draft, stability_functions,
        OPTIONAL, .words = stability_sets),
};
static const lee_key_section stability_keys =
    SECTION(stability_rows, NULL, NULL);

static const char *const grid_methods[] = {"nearest", "bilinear", NULL};
static const lee_key position_rows[] = {
    KEY("lon", lee_key_quantity, lee_case_draft, wind.longitude, REQUIRED,
        BETWEEN("degree", -180.0, 360.0)),
    KEY("lat", lee_key_quantity, lee_case_draft, wind.latitude, REQUIRED,
        BETWEEN("degree", -90.0, 90.0)),
    KEY("method", lee_key_choice, lee_case_draft, wind.method, OPTIONAL,
        .words = grid_methods),
};
static const lee_key_section position_keys = SECTION(position_rows, NULL, NULL);

static const char *const stamps[] = {"instant", "start", "middle", "end", NULL};
static const char *const height_methods[] = {"log", "power", "factor", NULL};
static const char *const gap_rules[] = {"error", "split", NULL};

static const lee_key wind_rows[] = {
    KEY("record", lee_key_record, lee_case_draft, wind, OPTIONAL),
    COLUMN("time", LEE_WIND_TIME),
    COLUMN("date", LEE_WIND_DATE),
    COLUMN("clock", LEE_WIND_CLOCK),
    COLUMN("year", LEE_WIND_YEAR),
    COLUMN("month", LEE_WIND_MONTH),
    COLUMN("day", LEE_WIND_DAY),
    COLUMN("hour", LEE_WIND_HOUR),
    COLUMN("minute", LEE_WIND_MINUTE),
    {"speed", lee_key_speed, OPTIONAL, SPEED,     .stands_for = LEE_WIND_SPEED,
                                 .section = &column_keys},
    {"from",  lee_key_from,  OPTIONAL, DIRECTION, .stands_for = LEE_WIND_FROM,
                                 .section = &column_keys},
    COLUMN("eastward", LEE_WIND_EASTWARD),
    COLUMN("northward", LEE_WIND_NORTHWARD),
    COLUMN("pressure", LEE_WIND_PRESSURE),
    COLUMN("air_temperature", LEE_WIND_AIR_TEMPERATURE),
    COLUMN("water_temperature", LEE_WIND_WATER_TEMPERATURE),
    COLUMN("humidity", LEE_WIND_HUMIDITY),
    COLUMN("ice", LEE_WIND_ICE),
    KEY("station", lee_key_borrow, lee_case_draft, wind.station, OPTIONAL),
    INSIDE("position", OPTIONAL, position_keys),
    KEY("calendar", lee_key_borrow, lee_case_draft, wind.calendar, OPTIONAL),
    KEY("stamp", lee_key_choice, lee_case_draft, wind.stamp, OPTIONAL,
        .words = stamps),
    KEY("missing", lee_key_missing, lee_case_draft, wind, OPTIONAL),
    KEY("variable", lee_key_borrow, lee_case_draft, wind.variable, OPTIONAL),
    KEY("century", lee_key_count, lee_case_draft, wind.century, OPTIONAL,
        BETWEEN("1", 1000.0, 9900.0)),
    KEY("utc_offset", lee_key_utc_offset, lee_case_draft, wind.utc_offset,
        OPTIONAL),
    KEY("largest_gap", lee_key_seconds, lee_case_draft,
        result.problem.wind.gap.largest, OPTIONAL, HOURS(8784.0)),
    KEY("gaps", lee_key_choice, lee_case_draft, wind.gaps, OPTIONAL,
        .words = gap_rules),
    KEY("directions", lee_key_count, lee_case_draft, wind.directions, OPTIONAL,
        BETWEEN("1", 2.0, 720.0)),
    KEY("duration", lee_key_quantity, lee_case_draft, wind.given.duration,
        OPTIONAL, ABOVE("h", 0.0, 8784.0), STORED("s")),
    KEY("winds", lee_key_winds, lee_case_draft, result.problem.wind, OPTIONAL,
        .section = &given_keys),
    KEY("height", lee_key_quantity, lee_case_draft,
        result.problem.exposure.height, OPTIONAL,
        BETWEEN("m", LEE_LOWEST_MAST, LEE_HIGHEST_MAST)),
    KEY("height_method", lee_key_choice, lee_case_draft,
        result.problem.exposure.height_method, OPTIONAL,
        .words = height_methods),
    KEY("height_factor", lee_key_quantity, lee_case_draft,
        result.problem.exposure.height_factor, OPTIONAL,
        BETWEEN("1", 0.2, 5.0)),
    KEY("averaging", lee_key_quantity, lee_case_draft,
        result.problem.exposure.averaging, OPTIONAL, MINUTES),
    KEY("maximum", lee_key_flag, lee_case_draft,
        result.problem.exposure.is_maximum, OPTIONAL),
    KEY("direction_offset", lee_key_quantity, lee_case_draft,
        result.problem.exposure.direction_offset, OPTIONAL,
        BETWEEN("degree", -180.0, 180.0), STORED("rad")),
    OR_MAPPING("gust", lee_key_gust, gust_keys, OPTIONAL),
    OR_MAPPING("over", lee_key_over, over_keys, OPTIONAL),
    OR_MAPPING("stability", lee_key_stability, stability_keys, OPTIONAL,
               BETWEEN("1", 0.5, 2.0), .words = stability_methods),
};
static const lee_key_pair wind_excluded[] = {
    {"station",          "position"  },
    {"record",           "winds"     },
    {"record",           "directions"},
    {"record",           "duration"  },
    {"winds",            "speed"     },
    {"winds",            "from"      },
    {"winds",            "directions"},
    {"winds",            "duration"  },
    {"from",             "directions"},
    {"speed",            "eastward"  },
    {"speed",            "northward" },
    {"from",             "eastward"  },
    {"from",             "northward" },
    {"time",             "date"      },
    {"time",             "year"      },
    {"date",             "year"      },
    {"clock",            "hour"      },
    {"gust",             "averaging" },
    {"gust",             "maximum"   },
    {"direction_offset", "directions"},
    {NULL,               NULL        },
};
static const lee_key_pair wind_needs[] = {
    {"station",           "record"       },
    {"position",          "record"       },
    {"calendar",          "record"       },
    {"time",              "record"       },
    {"date",              "record"       },
    {"date",              "clock"        },
    {"clock",             "date"         },
    {"year",              "record"       },
    {"year",              "month"        },
    {"month",             "year"         },
    {"month",             "day"          },
    {"day",               "month"        },
    {"hour",              "year"         },
    {"minute",            "hour"         },
    {"eastward",          "record"       },
    {"eastward",          "northward"    },
    {"northward",         "eastward"     },
    {"pressure",          "record"       },
    {"air_temperature",   "record"       },
    {"water_temperature", "record"       },
    {"humidity",          "record"       },
    {"ice",               "record"       },
    {"stamp",             "record"       },
    {"missing",           "record"       },
    {"variable",          "record"       },
    {"century",           "year"         },
    {"utc_offset",        "record"       },
    {"largest_gap",       "record"       },
    {"gaps",              "record"       },
    {"directions",        "speed"        },
    {"duration",          "speed"        },
    {"maximum",           "averaging"    },
    {"height_factor",     "height_method"},
    {NULL,                NULL           },
};
static const lee_key_section wind_keys =
    SECTION(wind_rows, wind_excluded, wind_needs);

static const lee_key storm_rows[] = {
    KEY("peak", lee_key_quantity, lee_storm, peak, REQUIRED,
        ABOVE("m/s", 0.0, 100.0)),
    KEY("from", lee_key_quantity, lee_storm, from, REQUIRED, DIRECTION),
    KEY("turn", lee_key_quantity, lee_storm, turn, OPTIONAL,
        BETWEEN("degree", -360.0, 360.0), STORED("rad")),
    KEY("rise", lee_key_quantity, lee_storm, rise, REQUIRED, HOURS(240.0)),
    KEY("hold", lee_key_quantity, lee_storm, hold, OPTIONAL, HOURS(240.0)),
    KEY("fall", lee_key_quantity, lee_storm, fall, REQUIRED, HOURS(240.0)),
    KEY("before", lee_key_quantity, lee_storm, before, OPTIONAL, SPEED),
    KEY("after", lee_key_quantity, lee_storm, after, OPTIONAL, SPEED),
};
static const lee_key_section storm_keys = SECTION(storm_rows, NULL, NULL);

/* Stress and what is not known. */

static const lee_key table_rows[] = {
    KEY("table", lee_key_borrow, lee_case_draft, drag_table, REQUIRED),
};
static const lee_key_section table_keys = SECTION(table_rows, NULL, NULL);

static const lee_key stress_rows[] = {
    {"drag", lee_key_drag, OPTIONAL, ABOVE("1", 0.0, 0.02),
     .section = &table_keys},
    KEY("drag_cap", lee_key_quantity, lee_case_draft, drag_cap, OPTIONAL,
        BETWEEN("1", 5e-4, 0.02), OR_WORD("none", INFINITY)),
    KEY("air_density", lee_key_quantity, lee_case_draft,
        result.problem.air.density, OPTIONAL, BETWEEN("kg m-3", 0.3, 2.0)),
    KEY("air_temperature", lee_key_quantity, lee_case_draft,
        result.problem.air.temperature, OPTIONAL, BETWEEN("degC", -60.0, 60.0),
        STORED("K")),
    KEY("air_pressure", lee_key_quantity, lee_case_draft,
        result.problem.air.pressure, OPTIONAL, BETWEEN("hPa", 300.0, 1100.0),
        STORED("Pa")),
    KEY("humidity", lee_key_quantity, lee_case_draft,
        result.problem.air.humidity, OPTIONAL, BETWEEN("1", 0.0, 1.0)),
    KEY("ice", lee_key_quantity, lee_case_draft, result.problem.ice, OPTIONAL,
        BETWEEN("1", 0.0, 1.0)),
    KEY("return_flow", lee_key_return_flow, lee_case_draft, result.problem,
        OPTIONAL, BETWEEN("1", 1.0, 3.0), .word = "computed"),
};
static const lee_key_pair stress_excluded[] = {
    {"air_density", "air_temperature"},
    {"air_density", "air_pressure"   },
    {"air_density", "humidity"       },
    {NULL,          NULL             },
};
static const lee_key_section stress_keys =
    SECTION(stress_rows, stress_excluded, NULL);

static const lee_key uncertainty_rows[] = {
    KEY("wind", lee_key_quantity, lee_case_draft,
        result.problem.uncertainty.wind, OPTIONAL, BETWEEN("1", 0.0, 0.9)),
    KEY("depth", lee_key_quantity, lee_case_draft,
        result.problem.uncertainty.depth, OPTIONAL, BETWEEN("m", 0.0, 100.0)),
    KEY("bed", lee_key_quantity, lee_case_draft, result.problem.uncertainty.bed,
        OPTIONAL, BETWEEN("1", 0.0, 0.9)),
};
static const lee_key_section uncertainty_keys =
    SECTION(uncertainty_rows, NULL, NULL);

/* Stations, run and solver. */

static const lee_key station_rows[] = {
    KEY("name", lee_key_text, lee_station, name, REQUIRED),
    KEY("at", lee_key_quantity, lee_station, at, REQUIRED,
        BETWEEN("m", -1e7, 1e7)),
    KEY("bed", lee_key_quantity, lee_station, bed, OPTIONAL, LEVEL),
    KEY("below", lee_key_thresholds, lee_station, threshold, OPTIONAL, LEVEL,
        .stands_for = true),
    KEY("above", lee_key_thresholds, lee_station, threshold, OPTIONAL, LEVEL,
        .stands_for = false),
    KEY("lon", lee_key_quantity, lee_station, longitude, OPTIONAL,
        BETWEEN("degree", -180.0, 360.0)),
    KEY("lat", lee_key_quantity, lee_station, latitude, OPTIONAL,
        BETWEEN("degree", -90.0, 90.0)),
};
static const lee_key_pair station_needs[] = {
    {"lon", "lat"},
    {"lat", "lon"},
    {NULL,  NULL },
};
static const lee_key_section station_keys =
    SECTION(station_rows, NULL, station_needs);

static const char *const starts[] = {"rest", "steady", NULL};

static const lee_key run_rows[] = {
    KEY("from", lee_key_time, lee_case_draft, from, OPTIONAL),
    KEY("to", lee_key_time, lee_case_draft, to, OPTIONAL),
    KEY("start", lee_key_choice, lee_case_draft, result.problem.run.start,
        OPTIONAL, .words = starts),
    KEY("every", lee_key_seconds, lee_case_draft, result.problem.run.every,
        OPTIONAL, MINUTES),
};
static const lee_key_section run_keys = SECTION(run_rows, NULL, NULL);

static const lee_key solver_rows[] = {
    KEY("cells", lee_key_count, lee_case_draft, result.problem.solver.cells,
        OPTIONAL, BETWEEN("1", 4.0, 1e5), OR_WORD("auto", 0.0)),
    KEY("step", lee_key_quantity, lee_case_draft, result.problem.solver.step,
        OPTIONAL, BETWEEN("s", 0.01, 86400.0), OR_WORD("auto", 0.0)),
    KEY("dry_depth", lee_key_quantity, lee_case_draft,
        result.problem.solver.dry_depth, OPTIONAL, ABOVE("m", 0.0, 1.0)),
    KEY("advection", lee_key_flag, lee_case_draft,
        result.problem.solver.has_advection, OPTIONAL),
};
static const lee_key_section solver_keys = SECTION(solver_rows, NULL, NULL);

/* The top of the file. */

static const lee_key about_rows[] = {
    KEY("institution", lee_key_text, lee_case_draft, result.institution,
        OPTIONAL),
    KEY("creator", lee_key_text, lee_case_draft, result.creator, OPTIONAL),
    KEY("license", lee_key_text, lee_case_draft, result.license, OPTIONAL),
};
static const lee_key_section about_keys = SECTION(about_rows, NULL, NULL);

static const lee_key case_rows[] = {
    KEY("title", lee_key_text, lee_case_draft, result.title, OPTIONAL),
    INSIDE("about", OPTIONAL, about_keys),
    INSIDE("lake", REQUIRED, lake_keys),
    INSIDE("wind", OPTIONAL, wind_keys),
    {"storm", lee_key_storm, OPTIONAL, .section = &storm_keys},
    INSIDE("stress", OPTIONAL, stress_keys),
    INSIDE("uncertainty", OPTIONAL, uncertainty_keys),
    KEY("stations", lee_key_stations, lee_case_draft, result.problem, OPTIONAL,
        .section = &station_keys),
    INSIDE("run", OPTIONAL, run_keys),
    INSIDE("solver", OPTIONAL, solver_keys),
};
const lee_key_section lee_case_keys = SECTION(case_rows, NULL, NULL);
