/* text.h - growing text, printable text, and the nearest of known words. */
#ifndef LEEWATER_BASE_TEXT_H
#define LEEWATER_BASE_TEXT_H

#include <stdbool.h>
#include <stddef.h>

#include "leewater/status.h"

/* Text that grows. {0} is valid and empty; `bytes` is NULL or terminated. */
typedef struct lee_text {
    size_t length;
    size_t room;
    char *bytes;
    bool has_failed; /* memory ran out: later additions do nothing */
} lee_text;

/* Adds formatted text. A failure is kept in `has_failed`: look once, at the
 * end. */
void lee_text_add(lee_text *text, const char *format, ...) LEE_PRINTF(2, 3);
void lee_text_free(lee_text *text);

/* Copy of a string; NULL for NULL or without memory. free() it. */
char *lee_text_copy(const char *string);

/* Copy without the blanks, tabs and line ends around it; NULL without memory.
 * free() it. */
char *lee_text_trimmed(const char *string);

enum { LEE_SHOWN = 48 }; /* room for shown text */

/* Makes bytes from a file fit to be printed: at most 40 characters, control
 * bytes and broken UTF-8 as '?', "..." when cut. Returns shown. */
char *lee_text_show(size_t length, const char bytes[], char shown[LEE_SHOWN]);

/* Copy in which bytes that are not UTF-8 are U+FFFD; NULL without memory.
 * free() it. */
char *lee_text_mended(const char *string);

/* Bytes of the longest beginning of a string of UTF-8 that has at most `room`
 * bytes and ends with a whole character. */
size_t lee_text_fits(const char *string, size_t room);

/* The word of words[count] nearest to `word` (edit distance, letters of either
 * case alike), or NULL when none is near: more than a third of its letters,
 * at least 1 and at most 3, would have to change. */
const char *lee_text_nearest(const char *word, size_t count,
                             const char *const words[]);

/* Equal but for the case of ASCII letters. */
bool lee_text_same(const char *a, const char *b);

#endif
