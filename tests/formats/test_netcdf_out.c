/* NetCDF files appear whole or not at all, hold what was put and nothing
 * that depends on the day. NetCDF-C reads them back. */
#include "support/files.h"

#include <float.h>
#include <sys/stat.h>
#include <unistd.h>

#include <netcdf.h>

#include "formats/netcdf_out.h"

/* A file of two names and a 2 by 3 field with a gap. */
static lee_status write_small(const char *path, bool is_large, double odd,
                              lee_error *error) {
    lee_netcdf_out out;
    lee_status status = lee_netcdf_create(path, false, is_large, &out, error);
    if (status != LEE_OK) {
        return status;
    }
    const int row = lee_netcdf_dimension(&out, "row", 2);
    const int column = lee_netcdf_dimension(&out, "column", 3);
    const int length = lee_netcdf_dimension(&out, "length", 4);
    const lee_netcdf_shape field = {
        .dimensions = 2,
        .dimension = {row, column},
        .chunk = {1,   3     },
    };
    const lee_netcdf_shape names = {
        .kind = LEE_NETCDF_CHAR,
        .dimensions = 2,
        .dimension = {row, length},
    };
    const lee_netcdf_shape flags = {
        .kind = LEE_NETCDF_BYTE,
        .dimensions = 1,
        .dimension = {row},
    };
    const lee_netcdf_shape scalar = {.dimensions = 0};
    const int level = lee_netcdf_variable(&out, "level", &field, true);
    const int name = lee_netcdf_variable(&out, "name", &names, false);
    const int flag = lee_netcdf_variable(&out, "flag", &flags, false);
    const int height = lee_netcdf_variable(&out, "height", &scalar, false);
    lee_netcdf_put_text(&out, level, "units", "m");
    lee_netcdf_put_text(&out, LEE_NETCDF_GLOBAL, "title", "a\tb\xFFz");
    lee_netcdf_put_text(&out, LEE_NETCDF_GLOBAL, "absent", NULL);
    lee_netcdf_end_definitions(&out, 0);
    const size_t start[] = {0, 0};
    const size_t count[] = {2, 3};
    const double values[] = {1.0, (double)NAN, 3.0, 4.0, 5.0, 6.0};
    const double set[] = {1.0, odd};
    const double ten = 10.0;
    lee_netcdf_put_block(&out, level, start, count, values);
    lee_netcdf_put_block(&out, flag, start, count, set);
    lee_netcdf_put_block(&out, height, NULL, NULL, &ten);
    lee_netcdf_put_name(&out, name, 0, 4, "quay");
    lee_netcdf_put_name(&out, name, 1, 4, "abc\xC3\xA9");
    return lee_netcdf_commit(&out, error);
}

static int open_small(test_folder *in, const char *name, bool is_large) {
    lee_error error = {0};
    char path[512];
    int id;
    (void)snprintf(path, sizeof path, "%s/%s", in->path, name);
    if (write_small(path, is_large, 0.0, &error) != LEE_OK) {
        fail_msg("%s", error.message);
    }
    assert_int_equal(nc_open(path, NC_NOWRITE, &id), NC_NOERR);
    (void)unlink(path);
    return id;
}

static void numbers_come_back_to_the_bit(void **state) {
    const int id = open_small(*state, "a.nc", false);
    double read[6];
    int level;
    assert_int_equal(nc_inq_varid(id, "level", &level), NC_NOERR);
    assert_int_equal(nc_get_var_double(id, level, read), NC_NOERR);
    assert_true(read[0] == 1.0 && read[5] == 6.0);
    assert_int_equal(nc_close(id), NC_NOERR);
}

static void what_is_not_known_is_the_fill_value(void **state) {
    const int id = open_small(*state, "a.nc", false);
    const size_t at[] = {0, 1};
    double read = 0.0;
    double fill = 1.0;
    int level;
    assert_int_equal(nc_inq_varid(id, "level", &level), NC_NOERR);
    assert_int_equal(nc_get_var1_double(id, level, at, &read), NC_NOERR);
    assert_int_equal(nc_get_att_double(id, level, "_FillValue", &fill),
                     NC_NOERR);
    assert_true(read == fill);
    assert_int_equal(nc_close(id), NC_NOERR);
}

static void a_large_file_holds_the_same_and_is_deflated(void **state) {
    const int id = open_small(*state, "a.nc", true);
    double read[6];
    int level;
    int format;
    int shuffled;
    int deflated;
    int degree;
    assert_int_equal(nc_inq_format(id, &format), NC_NOERR);
    assert_int_equal(format, NC_FORMAT_NETCDF4_CLASSIC);
    assert_int_equal(nc_inq_varid(id, "level", &level), NC_NOERR);
    assert_int_equal(
        nc_inq_var_deflate(id, level, &shuffled, &deflated, &degree), NC_NOERR);
    assert_true(shuffled && deflated);
    assert_int_equal(nc_get_var_double(id, level, read), NC_NOERR);
    assert_true(read[0] == 1.0 && read[5] == 6.0);
    assert_int_equal(nc_close(id), NC_NOERR);
}

static void texts_hold_neither_control_bytes_nor_broken_characters(void **s) {
    const int id = open_small(*s, "a.nc", false);
    char title[16] = "";
    assert_int_equal(nc_get_att_text(id, NC_GLOBAL, "title", title), NC_NOERR);
    assert_string_equal(title, "a b\xEF\xBF\xBDz");
    assert_int_equal(nc_close(id), NC_NOERR);
}

static void a_text_that_is_not_there_is_left_out(void **state) {
    const int id = open_small(*state, "a.nc", false);
    size_t length;
    assert_int_equal(nc_inq_attlen(id, NC_GLOBAL, "absent", &length),
                     NC_ENOTATT);
    assert_int_equal(nc_close(id), NC_NOERR);
}

static void a_name_is_cut_at_a_whole_character(void **state) {
    const int id = open_small(*state, "a.nc", false);
    char read[2][4];
    int name;
    assert_int_equal(nc_inq_varid(id, "name", &name), NC_NOERR);
    assert_int_equal(nc_get_var_text(id, name, read[0]), NC_NOERR);
    assert_memory_equal(read[0], "quay", 4);
    assert_memory_equal(read[1], "abc\0", 4);
    assert_int_equal(nc_close(id), NC_NOERR);
}

static void read_bytes(const char *path, size_t size, unsigned char bytes[],
                       size_t *length) {
    FILE *file = fopen(path, "rb");
    assert_non_null(file);
    *length = fread(bytes, 1, size, file);
    (void)fclose(file);
    (void)unlink(path);
}

static void check_same_bytes(test_folder *in, bool is_large) {
    static unsigned char bytes[2][65536];
    size_t length[2];
    char path[512];
    for (int i = 0; i < 2; i++) {
        (void)snprintf(path, sizeof path, "%s/%d.nc", in->path, i);
        assert_int_equal(write_small(path, is_large, 0.0, NULL), LEE_OK);
        read_bytes(path, sizeof bytes[i], bytes[i], &length[i]);
    }
    assert_true(length[0] > 100 && length[0] < sizeof bytes[0]);
    assert_int_equal(length[0], length[1]);
    assert_memory_equal(bytes[0], bytes[1], length[0]);
}

static void the_same_calls_give_the_same_bytes(void **state) {
    check_same_bytes(*state, false);
}

static void the_same_calls_give_the_same_bytes_when_large(void **state) {
    check_same_bytes(*state, true);
}

static void a_flag_that_is_no_whole_number_is_refused(void **state) {
    test_folder *in = *state;
    lee_error error = {0};
    char path[512];
    struct stat about;
    (void)snprintf(path, sizeof path, "%s/odd.nc", in->path);
    assert_int_equal(write_small(path, false, 0.5, &error), LEE_ERR_DATA);
    assert_non_null(strstr(error.message, "variable 'flag' cannot hold 0.5"));
    assert_int_equal(stat(path, &about), -1); /* and there is no file */
}

static void nothing_known_in_a_flag_is_refused(void **state) {
    test_folder *in = *state;
    char path[512];
    (void)snprintf(path, sizeof path, "%s/odd.nc", in->path);
    assert_int_equal(write_small(path, false, (double)NAN, NULL), LEE_ERR_DATA);
}

static void a_file_that_exists_is_kept(void **state) {
    test_folder *in = *state;
    const char *path = folder_write(in, "there.nc", "mine");
    struct stat about;
    assert_int_equal(write_small(path, false, 0.0, NULL), LEE_ERR_FILE);
    assert_int_equal(stat(path, &about), 0);
    assert_int_equal(about.st_size, 4);
}

static void standard_output_is_refused(void **state) {
    (void)state;
    assert_int_equal(write_small("-", false, 0.0, NULL), LEE_ERR_ARGUMENT);
}

static void what_is_discarded_leaves_no_file(void **state) {
    test_folder *in = *state;
    lee_netcdf_out out;
    char path[512];
    (void)snprintf(path, sizeof path, "%s/gone.nc", in->path);
    assert_int_equal(lee_netcdf_create(path, false, true, &out, NULL), LEE_OK);
    (void)lee_netcdf_dimension(&out, "row", 2);
    lee_netcdf_discard(&out);
    assert_int_equal(rmdir(in->path), 0); /* nothing is left in it */
    assert_int_equal(mkdir(in->path, 0700), 0);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        FOLDER_TEST(numbers_come_back_to_the_bit),
        FOLDER_TEST(what_is_not_known_is_the_fill_value),
        FOLDER_TEST(a_large_file_holds_the_same_and_is_deflated),
        FOLDER_TEST(texts_hold_neither_control_bytes_nor_broken_characters),
        FOLDER_TEST(a_text_that_is_not_there_is_left_out),
        FOLDER_TEST(a_name_is_cut_at_a_whole_character),
        FOLDER_TEST(the_same_calls_give_the_same_bytes),
        FOLDER_TEST(the_same_calls_give_the_same_bytes_when_large),
        FOLDER_TEST(a_flag_that_is_no_whole_number_is_refused),
        FOLDER_TEST(nothing_known_in_a_flag_is_refused),
        FOLDER_TEST(a_file_that_exists_is_kept),
        cmocka_unit_test(standard_output_is_refused),
        FOLDER_TEST(what_is_discarded_leaves_no_file),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
