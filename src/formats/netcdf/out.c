/* out.c - NetCDF files that appear whole or not at all.
 *
 * The file is made under the temporary name of an atomic file, which stays
 * open beside it and syncs, places or drops it in the end. */
#include "formats/netcdf_out.h"

#include <errno.h>
#include <math.h>
#include <stdlib.h>
#include <string.h>

#include <netcdf.h>

#include "base/text.h"

/* A large file's values, deflated at the least level (more costs time and
 * gains little: NetCDF-C's documentation of nc_def_var_deflate). */
enum { DEFLATE_LEVEL = 1 };

static bool is_usable(const lee_netcdf_out *out) {
    return out->is_open && out->status == LEE_OK;
}

/* Keeps the first failure. */
static void keep(lee_netcdf_out *out, int code, const char *what) {
    if (code == NC_NOERR || out->status != LEE_OK) {
        return;
    }
    const bool has_no_room = code == NC_ENOMEM || code == ENOMEM;
    const char *reason = code > 0 ? strerror(code) : nc_strerror(code);
    out->status =
        lee_fail(&out->error, has_no_room ? LEE_ERR_MEMORY : LEE_ERR_FILE,
                 "%s: cannot be written: %s (%s)", out->path, reason, what);
}

static lee_status refuse_stdout(const char *path, lee_error *error) {
    return strcmp(path, "-") == 0
               ? lee_fail(error, LEE_ERR_ARGUMENT,
                          "a NetCDF file cannot go to standard output")
               : LEE_OK;
}

lee_status lee_netcdf_create(const char *path, bool force, bool is_large,
                             lee_netcdf_out *out, lee_error *error) {
    *out = (lee_netcdf_out){.is_large = is_large};
    lee_status status = refuse_stdout(path, error);
    if (status == LEE_OK) {
        status = lee_atomic_open(path, force, &out->file, error);
    }
    if (status != LEE_OK) {
        return status;
    }
    out->path = lee_text_copy(path);
    if (out->path == NULL) {
        lee_netcdf_discard(out);
        return lee_fail(error, LEE_ERR_MEMORY, "%s: no room", path);
    }
    const int mode = NC_CLOBBER | (is_large ? NC_NETCDF4 | NC_CLASSIC_MODEL
                                            : NC_64BIT_OFFSET);
    keep(out, nc_create(out->file.temporary, mode, &out->id), "created");
    out->is_open = out->status == LEE_OK;
    if (!out->is_open) {
        if (error != NULL) {
            *error = out->error;
        }
        const lee_status failed = out->status;
        lee_netcdf_discard(out);
        return failed;
    }
    int previous;
    keep(out, nc_set_fill(out->id, NC_NOFILL, &previous), "not filled");
    return LEE_OK;
}

int lee_netcdf_dimension(lee_netcdf_out *out, const char *name, size_t size) {
    int dimension = -1;
    if (is_usable(out)) {
        const size_t length = size > 0 ? size : NC_UNLIMITED;
        keep(out, nc_def_dim(out->id, name, length, &dimension), name);
    }
    return dimension;
}

static nc_type type_of(lee_netcdf_kind kind) {
    switch (kind) {
    case LEE_NETCDF_BYTE:
        return NC_BYTE;
    case LEE_NETCDF_CHAR:
        return NC_CHAR;
    case LEE_NETCDF_DOUBLE:
        break;
    }
    return NC_DOUBLE;
}

/* Chunks and deflation of a variable of a large file. */
static void store(lee_netcdf_out *out, int variable, const char *name,
                  const lee_netcdf_shape *shape) {
    if (!out->is_large || shape->dimensions == 0) {
        return;
    }
    if (shape->chunk[0] > 0) {
        keep(out,
             nc_def_var_chunking(out->id, variable, NC_CHUNKED, shape->chunk),
             name);
    }
    if (shape->kind == LEE_NETCDF_DOUBLE) {
        keep(out, nc_def_var_deflate(out->id, variable, 1, 1, DEFLATE_LEVEL),
             name);
    }
}

int lee_netcdf_variable(lee_netcdf_out *out, const char *name,
                        const lee_netcdf_shape *shape, bool may_miss) {
    int variable = -1;
    if (!is_usable(out)) {
        return variable;
    }
    keep(out,
         nc_def_var(out->id, name, type_of(shape->kind), (int)shape->dimensions,
                    shape->dimension, &variable),
         name);
    if (out->status == LEE_OK) {
        store(out, variable, name, shape);
    }
    if (may_miss && shape->kind == LEE_NETCDF_DOUBLE) {
        const double fill = shape->fill != 0.0 ? shape->fill : NC_FILL_DOUBLE;
        keep(out,
             nc_put_att_double(out->id, variable, _FillValue, NC_DOUBLE, 1,
                               &fill),
             name);
    }
    return variable;
}

void lee_netcdf_put_text(lee_netcdf_out *out, int variable, const char *name,
                         const char *text) {
    if (!is_usable(out) || text == NULL) {
        return;
    }
    char *clean = lee_text_mended(text);
    if (clean == NULL) {
        keep(out, NC_ENOMEM, name);
        return;
    }
    for (char *c = clean; *c != '\0'; c++) {
        const bool is_control = (unsigned char)*c < 0x20 && *c != '\n';
        if (is_control) {
            *c = ' ';
        }
    }
    keep(out, nc_put_att_text(out->id, variable, name, strlen(clean), clean),
         name);
    free(clean);
}

void lee_netcdf_put_built(lee_netcdf_out *out, int variable, const char *name,
                          lee_text *text) {
    keep(out, text->has_failed ? NC_ENOMEM : NC_NOERR, name);
    lee_netcdf_put_text(out, variable, name, text->bytes);
    lee_text_free(text);
}

void lee_netcdf_put_number(lee_netcdf_out *out, int variable, const char *name,
                           double value) {
    if (is_usable(out)) {
        keep(out,
             nc_put_att_double(out->id, variable, name, NC_DOUBLE, 1, &value),
             name);
    }
}

void lee_netcdf_put_bytes(lee_netcdf_out *out, int variable, const char *name,
                          size_t n, const signed char value[]) {
    if (is_usable(out)) {
        keep(out, nc_put_att_schar(out->id, variable, name, NC_BYTE, n, value),
             name);
    }
}

void lee_netcdf_end_definitions(lee_netcdf_out *out, size_t reserve) {
    if (is_usable(out)) {
        keep(out, nc__enddef(out->id, reserve, 4, 0, 4), "definitions");
    }
}

void lee_netcdf_begin_definitions(lee_netcdf_out *out) {
    if (is_usable(out)) {
        keep(out, nc_redef(out->id), "definitions");
    }
}

static size_t block_size(int dimensions, const size_t count[]) {
    size_t size = 1;
    for (int i = 0; i < dimensions; i++) {
        size *= count[i];
    }
    return size;
}

/* The library stores anything for NaN in a whole number, and refuses nothing:
 * the judge is here. */
static bool is_storable(nc_type type, bool may_miss, double value) {
    if (isnan(value)) {
        return may_miss;
    }
    return type == NC_DOUBLE ||
           (value >= -127.0 && value <= 127.0 && value == floor(value));
}

/* Copies a block with fill values for NaN. */
static lee_status fill_gaps(lee_netcdf_out *out, int variable, size_t n,
                            const double value[], double stored[]) {
    nc_type type = NC_NAT;
    double fill = NAN;
    keep(out, nc_inq_vartype(out->id, variable, &type), "variable");
    const bool may_miss =
        nc_get_att_double(out->id, variable, _FillValue, &fill) == NC_NOERR;
    for (size_t i = 0; i < n && out->status == LEE_OK; i++) {
        if (!is_storable(type, may_miss, value[i])) {
            char name[NC_MAX_NAME + 1] = "";
            (void)nc_inq_varname(out->id, variable, name);
            out->status = lee_fail(&out->error, LEE_ERR_DATA,
                                   "%s: variable '%s' cannot hold %g",
                                   out->path, name, value[i]);
        }
        stored[i] = isnan(value[i]) ? fill : value[i];
    }
    return out->status;
}

void lee_netcdf_put_block(lee_netcdf_out *out, int variable,
                          const size_t start[], const size_t count[],
                          const double value[]) {
    int dimensions = 0;
    if (!is_usable(out)) {
        return;
    }
    keep(out, nc_inq_varndims(out->id, variable, &dimensions), "block");
    const size_t n = block_size(dimensions, count);
    if (out->status != LEE_OK || n == 0) {
        return;
    }
    double *stored = calloc(n, sizeof *stored);
    if (stored == NULL) {
        keep(out, NC_ENOMEM, "block");
        return;
    }
    if (fill_gaps(out, variable, n, value, stored) == LEE_OK) {
        const size_t origin[1] = {0};
        const size_t one[1] = {1};
        keep(out,
             nc_put_vara_double(out->id, variable,
                                dimensions > 0 ? start : origin,
                                dimensions > 0 ? count : one, stored),
             "block");
    }
    free(stored);
}

void lee_netcdf_put_name(lee_netcdf_out *out, int variable, size_t index,
                         size_t length, const char *text) {
    if (!is_usable(out)) {
        return;
    }
    char *clean = lee_text_mended(text);
    char *padded = calloc(length + 1, 1);
    if (clean == NULL || padded == NULL) {
        keep(out, NC_ENOMEM, "name");
    } else {
        memcpy(padded, clean, lee_text_fits(clean, length));
        const size_t start[] = {index, 0};
        const size_t count[] = {1, length};
        keep(out, nc_put_vara_text(out->id, variable, start, count, padded),
             "name");
    }
    free(clean);
    free(padded);
}

void lee_netcdf_lacks_memory(lee_netcdf_out *out) {
    keep(out, NC_ENOMEM, "memory");
}

lee_status lee_netcdf_failure(const lee_netcdf_out *out, lee_error *error) {
    if (out->status != LEE_OK && error != NULL) {
        *error = out->error;
    }
    return out->status;
}

lee_status lee_netcdf_commit(lee_netcdf_out *out, lee_error *error) {
    if (out->is_open) {
        out->is_open = false;
        keep(out, nc_close(out->id), "closed"); /* a full disk shows here */
    }
    lee_status status = out->status;
    if (status == LEE_OK) {
        status = lee_atomic_commit(&out->file, error);
    } else if (error != NULL) {
        *error = out->error;
    }
    lee_netcdf_discard(out);
    return status;
}

void lee_netcdf_discard(lee_netcdf_out *out) {
    if (out->is_open) {
        (void)nc_abort(out->id);
    }
    lee_atomic_discard(&out->file);
    free(out->path);
    *out = (lee_netcdf_out){0};
}
