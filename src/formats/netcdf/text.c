/* text.c - attributes, and texts that variables hold. */
#include "formats/netcdf_in.h"

#include <stdint.h>
#include <stdlib.h>
#include <string.h>

#include <netcdf.h>

#include "base/text.h"
#include "formats/netcdf/internal.h"

enum {
    LONGEST_ATTRIBUTE = 1048576, /* bytes or strings */
    MOST_TEXT = 16777216,        /* bytes of a variable */
    MOST_STRINGS = 1048576,
};

/* What an attribute belongs to: a variable, or the file. */
typedef struct owner {
    int group;
    int variable;
} owner;

static owner owner_of(const lee_netcdf *file,
                      const lee_netcdf_variable *variable) {
    return variable == NULL ? (owner){file->id, NC_GLOBAL}
                            : (owner){variable->group, variable->id};
}

static char *trimmed_copy(size_t length, const char bytes[]) {
    char *text = calloc(length + 1, 1);
    if (text == NULL) {
        return NULL;
    }
    memcpy(text, bytes, length); /* ends at the first zero byte */
    char *trimmed = lee_text_trimmed(text);
    free(text);
    return trimmed;
}

static int read_characters(owner of, const char *name, size_t length,
                           char **text) {
    char *bytes = calloc(length + 1, 1);
    if (bytes == NULL) {
        return NC_ENOMEM;
    }
    const int code = nc_get_att_text(of.group, of.variable, name, bytes);
    *text = code == NC_NOERR ? trimmed_copy(length, bytes) : NULL;
    free(bytes);
    return code == NC_NOERR && *text == NULL ? NC_ENOMEM : code;
}

static int read_strings(owner of, const char *name, size_t count, char **text) {
    char **strings = calloc(count + 1, sizeof *strings);
    if (strings == NULL) {
        return NC_ENOMEM;
    }
    const int code = nc_get_att_string(of.group, of.variable, name, strings);
    lee_text joined = {0};
    if (code == NC_NOERR) {
        for (size_t i = 0; i < count; i++) {
            lee_text_add(&joined, "%s%s", i == 0 ? "" : " ",
                         strings[i] == NULL ? "" : strings[i]);
        }
        *text =
            joined.has_failed
                ? NULL
                : lee_text_trimmed(joined.bytes == NULL ? "" : joined.bytes);
        (void)nc_free_string(count, strings);
    }
    lee_text_free(&joined);
    free(strings);
    return code == NC_NOERR && *text == NULL ? NC_ENOMEM : code;
}

lee_status lee_netcdf_attribute(const lee_netcdf *file,
                                const lee_netcdf_variable *variable,
                                const char *name, char **text,
                                lee_error *error) {
    const owner of = owner_of(file, variable);
    nc_type type = NC_NAT;
    size_t length = 0;
    *text = NULL;
    int code = nc_inq_att(of.group, of.variable, name, &type, &length);
    const bool is_other =
        code == NC_NOERR && type != NC_CHAR && type != NC_STRING;
    if (code == NC_ENOTATT || is_other) {
        return LEE_OK;
    }
    if (code == NC_NOERR && length > LONGEST_ATTRIBUTE) {
        code = NC_EDIMSIZE;
    }
    if (code == NC_NOERR) {
        code = type == NC_CHAR ? read_characters(of, name, length, text)
                               : read_strings(of, name, length, text);
    }
    return code == NC_NOERR ? LEE_OK
                            : lee_netcdf_fail(file, variable, code, error);
}

bool lee_netcdf_number(const lee_netcdf *file,
                       const lee_netcdf_variable *variable, const char *name,
                       double *value) {
    enum { FEW = 4096 };
    const owner of = owner_of(file, variable);
    nc_type type = NC_NAT;
    size_t length = 0;
    if (nc_inq_att(of.group, of.variable, name, &type, &length) != NC_NOERR ||
        type == NC_CHAR || type > NC_UINT64 || length == 0 || length > FEW) {
        return false;
    }
    double *numbers = calloc(length, sizeof *numbers);
    const bool is_read =
        numbers != NULL &&
        nc_get_att_double(of.group, of.variable, name, numbers) == NC_NOERR;
    if (is_read) {
        *value = numbers[0];
    }
    free(numbers);
    return is_read;
}

/* Product of the first n lengths; SIZE_MAX when beyond `most`. */
static size_t product(const lee_netcdf_variable *variable, size_t n,
                      size_t most) {
    size_t values = 1;
    for (size_t i = 0; i < n; i++) {
        const size_t length = variable->dimension[i].length;
        if (length != 0 && values > most / length) {
            return SIZE_MAX;
        }
        values *= length;
    }
    return values;
}

/* Rows of characters along the last dimension. */
static int read_rows(const lee_netcdf_variable *variable, size_t count,
                     size_t length, char **texts) {
    char *bytes = calloc(count * length + 1, 1);
    if (bytes == NULL) {
        return NC_ENOMEM;
    }
    int code = count * length == 0
                   ? NC_NOERR
                   : nc_get_var_text(variable->group, variable->id, bytes);
    for (size_t i = 0; i < count && code == NC_NOERR; i++) {
        texts[i] = trimmed_copy(length, bytes + i * length);
        code = texts[i] == NULL ? NC_ENOMEM : code;
    }
    free(bytes);
    return code;
}

static int read_string_values(const lee_netcdf_variable *variable, size_t count,
                              char **texts) {
    char **strings = calloc(count + 1, sizeof *strings);
    if (strings == NULL) {
        return NC_ENOMEM;
    }
    int code = count == 0
                   ? NC_NOERR
                   : nc_get_var_string(variable->group, variable->id, strings);
    if (code == NC_NOERR && count > 0) {
        for (size_t i = 0; i < count && code == NC_NOERR; i++) {
            texts[i] = lee_text_trimmed(strings[i] == NULL ? "" : strings[i]);
            code = texts[i] == NULL ? NC_ENOMEM : code;
        }
        (void)nc_free_string(count, strings);
    }
    free(strings);
    return code;
}

lee_status lee_netcdf_texts(const lee_netcdf *file,
                            const lee_netcdf_variable *variable, size_t *count,
                            char ***texts, lee_error *error) {
    const bool is_rows = variable->type == NC_CHAR && variable->rank > 0;
    const size_t outer = is_rows ? variable->rank - 1 : variable->rank;
    const size_t length = is_rows ? variable->dimension[outer].length : 1;
    *texts = NULL;
    *count = product(variable, outer, MOST_STRINGS);
    if (*count == SIZE_MAX ||
        product(variable, variable->rank, MOST_TEXT) == SIZE_MAX) {
        return lee_fail(error, LEE_ERR_FORMAT,
                        "%s: variable '%s' holds more than 16 MiB of text",
                        file->path, variable->name);
    }
    char **read = calloc(*count + 1, sizeof *read);
    if (read == NULL) {
        return lee_netcdf_fail(file, variable, NC_ENOMEM, error);
    }
    const int code = variable->type == NC_CHAR
                         ? read_rows(variable, *count, length, read)
                         : read_string_values(variable, *count, read);
    if (code != NC_NOERR) {
        lee_netcdf_texts_free(*count, read);
        return lee_netcdf_fail(file, variable, code, error);
    }
    *texts = read;
    return LEE_OK;
}

void lee_netcdf_texts_free(size_t count, char **texts) {
    for (size_t i = 0; i < count && texts != NULL; i++) {
        free(texts[i]);
    }
    free(texts);
}
