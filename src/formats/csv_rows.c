/* csv_rows.c - a text file as rows of fields.
 *
 * A row without quotes is cut at its separators, 64 bytes at a time; one
 * with quotes is walked field by field. */
#include "formats/csv_rows.h"

#include <stdint.h>
#include <stdlib.h>
#include <string.h>

#ifdef __SSE2__
#include <emmintrin.h>
#endif

enum {
    LONGEST_FIELD = 1 << 16, /* 64 KiB */
    MOST_COLUMNS = 4096,
};

/* The first quote from `next` on, or `end`. */
static const char *next_quote(lee_csv_rows *rows) {
    if (rows->quote == NULL || rows->quote < rows->block.next) {
        const char *quote =
            memchr(rows->block.next, '"',
                   (size_t)(rows->block.end - rows->block.next));
        rows->quote = quote == NULL ? rows->block.end : quote;
    }
    return rows->quote;
}

static bool is_blank(const lee_csv_rows *rows, char c) {
    return c == ' ' || (c == '\t' && rows->separator != '\t');
}

/* The field from first to last without the blanks around it. */
static lee_csv_field trimmed(const lee_csv_rows *rows, const char *first,
                             const char *last, const char *line_start) {
    while (first < last && is_blank(rows, *first)) {
        first++;
    }
    while (last > first && is_blank(rows, last[-1])) {
        last--;
    }
    return (lee_csv_field){first, (size_t)(last - first),
                           (size_t)(first - line_start) + 1};
}

enum { STRIDE = 64 }; /* bytes looked at together, one bit each */

/* A bit for each of STRIDE bytes that is a separator, that of the first byte
 * lowest. Bits are the one place where unsigned numbers earn their keep. */
static inline uint64_t find_separators(const char *p, char separator) {
    uint64_t found = 0;
#ifdef __SSE2__
    const __m128i pattern = _mm_set1_epi8(separator);
    for (int i = 0; i < STRIDE; i += 16) {
        __m128i bytes;
        memcpy(&bytes, p + i, sizeof bytes);
        const int equal = _mm_movemask_epi8(_mm_cmpeq_epi8(bytes, pattern));
        found |= (uint64_t)(unsigned)equal << i;
    }
#else
    for (int i = 0; i < STRIDE; i++) {
        found |= (uint64_t)(p[i] == separator) << i;
    }
#endif
    return found;
}

/* What can be blank is no larger than a blank; most fields begin and end with
 * something larger, and need no second look. */
static inline bool may_have_blanks(const char *first, const char *last) {
    return first < last &&
           ((unsigned char)*first <= ' ' || (unsigned char)last[-1] <= ' ');
}

/* Keeps a field of a row that is cut, when there is room for it. */
static inline void keep_cut(const lee_csv_rows *rows, size_t n,
                            const char *first, const char *last,
                            const char *start) {
    if (n >= rows->kept) {
        return;
    }
    if (may_have_blanks(first, last)) {
        rows->fields[n] = trimmed(rows, first, last, start);
        return;
    }
    rows->fields[n] = (lee_csv_field){first, (size_t)(last - first),
                                      (size_t)(first - start) + 1};
}

/* Cuts a row without quotes, which ends before `newline`, at its separators.
 * The last stride may reach past the row: the block has bytes to spare. */
static void cut_plain(lee_csv_rows *rows, const char *newline) {
    const char mark = rows->separator;
    const char *start = rows->block.next;
    const bool has_return = newline > start && newline[-1] == '\r';
    const char *end = has_return ? newline - 1 : newline;
    const char *first = start;
    size_t n = 0;
    for (const char *p = start; p < end; p += STRIDE) {
        uint64_t found = find_separators(p, mark);
        if (end - p < STRIDE) {
            found &= (UINT64_C(1) << (end - p)) - 1;
        }
        for (; found != 0; found &= found - 1) {
            const char *separator = p + __builtin_ctzll(found);
            keep_cut(rows, n++, first, separator, start);
            first = separator + 1;
        }
    }
    keep_cut(rows, n++, first, end, start);
    rows->n = n;
    rows->is_walked = false;
    rows->block.next = newline + 1;
    rows->block.line++;
}

/* A row with quotes, or a very long one, being walked. */
typedef struct walker {
    const char *p;
    lee_csv_place at;
} walker;

/* What a step of the walk came to. */
typedef enum step {
    STEP_ON,     /* a field is kept */
    STEP_DONE,   /* so is the last */
    STEP_SHORT,  /* the block ends before the row */
    STEP_REFUSED /* the error says why */
} step;

static step refuse(const lee_csv_rows *rows, const walker *w, const char *where,
                   const char *what, lee_error *error) {
    lee_csv_block_refuse(&rows->block, w->at, where, what, error);
    return STEP_REFUSED;
}

static void keep_walked(lee_csv_rows *rows, const walker *w, const char *first,
                        const char *last) {
    if (rows->n < rows->kept) {
        rows->field_line[rows->n] = w->at.line;
        rows->fields[rows->n] = trimmed(rows, first, last, w->at.line_start);
    }
    rows->n++;
}

/* The quote that closes the one at `open`, or NULL when the block ends first;
 * a doubled quote closes nothing. */
static const char *closing_quote(const char *open, const char *end) {
    const char *p = open + 1;
    for (;;) {
        const char *quote = memchr(p, '"', (size_t)(end - p));
        if (quote == NULL || quote + 1 == end) {
            return NULL;
        }
        if (quote[1] != '"') {
            return quote;
        }
        p = quote + 2;
    }
}

/* Keeps the quoted field that opens at w->p and steps behind it. */
static step walk_quoted(lee_csv_rows *rows, walker *w, lee_error *error) {
    const char *open = w->p;
    const char *close = closing_quote(open, rows->block.end);
    if (close == NULL && rows->block.at_end) {
        return refuse(rows, w, open, "a quote that is never closed", error);
    }
    const char *last = close == NULL ? rows->block.end : close;
    if (last - open - 1 > LONGEST_FIELD) {
        return refuse(rows, w, open,
                      "a field longer than 64 KiB; is its quote closed?",
                      error);
    }
    if (close == NULL) {
        return STEP_SHORT;
    }
    keep_walked(rows, w, open + 1, close);
    w->at = lee_csv_pass_lines(w->at, open, close);
    w->p = close + 1;
    return STEP_ON;
}

static step walk_unquoted(lee_csv_rows *rows, walker *w, lee_error *error) {
    const char *first = w->p;
    const char *last = first;
    while (last < rows->block.end && *last != rows->separator &&
           *last != '\n' && *last != '"') {
        last++;
    }
    if (last - first > LONGEST_FIELD) {
        return refuse(rows, w, first, "a field longer than 64 KiB", error);
    }
    if (last == rows->block.end) {
        return STEP_SHORT;
    }
    if (*last == '"') {
        return refuse(rows, w, last,
                      "a quote inside a field that does not begin with one",
                      error);
    }
    const bool has_return = *last == '\n' && last > first && last[-1] == '\r';
    keep_walked(rows, w, first, has_return ? last - 1 : last);
    w->p = last;
    return STEP_ON;
}

static const char *skip_blanks(const lee_csv_rows *rows, const char *p) {
    while (p < rows->block.end && is_blank(rows, *p)) {
        p++;
    }
    return p;
}

/* Steps over the separator or line end behind a field. */
static step walk_on(const lee_csv_rows *rows, walker *w, lee_error *error) {
    const char *end = rows->block.end;
    const char *p = skip_blanks(rows, w->p);
    if (p < end && *p == '\r' && (p + 1 == end || p[1] == '\n')) {
        p++;
    }
    if (p == end) {
        return STEP_SHORT;
    }
    if (*p != '\n' && *p != rows->separator) {
        return refuse(rows, w, p, "text behind a closing quote", error);
    }
    w->p = p + 1;
    return *p == '\n' ? STEP_DONE : STEP_ON;
}

static step walk_field(lee_csv_rows *rows, walker *w, lee_error *error) {
    const char *first = skip_blanks(rows, w->p);
    const bool is_quoted = first < rows->block.end && *first == '"';
    w->p = is_quoted ? first : w->p;
    const step kept =
        is_quoted ? walk_quoted(rows, w, error) : walk_unquoted(rows, w, error);
    return kept == STEP_ON ? walk_on(rows, w, error) : kept;
}

/* Reads on; where quotes are must be looked for anew. */
static lee_status read_on(lee_csv_rows *rows, lee_error *error) {
    rows->quote = NULL;
    return lee_csv_block_fill(&rows->block, error);
}

/* Turns "" into " within the kept fields; the block is ours to change. */
static void undouble_quotes(const lee_csv_rows *rows) {
    for (size_t i = 0; i < rows->n && i < rows->kept; i++) {
        lee_csv_field *field = &rows->fields[i];
        char *bytes = rows->block.bytes + (field->bytes - rows->block.bytes);
        size_t length = 0;
        for (size_t k = 0; k < field->length; k++) {
            bytes[length++] = bytes[k];
            k += bytes[k] == '"' ? 1 : 0;
        }
        field->length = length;
    }
}

/* Walks a row; reads on while the block ends before the row does. */
static lee_status walk_row(lee_csv_rows *rows, lee_error *error) {
    lee_status status = LEE_OK;
    while (status == LEE_OK) {
        walker w = {
            rows->block.next, {rows->block.line, rows->block.next}
        };
        step came_to = STEP_ON;
        rows->n = 0;
        rows->is_walked = true;
        while (came_to == STEP_ON) {
            came_to = walk_field(rows, &w, error);
        }
        if (came_to == STEP_DONE) {
            undouble_quotes(rows);
            rows->block.next = w.p;
            rows->block.line = w.at.line + 1;
            return LEE_OK;
        }
        status = came_to == STEP_SHORT ? read_on(rows, error) : LEE_ERR_FORMAT;
    }
    return status;
}

/* Blank lines and remarks are passed over. */
static bool is_passed_over(const lee_csv_rows *rows, const char *newline) {
    const char *p = rows->block.next;
    if (*p == '#') {
        return true;
    }
    while (is_blank(rows, *p)) {
        p++;
    }
    return p == newline || (*p == '\r' && p + 1 == newline);
}

/* Finds the line that the next row begins with; newline: out, its end, or
 * NULL at the end of the file. */
static lee_status find_line(lee_csv_rows *rows, const char **newline,
                            lee_error *error) {
    lee_status status = LEE_OK;
    while (status == LEE_OK) {
        const lee_csv_block *block = &rows->block;
        const size_t ahead = (size_t)(block->end - block->next);
        *newline = memchr(block->next, '\n', ahead);
        if (*newline == NULL && block->at_end) {
            return LEE_OK;
        }
        if (*newline == NULL) {
            status = read_on(rows, error);
        } else if (is_passed_over(rows, *newline)) {
            rows->block.next = *newline + 1;
            rows->block.line++;
        } else {
            return LEE_OK;
        }
    }
    return status;
}

/* Reads the row whose first line ends at `newline`. */
static lee_status read_row(lee_csv_rows *rows, const char *newline,
                           lee_error *error) {
    rows->row_line = rows->block.line;
    if (newline > next_quote(rows) ||
        newline - rows->block.next > LONGEST_FIELD) {
        return walk_row(rows, error);
    }
    cut_plain(rows, newline);
    return LEE_OK;
}

lee_status lee_csv_rows_next(lee_csv_rows *rows, bool *is_row,
                             lee_error *error) {
    const char *newline = NULL;
    lee_status status = find_line(rows, &newline, error);
    *is_row = status == LEE_OK && newline != NULL;
    if (*is_row) {
        status = read_row(rows, newline, error);
    }
    if (status == LEE_OK && *is_row && rows->n != rows->kept) {
        return lee_fail(error, LEE_ERR_FORMAT,
                        "%s:%zu:1: a row of %zu field%s; the header has %zu",
                        rows->block.path, rows->row_line, rows->n,
                        rows->n == 1 ? "" : "s", rows->kept);
    }
    return status;
}

size_t lee_csv_rows_field_line(const lee_csv_rows *rows, size_t column) {
    return rows->is_walked ? rows->field_line[column] : rows->row_line;
}

/* Chooses the separator: the one that the header holds most of outside quotes.
 * Returns how many there are. */
static size_t choose_separator(lee_csv_rows *rows) {
    static const char candidates[] = {',', ';', '\t'};
    size_t count[sizeof candidates] = {0};
    bool is_quoted = false;
    for (const char *p = rows->block.next; p < rows->block.end; p++) {
        is_quoted = is_quoted != (*p == '"');
        if (*p == '\n' && !is_quoted) {
            break;
        }
        for (size_t i = 0; i < sizeof candidates && !is_quoted; i++) {
            count[i] += *p == candidates[i] ? 1 : 0;
        }
    }
    size_t most = 0;
    for (size_t i = 1; i < sizeof candidates; i++) {
        most = count[i] > count[most] ? i : most;
    }
    rows->separator = candidates[most];
    return count[most];
}

/* Makes room for the fields of the header, of which there is one more than
 * separators. */
static lee_status make_room(lee_csv_rows *rows, size_t separators,
                            lee_error *error) {
    const size_t columns = separators + 1;
    if (columns > MOST_COLUMNS) {
        return lee_fail(
            error, LEE_ERR_FORMAT, "%s:%zu:1: %zu columns; at most %d are read",
            rows->block.path, rows->block.line, columns, MOST_COLUMNS);
    }
    rows->kept = columns;
    rows->fields = calloc(columns, sizeof *rows->fields);
    rows->field_line = calloc(columns, sizeof *rows->field_line);
    if (rows->fields == NULL || rows->field_line == NULL) {
        return lee_fail(error, LEE_ERR_MEMORY, "%s: no room for %zu columns",
                        rows->block.path, columns);
    }
    return LEE_OK;
}

/* Reads the first row, which says how many fields every row has. */
static lee_status read_header(lee_csv_rows *rows, lee_error *error) {
    const char *newline = NULL;
    lee_status status = find_line(rows, &newline, error);
    if (status != LEE_OK) {
        return status;
    }
    if (newline == NULL) {
        const lee_csv_place end = {rows->block.line, rows->block.next};
        return lee_csv_block_refuse(&rows->block, end, end.line_start,
                                    "no row at all; expected a header row",
                                    error);
    }
    status = make_room(rows, choose_separator(rows), error);
    if (status == LEE_OK) {
        status = read_row(rows, newline, error);
    }
    if (status == LEE_OK && rows->n != rows->kept) {
        /* Its separators were counted in the first block alone. */
        return lee_fail(error, LEE_ERR_FORMAT,
                        "%s:%zu:1: a header with line breaks and more than "
                        "256 KiB",
                        rows->block.path, rows->row_line);
    }
    return status;
}

lee_status lee_csv_rows_open(const char *path, lee_csv_rows *rows,
                             lee_error *error) {
    *rows = (lee_csv_rows){.separator = ','};
    lee_status status = lee_csv_block_open(path, &rows->block, error);
    if (status != LEE_OK) {
        return status;
    }
    status = read_header(rows, error);
    if (status != LEE_OK) {
        lee_csv_rows_close(rows);
    }
    return status;
}

void lee_csv_rows_close(lee_csv_rows *rows) {
    lee_csv_block_close(&rows->block);
    free(rows->field_line);
    free(rows->fields);
    *rows = (lee_csv_rows){.block = {.file = -1}};
}
