/* field.c - the water along the axis in time as NetCDF, written while a run
 * goes on: memory holds one block of times. */
#include <math.h>
#include <stdlib.h>
#include <string.h>

#include "base/constants.h"
#include "leewater/output.h"
#include "output/files/target.h"
#include "output/netcdf/parts.h"

/* Values of a block, which is a chunk of a large file; 1 MB. */
enum { BLOCK_VALUES = 131072 };

/* Room for method and warnings, which are known when the run has ended. */
enum { LATER_ATTRIBUTES = 65536 };

/* What is one row of numbers a time. */
typedef struct row {
    int variable;
    size_t width;
    double *block; /* [rows][width] */
} row;

enum { LEVEL, TRANSPORT, STRESS, TIME, SPEED, BLOWS_FROM, STILL_WATER, ROWS };

struct lee_field_file {
    lee_target target; /* the path is borrowed */
    const lee_case *from;
    lee_netcdf_out out;
    bool is_begun;
    size_t nodes;
    size_t links;
    size_t count;  /* of times */
    size_t rows;   /* times in a block */
    size_t filled; /* of them */
    size_t written;
    int time_dimension;
    int spin_up;
    int height;
    row row[ROWS];
};

lee_status lee_field_file_new(const lee_target *target, const lee_case *from,
                              lee_field_file **file, lee_error *error) {
    *file = NULL;
    const lee_status status = lee_target_check_field(target, from, error);
    if (status != LEE_OK) {
        return status;
    }
    *file = calloc(1, sizeof **file);
    if (*file == NULL) {
        return lee_fail(error, LEE_ERR_MEMORY, "%s: no room", target->path);
    }
    (*file)->target = *target;
    (*file)->from = from;
    return LEE_OK;
}

/* A number of the lake at each node or link. */
static void define_along(lee_field_file *file, const lee_nc_variable *is,
                         int dimension, int *variable) {
    const lee_netcdf_shape shape = {
        .dimensions = 1,
        .dimension = {dimension},
    };
    *variable = lee_nc_define(&file->out, is, &shape);
}

/* Numbers of the variables that do not change in time. */
typedef struct fixed {
    int chainage;
    int face;
    int bed;
    int length;
    int area;
    int width;
    int bearing;
    int datum;
    lee_nc_stations stations;
    lee_nc_thresholds thresholds;
} fixed;

static void define_axis(lee_field_file *file, int node, int link, fixed *at) {
    static const lee_nc_variable chainage = {
        "chainage", "m",
        NULL,       "distance along the axis, middle of the cell",
        NULL,       "coordinate",
        false};
    static const lee_nc_variable face = {
        "face", "m",
        NULL,   "distance along the axis, face between two cells",
        NULL,   "coordinate",
        false};
    static const lee_nc_variable bed = {
        "bed", "m",
        NULL,  "bed of the cell above the datum of levels",
        NULL,  "referenceInformation",
        false};
    static const lee_nc_variable length = {
        "cell_length", "m",
        NULL,          "length of the cell along the axis",
        NULL,          "referenceInformation",
        false};
    static const lee_nc_variable area = {"cell_area", "m2",
                                         NULL,        "plan area of the cell",
                                         NULL,        "referenceInformation",
                                         false};
    static const lee_nc_variable width = {
        "face_width", "m",
        NULL,         "width of the lake at the face",
        NULL,         "referenceInformation",
        false};
    static const lee_nc_variable bearing = {
        "face_bearing",
        "degree",
        NULL,
        "the way chainage grows at the face, clockwise from north",
        NULL,
        "referenceInformation",
        false};
    define_along(file, &chainage, node, &at->chainage);
    define_along(file, &face, link, &at->face);
    define_along(file, &bed, node, &at->bed);
    define_along(file, &length, node, &at->length);
    define_along(file, &area, node, &at->area);
    define_along(file, &width, link, &at->width);
    define_along(file, &bearing, link, &at->bearing);
}

static void add_row(lee_field_file *file, size_t which, int variable,
                    size_t width) {
    file->row[which] = (row){
        .variable = variable,
        .width = width,
        .block = calloc(file->rows * width, sizeof(double)),
    };
    if (file->row[which].block == NULL) {
        lee_netcdf_lacks_memory(&file->out);
    }
}

static void define_fields(lee_field_file *file, int node, int link) {
    static const lee_nc_level level = {"water_level", "water level", NULL,
                                       true};
    static const lee_nc_variable transport = {
        "transport",
        "m3 s-1",
        NULL,
        "transport of water towards growing chainage, mean of the last step",
        NULL,
        "modelResult",
        false};
    static const lee_nc_variable stress = {
        "wind_stress",
        "Pa",
        NULL,
        "stress of the wind on the water towards growing chainage",
        NULL,
        "auxiliaryInformation",
        false};
    lee_netcdf_shape shape = {
        .dimensions = 2,
        .dimension = {file->time_dimension, node       },
        .chunk = {file->rows,           file->nodes},
    };
    const int levels = lee_nc_define_level(
        &file->out, &file->from->problem.lake, &level, &shape);
    shape.dimension[1] = link;
    shape.chunk[1] = file->links;
    const int transports = lee_nc_define(&file->out, &transport, &shape);
    const int stresses = lee_nc_define(&file->out, &stress, &shape);
    lee_netcdf_put_text(&file->out, levels, "cell_methods", "time: point");
    add_row(file, LEVEL, levels, file->nodes);
    add_row(file, TRANSPORT, transports, file->links);
    add_row(file, STRESS, stresses, file->links);
}

static void define_times(lee_field_file *file) {
    static const lee_nc_level still_water = {"still_water", "still-water level",
                                             NULL, false};
    const lee_netcdf_shape shape = {
        .dimensions = 1,
        .dimension = {file->time_dimension},
    };
    lee_netcdf_out *out = &file->out;
    const lee_lake *lake = &file->from->problem.lake;
    add_row(file, TIME, lee_nc_define_time(out, "time", "time", &shape, true),
            1);
    add_row(file, SPEED, lee_nc_define_wind_speed(out, &shape), 1);
    add_row(file, BLOWS_FROM, lee_nc_define_wind_direction(out, &shape), 1);
    add_row(file, STILL_WATER,
            lee_nc_define_level(out, lake, &still_water, &shape), 1);
    file->height = lee_nc_define_height(out);
    file->spin_up = lee_nc_define_spin_up(out, file->time_dimension);
}

static void put_axis(lee_field_file *file, const lee_channel *channel,
                     const fixed *at) {
    const size_t start = 0;
    lee_netcdf_out *out = &file->out;
    const size_t *nodes = &file->nodes;
    const size_t *links = &file->links;
    lee_netcdf_put_block(out, at->chainage, &start, nodes, channel->chainage);
    lee_netcdf_put_block(out, at->bed, &start, nodes, channel->bed);
    lee_netcdf_put_block(out, at->length, &start, nodes, channel->length);
    lee_netcdf_put_block(out, at->area, &start, nodes, channel->area);
    lee_netcdf_put_block(out, at->width, &start, links, channel->width);
    for (size_t i = 0; i < file->links; i++) {
        const size_t one = 1;
        const double face = channel->chainage[i] + 0.5 * channel->length[i];
        const double bearing = lee_nc_degrees(channel->bearing[i]);
        lee_netcdf_put_block(out, at->face, &i, &one, &face);
        lee_netcdf_put_block(out, at->bearing, &i, &one, &bearing);
    }
}

static lee_status begin(lee_field_file *file, const lee_field *field,
                        lee_error *error) {
    const lee_problem *problem = &file->from->problem;
    const lee_channel *channel = field->channel;
    file->nodes = channel->nodes;
    file->links = channel->links;
    file->count = field->count;
    const size_t fitting = BLOCK_VALUES / file->nodes;
    file->rows = fitting < 1 ? 1 : fitting;
    file->rows = file->rows > file->count ? file->count : file->rows;
    const size_t values = file->count * (file->nodes + 2 * file->links);
    const lee_status status =
        lee_netcdf_create(file->target.path, file->target.force,
                          values > LEE_NC_LARGE, &file->out, error);
    if (status != LEE_OK) {
        return status;
    }
    file->is_begun = true;
    fixed at;
    lee_netcdf_out *out = &file->out;
    file->time_dimension = lee_netcdf_dimension(out, "time", file->count);
    const int node = lee_netcdf_dimension(out, "chainage", file->nodes);
    const int link = lee_netcdf_dimension(out, "face", file->links);
    define_axis(file, node, link, &at);
    define_times(file);
    define_fields(file, node, link);
    at.datum = lee_nc_define_datum(out, &problem->lake);
    at.stations = lee_nc_define_stations(out, problem, false);
    at.thresholds = lee_nc_define_thresholds(out, problem);
    lee_netcdf_end_definitions(out, LATER_ATTRIBUTES);
    put_axis(file, channel, &at);
    lee_nc_put_scalar(out, at.datum, problem->lake.datum_altitude);
    lee_nc_put_scalar(out, file->height, lee_reference_height);
    lee_nc_put_stations(out, &at.stations, problem);
    lee_nc_put_thresholds(out, &at.thresholds, problem);
    return LEE_OK;
}

static void flush(lee_field_file *file) {
    for (size_t k = 0; k < ROWS; k++) {
        const size_t start[] = {file->written, 0};
        const size_t count[] = {file->filled, file->row[k].width};
        lee_netcdf_put_block(&file->out, file->row[k].variable, start, count,
                             file->row[k].block);
    }
    file->written += file->filled;
    file->filled = 0;
}

static void keep_row(lee_field_file *file, size_t which,
                     const double values[]) {
    const row *to = &file->row[which];
    if (to->block != NULL) {
        memcpy(to->block + file->filled * to->width, values,
               to->width * sizeof *values);
    }
}

lee_status lee_field_file_take(void *user, const lee_field *field,
                               lee_error *error) {
    lee_field_file *file = user;
    if (!file->is_begun) {
        const lee_status status = begin(file, field, error);
        if (status != LEE_OK) {
            return status;
        }
    }
    const double time = (double)field->time;
    double speed;
    double blows_from;
    lee_wind_speed_from(field->wind[0], field->wind[1], &speed, &blows_from);
    blows_from = lee_nc_degrees(blows_from);
    keep_row(file, LEVEL, field->level);
    keep_row(file, TRANSPORT, field->transport);
    keep_row(file, STRESS, field->stress);
    keep_row(file, TIME, &time);
    keep_row(file, SPEED, &speed);
    keep_row(file, BLOWS_FROM, &blows_from);
    keep_row(file, STILL_WATER, &field->still_water);
    file->filled++;
    if (file->filled == file->rows || field->index + 1 == file->count) {
        flush(file);
    }
    return lee_netcdf_failure(&file->out, error);
}

lee_status lee_field_file_finish(lee_field_file *file,
                                 const lee_run_result *result,
                                 lee_error *error) {
    if (!file->is_begun || file->written != result->n) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "%s: %zu of %zu times of the run were taken",
                        file->target.path, file->written, result->n);
    }
    const lee_nc_about about = {
        .from = file->from,
        .method = &result->method,
        .warnings = &result->warnings,
        .command = "run",
        .title = "Water along the axis of a lake under wind",
        .summary = "Levels, transports and wind stress along the axis of a "
                   "lake, computed from its wind. Planning estimates.",
    };
    lee_netcdf_out *out = &file->out;
    lee_netcdf_begin_definitions(out);
    lee_nc_put_about(out, &about, file->target.date);
    lee_nc_put_run(out, result);
    lee_netcdf_end_definitions(out, 0);
    lee_nc_put_spin_up(out, file->spin_up, result);
    return lee_netcdf_commit(out, error);
}

void lee_field_file_free(lee_field_file *file) {
    if (file == NULL) {
        return;
    }
    lee_netcdf_discard(&file->out);
    for (size_t k = 0; k < ROWS; k++) {
        free(file->row[k].block);
    }
    free(file);
}
