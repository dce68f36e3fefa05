/* case.c - reads a case file and what it names. */
#include "leewater/case.h"

#include <math.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>

#include "base/text.h"
#include "case/draft.h"
#include "case/keys.h"

const lee_yaml_node *lee_case_node(const lee_case_draft *draft,
                                   const char *path) {
    const lee_yaml_node *node = draft->root;
    while (node != NULL && *path != '\0') {
        char key[32];
        const size_t length = strcspn(path, "/");
        if (length >= sizeof key) {
            return NULL;
        }
        memcpy(key, path, length);
        key[length] = '\0';
        node = lee_yaml_get(node, key);
        path += length + (path[length] == '/' ? 1 : 0);
    }
    return node;
}

static void note_input(lee_case_reader *reader, const char *path) {
    if (lee_notes_add(&reader->inputs, NULL, "%s", path) != LEE_OK) {
        reader->has_no_room = true;
    }
}

char *lee_case_beside(lee_case_reader *reader, const char *file) {
    const char *slash = strrchr(reader->path, '/');
    const size_t folder = slash == NULL || file[0] == '/'
                              ? 0
                              : (size_t)(slash - reader->path) + 1;
    const size_t length = strlen(file) + 1;
    char *path = malloc(folder + length);
    if (path == NULL) {
        reader->has_no_room = true;
        return NULL;
    }
    memcpy(path, reader->path, folder);
    memcpy(path + folder, file, length);
    note_input(reader, path);
    return path;
}

void lee_case_pass_on(lee_case_reader *reader, const lee_yaml_node *node,
                      const lee_error *error) {
    if (error->status == LEE_ERR_MEMORY) {
        reader->has_no_room = true;
        return;
    }
    lee_case_problems_pass_on(&reader->problems, error, reader->path,
                              node->line, node->column);
}

static lee_case_draft empty_draft(void) {
    const lee_level_draft no_level = {.level = NAN};
    return (lee_case_draft){
        .still_water = no_level,
        .axis = {.bearing = NAN,
                 .made_for = NAN,
                 .length = NAN,
                 .depth = NAN,
                 .width = NAN,
                 .start = no_level,
                 .end = no_level},
        .water_temperature = NAN,
        .wind = {.given = {NAN, NAN, NAN},  .longitude = NAN, .latitude = NAN},
        .drag_cap = NAN,
        .result = {.problem = lee_problem_default()  },
    };
}

static void check_run(lee_case_reader *reader, lee_case_draft *draft) {
    lee_run_window *run = &draft->result.problem.run;
    run->has_from = draft->from.is_given;
    run->from = draft->from.value;
    run->has_to = draft->to.is_given;
    run->to = draft->to.value;
    if (run->has_from && run->has_to && run->to <= run->from) {
        lee_key_problem(reader, lee_case_node(draft, "run/to"), "run.to",
                        "is not later than 'run.from'");
    }
}

/* Form first: files are read only for a case that is in order. */
static void read_draft(lee_case_reader *reader, lee_case_draft *draft) {
    lee_key_read_mapping(reader, draft->root, "", &lee_case_keys, draft);
    lee_case_check_lake(reader, draft);
    lee_case_check_wind(reader, draft);
    check_run(reader, draft);
    if (reader->problems.count > 0 || reader->has_no_room) {
        return;
    }
    lee_case_finish_lake(reader, draft);
    lee_case_finish_wind(reader, draft);
    lee_case_finish_drag(reader, draft);
    if (reader->problems.count == 0 && !reader->has_no_room) {
        lee_case_finish_stations(reader, draft);
    }
}

static lee_status read_tree(const char *path, const lee_yaml_node *root,
                            bool is_apart, lee_case *problem_case,
                            lee_error *error) {
    lee_case_reader reader = {.path = path, .is_apart = is_apart};
    lee_case_draft draft = empty_draft();
    draft.root = root;
    draft.result.path = lee_text_copy(path);
    reader.has_no_room = draft.result.path == NULL;
    note_input(&reader, path);
    read_draft(&reader, &draft);
    draft.result.inputs = reader.inputs;
    free(draft.wind.missing);
    free(draft.wind.record);
    const lee_status status =
        reader.has_no_room
            ? lee_fail(error, LEE_ERR_MEMORY, "%s: no room for the case", path)
            : lee_case_problems_tell(&reader.problems, error);
    if (status != LEE_OK) {
        lee_case_free(&draft.result);
        return status;
    }
    *problem_case = draft.result;
    return LEE_OK;
}

static lee_status read_case(const char *path, bool is_apart,
                            lee_case *problem_case, lee_error *error) {
    lee_yaml_node *root = NULL;
    lee_status status = lee_yaml_read(path, &root, error);
    if (status == LEE_OK) {
        status = read_tree(path, root, is_apart, problem_case, error);
    }
    lee_yaml_free(root);
    return status;
}

lee_status lee_case_read(const char *path, lee_case *problem_case,
                         lee_error *error) {
    return read_case(path, false, problem_case, error);
}

lee_status lee_case_read_apart(const char *path, lee_case *problem_case,
                               lee_error *error) {
    return read_case(path, true, problem_case, error);
}

void lee_case_free(lee_case *problem_case) {
    free(problem_case->path);
    free(problem_case->title);
    free(problem_case->institution);
    free(problem_case->creator);
    free(problem_case->license);
    lee_notes_free(&problem_case->notes);
    lee_notes_free(&problem_case->inputs);
    lee_problem_free(&problem_case->problem);
    *problem_case = (lee_case){0};
}
