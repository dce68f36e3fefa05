/* channel.c - cuts an axis into the nodes and links that the solvers take. */
#include "leewater/basin.h"

#include <math.h>
#include <stdlib.h>

static lee_status channel_init(lee_channel *channel, size_t nodes,
                               lee_error *error) {
    const size_t links = nodes - 1;
    *channel = (lee_channel){
        .nodes = nodes,
        .links = links,
        .classes = 1,
        .chainage = calloc(nodes, sizeof *channel->chainage),
        .length = calloc(nodes, sizeof *channel->length),
        .area = calloc(nodes, sizeof *channel->area),
        .bed = calloc(nodes, sizeof *channel->bed),
        .from = calloc(links, sizeof *channel->from),
        .to = calloc(links, sizeof *channel->to),
        .spacing = calloc(links, sizeof *channel->spacing),
        .width = calloc(links, sizeof *channel->width),
        .link_bed = calloc(links, sizeof *channel->link_bed),
        .bearing = calloc(links, sizeof *channel->bearing),
    };
    const lee_channel *c = channel;
    if (c->chainage == NULL || c->length == NULL || c->area == NULL ||
        c->bed == NULL || c->from == NULL || c->to == NULL ||
        c->spacing == NULL || c->width == NULL || c->link_bed == NULL ||
        c->bearing == NULL) {
        lee_channel_free(channel);
        (void)lee_fail(error, LEE_ERR_MEMORY,
                       "no room for a channel of %zu cells", nodes);
        return LEE_ERR_MEMORY; /* said outright, for the analyser */
    }
    return LEE_OK;
}

void lee_channel_free(lee_channel *channel) {
    free(channel->chainage);
    free(channel->length);
    free(channel->area);
    free(channel->bed);
    free(channel->from);
    free(channel->to);
    free(channel->spacing);
    free(channel->width);
    free(channel->link_bed);
    free(channel->bearing);
    *channel = (lee_channel){0};
}

/* Chainage of face i of `cells` equal cells; the last is the last row's. */
static double face_at(const lee_profile *profile, size_t i, size_t cells) {
    const double first = profile->chainage[0];
    const double last = profile->chainage[profile->n - 1];
    if (i == cells) {
        return last;
    }
    return first + (last - first) * ((double)i / (double)cells);
}

/* Integrals over a cell that a node must keep. Beds count from `reference`,
 * which keeps digits in lakes far above their datum. */
typedef struct cell_sums {
    double area;   /* of b, m2          */
    double moment; /* of b (z - reference), m3 */
} cell_sums;

/* Adds the stretch [x0, x1], on which bed and width are linear. Simpson's
 * rule is exact for the product of two lines. */
static void add_stretch(const lee_profile *profile, double reference, double x0,
                        double x1, cell_sums *sums) {
    const double b0 = lee_profile_width(profile, x0);
    const double b1 = lee_profile_width(profile, x1);
    const double z0 = lee_profile_bed(profile, x0) - reference;
    const double z1 = lee_profile_bed(profile, x1) - reference;
    sums->area += 0.5 * (x1 - x0) * (b0 + b1);
    sums->moment +=
        (x1 - x0) / 6.0 * (2.0 * z0 * b0 + z0 * b1 + z1 * b0 + 2.0 * z1 * b1);
}

/* Fills the nodes. `row` is the first profile row beyond the cell's start. */
static void fill_nodes(const lee_profile *profile, lee_channel *channel) {
    size_t row = 1;
    for (size_t i = 0; i < channel->nodes; i++) {
        const double start = face_at(profile, i, channel->nodes);
        const double end = face_at(profile, i + 1, channel->nodes);
        const double reference = lee_profile_bed(profile, start);
        cell_sums sums = {0};
        double x = start;
        while (row + 1 < profile->n && profile->chainage[row] < end) {
            if (profile->chainage[row] > x) {
                add_stretch(profile, reference, x, profile->chainage[row],
                            &sums);
                x = profile->chainage[row];
            }
            row++;
        }
        add_stretch(profile, reference, x, end, &sums);
        channel->chainage[i] = 0.5 * (start + end);
        channel->length[i] = end - start;
        channel->area[i] = sums.area;
        channel->bed[i] = reference + sums.moment / sums.area;
    }
}

static void fill_links(const lee_profile *profile, lee_channel *channel) {
    for (size_t i = 0; i < channel->links; i++) {
        const double face = face_at(profile, i + 1, channel->nodes);
        channel->from[i] = i;
        channel->to[i] = i + 1;
        channel->spacing[i] = channel->chainage[i + 1] - channel->chainage[i];
        channel->width[i] = lee_profile_width(profile, face);
        channel->link_bed[i] = lee_profile_bed(profile, face);
        channel->bearing[i] = lee_profile_bearing(profile, face);
    }
}

lee_status lee_channel_from_profile(const lee_profile *profile, size_t cells,
                                    lee_channel *channel, lee_error *error) {
    *channel = (lee_channel){0};
    if (cells < 2) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "a channel needs two cells, %zu asked for", cells);
    }
    lee_status status = lee_profile_check(profile, error);
    if (status == LEE_OK) {
        status = channel_init(channel, cells, error);
    }
    if (status == LEE_OK) {
        fill_nodes(profile, channel);
        fill_links(profile, channel);
    }
    return status;
}
