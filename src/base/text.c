/* text.c - growing text, printable text, and the nearest of known words. */
#include "base/text.h"

#include <stdarg.h>
#include <stdint.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>

/* Makes room for `more` bytes and the terminator. */
static bool grow(lee_text *text, size_t more) {
    const size_t needed = text->length + more + 1;
    if (needed <= text->room) {
        return true;
    }
    const size_t room = needed < 2 * text->room ? 2 * text->room : needed + 64;
    char *bytes = realloc(text->bytes, room);
    if (bytes == NULL) {
        text->has_failed = true;
        return false;
    }
    text->bytes = bytes;
    text->room = room;
    return true;
}

void lee_text_add(lee_text *text, const char *format, ...) {
    if (text->has_failed) {
        return;
    }
    va_list arguments;
    va_start(arguments, format);
    const int length = vsnprintf(NULL, 0, format, arguments);
    va_end(arguments);
    if (length < 0) {
        text->has_failed = true;
        return;
    }
    if (!grow(text, (size_t)length)) {
        return;
    }
    va_start(arguments, format);
    (void)vsnprintf(text->bytes + text->length, (size_t)length + 1, format,
                    arguments);
    va_end(arguments);
    text->length += (size_t)length;
}

void lee_text_free(lee_text *text) {
    free(text->bytes);
    *text = (lee_text){0};
}

char *lee_text_copy(const char *string) {
    if (string == NULL) {
        return NULL;
    }
    const size_t size = strlen(string) + 1;
    char *copy = malloc(size);
    return copy == NULL ? NULL : memcpy(copy, string, size);
}

static bool is_blank(char c) {
    return c == ' ' || c == '\t' || c == '\r' || c == '\n';
}

char *lee_text_trimmed(const char *string) {
    while (is_blank(*string)) {
        string++;
    }
    char *copy = lee_text_copy(string);
    if (copy != NULL) {
        size_t length = strlen(copy);
        while (length > 0 && is_blank(copy[length - 1])) {
            length--;
        }
        copy[length] = '\0';
    }
    return copy;
}

/* The code point that begins at bytes[0], and its length; length 0 when the
 * bytes are no UTF-8: cut off, overlong, a surrogate, above U+10FFFF (RFC
 * 3629, section 4). */
static size_t utf8_read(size_t room, const char bytes[], int32_t *point) {
    static const struct {
        int mask;
        int lead;
        int32_t least;
    } forms[] = {
        {0x80, 0x00, 0x0    },
        {0xE0, 0xC0, 0x80   },
        {0xF0, 0xE0, 0x800  },
        {0xF8, 0xF0, 0x10000},
    };
    const int first = (unsigned char)bytes[0];
    for (size_t i = 0; i < sizeof forms / sizeof forms[0]; i++) {
        if ((first & forms[i].mask) != forms[i].lead) {
            continue;
        }
        int32_t read = first & ~forms[i].mask;
        for (size_t k = 1; k <= i; k++) {
            if (k >= room || (bytes[k] & 0xC0) != 0x80) {
                return 0;
            }
            read = read * 64 + (bytes[k] & 0x3F);
        }
        const bool is_surrogate = read >= 0xD800 && read <= 0xDFFF;
        if (read < forms[i].least || read > 0x10FFFF || is_surrogate) {
            return 0;
        }
        *point = read;
        return i + 1;
    }
    return 0;
}

char *lee_text_mended(const char *string) {
    lee_text mended = {0};
    lee_text_add(&mended, "%s", "");
    while (*string != '\0') {
        int32_t point = 0;
        const size_t read = utf8_read(strnlen(string, 4), string, &point);
        if (read == 0) {
            lee_text_add(&mended, "\xEF\xBF\xBD"); /* U+FFFD */
        } else {
            lee_text_add(&mended, "%.*s", (int)read, string);
        }
        string += read > 0 ? read : 1;
    }
    if (mended.has_failed) {
        lee_text_free(&mended);
    }
    return mended.bytes;
}

size_t lee_text_fits(const char *string, size_t room) {
    size_t fitting = 0;
    while (string[fitting] != '\0') {
        int32_t point = 0;
        const char *at = string + fitting;
        const size_t read = utf8_read(strnlen(at, 4), at, &point);
        const size_t width = read > 0 ? read : 1;
        if (fitting + width > room) {
            break;
        }
        fitting += width;
    }
    return fitting;
}

/* Control characters, and those that turn the direction of text or end a
 * line: a message shows what it holds. */
static bool is_unprintable(int32_t point) {
    return point < 0x20 || (point >= 0x7F && point <= 0x9F) ||
           (point >= 0x2028 && point <= 0x202E) ||
           (point >= 0x2066 && point <= 0x2069);
}

enum { SHOWN_CHARACTERS = 40 };

char *lee_text_show(size_t length, const char bytes[], char shown[LEE_SHOWN]) {
    static const char cut[] = "...";
    size_t used = 0;
    size_t characters = 0;
    size_t at = 0;
    while (at < length) {
        int32_t point = 0;
        const size_t read = utf8_read(length - at, bytes + at, &point);
        const bool is_shown = read > 0 && !is_unprintable(point);
        const size_t width = is_shown ? read : 1;
        if (characters == SHOWN_CHARACTERS ||
            used + width + sizeof cut > LEE_SHOWN) {
            memcpy(shown + used, cut, sizeof cut);
            return shown;
        }
        memcpy(shown + used, is_shown ? bytes + at : "?", width);
        used += width;
        characters++;
        at += read > 0 ? read : 1;
    }
    shown[used] = '\0';
    return shown;
}

static int lower(char c) {
    return c >= 'A' && c <= 'Z' ? c - 'A' + 'a' : c;
}

enum { WORD_ROOM = 64 };

static size_t least(size_t a, size_t b) {
    return a < b ? a : b;
}

/* Letters to put in, leave out, change or swap with their neighbour between
 * two words shorter than WORD_ROOM (Damerau 1964, from memory)
 * [damerau1964]. */
static size_t edit_distance(const char *a, const char *b) {
    size_t rows[3][WORD_ROOM + 1];
    size_t *before = rows[0]; /* distances of the prefix two letters shorter */
    size_t *above = rows[1];
    size_t *row = rows[2];
    const size_t n = strlen(b);
    for (size_t j = 0; j <= n; j++) {
        row[j] = j;
    }
    for (size_t i = 1; a[i - 1] != '\0'; i++) {
        size_t *spare = before;
        before = above;
        above = row;
        row = spare;
        row[0] = i;
        for (size_t j = 1; j <= n; j++) {
            const bool differs = lower(a[i - 1]) != lower(b[j - 1]);
            row[j] =
                least(above[j - 1] + differs, 1 + least(above[j], row[j - 1]));
            if (i > 1 && j > 1 && lower(a[i - 1]) == lower(b[j - 2]) &&
                lower(a[i - 2]) == lower(b[j - 1])) {
                row[j] = least(row[j], before[j - 2] + 1);
            }
        }
    }
    return row[n];
}

const char *lee_text_nearest(const char *word, size_t count,
                             const char *const words[]) {
    const size_t length = strlen(word);
    if (length >= WORD_ROOM) {
        return NULL;
    }
    size_t reach = length / 3 < 1 ? 1 : least(length / 3, 3);
    const char *nearest = NULL;
    for (size_t i = 0; i < count; i++) {
        if (strlen(words[i]) >= WORD_ROOM) {
            continue;
        }
        const size_t distance = edit_distance(word, words[i]);
        if (distance < reach || (distance == reach && nearest == NULL)) {
            nearest = words[i];
            reach = distance;
        }
    }
    return nearest;
}

bool lee_text_same(const char *a, const char *b) {
    while (*a != '\0' && lower(*a) == lower(*b)) {
        a++;
        b++;
    }
    return lower(*a) == lower(*b);
}
