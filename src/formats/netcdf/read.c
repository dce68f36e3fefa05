/* read.c - boxes of numbers, read in blocks that suit the file.
 *
 * One long box through small chunks makes the library hold all of them at
 * once; one value at a time makes it search for each. Blocks of about a
 * thousand steps, whole chunks each, are near the best for all layouts
 * (docs/validation.md). */
#include "formats/netcdf_in.h"

#include <math.h>
#include <stdint.h>
#include <stdlib.h>
#include <string.h>

#include <netcdf.h>

#include "formats/netcdf/internal.h"

#define MEBIBYTE ((size_t)1 << 20U)

enum {
    BLOCK = 1024, /* steps along the longest dimension, about     */
    THIN = 64,    /* chunks of fewer steps are read in full width */
};

static const size_t most_values = 100000000;
static const size_t largest_chunk = 256 * MEBIBYTE;
static const size_t largest_block = 32 * MEBIBYTE;
static const size_t largest_cache = 64 * MEBIBYTE;

/* How a box is read. */
typedef struct plan {
    const lee_netcdf_variable *variable;
    size_t rank;
    size_t value_size; /* bytes */
    bool is_chunked;
    size_t chunk[LEE_NETCDF_RANK];
    size_t along; /* the dimension that blocks follow each other along */
    size_t step;  /* of blocks; whole chunks                            */
    const lee_netcdf_box *box;
    lee_netcdf_box read; /* the box, widened where whole chunks are cheaper */
} plan;

/* a*b, or SIZE_MAX. */
static size_t times(size_t a, size_t b) {
    return a != 0 && b > SIZE_MAX / a ? SIZE_MAX : a * b;
}

static size_t box_size(const plan *p, const lee_netcdf_box *box) {
    size_t values = 1;
    for (size_t i = 0; i < p->rank; i++) {
        values = times(values, box->count[i]);
    }
    return values;
}

static size_t smaller(size_t a, size_t b) {
    return a < b ? a : b;
}

/* Bytes of a step along the block's dimension. */
static size_t step_size(const plan *p, const lee_netcdf_box *box) {
    lee_netcdf_box one = *box;
    one.count[p->along] = 1;
    return times(box_size(p, &one), p->value_size);
}

/* The box on whole chunks, but for the dimension of the blocks. */
static lee_netcdf_box widened(const plan *p) {
    lee_netcdf_box wide = *p->box;
    for (size_t i = 0; i < p->rank; i++) {
        if (i == p->along) {
            continue;
        }
        const size_t length = p->variable->dimension[i].length;
        const size_t chunk = p->chunk[i];
        const size_t end = p->box->start[i] + p->box->count[i];
        wide.start[i] = p->box->start[i] / chunk * chunk;
        wide.count[i] =
            smaller((end + chunk - 1) / chunk * chunk, length) - wide.start[i];
    }
    return wide;
}

/* The number of chunks that a block crosses. */
static size_t crossed_chunks(const plan *p) {
    size_t chunks = p->step / p->chunk[p->along] + 1;
    for (size_t i = 0; i < p->rank; i++) {
        const size_t end = p->read.start[i] + p->read.count[i];
        if (i != p->along) {
            chunks = times(chunks, (end + p->chunk[i] - 1) / p->chunk[i] -
                                       p->read.start[i] / p->chunk[i]);
        }
    }
    return chunks;
}

static lee_status find_chunks(const lee_netcdf *file, plan *p,
                              size_t *chunk_bytes, lee_error *error) {
    int storage = NC_CONTIGUOUS;
    const int code = nc_inq_var_chunking(p->variable->group, p->variable->id,
                                         &storage, p->chunk);
    if (code != NC_NOERR) {
        return lee_netcdf_fail(file, p->variable, code, error);
    }
    p->is_chunked = storage == NC_CHUNKED && p->rank > 0;
    *chunk_bytes = p->value_size;
    for (size_t i = 0; i < p->rank && p->is_chunked; i++) {
        if (p->chunk[i] == 0) {
            return lee_netcdf_fail(file, p->variable, NC_EBADCHUNK, error);
        }
        *chunk_bytes = times(*chunk_bytes, p->chunk[i]);
    }
    if (*chunk_bytes > largest_chunk) {
        return lee_fail(error, LEE_ERR_FORMAT,
                        "%s: variable '%s' is stored in chunks of %zu MiB; at "
                        "most %zu are read",
                        file->path, p->variable->name, *chunk_bytes / MEBIBYTE,
                        largest_chunk / MEBIBYTE);
    }
    return LEE_OK;
}

static void choose_blocks(plan *p) {
    for (size_t i = 1; i < p->rank; i++) {
        if (p->box->count[i] > p->box->count[p->along]) {
            p->along = i;
        }
    }
    const size_t chunk = p->is_chunked ? p->chunk[p->along] : 1;
    p->step = (BLOCK + chunk - 1) / chunk * chunk;
    p->read = *p->box;
    if (p->is_chunked && chunk < THIN) {
        const lee_netcdf_box wide = widened(p);
        if (times(step_size(p, &wide), chunk) <= largest_block) {
            p->read = wide;
        }
    }
    const size_t bytes = step_size(p, &p->read);
    while (p->step > chunk && times(bytes, p->step) > largest_block) {
        p->step = (p->step / 2 + chunk - 1) / chunk * chunk;
        if (p->step / chunk == 1 || p->step <= chunk) {
            p->step = chunk;
        }
    }
}

/* Room for the chunks of a block, so that none is unpacked twice. */
static int set_cache(const plan *p, size_t chunk_bytes) {
    enum { SLOTS = 4099 }; /* a prime, for the library's table */
    const size_t wanted = times(crossed_chunks(p), chunk_bytes);
    const size_t least = 2 * chunk_bytes;
    size_t size = smaller(wanted, largest_cache);
    size = size < least ? least : size;
    return nc_set_var_chunk_cache(p->variable->group, p->variable->id, size,
                                  SLOTS, 0.75F);
}

static lee_status make_plan(const lee_netcdf *file, plan *p, lee_error *error) {
    size_t chunk_bytes = 0;
    const lee_status status = find_chunks(file, p, &chunk_bytes, error);
    if (status != LEE_OK || p->rank == 0) {
        return status;
    }
    choose_blocks(p);
    if (p->is_chunked) {
        const int code = set_cache(p, chunk_bytes);
        if (code != NC_NOERR) {
            return lee_netcdf_fail(file, p->variable, code, error);
        }
    }
    return LEE_OK;
}

/* A stored value as a double. */
static double value_at(int type, const unsigned char *place) {
    union {
        signed char byte;
        unsigned char ubyte;
        short small;
        unsigned short usmall;
        int whole;
        unsigned int uwhole;
        long long large;
        unsigned long long ularge;
        float single;
        double real;
    } v;
    switch (type) {
    case NC_BYTE:
        memcpy(&v.byte, place, sizeof v.byte);
        return v.byte;
    case NC_UBYTE:
        return *place;
    case NC_SHORT:
        memcpy(&v.small, place, sizeof v.small);
        return v.small;
    case NC_USHORT:
        memcpy(&v.usmall, place, sizeof v.usmall);
        return v.usmall;
    case NC_INT:
        memcpy(&v.whole, place, sizeof v.whole);
        return v.whole;
    case NC_UINT:
        memcpy(&v.uwhole, place, sizeof v.uwhole);
        return v.uwhole;
    case NC_INT64:
        memcpy(&v.large, place, sizeof v.large);
        return (double)v.large;
    case NC_UINT64:
        memcpy(&v.ularge, place, sizeof v.ularge);
        return (double)v.ularge;
    case NC_FLOAT:
        memcpy(&v.single, place, sizeof v.single);
        return (double)v.single;
    case NC_DOUBLE:
        memcpy(&v.real, place, sizeof v.real);
        return v.real;
    default:
        return NAN;
    }
}

/* The next place of a box, the last dimension fastest. */
static void advance(size_t rank, const size_t count[], size_t place[]) {
    for (size_t i = rank; i-- > 0;) {
        if (++place[i] < count[i]) {
            return;
        }
        place[i] = 0;
    }
}

/* Takes from a block as read, `block`, what of it belongs to the box. */
static void pick(const plan *p, const lee_netcdf_packing *packing,
                 const lee_netcdf_box *block, const unsigned char bytes[],
                 double values[]) {
    lee_netcdf_box wanted = *p->box;
    wanted.start[p->along] = block->start[p->along];
    wanted.count[p->along] = block->count[p->along];
    size_t place[LEE_NETCDF_RANK] = {0};
    const size_t count = box_size(p, &wanted);
    for (size_t n = 0; n < count; n++) {
        size_t from = 0;
        size_t to = 0;
        for (size_t i = 0; i < p->rank; i++) {
            const size_t at = wanted.start[i] + place[i];
            from = from * block->count[i] + at - block->start[i];
            to = to * p->box->count[i] + at - p->box->start[i];
        }
        values[to] = lee_netcdf_unpack(
            packing, value_at(p->variable->type, bytes + from * p->value_size));
        advance(p->rank, wanted.count, place);
    }
}

static int read_blocks(const plan *p, const lee_netcdf_packing *packing,
                       double values[]) {
    const size_t end = p->box->start[p->along] + p->box->count[p->along];
    const size_t step = p->step > 0 ? p->step : 1;
    const size_t room =
        times(step_size(p, &p->read), smaller(step, p->read.count[p->along]));
    if (room == 0) {
        return NC_EBADCHUNK; /* a box that is empty is never read */
    }
    unsigned char *bytes = malloc(room);
    int code = bytes == NULL ? NC_ENOMEM : NC_NOERR;
    size_t next = 0;
    for (size_t at = p->box->start[p->along]; at < end && code == NC_NOERR;
         at = next) {
        lee_netcdf_box block = p->read;
        next = smaller((at / step + 1) * step, end);
        block.start[p->along] = at;
        block.count[p->along] = next - at;
        code = nc_get_vara(p->variable->group, p->variable->id, block.start,
                           block.count, bytes);
        if (code == NC_NOERR) {
            pick(p, packing, &block, bytes, values);
        }
    }
    free(bytes);
    return code;
}

static lee_status read_box(const lee_netcdf *file, plan *p,
                           const lee_netcdf_codes *codes, double values[],
                           lee_error *error) {
    lee_status status = make_plan(file, p, error);
    if (status != LEE_OK) {
        return status;
    }
    lee_netcdf_packing packing;
    status = lee_netcdf_packing_find(file, p->variable, codes, &packing, error);
    if (status == LEE_OK) {
        int code = NC_NOERR;
        if (p->rank == 0) {
            unsigned char bytes[sizeof(double)] = {0};
            code = nc_get_var(p->variable->group, p->variable->id, bytes);
            values[0] =
                lee_netcdf_unpack(&packing, value_at(p->variable->type, bytes));
        } else {
            code = read_blocks(p, &packing, values);
        }
        if (code != NC_NOERR) {
            status = lee_netcdf_fail(file, p->variable, code, error);
        }
    }
    lee_netcdf_packing_free(&packing);
    return status;
}

lee_status lee_netcdf_read(const lee_netcdf *file,
                           const lee_netcdf_variable *variable,
                           const lee_netcdf_box *box,
                           const lee_netcdf_codes *codes, double values[],
                           lee_error *error) {
    plan p = {.variable = variable,
              .rank = variable->rank,
              .value_size = lee_netcdf_value_size(variable),
              .box = box};
    if (variable->kind != LEE_NETCDF_NUMBERS) {
        return lee_fail(error, LEE_ERR_FORMAT,
                        "%s: variable '%s' does not hold numbers", file->path,
                        variable->name);
    }
    for (size_t i = 0; i < p.rank; i++) {
        const size_t length = variable->dimension[i].length;
        if (box->start[i] > length || box->count[i] > length - box->start[i]) {
            return lee_netcdf_fail(file, variable, NC_EEDGE, error);
        }
    }
    const size_t size = box_size(&p, box);
    if (size > most_values) {
        return lee_fail(error, LEE_ERR_FORMAT,
                        "%s: variable '%s' holds more than %zu values",
                        file->path, variable->name, most_values);
    }
    return size == 0 ? LEE_OK : read_box(file, &p, codes, values, error);
}
