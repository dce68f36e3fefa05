/* status.h - what can go wrong, and how it is told. */
#ifndef LEEWATER_STATUS_H
#define LEEWATER_STATUS_H

#include <stddef.h>

/* Lets gcc and clang check a printf-like call. */
#if defined(__GNUC__)
#define LEE_PRINTF(text, first) __attribute__((format(printf, text, first)))
#else
#define LEE_PRINTF(text, first)
#endif

/* One list feeds the enumeration, the texts and the program's exit codes. */
#define LEE_STATUS_LIST(X)                                                \
    X(LEE_OK, 0, "success")                                               \
    X(LEE_ERR_ARGUMENT, 2, "an argument is outside its documented range") \
    X(LEE_ERR_FILE, 3, "a file cannot be opened, read or written")        \
    X(LEE_ERR_FORMAT, 4, "a file does not follow its documented format")  \
    X(LEE_ERR_DATA, 5, "the data cannot support the requested estimate")  \
    X(LEE_ERR_CONVERGENCE, 6, "an iteration did not reach its tolerance") \
    X(LEE_ERR_MEMORY, 7, "memory is exhausted")                           \
    X(LEE_ERR_INTERRUPTED, 130, "the caller asked to stop")

typedef enum lee_status {
#define LEE_ENTRY(name, exit_code, text) name,
    LEE_STATUS_LIST(LEE_ENTRY)
#undef LEE_ENTRY
} lee_status;

/* What went wrong, for a person. Lives on the caller's stack: start it as
 * {0}, pass its address down, print `message` when a call does not return
 * LEE_OK. A message may hold several lines, one a problem. Every function
 * that takes one accepts NULL. */
typedef struct lee_error {
    lee_status status;
    char message[2048];
} lee_error;

/* Records status and a formatted message in `error` (when not NULL) and
 * returns status, so a failure is one line: return lee_fail(...). */
lee_status lee_fail(lee_error *error, lee_status status, const char *format,
                    ...) LEE_PRINTF(3, 4);

/* Puts a place in front of the message that `error` already holds, as in
 * "wind.csv:42: ...". Does nothing when error is NULL or holds no failure. */
void lee_context(lee_error *error, const char *format, ...) LEE_PRINTF(2, 3);

/* The text of a status, and the exit code the program gives it. */
const char *lee_status_text(lee_status status);
int lee_status_exit_code(lee_status status);

/* Remarks that belong to a result: warnings, what was done to a record.
 * {0} is a valid empty list. Owns its texts. */
typedef struct lee_notes {
    size_t n;
    char **text; /* [n] one sentence each, no full stop, no newline */
} lee_notes;

/* Adds a formatted sentence unless the same one is there already.
 * Errors: LEE_ERR_MEMORY. */
lee_status lee_notes_add(lee_notes *notes, lee_error *error, const char *format,
                         ...) LEE_PRINTF(3, 4);

/* Frees the texts and empties the list. Safe to call twice. */
void lee_notes_free(lee_notes *notes);

/* Version of the library, "major.minor.patch". */
const char *lee_version(void);

/* The caution that accompanies every level this library prints or writes. */
const char *lee_caution(void);

/* Stated limits of the method, one sentence each; NULL past the last. */
const char *lee_limit_at(size_t index);

/* Turns off GSL's handler that aborts the process, for the whole process. The
 * library checks every status itself. */
void lee_quiet_gsl(void);

#endif
