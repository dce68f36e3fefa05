/* csv_block.c - a text file, block by block. */
#include "formats/csv_block.h"

#include <errno.h>
#include <stdlib.h>
#include <string.h>
#include <unistd.h>

#include "formats/regular_file.h"

enum {
    FIRST_ROOM = 1 << 18,    /* 256 KiB: a block fits in the fast memory */
    GREATEST_ROOM = 1 << 24, /* 16 MiB: no row is longer */
};

lee_status lee_csv_block_refuse(const lee_csv_block *block, lee_csv_place place,
                                const char *where, const char *what,
                                lee_error *error) {
    return lee_fail(error, LEE_ERR_FORMAT, "%s:%zu:%zu: %s", block->path,
                    place.line, (size_t)(where - place.line_start) + 1, what);
}

lee_csv_place lee_csv_pass_lines(lee_csv_place place, const char *p,
                                 const char *end) {
    while ((p = memchr(p, '\n', (size_t)(end - p))) != NULL) {
        p++;
        place = (lee_csv_place){place.line + 1, p};
    }
    return place;
}

/* Refuses a byte of the block that belongs to no row yet. */
static lee_status refuse_byte(const lee_csv_block *block, const char *byte,
                              const char *what, lee_error *error) {
    const lee_csv_place next = {block->line, block->next};
    return lee_csv_block_refuse(
        block, lee_csv_pass_lines(next, block->next, byte), byte, what, error);
}

/* Moves what is not yet read to the front and makes room behind it. */
static lee_status make_room(lee_csv_block *block, lee_error *error) {
    const size_t used = (size_t)(block->end - block->next);
    if (used > 0) {
        memmove(block->bytes, block->next, used);
    }
    if (used == block->room) {
        const size_t room = used == 0 ? block->wanted : 2 * used;
        char *bytes = realloc(block->bytes, room + LEE_CSV_SPARE);
        if (bytes == NULL) {
            return lee_fail(error, LEE_ERR_MEMORY,
                            "%s: no room for a row of %zu bytes", block->path,
                            room);
        }
        block->bytes = bytes;
        block->room = room;
    }
    block->next = block->bytes;
    block->end = block->bytes + used;
    return LEE_OK;
}

/* Closes the last line, should its end be missing; the spare bytes serve. */
static void end_last_line(lee_csv_block *block) {
    if (block->end > block->next && block->end[-1] != '\n') {
        *block->end++ = '\n';
    }
}

lee_status lee_csv_block_fill(lee_csv_block *block, lee_error *error) {
    if (block->end - block->next >= GREATEST_ROOM) {
        const lee_csv_place row = {block->line, block->next};
        return lee_csv_block_refuse(block, row, block->next,
                                    "a row longer than 16 MiB", error);
    }
    const lee_status status = make_room(block, error);
    if (status != LEE_OK) {
        return status;
    }
    ssize_t got;
    do {
        got = read(block->file, block->end,
                   (size_t)(block->bytes + block->room - block->end));
    } while (got < 0 && errno == EINTR);
    if (got < 0) {
        return lee_fail(error, LEE_ERR_FILE, "%s: cannot be read: %s",
                        block->path, strerror(errno));
    }
    const char *nul = memchr(block->end, '\0', (size_t)got);
    if (nul != NULL) {
        return refuse_byte(block, nul,
                           "a NUL byte: this is a binary file; expected text",
                           error);
    }
    block->end += got;
    block->at_end = got == 0;
    if (block->at_end) {
        end_last_line(block);
    }
    memset(block->end, 0, LEE_CSV_SPARE - 1);
    return LEE_OK;
}

static bool begins_with(const lee_csv_block *block, const char *mark) {
    const size_t length = strlen(mark);
    return (size_t)(block->end - block->next) >= length &&
           memcmp(block->next, mark, length) == 0;
}

/* Looks at the beginning: there is text, and its lines end. */
static lee_status check_beginning(lee_csv_block *block, lee_error *error) {
    if (begins_with(block, "\xEF\xBB\xBF")) {
        block->next += 3;
    }
    if (begins_with(block, "\xFF\xFE") || begins_with(block, "\xFE\xFF")) {
        return refuse_byte(block, block->next,
                           "this is UTF-16 text; expected UTF-8", error);
    }
    if (block->next == block->end) {
        return refuse_byte(block, block->next,
                           "the file is empty; expected a header row", error);
    }
    const char *cr =
        memchr(block->next, '\r', (size_t)(block->end - block->next));
    if (cr != NULL && cr + 1 < block->end && cr[1] != '\n') {
        return refuse_byte(block, cr,
                           "a carriage return without a line feed; expected "
                           "lines that end with LF or CR LF",
                           error);
    }
    return LEE_OK;
}

lee_status lee_csv_block_open(const char *path, lee_csv_block *block,
                              lee_error *error) {
    size_t size = 0;
    *block = (lee_csv_block){.path = path, .line = 1};
    lee_status status = lee_regular_open(path, &block->file, &size, error);
    /* A small file needs a small block: it and a byte, so that the end of the
     * file is met without growing. */
    block->wanted = size < FIRST_ROOM ? size + 1 : FIRST_ROOM;
    if (status == LEE_OK) {
        status = lee_csv_block_fill(block, error);
    }
    if (status == LEE_OK) {
        status = check_beginning(block, error);
    }
    if (status != LEE_OK) {
        lee_csv_block_close(block);
    }
    return status;
}

void lee_csv_block_close(lee_csv_block *block) {
    if (block->file >= 0) {
        (void)close(block->file);
    }
    free(block->bytes);
    *block = (lee_csv_block){.file = -1};
}
