/* damage.h - NetCDF files of three kinds, and damage done to them by lot. */
#ifndef LEEWATER_TESTS_DAMAGE_H
#define LEEWATER_TESTS_DAMAGE_H

#include "support/cdl.h"
#include "support/dice.h"

#include "leewater/wind.h"

enum { DAMAGE_KINDS = 3, DAMAGE_ROOM = 262144, DAMAGE_TEXT = 32768 };

static const char *const damage_kind[DAMAGE_KINDS] = {"classic", "NetCDF-4",
                                                      "NetCDF-4, deflated"};

/* A record of 400 times with attributes of every kind. */
static inline const char *damage_base(test_folder *in, size_t kind) {
    static char text[DAMAGE_TEXT];
    const char *chunks = kind == 2 ? " u:_ChunkSizes = 64; u:_DeflateLevel = 5;"
                                     " u:_Shuffle = \"true\";"
                                   : "";
    const char *string = kind == 0 ? "" : "string ";
    size_t n = (size_t)snprintf(
        text, sizeof text,
        "dimensions: time = UNLIMITED; l = 5; variables: double time(time);"
        " time:units = \"hours since 2031-01-10\";"
        " float u(time); %su:standard_name = \"eastward_wind\";"
        " u:units = \"m s-1\"; u:valid_range = -90.f, 90.f;%s"
        " short v(time); v:standard_name = \"northward_wind\";"
        " %sv:units = \"m s-1\"; v:scale_factor = 0.01; char station(l);"
        " :title = \"A record\"; %s:history = \"made\", \"kept\"; data: time =",
        string, chunks, string, string);
    if (kind == 0) { /* a list of strings is no classic attribute */
        char *list = strstr(text, ", \"kept\"");
        memset(list, ' ', strlen(", \"kept\""));
    }
    for (int column = 0; column < 3; column++) {
        for (int i = 0; i < 400; i++) {
            const int value = column == 0   ? i
                              : column == 1 ? i % 37 - 18
                                            : i * 7 % 2000 - 1000;
            n += (size_t)snprintf(text + n, sizeof text - n, "%s%d",
                                  i == 0 ? " " : ",", value);
        }
        n += (size_t)snprintf(text + n, sizeof text - n, "; %s",
                              column == 0   ? "u ="
                              : column == 1 ? "v ="
                                            : "station = \"quay\";");
    }
    return folder_write_cdl(in, "base.nc", kind == 0 ? "classic" : "netCDF-4",
                            text);
}

static inline size_t damage_load(const char *path, char bytes[DAMAGE_ROOM]) {
    FILE *stream = fopen(path, "rb");
    assert_non_null(stream);
    const size_t size = fread(bytes, 1, DAMAGE_ROOM, stream);
    assert_int_equal(fclose(stream), 0);
    assert_true(size > 0 && size < DAMAGE_ROOM);
    return size;
}

/* Single bytes changed, a stretch wiped, or the end cut off; half of it in the
 * first 2 kB, where the structure is. Returns the new size. */
static inline size_t damage_do(dice *d, size_t size, char bytes[]) {
    const int last = draw(d, 1) == 0 && size > 2048 ? 2047 : (int)size - 1;
    const int way = draw(d, 9);
    if (way == 0) {
        return (size_t)draw(d, (int)size - 1);
    }
    if (way == 1) {
        const int from = draw(d, last);
        const int length = draw(d, 63);
        for (int i = from; i < from + length && (size_t)i < size; i++) {
            bytes[i] = (char)(draw(d, 1) == 0 ? 0 : -1);
        }
        return size;
    }
    const int count = 1 + draw(d, 15);
    for (int i = 0; i < count; i++) {
        bytes[draw(d, last)] = (char)draw(d, 255);
    }
    return size;
}

typedef struct damage_tally {
    int read;    /* as if nothing were wrong: the damage hit numbers alone */
    int refused; /* by a message of the reader */
    int broke;   /* the child died or was stopped */
    int untold;  /* neither read nor told with the file's name: none may be */
} damage_tally;

/* Damages a kind of file `count` times, and reads each apart. */
static inline damage_tally damage_many(test_folder *in, size_t kind, int count,
                                       dice *d) {
    static char whole[DAMAGE_ROOM];
    static char hurt[DAMAGE_ROOM];
    const lee_wind_netcdf how = {.is_apart = true};
    const size_t size = damage_load(damage_base(in, kind), whole);
    damage_tally tally = {0};
    for (int i = 0; i < count; i++) {
        memcpy(hurt, whole, size);
        const size_t left = damage_do(d, size, hurt);
        const char *path = folder_write_bytes(in, "hurt.nc", left, hurt);
        lee_wind_record record;
        lee_error error = {0};
        const lee_status status =
            lee_wind_read_netcdf(path, &how, &record, NULL, &error);
        if (status == LEE_OK) {
            tally.read++;
        } else if (strncmp(error.message, path, strlen(path)) != 0) {
            print_error("untold: %s\n", error.message);
            tally.untold++;
        } else if (strstr(error.message, "broke down") != NULL ||
                   strstr(error.message, "nothing came of it") != NULL) {
            tally.broke++;
        } else {
            tally.refused++;
        }
        lee_wind_record_free(&record);
    }
    return tally;
}

#endif
