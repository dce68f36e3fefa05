/* draft.h - a case while it is read: what the file says, before the files it
 * names are read and the parts are put together. */
#ifndef LEEWATER_CASE_DRAFT_H
#define LEEWATER_CASE_DRAFT_H

#include <stdbool.h>
#include <stddef.h>
#include <stdint.h>

#include "case/schema.h"

#include "leewater/case.h"

typedef struct lee_given_time {
    bool is_given;
    int64_t value; /* s */
} lee_given_time;

/* A level: a number, or the name of a series. */
typedef struct lee_level_draft {
    double level;     /* NaN when not given */
    const char *file; /* NULL when not given */
    lee_given_time utc_offset;
} lee_level_draft;

typedef struct lee_axis_draft {
    double bearing;      /* rad; NaN */
    double made_for;     /* m; NaN   */
    const char *profile; /* NULL for a uniform lake */
    double length;       /* m, of a uniform lake; NaN */
    double depth;
    double width;
    lee_level_draft start; /* neither: closed */
    lee_level_draft end;
} lee_axis_draft;

typedef struct lee_column_draft {
    const char *column; /* NULL when not named */
    const char *unit;
    const char *file; /* another one than the record's; NetCDF */
} lee_column_draft;

typedef enum lee_wind_gaps { LEE_GAPS_ERROR, LEE_GAPS_SPLIT } lee_wind_gaps;

typedef struct lee_wind_draft {
    size_t record_count; /* files of the record; 0 when there is none */
    const char **record; /* owned list of borrowed texts              */
    lee_column_draft column[LEE_WIND_COLUMNS];
    lee_stamp stamp;
    size_t missing_count;
    const char **missing; /* owned list of borrowed texts */
    const char *variable;
    size_t century;
    lee_given_time utc_offset;
    lee_wind_gaps gaps;
    lee_given_wind given; /* speed and direction outright; NaN */
    size_t directions;    /* of a scan; 0 */
    bool has_storm;
    const char *station; /* of NetCDF, like the next three; NULL */
    const char *calendar;
    double longitude; /* degrees; NaN when no position is given */
    double latitude;
    lee_grid_method method;
} lee_wind_draft;

/* Texts are borrowed from the tree, except in `result` and where said. */
typedef struct lee_case_draft {
    const lee_yaml_node *root;
    lee_level_draft still_water;
    lee_axis_draft axis;
    double water_temperature; /* K; NaN */
    lee_wind_draft wind;
    const char *to_water_table;
    int stability_functions; /* index of the set */
    const char *drag_table;
    double drag_cap; /* NaN when not given */
    lee_given_time from;
    lee_given_time to;
    lee_case result;
} lee_case_draft;

/* Readers of values that are not of a plain kind. */
lee_key_read lee_key_level;       /* lee_level_draft                    */
lee_key_read lee_key_end;         /* lee_level_draft                    */
lee_key_read lee_key_bed;         /* lee_bed_law                        */
lee_key_read lee_key_bed_value;   /* lee_bed_law, one law of it         */
lee_key_read lee_key_time;        /* lee_given_time, UTC without a zone */
lee_key_read lee_key_utc_offset;  /* lee_given_time                     */
lee_key_read lee_key_column;      /* lee_column_draft                   */
lee_key_read lee_key_speed;       /* lee_case_draft: column or quantity */
lee_key_read lee_key_from;        /* lee_case_draft: column or quantity */
lee_key_read lee_key_record;      /* lee_wind_draft                     */
lee_key_read lee_key_missing;     /* lee_wind_draft                     */
lee_key_read lee_key_winds;       /* lee_wind_source                    */
lee_key_read lee_key_gust;        /* lee_case_draft                     */
lee_key_read lee_key_over;        /* lee_case_draft                     */
lee_key_read lee_key_to_water;    /* lee_case_draft                     */
lee_key_read lee_key_stability;   /* lee_case_draft                     */
lee_key_read lee_key_storm;       /* lee_case_draft                     */
lee_key_read lee_key_drag;        /* lee_case_draft                     */
lee_key_read lee_key_return_flow; /* lee_problem                        */
lee_key_read lee_key_stations;    /* lee_problem                        */
lee_key_read lee_key_thresholds;  /* lee_station                        */

/* Second part: the parts put together, files read; problems gathered. */
void lee_case_finish_lake(lee_case_reader *reader, lee_case_draft *draft);
void lee_case_finish_wind(lee_case_reader *reader, lee_case_draft *draft);
void lee_case_finish_exposure(lee_case_reader *reader, lee_case_draft *draft);
void lee_case_finish_drag(lee_case_reader *reader, lee_case_draft *draft);
void lee_case_finish_stations(lee_case_reader *reader, lee_case_draft *draft);

/* Is a file of the record NetCDF, by its ending? (wind_netcdf.c) */
bool lee_case_is_netcdf(const char *path);

/* Keys that only NetCDF or only CSV can have. (wind_netcdf.c) */
void lee_case_check_netcdf(lee_case_reader *reader,
                           const lee_case_draft *draft);

/* Reads a NetCDF file of the record. False after a problem.
 * (wind_netcdf.c) */
bool lee_case_read_netcdf(lee_case_reader *reader, lee_case_draft *draft,
                          const lee_yaml_node *node, const char *path,
                          lee_wind_record *record);

/* Combinations that need no other file. */
void lee_case_check_lake(lee_case_reader *reader, lee_case_draft *draft);
void lee_case_check_wind(lee_case_reader *reader, lee_case_draft *draft);
void lee_case_check_exposure(lee_case_reader *reader, lee_case_draft *draft);

/* The node at a path of keys, "lake/axis/profile"; NULL when not there. */
const lee_yaml_node *lee_case_node(const lee_case_draft *draft,
                                   const char *path);

/* Path of a file that the case names: relative to the case file. Kept among
 * the case's inputs. NULL without memory (told to the reader). free() it. */
char *lee_case_beside(lee_case_reader *reader, const char *file);

/* Passes a failure of reading a named file on to the problems. */
void lee_case_pass_on(lee_case_reader *reader, const lee_yaml_node *node,
                      const lee_error *error);

#endif
