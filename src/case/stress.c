/* stress.c - the drag and the return flow of a case. */
#include <math.h>
#include <stdlib.h>
#include <string.h>

#include "base/number.h"
#include "base/text.h"
#include "case/draft.h"
#include "case/table.h"

#include "leewater/units.h"

static void refuse_relation(lee_case_reader *reader, const lee_yaml_node *node,
                            const lee_key *key) {
    char shown[LEE_SHOWN];
    const char *nearest = lee_drag_nearest(node->text);
    lee_text_show(strlen(node->text), node->text, shown);
    if (nearest != NULL) {
        lee_key_problem(reader, node, key->name,
                        "is '%s', which is no drag relation; did you mean "
                        "'%s'?",
                        shown, nearest);
    } else {
        lee_key_problem(reader, node, key->name,
                        "is '%s'; expected a drag relation (the command drag "
                        "lists them), a number, or {table: drag.csv}",
                        shown);
    }
}

void lee_key_drag(lee_case_reader *reader, const lee_yaml_node *node,
                  const lee_key *key, void *into) {
    lee_case_draft *draft = into;
    lee_drag *drag = &draft->result.problem.drag;
    if (node->kind == LEE_YAML_MAPPING) {
        lee_key_section_of(reader, node, key, into);
        return;
    }
    const char *text = lee_key_scalar(reader, node, key);
    double value = 0.0;
    if (text == NULL) {
        return;
    }
    if (lee_number_parse(strlen(text), text, '.', &value)) {
        if (lee_key_value(reader, node, key, &value)) {
            drag->relation = NULL;
            drag->constant = value;
        }
        return;
    }
    const lee_drag_relation *relation = lee_drag_find(text);
    if (relation == NULL) {
        refuse_relation(reader, node, key);
    } else {
        drag->relation = relation;
    }
}

void lee_key_return_flow(lee_case_reader *reader, const lee_yaml_node *node,
                         const lee_key *key, void *into) {
    lee_problem *problem = (void *)((char *)into + key->offset);
    double value = 0.0;
    if (lee_key_value(reader, node, key, &value)) {
        const bool is_computed = strcmp(node->text, key->word) == 0;
        problem->return_flow =
            (lee_return_flow){is_computed, is_computed ? 1.0 : value};
        problem->return_flow_given = true;
    }
}

static const lee_speed_table_kind drag_table = {
    .table = "a drag table",
    .column = "coefficient",
    .value = "drag coefficient",
    .range = "more than 0 and up to 0.02",
    .above = 0.0,
    .highest = 0.02,
};

static lee_status read_table(const char *path, lee_drag *drag,
                             lee_error *error) {
    lee_speed_table table;
    const lee_status status =
        lee_speed_table_read(path, &drag_table, &table, error);
    drag->n = table.n;
    drag->speed = table.speed;
    drag->coefficient = table.value;
    return status;
}

void lee_case_finish_drag(lee_case_reader *reader, lee_case_draft *draft) {
    lee_drag *drag = &draft->result.problem.drag;
    if (draft->drag_table != NULL) {
        drag->relation = NULL;
        lee_error error = {0};
        char *path = lee_case_beside(reader, draft->drag_table);
        if (path != NULL && read_table(path, drag, &error) != LEE_OK) {
            lee_case_pass_on(reader, lee_case_node(draft, "stress/drag/table"),
                             &error);
        }
        free(path);
    }
    if (!isnan(draft->drag_cap)) {
        drag->cap = draft->drag_cap;
    } else if (drag->relation == NULL) {
        drag->cap = INFINITY; /* what the user wrote is meant */
    }
}
