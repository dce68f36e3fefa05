/* lake.c - the lake of a case: levels, ends, bed law, axis. */
#include <math.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>

#include "case/draft.h"

#include "leewater/calendar.h"
#include "leewater/stress.h"

void lee_key_level(lee_case_reader *reader, const lee_yaml_node *node,
                   const lee_key *key, void *into) {
    lee_level_draft *draft = (void *)((char *)into + key->offset);
    if (node->kind != LEE_YAML_MAPPING) {
        double level = 0.0;
        if (lee_key_value(reader, node, key, &level)) {
            draft->level = level;
        }
        return;
    }
    lee_key_section_of(reader, node, key, into);
    if (lee_yaml_get(node, "level") == NULL &&
        lee_yaml_get(node, "file") == NULL) {
        lee_key_problem(reader, node, key->name,
                        "needs one of the keys 'level' and 'file'");
    }
}

void lee_key_end(lee_case_reader *reader, const lee_yaml_node *node,
                 const lee_key *key, void *into) {
    if (node->kind == LEE_YAML_MAPPING) {
        lee_key_level(reader, node, key, into);
    } else if (node->kind == LEE_YAML_LIST ||
               strcmp(node->text, "closed") != 0) {
        lee_key_problem(reader, node, key->name,
                        "should be closed, or {level: 12 m}, or "
                        "{file: level.csv}");
    }
}

void lee_key_bed(lee_case_reader *reader, const lee_yaml_node *node,
                 const lee_key *key, void *into) {
    lee_bed_law *law = (void *)((char *)into + key->offset);
    if (node->kind == LEE_YAML_SCALAR && strcmp(node->text, "none") == 0) {
        *law = (lee_bed_law){LEE_BED_NONE, 0.0};
        return;
    }
    if (node->kind != LEE_YAML_MAPPING || node->count == 0) {
        lee_key_problem(reader, node, key->name,
                        "should be none, or one law such as "
                        "{manning: 0.025}");
        return;
    }
    lee_key_section_of(reader, node, key, into);
    if (node->count > 1) {
        lee_key_problem(reader, node->child[1], key->name,
                        "takes one law: '%s' and '%s' exclude each other",
                        node->child[0]->key, node->child[1]->key);
    }
}

/* UDUNITS knows no fractional powers, so the usual spellings are cut off. */
static const struct {
    lee_bed_kind kind;
    const char *tail;
} odd_units[] = {
    {LEE_BED_MANNING, " s m-1/3"   },
    {LEE_BED_MANNING, " s/m1/3"    },
    {LEE_BED_MANNING, " s m^(-1/3)"},
    {LEE_BED_MANNING, " s/m^(1/3)" },
    {LEE_BED_CHEZY,   " m1/2 s-1"  },
    {LEE_BED_CHEZY,   " m1/2/s"    },
    {LEE_BED_CHEZY,   " m^(1/2)/s" },
    {LEE_BED_CHEZY,   " m^0.5/s"   },
};

static void cut_odd_unit(lee_bed_kind kind, char text[]) {
    const size_t length = strlen(text);
    for (size_t i = 0; i < sizeof odd_units / sizeof odd_units[0]; i++) {
        const size_t tail = strlen(odd_units[i].tail);
        if (odd_units[i].kind == kind && length > tail &&
            strcmp(text + length - tail, odd_units[i].tail) == 0) {
            text[length - tail] = '\0';
            return;
        }
    }
}

void lee_key_bed_value(lee_case_reader *reader, const lee_yaml_node *node,
                       const lee_key *key, void *into) {
    lee_bed_law *law = into;
    lee_yaml_node bare = *node;
    char text[64];
    if (node->kind == LEE_YAML_SCALAR && strlen(node->text) < sizeof text) {
        (void)snprintf(text, sizeof text, "%s", node->text);
        cut_odd_unit((lee_bed_kind)key->stands_for, text);
        bare.text = text;
    }
    double value = 0.0;
    if (lee_key_value(reader, &bare, key, &value)) {
        *law = (lee_bed_law){(lee_bed_kind)key->stands_for, value};
    }
}

void lee_key_time(lee_case_reader *reader, const lee_yaml_node *node,
                  const lee_key *key, void *into) {
    lee_given_time *given = (void *)((char *)into + key->offset);
    const char *text = lee_key_scalar(reader, node, key);
    lee_error error = {0};
    if (text == NULL) {
        return;
    }
    if (lee_time_parse(text, 0, &given->value, NULL, &error) != LEE_OK) {
        lee_key_unreadable(reader, node, key, &error);
        return;
    }
    given->is_given = true;
}

void lee_key_utc_offset(lee_case_reader *reader, const lee_yaml_node *node,
                        const lee_key *key, void *into) {
    lee_given_time *given = (void *)((char *)into + key->offset);
    const char *text = lee_key_scalar(reader, node, key);
    lee_error error = {0};
    if (text == NULL) {
        return;
    }
    if (lee_utc_offset_parse(text, &given->value, &error) != LEE_OK) {
        lee_key_unreadable(reader, node, key, &error);
        return;
    }
    given->is_given = true;
}

/* The level a depth is measured from; NaN when the case leaves it open. */
static double depth_reference(const lee_case_draft *draft) {
    return isnan(draft->axis.made_for) ? draft->still_water.level
                                       : draft->axis.made_for;
}

static void miss_shape(lee_case_reader *reader, const lee_case_draft *draft) {
    const lee_yaml_node *axis = lee_case_node(draft, "lake/axis");
    if (axis == NULL || axis->kind != LEE_YAML_MAPPING) {
        return;
    }
    const lee_yaml_node *uniform = lee_yaml_get(axis, "uniform");
    if (lee_yaml_get(axis, "profile") == NULL && uniform == NULL) {
        lee_key_problem(reader, axis, "lake.axis",
                        "needs one of the keys 'profile' and 'uniform'");
    }
    if (uniform != NULL && draft->still_water.file != NULL &&
        isnan(draft->axis.made_for)) {
        lee_key_problem(reader, uniform, "lake.axis.uniform",
                        "needs 'made_for', the level its depth is measured "
                        "from, when 'still_water' is a series");
    }
}

void lee_case_check_lake(lee_case_reader *reader, lee_case_draft *draft) {
    lee_problem *problem = &draft->result.problem;
    miss_shape(reader, draft);
    if (!isnan(draft->water_temperature)) {
        problem->lake.water_density =
            lee_water_density(draft->water_temperature);
    }
}

static void read_levels(lee_case_reader *reader, const lee_yaml_node *node,
                        const lee_level_draft *from, lee_level_series *series) {
    lee_error error = {0};
    if (from->file == NULL) {
        if (lee_level_constant(from->level, series, &error) != LEE_OK) {
            reader->has_no_room = true;
        }
        return;
    }
    char *path = lee_case_beside(reader, from->file);
    if (path != NULL && lee_level_series_read_csv(
                            path, from->utc_offset.is_given,
                            from->utc_offset.value, series, &error) != LEE_OK) {
        lee_case_pass_on(reader, node, &error);
    }
    free(path);
}

static void build_end(lee_case_reader *reader, const lee_yaml_node *node,
                      const lee_level_draft *from, lee_end *end) {
    if (node == NULL || (isnan(from->level) && from->file == NULL)) {
        return;
    }
    end->is_held = true;
    read_levels(reader, node, from, &end->level);
}

static void build_uniform(lee_case_reader *reader, const lee_case_draft *draft,
                          lee_profile *profile) {
    if (lee_profile_init(profile, 2, NULL) != LEE_OK) {
        reader->has_no_room = true;
        return;
    }
    for (size_t i = 0; i < 2; i++) {
        profile->chainage[i] = i == 0 ? 0.0 : draft->axis.length;
        profile->bed[i] = depth_reference(draft) - draft->axis.depth;
        profile->width[i] = draft->axis.width;
        profile->bearing[i] = draft->axis.bearing;
    }
}

static void build_profile(lee_case_reader *reader, const lee_case_draft *draft,
                          lee_profile *profile) {
    if (draft->axis.profile == NULL) {
        build_uniform(reader, draft, profile);
        return;
    }
    lee_error error = {0};
    char *path = lee_case_beside(reader, draft->axis.profile);
    if (path != NULL &&
        lee_profile_read_csv(path, draft->axis.bearing, depth_reference(draft),
                             profile, &error) != LEE_OK) {
        lee_case_pass_on(reader, lee_case_node(draft, "lake/axis/profile"),
                         &error);
    }
    free(path);
}

/* Widths and section means belong to the level they were taken at. */
static void warn_of_level(lee_case_reader *reader, lee_case_draft *draft) {
    static const double large = 1.0; /* m, docs/theory.md */
    const lee_level_series *still = &draft->result.problem.lake.still_water;
    const double made_for = draft->axis.made_for;
    double furthest = made_for;
    for (size_t i = 0; i < still->n; i++) {
        if (fabs(still->level[i] - made_for) > fabs(furthest - made_for)) {
            furthest = still->level[i];
        }
    }
    const double off = furthest - made_for;
    if (fabs(off) > large &&
        lee_notes_add(&draft->result.notes, NULL,
                      "still water at %.2f m is %.2f m %s the level the "
                      "profile was made for (%.2f m): its widths and mean "
                      "depths may not fit",
                      furthest, fabs(off), off > 0.0 ? "above" : "below",
                      made_for) != LEE_OK) {
        reader->has_no_room = true;
    }
}

void lee_case_finish_lake(lee_case_reader *reader, lee_case_draft *draft) {
    lee_lake *lake = &draft->result.problem.lake;
    read_levels(reader, lee_case_node(draft, "lake/still_water"),
                &draft->still_water, &lake->still_water);
    build_end(reader, lee_case_node(draft, "lake/axis/start"),
              &draft->axis.start, &lake->start);
    build_end(reader, lee_case_node(draft, "lake/axis/end"), &draft->axis.end,
              &lake->end);
    build_profile(reader, draft, &lake->profile);
    warn_of_level(reader, draft);
}
