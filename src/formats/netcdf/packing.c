/* packing.c - what stored numbers mean: missing, valid, packed. */
#include <math.h>
#include <stdlib.h>

#include <netcdf.h>

#include "base/text.h"
#include "formats/netcdf/internal.h"

enum { MOST_NUMBERS = 4096 }; /* that an attribute may list */

/* All numbers of an attribute; none when it is no list of numbers. */
static int read_numbers(const lee_netcdf_variable *variable, const char *name,
                        size_t *count, double **numbers) {
    nc_type type = NC_NAT;
    size_t length = 0;
    *count = 0;
    *numbers = NULL;
    const int code =
        nc_inq_att(variable->group, variable->id, name, &type, &length);
    if (code == NC_ENOTATT) {
        return NC_NOERR;
    }
    if (code != NC_NOERR) {
        return code;
    }
    if (type == NC_CHAR || type > NC_UINT64 || length > MOST_NUMBERS) {
        return NC_ECHAR;
    }
    *numbers = calloc(length + 1, sizeof **numbers);
    if (*numbers == NULL) {
        return NC_ENOMEM;
    }
    *count = length;
    return nc_get_att_double(variable->group, variable->id, name, *numbers);
}

/* The library's fill for a value never written; NaN for bytes, all of which
 * are values. */
static double default_fill(int type) {
    switch (type) {
    case NC_SHORT:
        return NC_FILL_SHORT;
    case NC_USHORT:
        return NC_FILL_USHORT;
    case NC_INT:
        return NC_FILL_INT;
    case NC_UINT:
        return NC_FILL_UINT;
    case NC_INT64:
        return (double)NC_FILL_INT64;
    case NC_UINT64:
        return (double)NC_FILL_UINT64;
    case NC_FLOAT:
        return (double)NC_FILL_FLOAT;
    case NC_DOUBLE:
        return NC_FILL_DOUBLE;
    default:
        return NAN;
    }
}

/* 2^bits when `_Unsigned` turns the type, with the sign that `wrap` wants. */
static lee_status find_wrap(const lee_netcdf *file,
                            const lee_netcdf_variable *variable, double *wrap,
                            lee_error *error) {
    char *text = NULL;
    *wrap = 0.0;
    const lee_status status =
        lee_netcdf_attribute(file, variable, "_Unsigned", &text, error);
    if (status != LEE_OK || text == NULL) {
        return status;
    }
    const int type = variable->type;
    const bool is_signed = type == NC_BYTE || type == NC_SHORT ||
                           type == NC_INT || type == NC_INT64;
    const bool is_unsigned = type == NC_UBYTE || type == NC_USHORT ||
                             type == NC_UINT || type == NC_UINT64;
    const double size = ldexp(1.0, 8 * (int)lee_netcdf_value_size(variable));
    if (is_signed && lee_text_same(text, "true")) {
        *wrap = size;
    } else if (is_unsigned && lee_text_same(text, "false")) {
        *wrap = -size;
    }
    free(text);
    return LEE_OK;
}

static double wrapped(double wrap, double stored) {
    if (wrap > 0.0) {
        return stored < 0.0 ? stored + wrap : stored;
    }
    return wrap < 0.0 && stored >= -wrap / 2.0 ? stored + wrap : stored;
}

/* A number of an attribute as the variable would store it: -999.9 of a float
 * is not the double -999.9. */
static double as_stored(const lee_netcdf_variable *variable, double wrap,
                        double number) {
    if (variable->type == NC_FLOAT && isfinite(number) &&
        fabs(number) < 3.4e38) {
        return (double)(float)number;
    }
    return wrapped(wrap, number);
}

static bool add_missing(lee_netcdf_packing *packing, size_t count,
                        const double numbers[],
                        const lee_netcdf_variable *variable) {
    if (count == 0) {
        return true;
    }
    const size_t all = packing->missing_count + count;
    double *grown = realloc(packing->missing, all * sizeof *grown);
    if (grown == NULL) {
        return false;
    }
    packing->missing = grown;
    for (size_t i = 0; i < count; i++) {
        grown[packing->missing_count++] =
            as_stored(variable, packing->wrap, numbers[i]);
    }
    return true;
}

static int add_attribute(lee_netcdf_packing *packing,
                         const lee_netcdf_variable *variable, const char *name,
                         size_t *count) {
    double *numbers = NULL;
    int code = read_numbers(variable, name, count, &numbers);
    if (code == NC_NOERR && !add_missing(packing, *count, numbers, variable)) {
        code = NC_ENOMEM;
    }
    free(numbers);
    return code;
}

static int find_missing(const lee_netcdf_variable *variable,
                        const lee_netcdf_codes *codes,
                        lee_netcdf_packing *packing) {
    size_t fills = 0;
    size_t others = 0;
    int code = add_attribute(packing, variable, "_FillValue", &fills);
    if (code == NC_NOERR) {
        code = add_attribute(packing, variable, "missing_value", &others);
    }
    const double fill = default_fill(variable->type);
    if (code == NC_NOERR && fills == 0 && !isnan(fill) &&
        !add_missing(packing, 1, &fill, variable)) {
        code = NC_ENOMEM;
    }
    if (code == NC_NOERR && codes != NULL &&
        !add_missing(packing, codes->count, codes->value, variable)) {
        code = NC_ENOMEM;
    }
    return code;
}

/* The index-th number of an attribute, when it is there. */
static int find_number(const lee_netcdf_variable *variable, const char *name,
                       size_t index, double *value) {
    size_t count = 0;
    double *numbers = NULL;
    const int code = read_numbers(variable, name, &count, &numbers);
    if (code == NC_NOERR && index < count) {
        *value = numbers[index];
    }
    free(numbers);
    return code;
}

static int find_range(const lee_netcdf_variable *variable,
                      lee_netcdf_packing *packing) {
    double low = -INFINITY;
    double high = INFINITY;
    int code = find_number(variable, "valid_min", 0, &low);
    if (code == NC_NOERR) {
        code = find_number(variable, "valid_max", 0, &high);
    }
    if (code == NC_NOERR) {
        code = find_number(variable, "valid_range", 0, &low);
    }
    if (code == NC_NOERR) {
        code = find_number(variable, "valid_range", 1, &high);
    }
    packing->low =
        isnan(low) ? -INFINITY : as_stored(variable, packing->wrap, low);
    packing->high =
        isnan(high) ? INFINITY : as_stored(variable, packing->wrap, high);
    return code;
}

static int find_scale(const lee_netcdf_variable *variable,
                      lee_netcdf_packing *packing) {
    const int code = find_number(variable, "scale_factor", 0, &packing->scale);
    return code == NC_NOERR
               ? find_number(variable, "add_offset", 0, &packing->offset)
               : code;
}

lee_status lee_netcdf_packing_find(const lee_netcdf *file,
                                   const lee_netcdf_variable *variable,
                                   const lee_netcdf_codes *codes,
                                   lee_netcdf_packing *packing,
                                   lee_error *error) {
    *packing = (lee_netcdf_packing){.scale = 1.0};
    const lee_status status = find_wrap(file, variable, &packing->wrap, error);
    if (status != LEE_OK) {
        return status;
    }
    int code = find_missing(variable, codes, packing);
    if (code == NC_NOERR) {
        code = find_range(variable, packing);
    }
    if (code == NC_NOERR) {
        code = find_scale(variable, packing);
    }
    if (code == NC_ECHAR) {
        return lee_fail(error, LEE_ERR_FORMAT,
                        "%s: variable '%s' has a _FillValue, missing_value, "
                        "valid range, scale_factor or add_offset that is no "
                        "number",
                        file->path, variable->name);
    }
    if (code != NC_NOERR) {
        return lee_netcdf_fail(file, variable, code, error);
    }
    if (!isfinite(packing->scale) || packing->scale == 0.0 ||
        !isfinite(packing->offset)) {
        return lee_fail(error, LEE_ERR_FORMAT,
                        "%s: variable '%s' is packed by scale_factor %g and "
                        "add_offset %g, which makes no sense",
                        file->path, variable->name, packing->scale,
                        packing->offset);
    }
    return LEE_OK;
}

void lee_netcdf_packing_free(lee_netcdf_packing *packing) {
    free(packing->missing);
    *packing = (lee_netcdf_packing){0};
}

double lee_netcdf_unpack(const lee_netcdf_packing *packing, double stored) {
    const double value = wrapped(packing->wrap, stored);
    if (!(value >= packing->low && value <= packing->high)) {
        return NAN;
    }
    for (size_t i = 0; i < packing->missing_count; i++) {
        if (value == packing->missing[i]) {
            return NAN;
        }
    }
    return value * packing->scale + packing->offset;
}
