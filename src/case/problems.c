/* problems.c - gathers the problems of a case and tells them at once. */
#include "case/problems.h"

#include <stdio.h>
#include <stdlib.h>
#include <string.h>

static lee_case_problem *next_kept(lee_case_problems *problems,
                                   lee_status status) {
    if (problems->count == 0) {
        problems->status = status;
    }
    const size_t index = problems->count++;
    return index < LEE_PROBLEMS_SHOWN ? &problems->kept[index] : NULL;
}

void lee_case_problems_add(lee_case_problems *problems, lee_status status,
                           const char *path, size_t line, size_t column,
                           const char *text) {
    lee_case_problem *kept = next_kept(problems, status);
    if (kept != NULL) {
        kept->line = line;
        kept->column = column;
        (void)snprintf(kept->text, sizeof kept->text, "%s:%zu:%zu: %s", path,
                       line, column, text);
    }
}

void lee_case_problems_pass_on(lee_case_problems *problems,
                               const lee_error *from, const char *path,
                               size_t line, size_t column) {
    lee_case_problem *kept = next_kept(problems, from->status);
    if (kept != NULL) {
        kept->line = line;
        kept->column = column;
        (void)snprintf(
            kept->text, sizeof kept->text, "%.*s (named at %s:%zu:%zu)",
            (int)(sizeof kept->text / 2), from->message, path, line, column);
    }
}

static int compare_places(const void *left, const void *right) {
    const lee_case_problem *a = left;
    const lee_case_problem *b = right;
    if (a->line != b->line) {
        return a->line < b->line ? -1 : 1;
    }
    if (a->column != b->column) {
        return a->column < b->column ? -1 : 1;
    }
    return strcmp(a->text, b->text);
}

lee_status lee_case_problems_tell(lee_case_problems *problems,
                                  lee_error *error) {
    if (problems->count == 0) {
        return LEE_OK;
    }
    const size_t kept = problems->count < LEE_PROBLEMS_SHOWN
                            ? problems->count
                            : LEE_PROBLEMS_SHOWN;
    qsort(problems->kept, kept, sizeof problems->kept[0], compare_places);
    enum { CLOSING = 32 }; /* room for "\n123456 more problems" */
    char text[sizeof error->message];
    size_t length = 0;
    size_t told = 0;
    while (told < kept) {
        const char *line = problems->kept[told].text;
        const size_t more = strlen(line) + 1;
        if (length + more + CLOSING > sizeof text) {
            break;
        }
        length += (size_t)snprintf(text + length, sizeof text - length, "%s%s",
                                   told == 0 ? "" : "\n", line);
        told++;
    }
    const size_t left = problems->count - told;
    if (left > 0) {
        (void)snprintf(text + length, sizeof text - length, "\n%zu more %s",
                       left, left == 1 ? "problem" : "problems");
    }
    return lee_fail(error, problems->status, "%s", text);
}
