/* stations.c - the stations of a case and their thresholds. */
#include <math.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>

#include "base/text.h"
#include "case/draft.h"

static void add_threshold(lee_case_reader *reader, lee_station *station,
                          lee_threshold threshold) {
    const size_t n = station->threshold_count + 1;
    lee_threshold *grown = realloc(station->threshold, n * sizeof *grown);
    if (grown == NULL) {
        reader->has_no_room = true;
        return;
    }
    grown[n - 1] = threshold;
    station->threshold = grown;
    station->threshold_count = n;
}

void lee_key_thresholds(lee_case_reader *reader, const lee_yaml_node *node,
                        const lee_key *key, void *into) {
    lee_station *station = into;
    const bool is_list = node->kind == LEE_YAML_LIST;
    const size_t count = is_list ? node->count : 1;
    if (count == 0) {
        lee_key_problem(reader, node, key->name,
                        "is an empty list; expected one level at least");
    }
    for (size_t i = 0; i < count; i++) {
        lee_threshold threshold = {NAN, key->stands_for != 0};
        const lee_yaml_node *item = is_list ? node->child[i] : node;
        if (lee_key_value(reader, item, key, &threshold.level)) {
            add_threshold(reader, station, threshold);
        }
    }
}

/* Names that could not be read are NULL and equal to none. */
static bool is_taken(const lee_problem *problem, size_t before,
                     const char *name) {
    for (size_t i = 0; i < before; i++) {
        const char *earlier = problem->station[i].name;
        if (earlier != NULL && strcmp(earlier, name) == 0) {
            return true;
        }
    }
    return false;
}

static void check_names(lee_case_reader *reader, const lee_yaml_node *list,
                        const lee_problem *problem) {
    for (size_t i = 0; i < problem->station_count; i++) {
        const char *name = problem->station[i].name;
        if (name != NULL && is_taken(problem, i, name)) {
            char shown[LEE_SHOWN];
            lee_key_problem(reader, lee_yaml_get(list->child[i], "name"),
                            "stations", "holds the name '%s' twice",
                            lee_text_show(strlen(name), name, shown));
        }
    }
}

void lee_key_stations(lee_case_reader *reader, const lee_yaml_node *node,
                      const lee_key *key, void *into) {
    enum { MOST = 1000 }; /* names are compared with one another */
    lee_problem *problem = (void *)((char *)into + key->offset);
    if (node->kind != LEE_YAML_LIST || node->count == 0 || node->count > MOST) {
        lee_key_problem(reader, node, key->name,
                        "should be a list of 1 to %d stations such as "
                        "[{name: North quay, at: 0.4 km}]",
                        (int)MOST);
        return;
    }
    problem->station = calloc(node->count, sizeof *problem->station);
    if (problem->station == NULL) {
        reader->has_no_room = true;
        return;
    }
    problem->station_count = node->count;
    for (size_t i = 0; i < node->count; i++) {
        char where[sizeof reader->where];
        (void)snprintf(where, sizeof where, "%s[%zu]", key->name, i + 1);
        problem->station[i] = (lee_station){
            .at = NAN, .bed = NAN, .longitude = NAN, .latitude = NAN};
        lee_key_read_mapping(reader, node->child[i], where, key->section,
                             &problem->station[i]);
    }
    check_names(reader, node, problem);
}

void lee_case_finish_stations(lee_case_reader *reader, lee_case_draft *draft) {
    const lee_problem *problem = &draft->result.problem;
    const lee_profile *axis = &problem->lake.profile;
    const lee_yaml_node *list = lee_case_node(draft, "stations");
    const double first = axis->chainage[0];
    const double last = axis->chainage[axis->n - 1];
    for (size_t i = 0; i < problem->station_count; i++) {
        const lee_station *station = &problem->station[i];
        if (station->at >= first && station->at <= last) {
            continue;
        }
        char text[LEE_PROBLEM_TEXT];
        char shown[LEE_SHOWN];
        const lee_yaml_node *at = lee_yaml_get(list->child[i], "at");
        (void)snprintf(
            text, sizeof text,
            "station '%s' at %.10g m is off the axis, which runs from %.10g m "
            "to %.10g m",
            lee_text_show(strlen(station->name), station->name, shown),
            station->at, first, last);
        lee_case_problems_add(&reader->problems, LEE_ERR_DATA, reader->path,
                              at->line, at->column, text);
    }
}
