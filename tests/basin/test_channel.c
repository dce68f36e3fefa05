/* A channel keeps what its axis holds, cell by cell. */
#include "support/check.h"

#include <stdlib.h>

#include "leewater/basin.h"

/* A bent, widening lake with a sill, high above its datum; its rows fall on
 * no face of seven cells. */
enum { ROWS = 6, CELLS = 7 };
static const double rows[ROWS][4] = {
  /* chainage, bed, width, bearing */
    {150.0,   371.5, 400.0,  0.2},
    {900.0,   362.0, 900.0,  0.2},
    {1700.0,  358.3, 1300.0, 0.9},
    {2450.0,  370.0, 700.0,  0.9},
    {4300.0,  351.0, 1800.0, 1.4},
    {5100.25, 373.0, 250.0,  1.4},
};

static lee_profile lake(void) {
    lee_profile profile;
    assert_int_equal(lee_profile_init(&profile, ROWS, NULL), LEE_OK);
    for (size_t i = 0; i < ROWS; i++) {
        profile.chainage[i] = rows[i][0];
        profile.bed[i] = rows[i][1];
        profile.width[i] = rows[i][2];
        profile.bearing[i] = rows[i][3];
    }
    return profile;
}

static lee_channel cut(const lee_profile *profile, size_t cells) {
    lee_channel channel;
    assert_int_equal(lee_channel_from_profile(profile, cells, &channel, NULL),
                     LEE_OK);
    return channel;
}

static double total_area(const lee_channel *channel) {
    double area = 0.0;
    for (size_t i = 0; i < channel->nodes; i++) {
        area += channel->area[i];
    }
    return area;
}

/* Below the lowest bed nothing is negative here: level above all beds. */
static double total_volume(const lee_channel *channel, double level) {
    double volume = 0.0;
    for (size_t i = 0; i < channel->nodes; i++) {
        volume += channel->area[i] * (level - channel->bed[i]);
    }
    return volume;
}

static void a_channel_keeps_the_plan_area_of_its_axis(void **state) {
    (void)state;
    lee_profile profile = lake();
    const double level = 380.0;
    const lee_basin_summary whole = lee_profile_summary(&profile, level);
    for (size_t cells = 2; cells < 40; cells++) {
        lee_channel channel = cut(&profile, cells);
        /* some tens of rounded terms */
        assert_near_share(total_area(&channel), whole.area, 1e-14);
        lee_channel_free(&channel);
    }
    lee_profile_free(&profile);
}

static void a_full_channel_keeps_the_volume_of_its_axis(void **state) {
    (void)state;
    lee_profile profile = lake();
    const double level = 380.0; /* above every row */
    const lee_basin_summary whole = lee_profile_summary(&profile, level);
    for (size_t cells = 2; cells < 40; cells++) {
        lee_channel channel = cut(&profile, cells);
        /* beds of 370 m are rounded to 6e-14 m, depths are some 20 m */
        assert_near_share(total_volume(&channel, level), whole.volume, 1e-13);
        lee_channel_free(&channel);
    }
    lee_profile_free(&profile);
}

/* Width 1 + x/L, bed -x/L x 6 m over L = 2000 m in two cells, by hand:
 * area of the first = L (1/2 + 1/8), of b z = -6 L (1/8 + 1/24). */
static void a_cell_of_a_wedge_has_the_bed_of_its_integral(void **state) {
    (void)state;
    lee_profile profile;
    assert_int_equal(lee_profile_init(&profile, 2, NULL), LEE_OK);
    profile.chainage[1] = 2000.0;
    profile.bed[1] = -6.0;
    profile.width[0] = 1.0;
    profile.width[1] = 2.0;
    lee_channel channel = cut(&profile, 2);
    const double area = 2000.0 * 5.0 / 8.0;
    const double moment = -6.0 * 2000.0 * (1.0 / 8.0 + 1.0 / 24.0);
    assert_near_share(channel.area[0], area, 1e-15);
    assert_near_share(channel.bed[0], moment / area, 1e-15);
    lee_channel_free(&channel);
    lee_profile_free(&profile);
}

static void links_lie_on_the_faces_between_equal_cells(void **state) {
    (void)state;
    lee_profile profile = lake();
    lee_channel channel = cut(&profile, CELLS);
    assert_int_equal(channel.nodes, CELLS);
    assert_int_equal(channel.links, CELLS - 1);
    assert_int_equal(channel.classes, 1);
    const double length = (5100.25 - 150.0) / CELLS;
    for (size_t f = 0; f < channel.links; f++) {
        const double face = 150.0 + (double)(f + 1) * length;
        assert_int_equal(channel.from[f], f);
        assert_int_equal(channel.to[f], f + 1);
        assert_near(channel.spacing[f], length, 1e-11); /* 25 roundings */
        /* slopes of the bed are below 0.03, of the width below 2 */
        assert_near(channel.link_bed[f], lee_profile_bed(&profile, face),
                    1e-12);
        assert_near(channel.width[f], lee_profile_width(&profile, face), 1e-11);
        assert_near(channel.bearing[f], lee_profile_bearing(&profile, face),
                    0.0);
    }
    lee_channel_free(&channel);
    lee_profile_free(&profile);
}

static void nodes_stand_in_the_middle_of_their_cells(void **state) {
    (void)state;
    lee_profile profile = lake();
    lee_channel channel = cut(&profile, CELLS);
    const double length = (5100.25 - 150.0) / CELLS;
    for (size_t i = 0; i < channel.nodes; i++) {
        assert_near(channel.length[i], length, 1e-11);
        assert_near(channel.chainage[i], 150.0 + ((double)i + 0.5) * length,
                    1e-11);
    }
    lee_channel_free(&channel);
    lee_profile_free(&profile);
}

/* Many rows in a cell, and rows that coincide with faces. */
static void a_finely_drawn_axis_loses_nothing_either(void **state) {
    (void)state;
    lee_profile profile;
    assert_int_equal(lee_profile_init(&profile, 401, NULL), LEE_OK);
    for (size_t i = 0; i <= 400; i++) {
        const double x = 25.0 * (double)i;
        profile.chainage[i] = x;
        profile.bed[i] = 100.0 + 8.0 * cos(x / 700.0);
        profile.width[i] = 900.0 + 400.0 * sin(x / 1100.0);
    }
    const lee_basin_summary whole = lee_profile_summary(&profile, 110.0);
    lee_channel channel = cut(&profile, 20);
    assert_near_share(total_area(&channel), whole.area, 1e-14);
    assert_near_share(total_volume(&channel, 110.0), whole.volume, 1e-13);
    lee_channel_free(&channel);
    lee_profile_free(&profile);
}

static void a_single_cell_is_refused(void **state) {
    (void)state;
    lee_profile profile = lake();
    lee_channel channel;
    lee_error error = {0};
    assert_int_equal(lee_channel_from_profile(&profile, 1, &channel, &error),
                     LEE_ERR_ARGUMENT);
    assert_string_equal(error.message,
                        "a channel needs two cells, 1 asked for");
    assert_null(channel.bed);
    lee_profile_free(&profile);
}

static void an_unsound_profile_is_refused(void **state) {
    (void)state;
    lee_profile profile = lake();
    profile.width[2] = NAN;
    lee_channel channel;
    assert_int_equal(lee_channel_from_profile(&profile, 10, &channel, NULL),
                     LEE_ERR_DATA);
    assert_null(channel.bed);
    lee_profile_free(&profile);
}

static void a_channel_may_be_freed_twice(void **state) {
    (void)state;
    lee_profile profile = lake();
    lee_channel channel = cut(&profile, CELLS);
    lee_channel_free(&channel);
    lee_channel_free(&channel);
    assert_int_equal(channel.nodes, 0);
    lee_profile_free(&profile);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(a_channel_keeps_the_plan_area_of_its_axis),
        cmocka_unit_test(a_full_channel_keeps_the_volume_of_its_axis),
        cmocka_unit_test(a_cell_of_a_wedge_has_the_bed_of_its_integral),
        cmocka_unit_test(links_lie_on_the_faces_between_equal_cells),
        cmocka_unit_test(nodes_stand_in_the_middle_of_their_cells),
        cmocka_unit_test(a_finely_drawn_axis_loses_nothing_either),
        cmocka_unit_test(a_single_cell_is_refused),
        cmocka_unit_test(an_unsound_profile_is_refused),
        cmocka_unit_test(a_channel_may_be_freed_twice),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
