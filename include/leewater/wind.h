/* wind.h - the wind record: one model for every reader.
 *
 * Winds are components of where the air GOES (east, north; m s-1). Files and
 * people say where it comes FROM, in degrees clockwise from true north; the
 * reader converts once. A missing sample is NaN in both components; calm is
 * the zero vector. */
#ifndef LEEWATER_WIND_H
#define LEEWATER_WIND_H

#include <stdbool.h>
#include <stddef.h>
#include <stdint.h>

#include "leewater/status.h"

/* What the time of a sample stands for. */
typedef enum lee_stamp {
    LEE_STAMP_INSTANT, /* the sample holds at that time                    */
    LEE_STAMP_START,   /* mean over the step that begins there             */
    LEE_STAMP_MIDDLE,  /* mean over the step centred there                 */
    LEE_STAMP_END      /* mean over the step that ends there               */
} lee_stamp;

/* Owns its columns. {0} is a valid empty record; so is a freed one. */
typedef struct lee_wind_record {
    size_t n;
    int64_t *time;             /* [n] s since 1970 UTC, strictly increasing */
    double *east;              /* [n] toward east, m s-1; NaN when missing  */
    double *north;             /* [n] toward north, m s-1; NaN when missing */
    double *pressure;          /* [n] or NULL: station pressure, Pa         */
    double *air_temperature;   /* [n] or NULL: K                            */
    double *water_temperature; /* [n] or NULL: K                            */
    double *humidity;          /* [n] or NULL: relative humidity, 0 to 1    */
    double *ice;               /* [n] or NULL: ice cover, 0 to 1            */
    lee_stamp stamp;
    size_t duplicates; /* equal repeated rows that the reader dropped       */
    size_t variable_calm;    /* "variable" below 3 m s-1, taken as calm     */
    size_t variable_missing; /* "variable" from 3 m s-1 on, taken as missing*/
    size_t merged;    /* samples dropped: they stand in another file too    */
    size_t completed; /* samples that took what they lacked from another    */
} lee_wind_record;

/* Gives `record` room for n samples: times 0, winds NaN, no optional column.
 * What it held before is not freed. Errors: LEE_ERR_MEMORY. */
lee_status lee_wind_record_init(lee_wind_record *record, size_t n,
                                lee_error *error);

/* Frees the columns and empties the record. Safe to call twice. */
void lee_wind_record_free(lee_wind_record *record);

/* Components of where the air goes from speed and the direction it blows
 * from (radians clockwise from north), and back, with the direction in
 * [0, 2 pi).
 *
 *     east = -U sin(from), north = -U cos(from)
 *
 * Calm is (0, 0) whatever its direction and gives direction 0; NaN in either
 * argument gives NaN in both results. */
void lee_wind_components(double speed, double from, double *east,
                         double *north);
void lee_wind_speed_from(double east, double north, double *speed,
                         double *from);

/* Columns a CSV record may have; variables of a NetCDF file, where the time is
 * LEE_WIND_TIME alone. */
typedef enum lee_wind_column {
    LEE_WIND_TIME, /* ISO 8601 date and time                                */
    LEE_WIND_DATE, /* ISO date; with LEE_WIND_CLOCK                         */
    LEE_WIND_CLOCK,
    LEE_WIND_YEAR, /* split time: year, month, day, then optional hour ...  */
    LEE_WIND_MONTH,
    LEE_WIND_DAY,
    LEE_WIND_HOUR,
    LEE_WIND_MINUTE,
    LEE_WIND_SPEED, /* with LEE_WIND_FROM                                   */
    LEE_WIND_FROM,  /* degrees the wind blows from; 0 and 360 are north     */
    LEE_WIND_EASTWARD, /* or the two components                             */
    LEE_WIND_NORTHWARD,
    LEE_WIND_PRESSURE,
    LEE_WIND_AIR_TEMPERATURE,
    LEE_WIND_WATER_TEMPERATURE,
    LEE_WIND_HUMIDITY,
    LEE_WIND_ICE,
    LEE_WIND_COLUMNS
} lee_wind_column;

/* The case file's name of a column ("speed"), and the unit it is converted to
 * ("m s-1"; "degree" for the direction; NULL for times). */
const char *lee_wind_column_name(lee_wind_column column);
const char *lee_wind_column_unit(lee_wind_column column);

/* [n] what a record holds of an optional quantity, LEE_WIND_PRESSURE and what
 * follows it; NULL when it holds none, or when `column` is no such quantity. */
const double *lee_wind_quantity(const lee_wind_record *record,
                                lee_wind_column column);

/* How a CSV file is to be read. Borrows its texts. {0} plus column names is
 * enough: separator and decimal sign are found, units stand in the header as
 * "speed [knots]". Only humidity and ice may do without a unit: they are then
 * fractions. */
typedef struct lee_wind_csv {
    struct {
        const char *name; /* header without its unit, or "#3" for the third;
                             NULL when there is no such column              */
        const char *unit; /* when the header has none; NULL otherwise       */
    } column[LEE_WIND_COLUMNS];
    bool has_utc_offset;
    int64_t utc_offset; /* s east of UTC of times without a zone; times
                           without a zone are refused when not given        */
    size_t missing_count;
    const char *const *missing; /* [missing_count] texts that mean "missing",
                              beside the empty field, NA, NaN and null      */
    const char *variable;       /* text in the direction column that means
                                   "variable" ("VRB"); NULL for none        */
    int century; /* 1900: what two-digit years of LEE_WIND_YEAR are added to;
                    0: two-digit years are refused                          */
    lee_stamp stamp;
    bool may_lack_quantities; /* a file need not have the columns named from
                                 LEE_WIND_PRESSURE on: one of several       */
} lee_wind_csv;

/* Reads a wind record. Rows whose wind is missing are kept as NaN; equal
 * repeated rows are dropped and counted; a repeated time with other values,
 * and a time that runs backwards, are errors with their line. Direction is
 * in [0, 360] degrees, speed in [0, 340] m s-1 (no wind outruns sound), and
 * the other quantities in the ranges of docs/formats.md, or it is an error
 * with line and column. A speed of 0 needs no direction: it is calm; any
 * other does, or the wind is missing. The header of a time may name its zone,
 * "time [UTC]" or "clock [+01:00]".
 * Hour 24 with minute 0 is midnight at the end of the day.
 *
 *   path    a regular file
 *   csv     how to read it
 *   record  out: freed with lee_wind_record_free
 *
 * Errors: LEE_ERR_FILE, LEE_ERR_FORMAT (file:line:column), LEE_ERR_DATA when
 * no sample has a wind, LEE_ERR_MEMORY. */
lee_status lee_wind_read_csv(const char *path, const lee_wind_csv *csv,
                             lee_wind_record *record, lee_error *error);

/* One of several records that are to be one. Borrows both. */
typedef struct lee_wind_part {
    const char *name; /* for messages: its file */
    const lee_wind_record *record;
} lee_wind_part;

/* Joins records into one, in order of time whatever the order given. Samples
 * of equal time are one sample: equal values are merged, a missing one takes
 * the value of the other record, and different ones are refused. Equal means
 * within a millionth (of the value, or of 1 SI unit for small values), the
 * rounding of units and of single precision. A quantity that some records
 * lack is NaN there and told; so are unequal usual steps of instants.
 *
 *   part     [count] records, empty ones among them if any
 *   joined   out: freed with lee_wind_record_free; its counts are the sums,
 *            and `merged` and `completed` count what the join itself did
 *   remarks  in/out: takes what ought to be told; on errors too
 *
 * Errors: LEE_ERR_ARGUMENT without a record; LEE_ERR_DATA when two records
 * have different values at a time, different stamps, means of different
 * steps, or overlap in time with fewer than half of the times in common (of
 * the one that has fewer there), so that nothing tells whether they agree;
 * LEE_ERR_MEMORY. The rules are our own. */
lee_status lee_wind_join(size_t count, const lee_wind_part part[],
                         lee_wind_record *joined, lee_notes *remarks,
                         lee_error *error);

/* Which of the points of a grid speak for a position. */
typedef enum lee_grid_method {
    LEE_GRID_NEAREST, /* the nearest one                                    */
    LEE_GRID_BILINEAR /* the four around it; missing where a needed one is  */
} lee_grid_method;

/* How a NetCDF file is to be read. Borrows its texts. {0} is enough for a file
 * that follows the CF conventions and holds one series: the wind is then found
 * by standard names (eastward_wind and northward_wind, or else wind_speed and
 * wind_from_direction or wind_to_direction). */
typedef struct lee_wind_netcdf {
    struct {
        const char *name; /* of the variable, "group/name" inside a group. NULL:
                             by standard name (time and wind), or not read    */
        const char *unit; /* when the file has none; of LEE_WIND_TIME "hours
                             since 1996-01-05 00:00"; NULL otherwise          */
        const char *path; /* of another file that holds it; NULL: the same    */
    } column[LEE_WIND_COLUMNS];
    const char *calendar; /* when the file has none; NULL: the standard one */
    const char *station;  /* its name in the file, or "#3" for the third; NULL
                             when there is only one                         */
    bool has_position;    /* of one point of a grid, or of the station nearest
                             to it                                          */
    double longitude;     /* degrees east, -180 to 360                      */
    double latitude;      /* degrees north                                  */
    lee_grid_method method;
    bool has_utc_offset;
    int64_t utc_offset; /* s east of UTC of a reference date without a zone;
                           UTC when not given, as the conventions say      */
    size_t missing_count;
    const double *missing;    /* [missing_count] stored values that mean
                              "missing", beside what the file says itself   */
    bool may_lack_quantities; /* pressure to ice, although named, may be absent:
                                 for one of several files                   */
    lee_stamp stamp;
    bool is_apart; /* read in a child process with limits on time and memory:
                      damaged NetCDF-4 files can crash the NetCDF library or
                      keep it for ever. The child is forked: ask for it before
                      any thread starts. Without it the file is read in the
                      caller's process, and should be one that is trusted   */
} lee_wind_netcdf;

/* Reads a wind record out of NetCDF: a time series; one station of several
 * (orthogonal, incomplete, contiguous or indexed ragged arrays of the CF
 * conventions, chapter 9); or one point of a grid over time, latitude and
 * longitude, either way round and with longitudes of either kind. Other
 * dimensions have to be of length 1. The file is a regular one; a classic file
 * that is shorter than its header says is refused.
 *
 * Packed values are unpacked; what the file marks as missing is. Times in any
 * calendar of the conventions become UTC: real days are counted, dates of
 * model calendars (noleap, all_leap, 360_day) are taken by name. Rows follow
 * the rules of lee_wind_read_csv: duplicates, order, ranges, calm. Refused
 * are winds along the axes of a grid as eastward and northward, months as
 * time, pressure reduced to sea level, and positions off the grid.
 *
 *   path    a regular file
 *   how     how to read it
 *   record  out: freed with lee_wind_record_free
 *   told    adds what was read: variables, calendar, station, grid point with
 *           its distance; may be NULL
 *
 * Not thread-safe: no two threads may read NetCDF at once.
 * Errors: LEE_ERR_FILE, LEE_ERR_FORMAT (file, variable, index), LEE_ERR_DATA
 * when no sample has a wind, LEE_ERR_ARGUMENT for a position that makes no
 * sense, LEE_ERR_MEMORY.
 * Source: CF Conventions 1.8 [cfconventions]. */
lee_status lee_wind_read_netcdf(const char *path, const lee_wind_netcdf *how,
                                lee_wind_record *record, lee_notes *told,
                                lee_error *error);

/* What to do where the record has no wind. */
typedef struct lee_gap_rule {
    int64_t largest; /* s, >= 0: longest distance between two samples with
                        wind, in excess of the record's own step, that is
                        bridged                                             */
    bool split;      /* longer gaps part the record instead of being errors */
} lee_gap_rule;

/* A stretch without wind, longer than the record's own step. */
typedef struct lee_wind_gap {
    int64_t after;  /* last sample with wind before it */
    int64_t before; /* first sample with wind after it */
    bool is_long;   /* beyond the gap rule             */
} lee_wind_gap;

/* What a record holds; makes no change to it. {0} is valid. Owns `gap`. Times
 * of first finds mean nothing while their count is 0. */
typedef struct lee_wind_check {
    size_t samples;
    int64_t first;
    int64_t last;

    /* The usual step: the most frequent distance of successive samples, the
     * shortest of equals, s; 0 for one sample. */
    int64_t step;
    size_t irregular; /* steps that differ from it */

    size_t missing; /* samples without wind */
    size_t calms;
    size_t duplicates; /* as reader and join counted, like the next four */
    size_t variable_calm;
    size_t variable_missing;
    size_t merged;
    size_t completed;

    size_t beyond_belief;       /* faster than 75 m s-1 */
    int64_t beyond_belief_time; /* the first of them    */

    /* Faster than the samples with wind before and after by 15 m s-1 and by a
     * factor of 3, both at most three usual steps away. */
    size_t spikes;
    int64_t spike_time; /* the first of them */

    /* Of the samples with wind; NaN when there is none. */
    double fastest;      /* m s-1   */
    double fastest_from; /* radians */
    int64_t fastest_time;
    double mean_speed; /* m s-1 */

    size_t gap_count;
    lee_wind_gap *gap; /* [gap_count] in order of time */
} lee_wind_check;

/* Looks through a record. Errors: LEE_ERR_MEMORY. */
lee_status lee_wind_check_record(const lee_wind_record *record,
                                 const lee_gap_rule *rule,
                                 lee_wind_check *check, lee_error *error);
void lee_wind_check_free(lee_wind_check *check);

/* Finds the longest gaps of a check, of equals the earlier.
 *
 *   room   the most that is wanted
 *   index  [room] out: places in check->gap, in order of time
 *
 * Returns how many there are: the lesser of room and gap_count. */
size_t lee_wind_longest_gaps(const lee_wind_check *check, size_t room,
                             size_t index[]);

/* One unbroken stretch of a record after the gap rule: indices [first, end)
 * of samples; missing ones inside are to be bridged. */
typedef struct lee_wind_piece {
    size_t first;
    size_t end;
} lee_wind_piece;

/* One of the strongest storms of a record: a wind faster than all of the 48 h
 * before it and not slower than all of the 48 h after it, so that two of them
 * are parted by more than that. */
typedef struct lee_wind_storm {
    int64_t time;    /* of the fastest wind, s since 1970                  */
    double speed;    /* m s-1                                              */
    double from;     /* radians                                            */
    double duration; /* s around it at three quarters of its speed or more */
    bool is_cut;     /* the record does not show its begin or its end: the
                        duration is the least                              */
    bool is_spike;   /* the record check takes its wind for a spike        */
} lee_wind_storm;

enum {
    LEE_WIND_STORMS = 10,        /* at most listed                   */
    LEE_ROSE_DIRECTIONS = 16,    /* centred on north, then clockwise */
    LEE_ROSE_CLASSES = 6,        /* of speed                         */
    LEE_WIND_PERCENTILES = 6,    /* of speed                         */
    LEE_STORM_PARTED = 48 * 3600 /* s, least time between storms     */
};

/* The LEE_WIND_STORMS strongest storms, the strongest first, of equals the
 * earlier. Durations follow the wind between the samples: instants are
 * linear, means hold over their step. A sample that is missing, or more than
 * one and a half steps away, cuts a storm.
 *
 *   step   the record's usual step, s (lee_wind_check)
 *   count  out: how many there are
 *   storm  [LEE_WIND_STORMS] out
 *
 * Errors: LEE_ERR_MEMORY. Source: a separation of 48 h is common practice for
 * independent storms; the duration is our own choice, a little above half of
 * the greatest stress. */
lee_status lee_wind_storms(const lee_wind_record *record, int64_t step,
                           size_t *count, lee_wind_storm storm[],
                           lee_error *error);

/* What a calendar month of a record holds. */
typedef struct lee_wind_month {
    int year;
    int month;        /* 1 to 12 */
    size_t samples;   /* whose step begins in it */
    size_t with_wind; /* of them */
    double coverage;  /* share of the month, 0 to 1; NaN when the record has
                         one sample and therefore no step */
} lee_wind_month;

/* Sums over a record, nothing filled in. A sample with wind stands for the
 * time up to the next sample (END: from the one before it), at most for the
 * usual step. {0} is valid. Owns `month`. */
typedef struct lee_wind_summary {
    size_t samples;
    size_t with_wind;
    double coverage; /* share of the time from the begin of the first to the
                        end of the last step that has wind; NaN for one sample*/
    size_t month_count;
    lee_wind_month *month; /* [month_count] from the first to the last, those
                              without samples among them */

    /* Shares of the time with wind, together 1; NaN without any wind. Where
     * all directions are whole tens of degrees (of a hundred winds at least),
     * each is spread over the ten degrees around it: else the sectors that
     * hold three tens would outweigh those that hold two. */
    double calm;
    double rose[LEE_ROSE_DIRECTIONS][LEE_ROSE_CLASSES];
    bool is_spread;

    /* Speeds that these shares of the samples with wind do not exceed, m s-1:
     * the inverse of the empirical distribution. */
    double percentile[LEE_WIND_PERCENTILES];

    size_t storm_count;
    lee_wind_storm storm[LEE_WIND_STORMS];
} lee_wind_summary;

/* Lowest speed of a class of the rose, m s-1 (0 for the first, which holds no
 * calm), and a percentile as a number from 0 to 100. */
double lee_rose_class_from(size_t index);
double lee_wind_percent(size_t index);

/* Sums up a record.
 *
 *   step  the record's usual step, s (lee_wind_check)
 *
 * Errors: LEE_ERR_MEMORY. Sources: percentiles by Hyndman and Fan (1996),
 * definition 1 [hyndmanfan1996]; classes of our own. */
lee_status lee_wind_summarise(const lee_wind_record *record, int64_t step,
                              lee_wind_summary *summary, lee_error *error);
void lee_wind_summary_free(lee_wind_summary *summary);

/* Parts a record into pieces. One piece when nothing is beyond the rule.
 * A piece begins and ends with a sample that has a wind (one and the same
 * when it stands alone): missing ones at its ends belong to no piece.
 *
 *   pieces  out: [count], free() it
 *
 * Errors: LEE_ERR_DATA when a gap is beyond the rule and `split` is off (the
 * message names its two times), or when no sample has a wind;
 * LEE_ERR_MEMORY. */
lee_status lee_wind_pieces(const lee_wind_record *record,
                           const lee_gap_rule *rule, lee_wind_piece **pieces,
                           size_t *count, lee_error *error);

/* Wind at time t inside the span of a piece. Instants: speed and the shorter
 * arc of direction are linear between samples with wind (through calm: the
 * direction of the sample that has one; between opposite winds the direction
 * turns clockwise). Means: held over their step, so that their mean is kept;
 * where samples with wind are further apart than the step, the time between
 * the end of one step and the begin of the next is bridged, linear like
 * instants; where they are closer, each is held up to the next (START), from
 * the one before (END) or to half the way (MIDDLE). A jump belongs to the
 * later step.
 *
 *   step  the record's usual step, s (lee_wind_check)
 *   at    out: east, north; NaN outside the span
 *   hint  in/out: index to start the search from; start with 0 */
void lee_wind_at(const lee_wind_record *record, const lee_wind_piece *piece,
                 int64_t step, double t, double at[2], size_t *hint);

/* First and last time that lee_wind_at covers for a piece, s since 1970:
 * for means the begin of the first and the end of the last step. The step of
 * a MIDDLE stamp begins half a step, rounded down to a second, before it. */
void lee_wind_piece_span(const lee_wind_record *record,
                         const lee_wind_piece *piece, int64_t step,
                         int64_t *from, int64_t *to);

/* What a record knows of air, water and ice. NaN: not known. */
typedef struct lee_wind_conditions {
    double pressure;          /* station pressure, Pa      */
    double air_temperature;   /* K                         */
    double water_temperature; /* K                         */
    double humidity;          /* relative humidity, 0 to 1 */
    double ice;               /* ice cover, 0 to 1         */
} lee_wind_conditions;

/* The optional columns of a record at time t. Each column goes by its own
 * samples, whatever else they lack: instants are linear between samples that
 * have the value, means are held over their step and bridged between steps,
 * like the wind. Two samples with the value are bridged when the gap rule
 * would bridge a wind between them (`split` says nothing here); where it would
 * not, before the first and after the last the value is NaN: nothing is filled
 * in.
 *
 *   rule  how far apart samples with a value may be
 *   step  the record's usual step, s (lee_wind_check)
 *   t     s since 1970; NaN gives nothing known
 *   hint  in/out: index to start the search from; start with 0 */
lee_wind_conditions lee_wind_conditions_at(const lee_wind_record *record,
                                           const lee_gap_rule *rule,
                                           int64_t step, double t,
                                           size_t *hint);

/* One column of values [n] beside a record's samples, in the same way. */
double lee_wind_column_at(const lee_wind_record *record, const double *column,
                          const lee_gap_rule *rule, int64_t step, double t,
                          size_t *hint);

/* The same for a sample: its own value where it has one, else what
 * lee_wind_conditions_at says for the middle of its step. */
lee_wind_conditions lee_wind_conditions_of(const lee_wind_record *record,
                                           const lee_gap_rule *rule,
                                           int64_t step, size_t index);

/* A storm built for design: speed rises from `before` to the peak along half
 * a cosine, holds, falls to `after` along half a cosine. The direction turns
 * by `turn` at an even rate over rise, hold and fall and is `from` in the
 * middle of the hold: a storm that rises as long as it falls turns from
 * `from` - turn/2 to `from` + turn/2. */
typedef struct lee_storm {
    double peak;   /* m s-1, > 0                                            */
    double from;   /* radians, direction at the middle of the hold          */
    double turn;   /* radians, clockwise positive                           */
    double rise;   /* s, >= 0                                               */
    double hold;   /* s, >= 0                                               */
    double fall;   /* s, >= 0                                               */
    double before; /* m s-1 ahead of the storm, 0 to peak                   */
    double after;  /* m s-1 once it has passed, 0 to peak                   */
} lee_storm;

/* The storm as a record of instants: each `step` s (> 0) from `start` on, at
 * the four corners of its curve, and at the end, `calm` s (>= 0) after the
 * fall; so its peak is in the record whatever the step. Durations are taken
 * to the nearest second, and a rise or fall of nothing takes one second.
 *
 * Errors: LEE_ERR_ARGUMENT when a value is outside its range or the record
 * would exceed ten million samples; LEE_ERR_MEMORY.
 * Source: a shape of our own; the half cosine is common practice. */
lee_status lee_storm_record(const lee_storm *storm, int64_t start, int64_t step,
                            int64_t calm, lee_wind_record *record,
                            lee_error *error);

#endif
