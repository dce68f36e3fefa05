/* NetCDF is read as its attributes say, or refused. */
#include "support/cdl.h"

#include "formats/netcdf_in.h"

static lee_netcdf *open_as(const char *kind, const char *text) {
    lee_netcdf *file = NULL;
    lee_error error = {0};
    const char *path = folder_write_cdl(&folder, "a.nc", kind, text);
    (void)lee_netcdf_open(path, &file, &error);
    assert_string_equal(error.message, "");
    assert_non_null(file);
    return file;
}

/* Reads all of the variable v. */
static void read_v(const lee_netcdf *file, double values[]) {
    const lee_netcdf_variable *v = lee_netcdf_find(file, "v");
    lee_error error = {0};
    assert_non_null(v);
    const lee_netcdf_box box = lee_netcdf_whole(v);
    (void)lee_netcdf_read(file, v, &box, NULL, values, &error);
    assert_string_equal(error.message, "");
}

static void assert_reads(const char *kind, const char *text, size_t n,
                         const double expected[]) {
    double values[16] = {0.0};
    lee_netcdf *file = open_as(kind, text);
    read_v(file, values);
    lee_netcdf_close(file);
    for (size_t i = 0; i < n; i++) {
        if (isnan(expected[i])) {
            assert_true(isnan(values[i]));
        } else {
            /* One multiplication and one addition. */
            assert_near(values[i], expected[i], 1e-12);
        }
    }
}

static const char *const kinds[] = {"classic", "64-bit-offset", "64-bit-data",
                                    "netCDF-4"};

static void every_kind_of_file_is_read(void **state) {
    (void)state;
    static const double expected[] = {1.5, -2.0, 3.25};
    for (size_t i = 0; i < sizeof kinds / sizeof kinds[0]; i++) {
        assert_reads(kinds[i],
                     "dimensions: n = 3; variables: double v(n);"
                     "data: v = 1.5, -2, 3.25;",
                     3, expected);
    }
}

static void every_type_of_number_is_read(void **state) {
    (void)state;
    static const double expected[] = {1.0, 2.0};
    static const char *const types[] = {"byte",   "short", "int",
                                        "float",  "ubyte", "int64",
                                        "ushort", "uint",  "uint64"};
    for (size_t i = 0; i < sizeof types / sizeof types[0]; i++) {
        char text[128];
        (void)snprintf(text, sizeof text,
                       "dimensions: n = 2; variables: %s v(n); data: v = 1, 2;",
                       types[i]);
        assert_reads("netCDF-4", text, 2, expected);
    }
}

static void packed_values_are_unpacked(void **state) {
    (void)state;
    static const double expected[] = {273.15, 283.15, 263.15};
    assert_reads("classic",
                 "dimensions: n = 3; variables: short v(n);"
                 "v:scale_factor = 0.01; v:add_offset = 273.15;"
                 "data: v = 0, 1000, -1000;",
                 3, expected);
}

static void a_fill_value_is_missing_before_it_is_unpacked(void **state) {
    (void)state;
    static const double expected[] = {NAN, -99.0};
    assert_reads("classic",
                 "dimensions: n = 2; variables: short v(n);"
                 "v:_FillValue = -99s; v:scale_factor = 2.; v:add_offset = -1.;"
                 "data: v = -99, -49;",
                 2, expected);
}

static void each_missing_value_is_missing(void **state) {
    (void)state;
    static const double expected[] = {1.0, NAN, NAN, NAN, 5.0};
    assert_reads("classic",
                 "dimensions: n = 5; variables: int v(n);"
                 "v:_FillValue = 4; v:missing_value = 2, 3;"
                 "data: v = 1, 2, 3, 4, 5;",
                 5, expected);
}

/* -999.9 as a double is not the float that stands in the file. */
static void a_missing_value_of_another_type_is_compared_as_stored(void **s) {
    (void)s;
    static const double expected[] = {NAN, 1.0};
    assert_reads("classic",
                 "dimensions: n = 2; variables: float v(n);"
                 "v:missing_value = -999.9; data: v = -999.9f, 1;",
                 2, expected);
}

static void a_value_never_written_is_missing(void **state) {
    (void)state;
    static const double expected[] = {7.0, NAN};
    static const char *const types[] = {"short", "int",    "float", "double",
                                        "int64", "ushort", "uint",  "uint64"};
    for (size_t i = 0; i < sizeof types / sizeof types[0]; i++) {
        char text[128];
        (void)snprintf(text, sizeof text,
                       "dimensions: n = 2; variables: %s v(n); data: v = 7, _;",
                       types[i]);
        assert_reads("netCDF-4", text, 2, expected);
    }
}

static void every_byte_is_a_value_without_a_fill(void **state) {
    (void)state;
    static const double expected[] = {-127.0, -128.0};
    assert_reads("classic",
                 "dimensions: n = 2; variables: byte v(n);"
                 "data: v = -127, -128;",
                 2, expected);
}

static void not_a_number_is_missing(void **state) {
    (void)state;
    static const double expected[] = {NAN, 1.0};
    assert_reads("classic",
                 "dimensions: n = 2; variables: float v(n);"
                 "data: v = NaNf, 1;",
                 2, expected);
}

static void the_valid_range_is_that_of_stored_values(void **state) {
    (void)state;
    static const double expected[] = {NAN, 10.0, 20.0, NAN};
    assert_reads("classic",
                 "dimensions: n = 4; variables: short v(n);"
                 "v:valid_range = 1s, 2s; v:scale_factor = 10.;"
                 "data: v = 0, 1, 2, 3;",
                 4, expected);
    assert_reads("classic",
                 "dimensions: n = 4; variables: short v(n);"
                 "v:valid_min = 1s; v:valid_max = 2s; v:scale_factor = 10.;"
                 "data: v = 0, 1, 2, 3;",
                 4, expected);
}

static void signed_bytes_may_stand_for_unsigned(void **state) {
    (void)state;
    static const double expected[] = {NAN, 20.0, 12.8};
    assert_reads("classic",
                 "dimensions: n = 3; variables: byte v(n);"
                 "v:_Unsigned = \"true\"; v:_FillValue = -1b;"
                 "v:scale_factor = 0.1;"
                 "data: v = -1, -56, -128;",
                 3, expected);
}

static void unsigned_bytes_may_stand_for_signed(void **state) {
    (void)state;
    static const double expected[] = {127.0, -128.0, -1.0};
    assert_reads("netCDF-4",
                 "dimensions: n = 3; variables: ubyte v(n);"
                 "v:_Unsigned = \"false\"; data: v = 127, 128, 255;",
                 3, expected);
}

static void a_scalar_is_read(void **state) {
    (void)state;
    static const double expected[] = {47.5};
    assert_reads("classic", "variables: float v; data: v = 47.5;", 1, expected);
}

static void codes_of_the_caller_are_missing_too(void **state) {
    (void)state;
    static const double code[] = {-70.0};
    const lee_netcdf_codes codes = {1, code};
    double values[2];
    lee_netcdf *file =
        open_as("classic", "dimensions: n = 2; variables: float v(n);"
                           "v:scale_factor = 2.f; data: v = -70, 5;");
    const lee_netcdf_variable *v = lee_netcdf_find(file, "v");
    const lee_netcdf_box box = lee_netcdf_whole(v);
    assert_int_equal(lee_netcdf_read(file, v, &box, &codes, values, NULL),
                     LEE_OK);
    assert_true(isnan(values[0]));
    assert_near(values[1], 10.0, 0.0);
    lee_netcdf_close(file);
}

/* v(t, y, x) = 100 t + 10 y + x, in chunks of each shape. */
static void a_box_is_the_same_however_it_is_stored(void **state) {
    (void)state;
    static const char *const stored[] = {
        "", "v:_ChunkSizes = 1, 4, 5;", "v:_ChunkSizes = 30, 1, 1;",
        "v:_ChunkSizes = 7, 3, 2; v:_DeflateLevel = 1;"};
    for (size_t k = 0; k < sizeof stored / sizeof stored[0]; k++) {
        char text[16384];
        size_t length = (size_t)snprintf(
            text, sizeof text,
            "dimensions: t = 30; y = 4; x = 5; variables: float v(t, y, x);"
            "%s data: v =",
            stored[k]);
        for (int i = 0; i < 600; i++) {
            length += (size_t)snprintf(text + length, sizeof text - length,
                                       "%s%d", i == 0 ? " " : ", ",
                                       i / 20 * 100 + i / 5 % 4 * 10 + i % 5);
        }
        (void)snprintf(text + length, sizeof text - length, ";");
        lee_netcdf *file = open_as("netCDF-4", text);
        const lee_netcdf_box box = {
            .start = {3,  1, 2},
              .count = {25, 2, 3}
        };
        double values[150];
        assert_int_equal(lee_netcdf_read(file, lee_netcdf_find(file, "v"), &box,
                                         NULL, values, NULL),
                         LEE_OK);
        for (int i = 0; i < 150; i++) {
            assert_near(values[i],
                        (3 + i / 6) * 100 + (1 + i / 3 % 2) * 10 + 2 + i % 3,
                        0.0);
        }
        lee_netcdf_close(file);
    }
}

static void assert_attribute(const lee_netcdf *file, const char *variable,
                             const char *name, const char *expected) {
    char *text = NULL;
    assert_int_equal(
        lee_netcdf_attribute(
            file, variable == NULL ? NULL : lee_netcdf_find(file, variable),
            name, &text, NULL),
        LEE_OK);
    if (expected == NULL) {
        assert_null(text);
    } else {
        assert_non_null(text);
        assert_string_equal(text, expected);
    }
    free(text);
}

static void attributes_are_text_of_either_kind(void **state) {
    (void)state;
    lee_netcdf *file =
        open_as("netCDF-4", "variables: int v; v:units = \"m s-1\";"
                            "string v:long_name = \"wind\", \"speed\";"
                            "v:blank = \" x \\n\"; v:number = 3;"
                            ":title = \"all\";");
    assert_attribute(file, "v", "units", "m s-1");
    assert_attribute(file, "v", "long_name", "wind speed");
    assert_attribute(file, "v", "blank", "x");
    assert_attribute(file, "v", "number", NULL);
    assert_attribute(file, "v", "absent", NULL);
    assert_attribute(file, NULL, "title", "all");
    double number = 0.0;
    assert_true(
        lee_netcdf_number(file, lee_netcdf_find(file, "v"), "number", &number));
    assert_near(number, 3.0, 0.0);
    assert_false(
        lee_netcdf_number(file, lee_netcdf_find(file, "v"), "units", &number));
    lee_netcdf_close(file);
}

static void names_are_read_as_characters_and_as_strings(void **state) {
    (void)state;
    static const char *const texts[] = {
        "dimensions: n = 2; l = 6; variables: char v(n, l);"
        "data: v = \"quay\", \"lee  \";",
        "dimensions: n = 2; variables: string v(n);"
        "data: v = \"quay\", \"lee\";"};
    for (size_t i = 0; i < 2; i++) {
        lee_netcdf *file = open_as("netCDF-4", texts[i]);
        char **names = NULL;
        size_t count = 0;
        assert_int_equal(lee_netcdf_texts(file, lee_netcdf_find(file, "v"),
                                          &count, &names, NULL),
                         LEE_OK);
        assert_int_equal(count, 2);
        assert_string_equal(names[0], "quay");
        assert_string_equal(names[1], "lee");
        lee_netcdf_texts_free(count, names);
        lee_netcdf_close(file);
    }
}

static void variables_of_groups_are_found_by_their_path(void **state) {
    (void)state;
    lee_netcdf *file =
        open_as("netCDF-4", "dimensions: n = 1; group: a { group: b {"
                            "variables: double v(n); data: v = 4; } }");
    const lee_netcdf_variable *v = lee_netcdf_find(file, "a/b/v");
    assert_non_null(v);
    assert_string_equal(v->dimension[0].name, "n");
    const lee_netcdf_box box = lee_netcdf_whole(v);
    double value = 0.0;
    assert_int_equal(lee_netcdf_read(file, v, &box, NULL, &value, NULL),
                     LEE_OK);
    assert_near(value, 4.0, 0.0);
    lee_netcdf_close(file);
}

static void assert_unreadable(const char *kind, const char *text,
                              const char *why) {
    lee_netcdf *file = open_as(kind, text);
    const lee_netcdf_variable *v = lee_netcdf_find(file, "v");
    const lee_netcdf_box box = lee_netcdf_whole(v);
    double values[16];
    lee_error error = {0};
    assert_int_equal(lee_netcdf_read(file, v, &box, NULL, values, &error),
                     LEE_ERR_FORMAT);
    if (strstr(error.message, why) == NULL) {
        print_error("told as: %s\n", error.message);
        fail();
    }
    assert_int_equal(strncmp(error.message, folder.path, strlen(folder.path)),
                     0);
    lee_netcdf_close(file);
}

static void packing_that_makes_no_sense_is_refused(void **state) {
    (void)state;
    assert_unreadable("classic",
                      "dimensions: n = 1; variables: short v(n);"
                      "v:scale_factor = 0.; data: v = 1;",
                      "packed by scale_factor 0");
    assert_unreadable("classic",
                      "dimensions: n = 1; variables: short v(n);"
                      "v:add_offset = NaN; data: v = 1;",
                      "makes no sense");
    assert_unreadable("classic",
                      "dimensions: n = 1; variables: short v(n);"
                      "v:missing_value = \"none\"; data: v = 1;",
                      "that is no number");
}

static void text_is_not_read_as_numbers(void **state) {
    (void)state;
    assert_unreadable("classic",
                      "dimensions: n = 4; variables: char v(n);"
                      "data: v = \"quay\";",
                      "does not hold numbers");
}

/* 300 MiB a chunk, claimed by a few bytes of header. */
static void a_chunk_too_large_for_memory_is_refused(void **state) {
    (void)state;
    assert_unreadable("netCDF-4",
                      "dimensions: n = 1; m = 78643200;"
                      "variables: float v(n, m); v:_ChunkSizes = 1, 78643200;"
                      "v:_NoFill = \"true\";",
                      "is stored in chunks of 300 MiB");
}

static void assert_no_file(const char *path, lee_status status,
                           const char *why) {
    lee_netcdf *file = NULL;
    lee_error error = {0};
    assert_int_equal(lee_netcdf_open(path, &file, &error), status);
    assert_null(file);
    if (strstr(error.message, why) == NULL) {
        print_error("%s is told as: %s\n", path, error.message);
        fail();
    }
}

static void what_is_no_file_on_this_machine_is_refused(void **state) {
    (void)state;
    assert_no_file("no-such-file.nc", LEE_ERR_FILE, "cannot be opened");
    assert_no_file(folder.path, LEE_ERR_FILE, "is a directory");
    assert_no_file("/dev/null", LEE_ERR_FILE, "is a pipe or a device");
    assert_no_file("https://127.0.0.1/a.nc", LEE_ERR_FILE, "is an address");
    assert_no_file("file://a.nc#mode=zarr", LEE_ERR_FILE, "is an address");
    assert_no_file("a.nc#mode=bytes", LEE_ERR_FILE, "is an address");
}

static void what_is_no_netcdf_is_refused(void **state) {
    (void)state;
    assert_no_file(folder_write(&folder, "b.nc", ""), LEE_ERR_FORMAT,
                   "is empty");
    assert_no_file(folder_write(&folder, "b.nc", "time,speed\n"),
                   LEE_ERR_FORMAT, "does not begin like a NetCDF file");
    assert_no_file(folder_write(&folder, "b.nc", "CDF"), LEE_ERR_FORMAT,
                   "has no end");
    assert_no_file(folder_write(&folder, "b.nc", "CDF\x03nonsense"),
                   LEE_ERR_FORMAT, "makes no sense");
    assert_no_file(folder_write(&folder, "b.nc", "\211HDF\r\n\032\nnonsense"),
                   LEE_ERR_FORMAT, "cannot be read: NetCDF");
}

/* Cuts a file of 1000 shorts here and there: none is read as zeros. */
static void a_classic_file_cut_anywhere_is_refused(void **state) {
    (void)state;
    static const char *const shapes[] = {"n = 1000", "n = UNLIMITED"};
    for (size_t k = 0; k < 6; k++) {
        char text[8192];
        size_t length = (size_t)snprintf(
            text, sizeof text,
            "dimensions: %s; variables: short v(n); v:units = \"m\"; int w(n);"
            "data: v = 1",
            shapes[k % 2]);
        for (int i = 1; i < 1000; i++) {
            length += (size_t)snprintf(text + length, sizeof text - length,
                                       ", %d", i % 7);
        }
        (void)snprintf(text + length, sizeof text - length, "; w = 1;");
        const char *path =
            folder_write_cdl(&folder, "a.nc", kinds[k / 2], text);
        FILE *stream = fopen(path, "rb");
        assert_non_null(stream);
        static char bytes[65536];
        const size_t size = fread(bytes, 1, sizeof bytes, stream);
        assert_int_equal(fclose(stream), 0);
        for (size_t cut = 0; cut + 4 < size; cut += 61) {
            lee_netcdf *file = NULL;
            const char *cut_path =
                folder_write_bytes(&folder, "cut.nc", cut, bytes);
            assert_int_equal(lee_netcdf_open(cut_path, &file, NULL),
                             LEE_ERR_FORMAT);
            assert_null(file);
        }
    }
}

int main(void) {
    const struct CMUnitTest tests[] = {
        FOLDER_TEST(every_kind_of_file_is_read),
        FOLDER_TEST(every_type_of_number_is_read),
        FOLDER_TEST(packed_values_are_unpacked),
        FOLDER_TEST(a_fill_value_is_missing_before_it_is_unpacked),
        FOLDER_TEST(each_missing_value_is_missing),
        FOLDER_TEST(a_missing_value_of_another_type_is_compared_as_stored),
        FOLDER_TEST(a_value_never_written_is_missing),
        FOLDER_TEST(every_byte_is_a_value_without_a_fill),
        FOLDER_TEST(not_a_number_is_missing),
        FOLDER_TEST(the_valid_range_is_that_of_stored_values),
        FOLDER_TEST(signed_bytes_may_stand_for_unsigned),
        FOLDER_TEST(unsigned_bytes_may_stand_for_signed),
        FOLDER_TEST(a_scalar_is_read),
        FOLDER_TEST(codes_of_the_caller_are_missing_too),
        FOLDER_TEST(a_box_is_the_same_however_it_is_stored),
        FOLDER_TEST(attributes_are_text_of_either_kind),
        FOLDER_TEST(names_are_read_as_characters_and_as_strings),
        FOLDER_TEST(variables_of_groups_are_found_by_their_path),
        FOLDER_TEST(packing_that_makes_no_sense_is_refused),
        FOLDER_TEST(text_is_not_read_as_numbers),
        FOLDER_TEST(a_chunk_too_large_for_memory_is_refused),
        FOLDER_TEST(what_is_no_file_on_this_machine_is_refused),
        FOLDER_TEST(what_is_no_netcdf_is_refused),
        FOLDER_TEST(a_classic_file_cut_anywhere_is_refused),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
