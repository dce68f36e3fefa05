/* problems.h - what is wrong with a case, gathered until all is read. */
#ifndef LEEWATER_CASE_PROBLEMS_H
#define LEEWATER_CASE_PROBLEMS_H

#include <stdbool.h>
#include <stddef.h>

#include "leewater/status.h"

enum { LEE_PROBLEMS_SHOWN = 20, LEE_PROBLEM_TEXT = 640 };

/* One problem: a whole line without its end. */
typedef struct lee_case_problem {
    size_t line; /* of the case file; 0 for a file that it names */
    size_t column;
    char text[LEE_PROBLEM_TEXT];
} lee_case_problem;

/* {0} is empty. The first twenty keep their text, all are counted. */
typedef struct lee_case_problems {
    size_t count;
    lee_status status; /* of the first */
    lee_case_problem kept[LEE_PROBLEMS_SHOWN];
} lee_case_problems;

/* Adds the line "path:line:column: text". */
void lee_case_problems_add(lee_case_problems *problems, lee_status status,
                           const char *path, size_t line, size_t column,
                           const char *text);

/* Adds the message of another file's reader as it is, followed by where the
 * case names that file. */
void lee_case_problems_pass_on(lee_case_problems *problems,
                               const lee_error *from, const char *path,
                               size_t line, size_t column);

/* Tells all problems as one error, in the order of their places: as many
 * whole lines as a message holds, then how many more. LEE_OK when there are
 * none. */
lee_status lee_case_problems_tell(lee_case_problems *problems,
                                  lee_error *error);

#endif
