/* The point of a grid that is read is the one that was meant. */
#include "wind/netcdf_support.h"

/* u(time, height, lat, lon) = 20 row + column; v = 1. Rows from the south,
 * columns from 0 E, 30 degrees apart, all the way round. */
enum { ROWS = 4, COLUMNS = 12 };

typedef struct grid_shape {
    bool is_from_north;
    bool is_west_east; /* -180 to 150 instead of 0 to 330 */
    const char *extra; /* more of CDL in `variables`      */
    int missing_row;   /* a cell without v; -1 for none   */
    int missing_column;
} grid_shape;

static const double south[ROWS] = {45.0, 46.0, 47.0, 48.0};

static void write_grid(const grid_shape *shape) {
    char text[8192];
    size_t n = (size_t)snprintf(
        text, sizeof text,
        "dimensions: time = 2; height = 1; lat = 4; lon = 12;"
        " variables: " TIME_OF("time") EAST("time, height, lat, lon")
            NORTH("time, height, lat, lon") LAT("lat")
                LON("lon") "%s" DATA("time = 0, 1; lat ="),
        shape->extra == NULL ? "" : shape->extra);
    for (int r = 0; r < ROWS; r++) {
        n += (size_t)snprintf(
            text + n, sizeof text - n, "%s%g", r == 0 ? " " : ", ",
            shape->is_from_north ? south[ROWS - 1 - r] : south[r]);
    }
    n += (size_t)snprintf(text + n, sizeof text - n, "; lon =");
    for (int c = 0; c < COLUMNS; c++) {
        n += (size_t)snprintf(text + n, sizeof text - n, "%s%d",
                              c == 0 ? " " : ", ",
                              30 * c - (shape->is_west_east ? 180 : 0));
    }
    for (int k = 0; k < 2; k++) {
        n += (size_t)snprintf(text + n, sizeof text - n,
                              "; %s =", k == 0 ? "u" : "v");
        for (int i = 0; i < 2 * ROWS * COLUMNS; i++) {
            const int r = i / COLUMNS % ROWS;
            const int c = i % COLUMNS;
            const bool is_gone =
                k == 1 && r == shape->missing_row && c == shape->missing_column;
            n += (size_t)snprintf(text + n, sizeof text - n, "%s%s",
                                  i == 0 ? " " : ", ", is_gone ? "_" : "");
            if (!is_gone) {
                n += (size_t)snprintf(text + n, sizeof text - n, "%d",
                                      k == 1 ? 1 : r * 20 + c);
            }
        }
    }
    (void)snprintf(text + n, sizeof text - n, ";");
    (void)folder_write_cdl(&folder, "wind.nc", "netCDF-4", text);
}

static const grid_shape usual = {.missing_row = -1};

static lee_wind_netcdf at(double longitude, double latitude,
                          lee_grid_method method) {
    return (lee_wind_netcdf){.has_position = true,
                             .longitude = longitude,
                             .latitude = latitude,
                             .method = method};
}

/* The eastward wind at a position. */
static double east_at(double longitude, double latitude,
                      lee_grid_method method) {
    const lee_wind_netcdf how = at(longitude, latitude, method);
    lee_wind_record record = read_wind(&how, NULL);
    assert_int_equal(record.n, 2);
    assert_near(record.east[0], record.east[1], 0.0);
    const double east = record.east[0];
    lee_wind_record_free(&record);
    return east;
}

static void the_nearest_point_is_read(void **state) {
    (void)state;
    write_grid(&usual);
    assert_near(east_at(31.0, 46.4, LEE_GRID_NEAREST), 21.0, 0.0);
    assert_near(east_at(80.0, 46.6, LEE_GRID_NEAREST), 43.0, 0.0);
    assert_near(east_at(0.0, 45.0, LEE_GRID_NEAREST), 0.0, 0.0);
    assert_near(east_at(330.0, 48.0, LEE_GRID_NEAREST), 71.0, 0.0);
}

static void longitudes_of_either_kind_are_the_same_place(void **state) {
    (void)state;
    write_grid(&usual);
    assert_near(east_at(-30.0, 45.0, LEE_GRID_NEAREST), 11.0, 0.0);
    assert_near(east_at(-180.0, 45.0, LEE_GRID_NEAREST), 6.0, 0.0);
    assert_near(east_at(360.0, 45.0, LEE_GRID_NEAREST), 0.0, 0.0);
    const grid_shape western = {.is_west_east = true, .missing_row = -1};
    write_grid(&western);
    assert_near(east_at(330.0, 45.0, LEE_GRID_NEAREST), 5.0, 0.0);
    assert_near(east_at(180.0, 45.0, LEE_GRID_NEAREST), 0.0, 0.0);
    assert_near(east_at(-180.0, 45.0, LEE_GRID_NEAREST), 0.0, 0.0);
}

static void the_seam_of_a_round_grid_is_no_edge(void **state) {
    (void)state;
    write_grid(&usual);
    assert_near(east_at(346.0, 45.0, LEE_GRID_NEAREST), 0.0, 0.0);
    assert_near(east_at(344.0, 45.0, LEE_GRID_NEAREST), 11.0, 0.0);
    /* A third of the way from 330 E (11) to 0 E (0). */
    assert_near(east_at(340.0, 45.0, LEE_GRID_BILINEAR), 11.0 * 2.0 / 3.0,
                1e-12);
    assert_near(east_at(-20.0, 46.0, LEE_GRID_BILINEAR),
                20.0 + 11.0 * 2.0 / 3.0, 1e-12);
}

static void latitudes_may_run_either_way(void **state) {
    (void)state;
    const grid_shape northern = {.is_from_north = true, .missing_row = -1};
    write_grid(&northern);
    assert_near(east_at(30.0, 48.0, LEE_GRID_NEAREST), 1.0, 0.0);
    assert_near(east_at(30.0, 45.0, LEE_GRID_NEAREST), 61.0, 0.0);
    assert_near(east_at(30.0, 47.75, LEE_GRID_BILINEAR), 6.0, 1e-12);
}

/* The values are linear in both: u = 20 (lat - 45) + lon/30. */
static void a_field_linear_in_both_comes_out_exactly(void **state) {
    (void)state;
    write_grid(&usual);
    static const double place[][2] = {
        {10.0,  45.5 },
        {45.0,  46.25},
        {300.0, 47.9 },
        {299.0, 45.0 },
        {30.0,  48.0 },
    };
    for (size_t i = 0; i < sizeof place / sizeof place[0]; i++) {
        assert_near(east_at(place[i][0], place[i][1], LEE_GRID_BILINEAR),
                    20.0 * (place[i][1] - 45.0) + place[i][0] / 30.0, 1e-11);
    }
}

static void a_missing_corner_makes_the_wind_missing(void **state) {
    (void)state;
    const grid_shape holed = {.missing_row = 1, .missing_column = 2};
    write_grid(&holed);
    lee_wind_record record;
    lee_error error = {0};
    char path[FOLDER_PATH];
    (void)snprintf(path, sizeof path, "%s/wind.nc", folder.path);
    const lee_wind_netcdf inside = at(50.0, 45.5, LEE_GRID_BILINEAR);
    assert_int_equal(lee_wind_read_netcdf(path, &inside, &record, NULL, &error),
                     LEE_ERR_DATA);
    assert_string_equal(error.message + strlen(path),
                        ": the wind is missing from all 2 samples");
}

static void a_missing_corner_of_no_weight_does_not_matter(void **state) {
    (void)state;
    const grid_shape holed = {.missing_row = 1, .missing_column = 2};
    write_grid(&holed);
    assert_near(east_at(50.0, 45.0, LEE_GRID_BILINEAR), 50.0 / 30.0, 1e-12);
    assert_near(east_at(30.0, 45.5, LEE_GRID_BILINEAR), 11.0, 1e-12);
}

static void assert_off(double longitude, double latitude,
                       lee_grid_method method, const char *expected) {
    const lee_wind_netcdf how = at(longitude, latitude, method);
    lee_wind_record record;
    lee_error error = {0};
    char path[FOLDER_PATH];
    (void)snprintf(path, sizeof path, "%s/wind.nc", folder.path);
    assert_int_equal(lee_wind_read_netcdf(path, &how, &record, NULL, &error),
                     LEE_ERR_DATA);
    assert_string_equal(error.message + strlen(folder.path) + 1, expected);
}

/* A degree of the meridian is 6371.0088 pi/180 = 111.19 km. */
static void a_position_off_the_grid_is_refused_with_its_distance(void **s) {
    (void)s;
    write_grid(&usual);
    assert_near(east_at(30.0, 48.49, LEE_GRID_NEAREST), 61.0, 0.0);
    assert_off(30.0, 50.0, LEE_GRID_NEAREST,
               "wind.nc: position 50.0000 N 30.0000 E is off the grid of 'u': "
               "its nearest point, 48.0000 N 30.0000 E, is 222 km away");
    assert_off(30.0, 48.49, LEE_GRID_BILINEAR,
               "wind.nc: position 48.4900 N 30.0000 E is off the grid of 'u': "
               "its nearest point, 48.0000 N 30.0000 E, is 54 km away");
    assert_off(30.0, 43.0, LEE_GRID_BILINEAR,
               "wind.nc: position 43.0000 N 30.0000 E is off the grid of 'u': "
               "its nearest point, 45.0000 N 30.0000 E, is 222 km away");
}

static void east_and_west_of_a_part_of_the_earth_is_off(void **state) {
    (void)state;
    (void)folder_write_cdl(
        &folder, "wind.nc", "classic",
        "dimensions: time = 1; lat = 2; lon = 3; variables:" TIME_OF("time")
            EAST("time, lat, lon") NORTH("time, lat, lon") LAT("lat") LON("lon")
                DATA("time = 0; lat = 0, 1; lon = 359, 0, 1;"
                     "u = 1, 2, 3, 4, 5, 6; v = 1, 2, 3, 4, 5, 6;"));
    const lee_wind_netcdf middle = at(0.5, 0.0, LEE_GRID_BILINEAR);
    lee_wind_record record = read_wind(&middle, NULL);
    assert_near(record.east[0], 2.5, 1e-12);
    lee_wind_record_free(&record);
    const lee_wind_netcdf west = at(-0.5, 1.0, LEE_GRID_BILINEAR);
    record = read_wind(&west, NULL);
    assert_near(record.east[0], 4.5, 1e-12);
    lee_wind_record_free(&record);
    assert_off(2.0, 0.0, LEE_GRID_NEAREST,
               "wind.nc: position 0.0000 N 2.0000 E is off the grid of 'u': "
               "its nearest point, 0.0000 N 1.0000 E, is 111 km away");
    assert_off(-2.0, 0.0, LEE_GRID_NEAREST,
               "wind.nc: position 0.0000 N -2.0000 E is off the grid of 'u': "
               "its nearest point, 0.0000 N -1.0000 E, is 111 km away");
}

static void the_point_is_told_with_its_distance(void **state) {
    (void)state;
    write_grid(&usual);
    lee_notes told = {0};
    const lee_wind_netcdf how = at(-30.0, 46.1, LEE_GRID_NEAREST);
    lee_wind_record record = read_wind(&how, &told);
    assert_true(is_told(&told, "grid point 46.0000 N -30.0000 E, 11.1 km from "
                               "the position"));
    lee_notes_free(&told);
    lee_wind_record_free(&record);
}

/* Between 10 m/s from the west and 10 m/s from the north lies (5, -5), not 10
 * m/s from the mean of 270 and 0 degrees. */
static void directions_are_never_averaged(void **state) {
    (void)state;
    (void)folder_write_cdl(
        &folder, "wind.nc", "classic",
        "dimensions: time = 1; lat = 2; lon = 2; variables:" TIME_OF(
            "time") "float s(time, lat, lon); s:units = \"m/s\";"
                    "s:standard_name = \"wind_speed\";"
                    "float d(time, lat, lon); d:units = \"degree\";"
                    "d:standard_name = \"wind_from_direction\";" LAT("lat")
                        LON("lon") DATA("time = 0; lat = 0, 1; lon = 0, 1;"
                                        "s = 10, 10, 10, 10;"
                                        "d = 270, 0, 270, 0;"));
    const lee_wind_netcdf how = at(0.5, 0.5, LEE_GRID_BILINEAR);
    lee_wind_record record = read_wind(&how, NULL);
    assert_components(&record, 0, 5.0, -5.0);
    lee_wind_record_free(&record);
}

#define CURVED(names)                                                      \
    "dimensions: time = 1; y = 2; x = 3; variables:" TIME_OF("time") names \
        "float lat(y, x); lat:units = \"degrees_north\";"                  \
        "float lon(y, x); lon:units = \"degrees_east\";" DATA(             \
            "time = 0; lat = 47, 47.1, 47.2, 48, 48.1, 48.2;"              \
            "lon = 8, 9, 10, 7.9, 8.9, 9.9; u = 1, 2, 3, 4, 5, 6;"         \
            "v = 1, 2, 3, 4, 5, 6;")
#define COORDINATES "u:coordinates = \"lat lon\"; v:coordinates = \"lat lon\"; "

static void the_nearest_point_of_a_curved_grid_is_read(void **state) {
    (void)state;
    (void)folder_write_cdl(
        &folder, "wind.nc", "classic",
        CURVED(EAST("time, y, x") NORTH("time, y, x") COORDINATES));
    const lee_wind_netcdf how = at(9.0, 48.0, LEE_GRID_NEAREST);
    lee_wind_record record = read_wind(&how, NULL);
    assert_components(&record, 0, 5.0, 5.0);
    lee_wind_record_free(&record);
    assert_off(8.9, 50.0, LEE_GRID_NEAREST,
               "wind.nc: position 50.0000 N 8.9000 E is off the grid of 'u': "
               "its nearest point, 48.1000 N 8.9000 E, is 211 km away");
}

static void a_curved_grid_is_not_read_bilinear(void **state) {
    (void)state;
    const lee_wind_netcdf how = at(9.0, 48.0, LEE_GRID_BILINEAR);
    assert_refused(&how,
                   CURVED(EAST("time, y, x") NORTH("time, y, x") COORDINATES),
                   LEE_ERR_FORMAT,
                   "wind.nc: the grid of 'u' has a latitude and longitude of "
                   "its own at each point; only the nearest is read there");
}

static void unnamed_components_on_a_curved_grid_are_refused(void **state) {
    (void)state;
    lee_wind_netcdf how = at(9.0, 48.0, LEE_GRID_NEAREST);
    how.column[LEE_WIND_EASTWARD].name = "u";
    how.column[LEE_WIND_NORTHWARD].name = "v";
    assert_refused(
        &how,
        CURVED("float u(time, y, x); u:units = \"m/s\";"
               "float v(time, y, x); v:units = \"m/s\"; " COORDINATES),
        LEE_ERR_FORMAT,
        "wind.nc: variable 'u' lies on a grid of curved or turned axes, and "
        "nothing says that it points east or north; such a wind is not read "
        "as eastward or northward: turn it first, or give speed and "
        "direction");
}

static void
components_said_to_follow_the_earth_are_read_on_a_curved_grid(void **state) {
    (void)state;
    lee_wind_netcdf how = at(9.0, 48.0, LEE_GRID_NEAREST);
    how.column[LEE_WIND_EASTWARD].name = "u";
    how.column[LEE_WIND_NORTHWARD].name = "v";
    lee_wind_record record = read_cdl(
        &how, CURVED("float u(time, y, x); u:units = \"m/s\";"
                     "float v(time, y, x); v:units = \"m/s\"; " COORDINATES
                     "u:uvRelativeToGrid = 0; v:uvRelativeToGrid = 0;"));
    assert_components(&record, 0, 5.0, 5.0);
    lee_wind_record_free(&record);
}

static void a_grid_needs_a_position(void **state) {
    (void)state;
    write_grid(&usual);
    lee_wind_record record;
    lee_error error = {0};
    char path[FOLDER_PATH];
    (void)snprintf(path, sizeof path, "%s/wind.nc", folder.path);
    assert_int_equal(lee_wind_read_netcdf(path, &plain, &record, NULL, &error),
                     LEE_ERR_FORMAT);
    assert_non_null(strstr(error.message, "'u' lies on a grid; the case has"));
}

static void a_position_beyond_the_earth_is_refused(void **state) {
    (void)state;
    static const double wrong[][2] = {
        {8.0,   91.0},
        {361.0, 47.0},
        {NAN,   47.0},
        {8.0,   NAN }
    };
    write_grid(&usual);
    for (size_t i = 0; i < 4; i++) {
        const lee_wind_netcdf how =
            at(wrong[i][0], wrong[i][1], LEE_GRID_NEAREST);
        lee_wind_record record;
        assert_int_equal(
            lee_wind_read_netcdf("x.nc", &how, &record, NULL, NULL),
            LEE_ERR_ARGUMENT);
    }
}

int main(void) {
    const struct CMUnitTest tests[] = {
        FOLDER_TEST(the_nearest_point_is_read),
        FOLDER_TEST(longitudes_of_either_kind_are_the_same_place),
        FOLDER_TEST(the_seam_of_a_round_grid_is_no_edge),
        FOLDER_TEST(latitudes_may_run_either_way),
        FOLDER_TEST(a_field_linear_in_both_comes_out_exactly),
        FOLDER_TEST(a_missing_corner_makes_the_wind_missing),
        FOLDER_TEST(a_missing_corner_of_no_weight_does_not_matter),
        FOLDER_TEST(a_position_off_the_grid_is_refused_with_its_distance),
        FOLDER_TEST(east_and_west_of_a_part_of_the_earth_is_off),
        FOLDER_TEST(the_point_is_told_with_its_distance),
        FOLDER_TEST(directions_are_never_averaged),
        FOLDER_TEST(the_nearest_point_of_a_curved_grid_is_read),
        FOLDER_TEST(a_curved_grid_is_not_read_bilinear),
        FOLDER_TEST(unnamed_components_on_a_curved_grid_are_refused),
        FOLDER_TEST(
            components_said_to_follow_the_earth_are_read_on_a_curved_grid),
        FOLDER_TEST(a_grid_needs_a_position),
        FOLDER_TEST(a_position_beyond_the_earth_is_refused),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
