/* netcdf_in.c - opens a NetCDF file and lists what is in it. */
#include "formats/netcdf_in.h"

#include <stdio.h>
#include <stdlib.h>
#include <string.h>

#include <netcdf.h>

#include "base/text.h"
#include "formats/netcdf/internal.h"
#include "formats/netcdf/length.h"

enum {
    MOST_VARIABLES = 20000,
    MOST_GROUPS = 1000,
    DEEPEST = 8, /* groups in groups */
};

lee_status lee_netcdf_fail(const lee_netcdf *file,
                           const lee_netcdf_variable *variable, int code,
                           lee_error *error) {
    if (code == NC_ENOMEM) {
        return lee_fail(error, LEE_ERR_MEMORY, "%s: no room to read",
                        file->path);
    }
    if (variable == NULL) {
        return lee_fail(error, LEE_ERR_FORMAT, "%s: cannot be read: %s",
                        file->path, nc_strerror(code));
    }
    return lee_fail(error, LEE_ERR_FORMAT,
                    "%s: variable '%s' cannot be read: %s", file->path,
                    variable->name, nc_strerror(code));
}

size_t lee_netcdf_value_size(const lee_netcdf_variable *variable) {
    switch (variable->type) {
    case NC_BYTE:
    case NC_UBYTE:
        return 1;
    case NC_SHORT:
    case NC_USHORT:
        return 2;
    case NC_INT:
    case NC_UINT:
    case NC_FLOAT:
        return 4;
    case NC_INT64:
    case NC_UINT64:
    case NC_DOUBLE:
        return 8;
    default:
        return 0;
    }
}

static lee_netcdf_kind kind_of(const lee_netcdf_variable *variable, int rank) {
    if (rank > LEE_NETCDF_RANK) {
        return LEE_NETCDF_OTHER;
    }
    if (variable->type == NC_CHAR || variable->type == NC_STRING) {
        return LEE_NETCDF_TEXT;
    }
    return lee_netcdf_value_size(variable) > 0 ? LEE_NETCDF_NUMBERS
                                               : LEE_NETCDF_OTHER;
}

static char *join(const char *folder, const char *name) {
    const size_t size = strlen(folder) + strlen(name) + 2;
    char *joined = malloc(size);
    if (joined != NULL) {
        (void)snprintf(joined, size, "%s%s%s", folder,
                       folder[0] == '\0' ? "" : "/", name);
    }
    return joined;
}

/* Room for one more variable; NULL without memory. It is empty. */
static lee_netcdf_variable *next_variable(lee_netcdf *file) {
    if (file->count == file->room) {
        const size_t room = 2 * file->room + 16;
        lee_netcdf_variable *grown =
            realloc(file->variable, room * sizeof *grown);
        if (grown == NULL) {
            return NULL;
        }
        file->variable = grown;
        file->room = room;
    }
    lee_netcdf_variable *variable = &file->variable[file->count++];
    *variable = (lee_netcdf_variable){0};
    return variable;
}

static int list_dimensions(lee_netcdf_variable *variable, const int ids[]) {
    for (size_t i = 0; i < variable->rank; i++) {
        char name[NC_MAX_NAME + 1] = "";
        lee_netcdf_dimension *dimension = &variable->dimension[i];
        const int code =
            nc_inq_dim(variable->group, ids[i], name, &dimension->length);
        if (code != NC_NOERR) {
            return code;
        }
        dimension->id = ids[i];
        dimension->name = lee_text_copy(name);
        if (dimension->name == NULL) {
            return NC_ENOMEM;
        }
    }
    return NC_NOERR;
}

static int list_variable(lee_netcdf *file, int group, int id,
                         const char *folder) {
    char name[NC_MAX_NAME + 1] = "";
    int rank = 0;
    int ids[NC_MAX_VAR_DIMS];
    lee_netcdf_variable *variable = next_variable(file);
    if (variable == NULL) {
        return NC_ENOMEM;
    }
    variable->group = group;
    variable->id = id;
    int code = nc_inq_varndims(group, id, &rank);
    if (code != NC_NOERR) {
        return code;
    }
    if (rank < 0 || rank > NC_MAX_VAR_DIMS) {
        return NC_EMAXDIMS;
    }
    code = nc_inq_var(group, id, name, &variable->type, NULL, ids, NULL);
    if (code != NC_NOERR) {
        return code;
    }
    variable->kind = kind_of(variable, rank);
    variable->rank = rank > LEE_NETCDF_RANK ? 0 : (size_t)rank;
    variable->name = join(folder, name);
    return variable->name == NULL ? NC_ENOMEM : list_dimensions(variable, ids);
}

static int list_variables(lee_netcdf *file, int group, const char *folder) {
    int count = 0;
    int code = nc_inq_varids(group, &count, NULL);
    if (code != NC_NOERR) {
        return code;
    }
    if (count < 0 || file->count + (size_t)count > MOST_VARIABLES) {
        return NC_EMAXVARS;
    }
    int *ids = calloc((size_t)count + 1, sizeof *ids);
    if (ids == NULL) {
        return NC_ENOMEM;
    }
    code = nc_inq_varids(group, &count, ids);
    for (int i = 0; i < count && code == NC_NOERR; i++) {
        code = list_variable(file, group, ids[i], folder);
    }
    free(ids);
    return code;
}

/* Groups still to be listed, each with its path. */
typedef struct waiting {
    size_t count;
    struct {
        int id;
        int depth;
        char *path;
    } group[MOST_GROUPS];
} waiting;

static int add_groups(waiting *list, int parent, int depth, const char *path) {
    int count = 0;
    int ids[MOST_GROUPS];
    int code = nc_inq_grps(parent, &count, NULL);
    if (code != NC_NOERR) {
        return code;
    }
    if (count < 0 || list->count + (size_t)count > MOST_GROUPS ||
        (count > 0 && depth >= DEEPEST)) {
        return NC_EMAXDIMS;
    }
    code = nc_inq_grps(parent, &count, ids);
    for (int i = 0; i < count && code == NC_NOERR; i++) {
        char name[NC_MAX_NAME + 1] = "";
        code = nc_inq_grpname(ids[i], name);
        char *joined = code == NC_NOERR ? join(path, name) : NULL;
        if (joined == NULL) {
            return code == NC_NOERR ? NC_ENOMEM : code;
        }
        list->group[list->count].id = ids[i];
        list->group[list->count].depth = depth + 1;
        list->group[list->count++].path = joined;
    }
    return code;
}

static int list_groups(lee_netcdf *file) {
    waiting *list = calloc(1, sizeof *list);
    if (list == NULL) {
        return NC_ENOMEM;
    }
    int code = add_groups(list, file->id, 0, "");
    for (size_t i = 0; i < list->count && code == NC_NOERR; i++) {
        code = list_variables(file, list->group[i].id, list->group[i].path);
        if (code == NC_NOERR) {
            code = add_groups(list, list->group[i].id, list->group[i].depth,
                              list->group[i].path);
        }
    }
    for (size_t i = 0; i < list->count; i++) {
        free(list->group[i].path);
    }
    free(list);
    return code;
}

static lee_status list_all(lee_netcdf *file, lee_error *error) {
    int code = nc_open(file->path, NC_NOWRITE, &file->id);
    if (code != NC_NOERR) {
        return lee_netcdf_fail(file, NULL, code, error);
    }
    file->is_open = true;
    code = list_variables(file, file->id, "");
    if (code == NC_NOERR) {
        code = list_groups(file);
    }
    return code == NC_NOERR ? LEE_OK : lee_netcdf_fail(file, NULL, code, error);
}

lee_status lee_netcdf_open(const char *path, lee_netcdf **file,
                           lee_error *error) {
    *file = NULL;
    lee_status status = lee_netcdf_check_file(path, error);
    if (status != LEE_OK) {
        return status;
    }
    lee_netcdf *opened = calloc(1, sizeof *opened);
    if (opened != NULL) {
        opened->path = lee_text_copy(path);
    }
    if (opened == NULL || opened->path == NULL) {
        lee_netcdf_close(opened);
        return lee_fail(error, LEE_ERR_MEMORY, "%s: no room to read", path);
    }
    status = list_all(opened, error);
    if (status != LEE_OK) {
        lee_netcdf_close(opened);
        return status;
    }
    *file = opened;
    return LEE_OK;
}

void lee_netcdf_close(lee_netcdf *file) {
    if (file == NULL) {
        return;
    }
    if (file->is_open) {
        (void)nc_close(file->id);
    }
    for (size_t i = 0; i < file->count; i++) {
        for (size_t k = 0; k < LEE_NETCDF_RANK; k++) {
            free(file->variable[i].dimension[k].name);
        }
        free(file->variable[i].name);
    }
    free(file->variable);
    free(file->path);
    free(file);
}

const char *lee_netcdf_path(const lee_netcdf *file) {
    return file->path;
}

const lee_netcdf_variable *lee_netcdf_at(const lee_netcdf *file, size_t index) {
    return index < file->count ? &file->variable[index] : NULL;
}

const lee_netcdf_variable *lee_netcdf_find(const lee_netcdf *file,
                                           const char *name) {
    for (size_t i = 0; i < file->count; i++) {
        if (strcmp(file->variable[i].name, name) == 0) {
            return &file->variable[i];
        }
    }
    return NULL;
}

lee_netcdf_box lee_netcdf_whole(const lee_netcdf_variable *variable) {
    lee_netcdf_box box = {0};
    for (size_t i = 0; i < variable->rank; i++) {
        box.count[i] = variable->dimension[i].length;
    }
    return box;
}
