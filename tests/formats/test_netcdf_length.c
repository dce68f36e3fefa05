/* The length of a classic file follows from its header alone. */
#include "support/damage.h"

#include "formats/netcdf/length.h"

static const char *const kinds[] = {"classic", "64-bit-offset", "64-bit-data"};

static size_t load(const char *kind, const char *text,
                   char bytes[DAMAGE_ROOM]) {
    return damage_load(folder_write_cdl(&folder, "a.nc", kind, text), bytes);
}

static lee_netcdf_head read_head(size_t size, const char bytes[],
                                 uint64_t *needed) {
    return lee_netcdf_read_head(size, (const unsigned char *)bytes, needed);
}

/* The library pads what it writes to four bytes; the header asks for the data
 * alone. */
static void a_file_is_as_long_as_its_header_says(void **state) {
    (void)state;
    static const char *const texts[] = {
        "dimensions: n = 1000; variables: double v(n); v:units = \"m s-1\";",
        "dimensions: n = 3; m = 5; variables: short v(n, m); int w;"
        " data: v = 1; w = 2;",
        "dimensions: t = UNLIMITED; n = 3; variables: float v(t, n); int w(t);"
        " data: v = 1, 2, 3, 4, 5, 6; w = 1, 2;",
        "dimensions: t = UNLIMITED; variables: short v(t); :title = \"x\";"
        " data: v = 1, 2, 3, 4, 5, 6, 7;",
        "dimensions: t = UNLIMITED; variables: byte b(t); short v(t);"
        " data: b = 1, 2, 3; v = 1, 2, 3;",
        ":title = \"nothing but this\";",
    };
    static char bytes[DAMAGE_ROOM];
    for (size_t k = 0; k < 3; k++) {
        for (size_t i = 0; i < sizeof texts / sizeof texts[0]; i++) {
            const size_t size = load(kinds[k], texts[i], bytes);
            uint64_t needed = 0;
            assert_int_equal(read_head(size, bytes, &needed),
                             LEE_NETCDF_HEAD_WHOLE);
            assert_true(needed <= size && needed + 4 > size);
        }
    }
}

/* CDF-1 by hand: 2^31 - 1 records of 2^31 - 4 bytes, far more than a disk. */
static void claims_beyond_all_measure_do_not_wrap(void **state) {
    (void)state;
    static const unsigned char head[] =
        "CDF\001\x7f\xff\xff\xff"               /* records    */
        "\0\0\0\012\0\0\0\002"                  /* dimensions */
        "\0\0\0\001t\0\0\0\0\0\0\0"             /* t, records */
        "\0\0\0\001n\0\0\0\x7f\xff\xff\xfc"     /* n          */
        "\0\0\0\0\0\0\0\0"                      /* attributes */
        "\0\0\0\013\0\0\0\001"                  /* a variable */
        "\0\0\0\001v\0\0\0\0\0\0\002"           /* v          */
        "\0\0\0\0\0\0\0\001"                    /* (t, n)     */
        "\0\0\0\0\0\0\0\0"                      /* attributes */
        "\0\0\0\006\xff\xff\xff\xff\0\0\0\x80"; /* doubles */
    uint64_t needed = 0;
    assert_int_equal(lee_netcdf_read_head(sizeof head - 1, head, &needed),
                     LEE_NETCDF_HEAD_WHOLE);
    /* (2^31 - 1) (2^31 - 4) 8 bytes are more than 2^60: the largest told. */
    assert_true(needed >= UINT64_C(1) << 60U && needed < UINT64_C(1) << 62U);
}

static void a_header_cut_anywhere_wants_more(void **state) {
    (void)state;
    static char bytes[DAMAGE_ROOM];
    for (size_t k = 0; k < 3; k++) {
        const size_t size =
            load(kinds[k],
                 "dimensions: n = 9; variables: int v(n);"
                 " v:units = \"m\"; :title = \"x\"; data: v = 1;",
                 bytes);
        for (size_t cut = 0; cut + 36 < size; cut++) {
            uint64_t needed = 0;
            assert_int_equal(read_head(cut, bytes, &needed),
                             LEE_NETCDF_HEAD_LONGER);
        }
    }
}

static void records_left_open_are_told(void **state) {
    (void)state;
    static char bytes[DAMAGE_ROOM];
    for (size_t k = 0; k < 3; k++) {
        const size_t size =
            load(kinds[k],
                 "dimensions: t = UNLIMITED; variables: int v(t);"
                 " data: v = 1, 2;",
                 bytes);
        uint64_t needed = 0;
        memset(bytes + 4, 0xff, k == 2 ? 8 : 4);
        assert_int_equal(read_head(size, bytes, &needed), LEE_NETCDF_HEAD_OPEN);
    }
}

/* The sanitizers watch. */
static void damaged_headers_are_judged_without_harm(void **state) {
    (void)state;
    static char whole[DAMAGE_ROOM];
    dice d = {5};
    int judged[LEE_NETCDF_HEAD_NO_MEMORY + 1] = {0};
    for (size_t k = 0; k < 3; k++) {
        const size_t size =
            load(kinds[k],
                 "dimensions: t = UNLIMITED; n = 3; variables: float v(t, n);"
                 " v:units = \"m s-1\"; v:valid_range = 1.f, 2.f; short w(t);"
                 " int x(n); :title = \"a\"; data: v = 1, 2, 3; w = 1; x = 1;",
                 whole);
        for (int i = 0; i < 20000; i++) {
            /* Of its own size, so that a byte too far is seen. */
            char *hurt = malloc(size);
            assert_non_null(hurt);
            memcpy(hurt, whole, size);
            const size_t left = damage_do(&d, size, hurt);
            uint64_t needed = 0;
            const lee_netcdf_head state_of = read_head(left, hurt, &needed);
            judged[state_of]++;
            assert_true(needed < UINT64_C(1) << 62U);
            free(hurt);
        }
    }
    assert_true(judged[LEE_NETCDF_HEAD_WHOLE] > 1000 &&
                judged[LEE_NETCDF_HEAD_LONGER] > 1000 &&
                judged[LEE_NETCDF_HEAD_DAMAGED] > 1000);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        FOLDER_TEST(a_file_is_as_long_as_its_header_says),
        FOLDER_TEST(claims_beyond_all_measure_do_not_wrap),
        FOLDER_TEST(a_header_cut_anywhere_wants_more),
        FOLDER_TEST(records_left_open_are_told),
        FOLDER_TEST(damaged_headers_are_judged_without_harm),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
