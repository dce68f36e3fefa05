/* stress.c - the drag and the return flow of a case. */
#include <math.h>
#include <stdlib.h>
#include <string.h>

#include "base/number.h"
#include "base/text.h"
#include "case/draft.h"
#include "formats/csv_column.h"

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

/* The columns of a drag table. */
typedef struct drag_columns {
    lee_csv_column speed;
    lee_csv_column coefficient;
} drag_columns;

static lee_status find_columns(const lee_csv *csv, drag_columns *columns,
                               lee_error *error) {
    const lee_status status =
        lee_csv_find_column(csv, "speed", "m s-1", &columns->speed, error);
    return status == LEE_OK ? lee_csv_find_column(csv, "coefficient", "1",
                                                  &columns->coefficient, error)
                            : status;
}

static lee_status add_row(lee_drag *drag, double speed, double coefficient,
                          lee_error *error) {
    const size_t n = drag->n + 1;
    double *grown = realloc(drag->speed, n * sizeof *grown);
    if (grown != NULL) {
        drag->speed = grown;
        grown = realloc(drag->coefficient, n * sizeof *grown);
    }
    if (grown == NULL) {
        return lee_fail(error, LEE_ERR_MEMORY, "no room for a drag table");
    }
    drag->coefficient = grown;
    drag->speed[drag->n] = speed;
    drag->coefficient[drag->n] = coefficient;
    drag->n = n;
    return LEE_OK;
}

static lee_status take_row(const lee_csv *csv, const lee_csv_field *fields,
                           const drag_columns *columns, lee_drag *drag,
                           lee_error *error) {
    double speed = 0.0;
    double coefficient = 0.0;
    lee_status status =
        lee_csv_column_number(csv, fields, &columns->speed, &speed, error);
    if (status == LEE_OK) {
        status = lee_csv_column_number(csv, fields, &columns->coefficient,
                                       &coefficient, error);
    }
    if (status != LEE_OK) {
        return status;
    }
    const double last = drag->n == 0 ? -1.0 : drag->speed[drag->n - 1];
    if (!(speed >= 0.0 && speed > last)) {
        return lee_csv_fail(csv, &fields[columns->speed.index], error,
                            "speed %g m/s does not grow from row to row, "
                            "from 0 on",
                            speed);
    }
    if (!(coefficient > 0.0 && coefficient <= 0.02)) {
        return lee_csv_fail(csv, &fields[columns->coefficient.index], error,
                            "drag coefficient %g; expected more than 0 and "
                            "up to 0.02",
                            coefficient);
    }
    return add_row(drag, speed, coefficient, error);
}

static lee_status read_table(const char *path, lee_drag *drag,
                             lee_error *error) {
    lee_csv *csv = NULL;
    drag_columns columns = {0};
    lee_status status = lee_csv_open(path, &csv, error);
    if (status == LEE_OK) {
        status = find_columns(csv, &columns, error);
    }
    while (status == LEE_OK) {
        const lee_csv_field *fields = NULL;
        status = lee_csv_next(csv, &fields, error);
        if (status != LEE_OK || fields == NULL) {
            break;
        }
        status = take_row(csv, fields, &columns, drag, error);
    }
    lee_csv_close(csv);
    if (status == LEE_OK && drag->n < 2) {
        return lee_fail(error, LEE_ERR_DATA,
                        "%s: a drag table needs two rows, this one has %zu",
                        path, drag->n);
    }
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
