/* wind_netcdf.c - a wind record of a case that is NetCDF. */
#include <math.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>

#include "base/cf_time.h"
#include "base/number.h"
#include "base/text.h"
#include "case/draft.h"

static bool ends_with(const char *text, const char *ending) {
    const size_t length = strlen(text);
    const size_t tail = strlen(ending);
    return length >= tail && lee_text_same(text + length - tail, ending);
}

bool lee_case_is_netcdf(const char *path) {
    static const char *const endings[] = {".nc", ".nc4", ".cdf", ".netcdf"};
    for (size_t i = 0; i < sizeof endings / sizeof endings[0]; i++) {
        if (ends_with(path, endings[i])) {
            return true;
        }
    }
    return false;
}

/* A problem of a key of 'wind'. */
static void refuse_key(lee_case_reader *reader, const lee_yaml_node *node,
                       const char *key, const char *why) {
    char name[48];
    (void)snprintf(name, sizeof name, "wind.%s", key);
    lee_key_problem(reader, node, name, "%s", why);
}

static void refuse_keys(lee_case_reader *reader, const lee_yaml_node *wind,
                        size_t count, const char *const keys[],
                        const char *why) {
    for (size_t i = 0; i < count; i++) {
        const lee_yaml_node *node = lee_yaml_get(wind, keys[i]);
        if (node != NULL) {
            refuse_key(reader, node, keys[i], why);
        }
    }
}

/* Columns with a file of their own, and times with a unit, are NetCDF's. */
static void check_columns(lee_case_reader *reader, const lee_case_draft *draft,
                          bool is_netcdf) {
    const lee_yaml_node *wind = lee_case_node(draft, "wind");
    for (int i = 0; i < LEE_WIND_COLUMNS; i++) {
        const lee_column_draft *column = &draft->wind.column[i];
        const char *name = lee_wind_column_name((lee_wind_column)i);
        const lee_yaml_node *node = lee_yaml_get(wind, name);
        if (column->file != NULL &&
            (!is_netcdf || draft->wind.record_count > 1)) {
            refuse_key(reader, node, name,
                       is_netcdf ? "has a file of its own beside a list "
                                   "of files; only one record may"
                                 : "has a file of its own, which only a "
                                   "NetCDF record may");
        }
        if (i == LEE_WIND_TIME && column->unit != NULL && !is_netcdf &&
            lee_cf_is_clock(column->unit)) {
            refuse_key(reader, lee_yaml_get(node, "unit"), name,
                       "takes no unit");
        }
    }
}

static void check_codes(lee_case_reader *reader, const lee_case_draft *draft) {
    for (size_t i = 0; i < draft->wind.missing_count; i++) {
        const char *text = draft->wind.missing[i];
        double value = 0.0;
        if (!lee_number_parse(strlen(text), text, '.', &value)) {
            lee_key_problem(reader, lee_case_node(draft, "wind/missing"),
                            "wind.missing",
                            "lists '%s'; a NetCDF file holds numbers", text);
        }
    }
}

void lee_case_check_netcdf(lee_case_reader *reader,
                           const lee_case_draft *draft) {
    static const char *const of_netcdf[] = {"station", "position", "calendar"};
    static const char *const of_csv[] = {"date",   "clock",    "year",
                                         "month",  "day",      "hour",
                                         "minute", "variable", "century"};
    const lee_yaml_node *wind = lee_case_node(draft, "wind");
    size_t count = 0;
    for (size_t i = 0; i < draft->wind.record_count; i++) {
        count += lee_case_is_netcdf(draft->wind.record[i]);
    }
    if (draft->wind.record_count == 0) {
        return;
    }
    check_columns(reader, draft, count > 0);
    if (count == 0) {
        refuse_keys(reader, wind, sizeof of_netcdf / sizeof of_netcdf[0],
                    of_netcdf, "is for NetCDF records; this one is CSV");
    } else if (count == draft->wind.record_count) {
        refuse_keys(reader, wind, sizeof of_csv / sizeof of_csv[0], of_csv,
                    "is for CSV records; this one is NetCDF");
        check_codes(reader, draft);
    }
}

/* The codes that are numbers; NULL without memory. */
static double *number_codes(const lee_wind_draft *draft, size_t *count) {
    double *codes = calloc(draft->missing_count + 1, sizeof *codes);
    for (size_t i = 0; i < draft->missing_count && codes != NULL; i++) {
        const char *text = draft->missing[i];
        if (lee_number_parse(strlen(text), text, '.', &codes[*count])) {
            (*count)++;
        }
    }
    return codes;
}

/* Paths of the columns' own files, beside the case. */
typedef struct column_paths {
    char *path[LEE_WIND_COLUMNS];
} column_paths;

static lee_wind_netcdf netcdf_of(lee_case_reader *reader,
                                 const lee_wind_draft *draft,
                                 column_paths *paths) {
    lee_wind_netcdf how = {
        .calendar = draft->calendar,
        .station = draft->station,
        .has_position = !isnan(draft->longitude),
        .longitude = draft->longitude,
        .latitude = draft->latitude,
        .method = draft->method,
        .has_utc_offset = draft->utc_offset.is_given,
        .utc_offset = draft->utc_offset.value,
        .may_lack_quantities = draft->record_count > 1,
        .stamp = draft->stamp,
        .is_apart = reader->is_apart,
    };
    for (size_t i = 0; i < LEE_WIND_COLUMNS; i++) {
        how.column[i].name = draft->column[i].column;
        how.column[i].unit = draft->column[i].unit;
        if (draft->column[i].file != NULL) {
            paths->path[i] = lee_case_beside(reader, draft->column[i].file);
            how.column[i].path = paths->path[i];
        }
    }
    return how;
}

bool lee_case_read_netcdf(lee_case_reader *reader, lee_case_draft *draft,
                          const lee_yaml_node *node, const char *path,
                          lee_wind_record *record) {
    column_paths paths = {{NULL}};
    lee_error error = {0};
    lee_wind_netcdf how = netcdf_of(reader, &draft->wind, &paths);
    double *codes = number_codes(&draft->wind, &how.missing_count);
    how.missing = codes;
    reader->has_no_room = reader->has_no_room || codes == NULL;
    bool is_read = false;
    if (!reader->has_no_room) {
        is_read = lee_wind_read_netcdf(path, &how, record,
                                       &draft->result.problem.wind.record_told,
                                       &error) == LEE_OK;
        if (!is_read) {
            lee_case_pass_on(reader, node, &error);
        }
    }
    free(codes);
    for (size_t i = 0; i < LEE_WIND_COLUMNS; i++) {
        free(paths.path[i]);
    }
    return is_read;
}
