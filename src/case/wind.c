/* wind.c - the wind of a case: a record, given winds, a scan or a storm. */
#include <math.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>

#include "base/cf_time.h"
#include "base/text.h"
#include "case/draft.h"

#include "leewater/units.h"

static bool has_record(const lee_case_reader *reader) {
    return lee_yaml_get(reader->mapping, "record") != NULL;
}

static void check_column_unit(lee_case_reader *reader,
                              const lee_yaml_node *node, const lee_key *key,
                              const char *unit) {
    const char *wanted = lee_wind_column_unit((lee_wind_column)key->stands_for);
    if (key->stands_for == LEE_WIND_TIME && lee_cf_is_clock(unit)) {
        return; /* of NetCDF: judged with the record */
    }
    if (wanted == NULL) {
        lee_key_problem(reader, node, key->name, "takes no unit");
        return;
    }
    lee_conversion conversion;
    lee_error error = {0};
    if (lee_unit_conversion(unit, wanted, &conversion, &error) != LEE_OK) {
        lee_key_unreadable(reader, node, key, &error);
    }
}

void lee_key_column(lee_case_reader *reader, const lee_yaml_node *node,
                    const lee_key *key, void *into) {
    lee_case_draft *draft = into;
    lee_column_draft *column = &draft->wind.column[key->stands_for];
    if (node->kind != LEE_YAML_MAPPING) {
        const char *name = lee_key_scalar(reader, node, key);
        column->column = name;
        return;
    }
    char where[sizeof reader->where];
    (void)snprintf(where, sizeof where, "%.96s.%s", reader->where, key->name);
    lee_key_read_mapping(reader, node, where, key->section, column);
    if (column->unit != NULL) {
        check_column_unit(reader, lee_yaml_get(node, "unit"), key,
                          column->unit);
    }
}

void lee_key_speed(lee_case_reader *reader, const lee_yaml_node *node,
                   const lee_key *key, void *into) {
    lee_case_draft *draft = into;
    if (has_record(reader)) {
        lee_key_column(reader, node, key, into);
    } else {
        (void)lee_key_value(reader, node, key, &draft->wind.given.speed);
    }
}

void lee_key_from(lee_case_reader *reader, const lee_yaml_node *node,
                  const lee_key *key, void *into) {
    lee_case_draft *draft = into;
    if (has_record(reader)) {
        lee_key_column(reader, node, key, into);
    } else {
        (void)lee_key_value(reader, node, key, &draft->wind.given.from);
    }
}

/* A text or a list of texts, borrowed from the tree; free() the list. NULL
 * without memory. */
static const char **borrow_texts(lee_case_reader *reader,
                                 const lee_yaml_node *node, const lee_key *key,
                                 size_t *texts) {
    const bool is_list = node->kind == LEE_YAML_LIST;
    const size_t count = is_list ? node->count : 1;
    const char **text = calloc(count + 1, sizeof *text);
    if (text == NULL) {
        reader->has_no_room = true;
        return NULL;
    }
    for (size_t i = 0; i < count; i++) {
        const lee_yaml_node *item = is_list ? node->child[i] : node;
        text[*texts] = lee_key_scalar(reader, item, key);
        *texts += text[*texts] != NULL;
    }
    return text;
}

void lee_key_missing(lee_case_reader *reader, const lee_yaml_node *node,
                     const lee_key *key, void *into) {
    lee_wind_draft *draft = (void *)((char *)into + key->offset);
    draft->missing = borrow_texts(reader, node, key, &draft->missing_count);
}

void lee_key_record(lee_case_reader *reader, const lee_yaml_node *node,
                    const lee_key *key, void *into) {
    lee_wind_draft *draft = (void *)((char *)into + key->offset);
    if (node->kind == LEE_YAML_LIST && node->count == 0) {
        lee_key_problem(reader, node, key->name,
                        "is an empty list; expected a file or a list of "
                        "files");
        return;
    }
    draft->record = borrow_texts(reader, node, key, &draft->record_count);
    for (size_t i = 0; i < draft->record_count; i++) {
        for (size_t j = 0; j < i; j++) {
            if (strcmp(draft->record[i], draft->record[j]) == 0) {
                lee_key_problem(reader, node, key->name, "names '%s' twice",
                                draft->record[i]);
            }
        }
    }
}

void lee_key_winds(lee_case_reader *reader, const lee_yaml_node *node,
                   const lee_key *key, void *into) {
    lee_wind_source *source = (void *)((char *)into + key->offset);
    if (node->kind != LEE_YAML_LIST || node->count == 0) {
        lee_key_problem(reader, node, key->name,
                        "should be a list of winds such as "
                        "[{speed: 20 m/s, from: 240 degree}]");
        return;
    }
    source->given = calloc(node->count, sizeof *source->given);
    if (source->given == NULL) {
        reader->has_no_room = true;
        return;
    }
    source->given_count = node->count;
    for (size_t i = 0; i < node->count; i++) {
        char where[sizeof reader->where];
        (void)snprintf(where, sizeof where, "%.80s.%s[%zu]", reader->where,
                       key->name, i + 1);
        source->given[i] = (lee_given_wind){NAN, NAN, NAN};
        lee_key_read_mapping(reader, node->child[i], where, key->section,
                             &source->given[i]);
    }
}

void lee_key_storm(lee_case_reader *reader, const lee_yaml_node *node,
                   const lee_key *key, void *into) {
    lee_case_draft *draft = into;
    lee_storm *storm = &draft->result.problem.wind.storm;
    draft->wind.has_storm = true;
    lee_key_read_mapping(reader, node, key->name, key->section, storm);
}

static void check_storm(lee_case_reader *reader, const lee_case_draft *draft) {
    static const char *const others[] = {"record", "speed", "winds"};
    const lee_storm *storm = &draft->result.problem.wind.storm;
    const lee_yaml_node *node = lee_case_node(draft, "storm");
    const lee_yaml_node *wind = lee_case_node(draft, "wind");
    for (size_t i = 0; wind != NULL && i < 3; i++) {
        if (lee_yaml_get(wind, others[i]) != NULL) {
            lee_key_problem(reader, node, "storm",
                            "and 'wind.%s' exclude each other", others[i]);
        }
    }
    if (node->kind != LEE_YAML_MAPPING || !(storm->peak > 0.0)) {
        return;
    }
    if (storm->before > storm->peak) {
        lee_key_problem(reader, lee_yaml_get(node, "before"), "storm.before",
                        "is faster than the peak");
    }
    if (storm->after > storm->peak) {
        lee_key_problem(reader, lee_yaml_get(node, "after"), "storm.after",
                        "is faster than the peak");
    }
    if (storm->rise + storm->hold + storm->fall <= 0.0) {
        lee_key_problem(reader, node, "storm",
                        "takes no time: rise, hold and fall are all zero");
    }
}

static void check_given(lee_case_reader *reader, const lee_case_draft *draft,
                        const lee_yaml_node *wind) {
    const lee_yaml_node *speed = lee_yaml_get(wind, "speed");
    const lee_yaml_node *from = lee_yaml_get(wind, "from");
    if (speed != NULL && from == NULL &&
        lee_yaml_get(wind, "directions") == NULL) {
        lee_key_problem(reader, speed, "wind.speed",
                        "needs one of the keys 'from' and 'directions'");
    }
    if (speed == NULL && from != NULL && lee_yaml_get(wind, "winds") == NULL) {
        lee_key_problem(reader, from, "wind.from",
                        "needs one of the keys 'speed' and 'record'");
    }
    if (speed == NULL && from == NULL && lee_yaml_get(wind, "winds") == NULL &&
        !draft->wind.has_storm) {
        lee_key_problem(reader, wind, "wind",
                        "needs one of the keys 'record', 'speed' and "
                        "'winds', or a 'storm' beside it");
    }
}

void lee_case_check_wind(lee_case_reader *reader, lee_case_draft *draft) {
    const lee_yaml_node *wind = lee_case_node(draft, "wind");
    if (draft->wind.has_storm) {
        check_storm(reader, draft);
    }
    if (wind == NULL || wind->kind != LEE_YAML_MAPPING) {
        return;
    }
    lee_case_check_exposure(reader, draft);
    if (lee_yaml_get(wind, "record") == NULL) {
        check_given(reader, draft, wind);
    } else {
        lee_case_check_netcdf(reader, draft);
    }
    if (draft->wind.century % 100 != 0) {
        lee_key_problem(reader, lee_yaml_get(wind, "century"), "wind.century",
                        "is '%zu'; expected a whole century such as 1900",
                        draft->wind.century);
    }
}

/* Names that stand in many a record, for what the case leaves out. */
static void name_usual_columns(lee_wind_csv *csv) {
    if (csv->column[LEE_WIND_TIME].name == NULL &&
        csv->column[LEE_WIND_DATE].name == NULL &&
        csv->column[LEE_WIND_YEAR].name == NULL) {
        csv->column[LEE_WIND_TIME].name = "time";
    }
    if (csv->column[LEE_WIND_EASTWARD].name != NULL) {
        return;
    }
    if (csv->column[LEE_WIND_SPEED].name == NULL) {
        csv->column[LEE_WIND_SPEED].name = "speed";
    }
    if (csv->column[LEE_WIND_FROM].name == NULL) {
        csv->column[LEE_WIND_FROM].name = "from";
    }
}

static lee_wind_csv csv_of(const lee_wind_draft *draft) {
    lee_wind_csv csv = {
        .has_utc_offset = draft->utc_offset.is_given,
        .utc_offset = draft->utc_offset.value,
        .missing_count = draft->missing_count,
        .missing = draft->missing,
        .variable = draft->variable,
        .century = (int)draft->century,
        .stamp = draft->stamp,
    };
    for (size_t i = 0; i < LEE_WIND_COLUMNS; i++) {
        csv.column[i].name = draft->column[i].column;
        csv.column[i].unit = draft->column[i].unit;
    }
    name_usual_columns(&csv);
    return csv;
}

/* The place of the i-th file of the record in the case. */
static const lee_yaml_node *record_node(const lee_case_draft *draft,
                                        size_t index) {
    const lee_yaml_node *node = lee_case_node(draft, "wind/record");
    return node->kind == LEE_YAML_LIST ? node->child[index] : node;
}

/* Reads one file of the record by its ending. False after a problem. */
static bool read_file(lee_case_reader *reader, lee_case_draft *draft,
                      const lee_yaml_node *node, const char *path,
                      lee_wind_record *record) {
    if (lee_case_is_netcdf(path)) {
        return lee_case_read_netcdf(reader, draft, node, path, record);
    }
    lee_wind_csv csv = csv_of(&draft->wind);
    csv.may_lack_quantities = draft->wind.record_count > 1;
    lee_error error = {0};
    if (lee_wind_read_csv(path, &csv, record, &error) != LEE_OK) {
        lee_case_pass_on(reader, node, &error);
        return false;
    }
    return true;
}

/* Reads every file into its part, in the order of the case. */
static bool read_files(lee_case_reader *reader, lee_case_draft *draft,
                       lee_wind_record record[], lee_wind_part part[]) {
    lee_wind_source *source = &draft->result.problem.wind;
    bool is_read = true;
    for (size_t i = 0; i < draft->wind.record_count; i++) {
        char *path = lee_case_beside(reader, draft->wind.record[i]);
        if (path == NULL) {
            return false;
        }
        source->record_path[source->record_count++] = path;
        part[i] = (lee_wind_part){draft->wind.record[i], &record[i]};
        is_read =
            read_file(reader, draft, record_node(draft, i), path, &record[i]) &&
            is_read;
    }
    return is_read;
}

/* A quantity that the case names has to be in one of the files at least. */
static void check_quantities(lee_case_reader *reader,
                             const lee_case_draft *draft) {
    for (int i = LEE_WIND_PRESSURE; i < LEE_WIND_COLUMNS; i++) {
        const lee_wind_column column = (lee_wind_column)i;
        const char *named = draft->wind.column[i].column;
        if (named != NULL &&
            lee_wind_quantity(&draft->result.problem.wind.record, column) ==
                NULL) {
            lee_key_problem(reader, lee_case_node(draft, "wind/record"),
                            "wind.record",
                            "names %zu files, and none of them has the column "
                            "'%s'",
                            draft->wind.record_count, named);
        }
    }
}

static void join_files(lee_case_reader *reader, lee_case_draft *draft,
                       const lee_wind_part part[]) {
    lee_error error = {0};
    if (lee_wind_join(draft->wind.record_count, part,
                      &draft->result.problem.wind.record, &draft->result.notes,
                      &error) != LEE_OK) {
        lee_case_pass_on(reader, lee_case_node(draft, "wind/record"), &error);
        return;
    }
    check_quantities(reader, draft);
}

static void read_record(lee_case_reader *reader, lee_case_draft *draft) {
    lee_wind_source *source = &draft->result.problem.wind;
    const size_t count = draft->wind.record_count;
    source->kind = LEE_WIND_RECORD;
    source->gap.split = draft->wind.gaps == LEE_GAPS_SPLIT;
    source->record_path = calloc(count, sizeof *source->record_path);
    lee_wind_record *record = calloc(count, sizeof *record);
    lee_wind_part *part = calloc(count, sizeof *part);
    if (source->record_path == NULL || record == NULL || part == NULL) {
        reader->has_no_room = true;
    } else if (read_files(reader, draft, record, part) && count == 1) {
        source->record = record[0];
        record[0] = (lee_wind_record){0};
    } else if (reader->problems.count == 0 && !reader->has_no_room) {
        join_files(reader, draft, part);
    }
    for (size_t i = 0; record != NULL && i < count; i++) {
        lee_wind_record_free(&record[i]);
    }
    free(part);
    free(record);
}

static void give_one(lee_case_reader *reader, lee_case_draft *draft) {
    lee_wind_source *source = &draft->result.problem.wind;
    source->given = calloc(1, sizeof *source->given);
    if (source->given == NULL) {
        reader->has_no_room = true;
        return;
    }
    source->given_count = 1;
    source->given[0] = draft->wind.given;
    source->kind = LEE_WIND_GIVEN;
    if (draft->wind.directions > 0) {
        source->kind = LEE_WIND_SCAN;
        source->directions = draft->wind.directions;
        source->given[0].from = 0.0;
    }
}

void lee_case_finish_wind(lee_case_reader *reader, lee_case_draft *draft) {
    lee_wind_source *source = &draft->result.problem.wind;
    if (draft->wind.record_count > 0) {
        read_record(reader, draft);
    } else if (draft->wind.has_storm) {
        source->kind = LEE_WIND_STORM;
    } else if (source->given_count > 0) {
        source->kind = LEE_WIND_GIVEN;
    } else if (!isnan(draft->wind.given.speed)) {
        give_one(reader, draft);
    }
    lee_case_finish_exposure(reader, draft);
}
