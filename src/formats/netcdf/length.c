/* length.c - reads the header of a classic file for its length. */
#include "formats/netcdf/length.h"

#include <stdbool.h>
#include <stdlib.h>
#include <string.h>

enum {
    TAG_DIMENSIONS = 10,
    TAG_VARIABLES = 11,
    TAG_ATTRIBUTES = 12,
    TYPES = 12,
    LEAST_ITEM = 8, /* bytes that any item of a list takes */
};

/* Sizes beyond this are nonsense, and sums of a few of them do not wrap. */
static const uint64_t largest = UINT64_C(1) << 60U;

/* A header being read. Once it has failed, what is taken is zero. */
typedef struct head {
    const unsigned char *bytes;
    size_t size;
    size_t at;
    bool is_wide; /* counts of 8 bytes: CDF-5           */
    bool is_far;  /* offsets of 8 bytes: CDF-2 and CDF-5 */
    lee_netcdf_head state;
    uint64_t records;
    size_t dimension_count;
    uint64_t *dimension; /* lengths; 0 for that of records */
    uint64_t fixed_end;  /* end of what is no record       */
    uint64_t record_end; /* end of the first record        */
    uint64_t record_size;
    size_t record_variables;
} head;

static uint64_t fail(head *h, lee_netcdf_head state) {
    if (h->state == LEE_NETCDF_HEAD_WHOLE) {
        h->state = state;
    }
    return 0;
}

static bool has_failed(const head *h) {
    return h->state != LEE_NETCDF_HEAD_WHOLE;
}

/* A number of big end first. */
static uint64_t take(head *h, size_t width) {
    if (has_failed(h) || h->size - h->at < width) {
        return fail(h, LEE_NETCDF_HEAD_LONGER);
    }
    uint64_t value = 0;
    for (size_t i = 0; i < width; i++) {
        value = value * 256 + h->bytes[h->at++];
    }
    return value;
}

static uint64_t take_count(head *h) {
    const uint64_t count = take(h, h->is_wide ? 8 : 4);
    return count < largest ? count : fail(h, LEE_NETCDF_HEAD_DAMAGED);
}

static uint64_t padded(uint64_t size) {
    return (size + 3) / 4 * 4;
}

static void skip(head *h, uint64_t size) {
    if (has_failed(h) || h->size - h->at < padded(size)) {
        (void)fail(h, LEE_NETCDF_HEAD_LONGER);
        return;
    }
    h->at += (size_t)padded(size);
}

/* Product that stays at `largest` once it is there. */
static uint64_t times(uint64_t a, uint64_t b) {
    return a != 0 && b > largest / a ? largest : a * b;
}

static uint64_t type_size(head *h) {
    static const uint64_t size[TYPES] = {0, 1, 1, 2, 4, 4, 8, 1, 2, 4, 8, 8};
    const uint64_t type = take(h, 4);
    if (type == 0 || type >= TYPES) {
        return fail(h, LEE_NETCDF_HEAD_DAMAGED);
    }
    return size[type];
}

/* The number of items of a list that begins here. */
static uint64_t take_list(head *h, uint64_t tag) {
    const uint64_t found = take(h, 4);
    const uint64_t count = take_count(h);
    if (has_failed(h) || (found == 0 && count == 0)) {
        return 0;
    }
    return found == tag ? count : fail(h, LEE_NETCDF_HEAD_DAMAGED);
}

static void skip_attributes(head *h) {
    const uint64_t count = take_list(h, TAG_ATTRIBUTES);
    for (uint64_t i = 0; i < count && !has_failed(h); i++) {
        skip(h, take_count(h)); /* name */
        const uint64_t size = type_size(h);
        skip(h, times(take_count(h), size));
    }
}

static void take_dimensions(head *h) {
    const uint64_t count = take_list(h, TAG_DIMENSIONS);
    if (count > (h->size - h->at) / LEAST_ITEM) {
        (void)fail(h, LEE_NETCDF_HEAD_LONGER);
        return;
    }
    h->dimension = calloc((size_t)count + 1, sizeof *h->dimension);
    if (h->dimension == NULL) {
        (void)fail(h, LEE_NETCDF_HEAD_NO_MEMORY);
        return;
    }
    h->dimension_count = (size_t)count;
    for (uint64_t i = 0; i < count && !has_failed(h); i++) {
        skip(h, take_count(h)); /* name */
        h->dimension[i] = take_count(h);
    }
}

/* The values that the dimensions of a variable make; of one record when it
 * has records. */
static uint64_t take_shape(head *h, bool *has_records) {
    const uint64_t rank = take_count(h);
    uint64_t values = 1;
    *has_records = false;
    for (uint64_t i = 0; i < rank && !has_failed(h); i++) {
        const uint64_t id = take_count(h);
        if (id >= h->dimension_count) {
            return fail(h, LEE_NETCDF_HEAD_DAMAGED);
        }
        const uint64_t length = h->dimension[id];
        if (length == 0 && i > 0) {
            return fail(h, LEE_NETCDF_HEAD_DAMAGED);
        }
        *has_records = *has_records || length == 0;
        values = times(values, length == 0 ? 1 : length);
    }
    return values;
}

static void take_variable(head *h) {
    bool has_records = false;
    skip(h, take_count(h)); /* name */
    const uint64_t values = take_shape(h, &has_records);
    skip_attributes(h);
    const uint64_t size = times(values, type_size(h));
    (void)take(h, h->is_wide ? 8 : 4); /* size as stored: of no use when
                                          it does not fit into 4 bytes */
    const uint64_t begin = take(h, h->is_far ? 8 : 4);
    if (has_failed(h) || begin > largest) {
        (void)fail(h, LEE_NETCDF_HEAD_DAMAGED);
        return;
    }
    uint64_t *end = has_records ? &h->record_end : &h->fixed_end;
    *end = begin + size > *end ? begin + size : *end;
    if (has_records) {
        h->record_variables++;
        /* A single one is not padded. */
        h->record_size = h->record_variables == 1
                             ? size
                             : padded(h->record_size) + padded(size);
        h->record_size = h->record_size < largest ? h->record_size : largest;
    }
}

static void take_head(head *h) {
    h->is_wide = h->bytes[3] == 5;
    h->is_far = h->bytes[3] != 1;
    h->at = 4;
    const uint64_t records = take(h, h->is_wide ? 8 : 4);
    const uint64_t open = h->is_wide ? UINT64_MAX : UINT32_MAX;
    h->records = records;
    take_dimensions(h);
    skip_attributes(h);
    const uint64_t count = take_list(h, TAG_VARIABLES);
    for (uint64_t i = 0; i < count && !has_failed(h); i++) {
        take_variable(h);
    }
    if (!has_failed(h) && h->record_variables > 0 && records == open) {
        (void)fail(h, LEE_NETCDF_HEAD_OPEN);
    }
}

static uint64_t needed_size(const head *h) {
    uint64_t needed = h->at > h->fixed_end ? h->at : h->fixed_end;
    if (h->record_variables > 0 && h->records > 0) {
        const uint64_t end =
            h->record_end + times(h->records - 1, h->record_size);
        needed = end > needed ? end : needed;
    }
    return needed;
}

lee_netcdf_head lee_netcdf_read_head(size_t size, const unsigned char bytes[],
                                     uint64_t *needed) {
    if (size < 4) {
        return LEE_NETCDF_HEAD_LONGER;
    }
    head h = {.bytes = bytes, .size = size};
    if (memcmp(bytes, "CDF", 3) != 0 ||
        (bytes[3] != 1 && bytes[3] != 2 && bytes[3] != 5)) {
        return LEE_NETCDF_HEAD_DAMAGED;
    }
    take_head(&h);
    free(h.dimension);
    if (h.state == LEE_NETCDF_HEAD_WHOLE) {
        *needed = needed_size(&h);
    }
    return h.state;
}
