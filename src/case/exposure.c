/* exposure.c - how the wind of a case was measured: gusts, land, stability. */
#include <math.h>
#include <stdlib.h>
#include <string.h>

#include "base/number.h"
#include "base/text.h"
#include "case/draft.h"
#include "case/table.h"

void lee_key_gust(lee_case_reader *reader, const lee_yaml_node *node,
                  const lee_key *key, void *into) {
    lee_case_draft *draft = into;
    if (node->kind != LEE_YAML_MAPPING) {
        lee_key_problem(reader, node, key->name,
                        "should be {duration: 3 s, period: 10 min, exposure: "
                        "in-land}: it says that the speeds are gusts");
        return;
    }
    draft->result.problem.exposure.is_gust = true;
    lee_key_section_of(reader, node, key, into);
}

void lee_key_over(lee_case_reader *reader, const lee_yaml_node *node,
                  const lee_key *key, void *into) {
    lee_case_draft *draft = into;
    if (node->kind == LEE_YAML_SCALAR && strcmp(node->text, "water") == 0) {
        return;
    }
    if (node->kind != LEE_YAML_MAPPING) {
        lee_key_problem(reader, node, key->name,
                        "should be water, or {land: {roughness_length: "
                        "0.03 m, to_water: 1.2}}");
        return;
    }
    draft->result.problem.exposure.is_over_land = true;
    lee_key_section_of(reader, node, key, into);
}

static bool is_number(const char *text) {
    double value;
    return lee_number_parse(strlen(text), text, '.', &value);
}

/* The relations of lee_to_water_method that stand for themselves. */
static bool find_relation(const char *text, lee_to_water_method *method) {
    static const struct {
        const char *word;
        lee_to_water_method method;
    } relations[] = {
        {"hsu-1980", LEE_TO_WATER_HSU_1980},
        {"hsu-1981", LEE_TO_WATER_HSU_1981},
    };
    for (size_t i = 0; i < sizeof relations / sizeof relations[0]; i++) {
        if (strcmp(relations[i].word, text) == 0) {
            *method = relations[i].method;
            return true;
        }
    }
    return false;
}

static void read_way(lee_case_reader *reader, const lee_yaml_node *node,
                     const lee_key *key, lee_case_draft *draft) {
    lee_exposure *exposure = &draft->result.problem.exposure;
    lee_key_section_of(reader, node, key, draft);
    if (draft->to_water_table != NULL) {
        exposure->to_water_method = LEE_TO_WATER_TABLE;
    } else if (lee_yaml_get(node, "fetch") != NULL) {
        exposure->to_water_method = LEE_TO_WATER_RESERVOIR;
    } else {
        lee_key_problem(reader, node, key->name,
                        "needs one of the keys 'fetch' and 'table'");
    }
}

void lee_key_to_water(lee_case_reader *reader, const lee_yaml_node *node,
                      const lee_key *key, void *into) {
    lee_case_draft *draft = into;
    lee_exposure *exposure = &draft->result.problem.exposure;
    if (node->kind == LEE_YAML_MAPPING) {
        read_way(reader, node, key, draft);
        return;
    }
    const char *text = lee_key_scalar(reader, node, key);
    if (text == NULL || find_relation(text, &exposure->to_water_method)) {
        return;
    }
    if (is_number(text)) {
        (void)lee_key_value(reader, node, key, &exposure->land_to_water);
        return;
    }
    char shown[LEE_SHOWN];
    lee_key_problem(reader, node, key->name,
                    "is '%s'; expected a factor, hsu-1980, hsu-1981, {fetch: "
                    "4 km} or {table: ratio.csv}",
                    lee_text_show(strlen(text), text, shown));
}

void lee_key_stability(lee_case_reader *reader, const lee_yaml_node *node,
                       const lee_key *key, void *into) {
    lee_case_draft *draft = into;
    lee_exposure *exposure = &draft->result.problem.exposure;
    if (node->kind == LEE_YAML_MAPPING) {
        lee_key_section_of(reader, node, key, into);
        return;
    }
    if (node->kind == LEE_YAML_LIST) {
        lee_key_problem(reader, node, key->name,
                        "takes one method, never two; expected one of none, "
                        "monin-obukhov, air-water-ratio, or a factor");
        return;
    }
    const char *text = lee_key_scalar(reader, node, key);
    if (text == NULL) {
        return;
    }
    if (!is_number(text)) {
        lee_key choice = *key;
        choice.offset =
            offsetof(lee_case_draft, result.problem.exposure.stability);
        lee_key_choice(reader, node, &choice, into);
    } else if (lee_key_value(reader, node, key, &exposure->stability_factor)) {
        exposure->stability = LEE_STABILITY_FACTOR;
    }
}

static void check_height(lee_case_reader *reader, const lee_case_draft *draft,
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

/* A temperature that stability asks for: its own, else that of the record's
 * samples (NaN), else one that the case gives for another use. */
static void settle_temperature(lee_case_reader *reader,
                               const lee_case_draft *draft,
                               lee_wind_column column, double other,
                               double *temperature) {
    static const char *const elsewhere[] = {"stress.air_temperature",
                                            "lake.water_temperature"};
    const bool is_water = column == LEE_WIND_WATER_TEMPERATURE;
    if (!isnan(*temperature) || draft->wind.column[column].column != NULL) {
        return;
    }
    *temperature = other;
    if (isnan(other)) {
        const char *name = lee_wind_column_name(column);
        lee_key_problem(reader, lee_case_node(draft, "wind/stability"),
                        "wind.stability",
                        "needs '%s': inside it, as a column of the record, or "
                        "as '%s'",
                        name, elsewhere[is_water]);
    }
}

static void check_stability(lee_case_reader *reader, lee_case_draft *draft) {
    lee_exposure *exposure = &draft->result.problem.exposure;
    const bool is_solved = exposure->stability == LEE_STABILITY_MONIN_OBUKHOV;
    static const struct {
        const char *key;
        const char *path;
    } own[] = {
        {"temperature_height", "wind.stability.temperature_height"},
        {"functions",          "wind.stability.functions"         },
    };
    const lee_yaml_node *node = lee_case_node(draft, "wind/stability");
    for (size_t i = 0; i < 2 && !is_solved; i++) {
        const lee_yaml_node *key =
            node != NULL && node->kind == LEE_YAML_MAPPING
                ? lee_yaml_get(node, own[i].key)
                : NULL;
        if (key != NULL) {
            lee_key_problem(reader, key, own[i].path,
                            "goes with the method 'monin-obukhov' only");
        }
    }
    if (is_solved || exposure->stability == LEE_STABILITY_RATIO) {
        settle_temperature(reader, draft, LEE_WIND_AIR_TEMPERATURE,
                           draft->result.problem.air.temperature,
                           &exposure->air_temperature);
        settle_temperature(reader, draft, LEE_WIND_WATER_TEMPERATURE,
                           draft->water_temperature,
                           &exposure->water_temperature);
    }
    exposure->functions =
        lee_stability_functions_at((size_t)draft->stability_functions);
}

void lee_case_check_exposure(lee_case_reader *reader, lee_case_draft *draft) {
    const lee_yaml_node *wind = lee_case_node(draft, "wind");
    const lee_yaml_node *offset = lee_yaml_get(wind, "direction_offset");
    check_height(reader, draft, wind);
    check_stability(reader, draft);
    if (offset != NULL && draft->wind.has_storm) {
        lee_key_problem(reader, offset, "wind.direction_offset",
                        "is for winds that were measured, not for a storm");
    }
}

static const lee_speed_table_kind ratio_table = {
    .table = "a table of ratios",
    .column = "ratio",
    .value = "ratio",
    .range = "more than 0.2 and up to 5",
    .above = 0.2,
    .highest = 5.0,
};

void lee_case_finish_exposure(lee_case_reader *reader, lee_case_draft *draft) {
    lee_exposure *exposure = &draft->result.problem.exposure;
    lee_error error = {0};
    if (draft->to_water_table != NULL) {
        char *path = lee_case_beside(reader, draft->to_water_table);
        lee_speed_table table = {0};
        if (path != NULL && lee_speed_table_read(path, &ratio_table, &table,
                                                 &error) != LEE_OK) {
            lee_case_pass_on(
                reader, lee_case_node(draft, "wind/over/land/to_water/table"),
                &error);
        }
        exposure->to_water_table =
            (lee_ratio_table){table.n, table.speed, table.value};
        free(path);
    }
    const lee_yaml_node *wind = lee_case_node(draft, "wind");
    if (wind != NULL && error.status == LEE_OK &&
        lee_exposure_check(exposure, &error) != LEE_OK) {
        lee_key_problem(reader, wind, "wind", "cannot be used: %s",
                        error.message);
    }
}
