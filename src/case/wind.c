/* wind.c - the wind of a case: a record, given winds, a scan or a storm. */
#include <math.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>

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
    if (wanted == NULL) {
        lee_key_problem(reader, node, key->name, "takes no unit");
        return;
    }
    lee_conversion conversion;
    lee_error error = {0};
    if (lee_unit_conversion(unit, wanted, &conversion, &error) != LEE_OK) {
        lee_key_problem(reader, node, key->name, "cannot be read: %s",
                        error.message);
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

void lee_key_missing(lee_case_reader *reader, const lee_yaml_node *node,
                     const lee_key *key, void *into) {
    lee_wind_draft *draft = (void *)((char *)into + key->offset);
    const bool is_list = node->kind == LEE_YAML_LIST;
    const size_t count = is_list ? node->count : 1;
    draft->missing = calloc(count + 1, sizeof *draft->missing);
    if (draft->missing == NULL) {
        reader->has_no_room = true;
        return;
    }
    for (size_t i = 0; i < count; i++) {
        const lee_yaml_node *item = is_list ? node->child[i] : node;
        const char *text = lee_key_scalar(reader, item, key);
        if (text != NULL) {
            draft->missing[draft->missing_count++] = text;
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

void lee_key_over(lee_case_reader *reader, const lee_yaml_node *node,
                  const lee_key *key, void *into) {
    lee_exposure *exposure = (void *)((char *)into + key->offset);
    if (node->kind == LEE_YAML_SCALAR && strcmp(node->text, "water") == 0) {
        return;
    }
    if (node->kind != LEE_YAML_MAPPING) {
        lee_key_problem(reader, node, key->name,
                        "should be water, or {land: {roughness_length: "
                        "0.03 m, to_water: 1.2}}");
        return;
    }
    exposure->is_over_land = true;
    lee_key_section_of(reader, node, key, into);
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

static void check_exposure(lee_case_reader *reader, const lee_case_draft *draft,
                           const lee_yaml_node *wind) {
    const lee_exposure *exposure = &draft->result.problem.exposure;
    const lee_yaml_node *method = lee_yaml_get(wind, "height_method");
    const bool has_factor = lee_yaml_get(wind, "height_factor") != NULL;
    if (method == NULL) {
        return;
    }
    const bool is_factor = exposure->height_method == LEE_HEIGHT_FACTOR;
    if (is_factor && !has_factor) {
        lee_key_problem(reader, method, "wind.height_method",
                        "is 'factor' and needs 'height_factor'");
    }
    if (!is_factor && has_factor) {
        lee_key_problem(reader, method, "wind.height_method",
                        "and 'height_factor' exclude each other unless the "
                        "method is 'factor'");
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
    check_exposure(reader, draft, wind);
    if (lee_yaml_get(wind, "record") == NULL) {
        check_given(reader, draft, wind);
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

static bool ends_with(const char *text, const char *ending) {
    const size_t length = strlen(text);
    const size_t tail = strlen(ending);
    return length >= tail && lee_text_same(text + length - tail, ending);
}

static void read_record(lee_case_reader *reader, lee_case_draft *draft) {
    lee_wind_source *source = &draft->result.problem.wind;
    const lee_yaml_node *node = lee_case_node(draft, "wind/record");
    if (ends_with(draft->wind.record, ".nc")) {
        lee_key_problem(reader, node, "wind.record",
                        "is a NetCDF file, which this version does not read; "
                        "write the series of one point to CSV");
        return;
    }
    source->kind = LEE_WIND_RECORD;
    source->gap.split = draft->wind.gaps == LEE_GAPS_SPLIT;
    source->record_path = lee_case_beside(reader, draft->wind.record);
    if (source->record_path == NULL) {
        return;
    }
    const lee_wind_csv csv = csv_of(&draft->wind);
    lee_error error = {0};
    if (lee_wind_read_csv(source->record_path, &csv, &source->record, &error) !=
        LEE_OK) {
        lee_case_pass_on(reader, node, &error);
    }
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
    const lee_yaml_node *wind = lee_case_node(draft, "wind");
    if (draft->wind.record != NULL) {
        read_record(reader, draft);
    } else if (draft->wind.has_storm) {
        source->kind = LEE_WIND_STORM;
    } else if (source->given_count > 0) {
        source->kind = LEE_WIND_GIVEN;
    } else if (!isnan(draft->wind.given.speed)) {
        give_one(reader, draft);
    }
    lee_error error = {0};
    if (wind != NULL &&
        lee_exposure_check(&draft->result.problem.exposure, &error) != LEE_OK) {
        lee_key_problem(reader, wind, "wind", "cannot be used: %s",
                        error.message);
    }
}
