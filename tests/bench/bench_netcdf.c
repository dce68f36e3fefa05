/* bench_netcdf.c - a point series out of ten years of an hourly grid.
 *
 * Four ways to store the same grid; in each, this library's reader and three
 * ways to ask the NetCDF library itself for the series are timed in turn, and
 * the fastest of the three is the measure: the whole series at once, in blocks
 * of 1024 steps at the point, and in full slabs of which the point is picked.
 * All must come to the same sum. Memory is that of a process that does nothing
 * else. */
#include <math.h>
#include <stdbool.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>
#include <time.h>
#include <unistd.h>

#include <netcdf.h>

#include "formats/netcdf_in.h"

enum { STEPS = 87660, SIDE = 24, ROUNDS = 3, ROW = 11, COLUMN = 13 };

static const struct layout {
    const char *name;
    int format; /* of nc_create */
    size_t chunk[3];
    int deflate;
} layouts[] = {
    {"classic, record dimension",    NC_64BIT_OFFSET, {0},         0},
    {"chunks (1, 24, 24)",           NC_NETCDF4,      {1, 24, 24}, 0},
    {"chunks (1, 24, 24), deflated", NC_NETCDF4,      {1, 24, 24}, 1},
    {"chunks (744, 8, 8), deflated", NC_NETCDF4,      {744, 8, 8}, 1},
};
enum { LAYOUTS = sizeof layouts / sizeof layouts[0] };

/* A field that packs like one of nature's: smooth, in steps of 1/64. */
static void fill(size_t first, size_t count, float block[]) {
    for (size_t t = 0; t < count; t++) {
        for (size_t i = 0; i < (size_t)SIDE * SIDE; i++) {
            const double phase = 0.01 * (double)(first + t) +
                                 0.1 * (double)(i / SIDE + i % SIDE);
            block[t * SIDE * SIDE + i] =
                (float)(rint(640.0 * sin(phase)) / 64.0);
        }
    }
}

static bool write_grid(const char *path, const struct layout *how) {
    enum { BLOCK = 744 };
    static float block[(size_t)BLOCK * SIDE * SIDE];
    int file = 0;
    int dimension[3];
    int v = 0;
    bool is_done = nc_create(path, how->format, &file) == NC_NOERR &&
                   nc_def_dim(file, "time", NC_UNLIMITED, &dimension[0]) == 0 &&
                   nc_def_dim(file, "lat", SIDE, &dimension[1]) == 0 &&
                   nc_def_dim(file, "lon", SIDE, &dimension[2]) == 0 &&
                   nc_def_var(file, "v", NC_FLOAT, 3, dimension, &v) == 0;
    if (is_done && how->chunk[0] > 0) {
        is_done =
            nc_def_var_chunking(file, v, NC_CHUNKED, how->chunk) == 0 &&
            nc_def_var_deflate(file, v, how->deflate, how->deflate, 1) == 0;
    }
    is_done = is_done && nc_enddef(file) == NC_NOERR;
    for (size_t t = 0; t < STEPS && is_done; t += BLOCK) {
        const size_t count = STEPS - t < BLOCK ? STEPS - t : BLOCK;
        const size_t start[3] = {t, 0, 0};
        const size_t counts[3] = {count, SIDE, SIDE};
        fill(t, count, block);
        is_done = nc_put_vara_float(file, v, start, counts, block) == NC_NOERR;
    }
    return nc_close(file) == NC_NOERR && is_done;
}

static bool by_this_library(const char *path, double values[]) {
    lee_netcdf *file = NULL;
    if (lee_netcdf_open(path, &file, NULL) != LEE_OK) {
        return false;
    }
    const lee_netcdf_box box = {
        .start = {0,     ROW, COLUMN},
          .count = {STEPS, 1,   1     }
    };
    const bool is_read = lee_netcdf_read(file, lee_netcdf_find(file, "v"), &box,
                                         NULL, values, NULL) == LEE_OK;
    lee_netcdf_close(file);
    return is_read;
}

/* Blocks of `step` times, `rows` by `columns` from the given corner. */
static bool by_blocks(const char *path, size_t step, bool is_full,
                      double values[]) {
    int file = 0;
    int v = 0;
    const size_t width = is_full ? (size_t)SIDE * SIDE : 1;
    double *block = malloc(step * width * sizeof *block);
    bool is_read = block != NULL && nc_open(path, NC_NOWRITE, &file) == 0 &&
                   nc_inq_varid(file, "v", &v) == NC_NOERR;
    for (size_t t = 0; t < STEPS && is_read; t += step) {
        const size_t n = STEPS - t < step ? STEPS - t : step;
        const size_t start[3] = {t, is_full ? 0 : ROW, is_full ? 0 : COLUMN};
        const size_t count[3] = {n, is_full ? SIDE : 1, is_full ? SIDE : 1};
        is_read = nc_get_vara_double(file, v, start, count, block) == NC_NOERR;
        for (size_t i = 0; i < n; i++) {
            values[t + i] =
                block[i * width + (is_full ? (size_t)ROW * SIDE + COLUMN : 0)];
        }
    }
    free(block);
    return nc_close(file) == NC_NOERR && is_read;
}

static bool at_once(const char *path, double values[]) {
    return by_blocks(path, STEPS, false, values);
}
static bool point_blocks(const char *path, double values[]) {
    return by_blocks(path, 1024, false, values);
}
static bool full_slabs(const char *path, double values[]) {
    return by_blocks(path, 2048, true, values);
}

static const struct {
    const char *name;
    bool (*read)(const char *path, double values[]);
} ways[] = {
    {"leewater",     by_this_library},
    {"at once",      at_once        },
    {"point blocks", point_blocks   },
    {"full slabs",   full_slabs     },
};
enum { WAYS = sizeof ways / sizeof ways[0] };

static double seconds_now(void) {
    struct timespec now;
    (void)clock_gettime(CLOCK_MONOTONIC, &now);
    return (double)now.tv_sec + 1e-9 * (double)now.tv_nsec;
}

static int by_size(const void *a, const void *b) {
    const double x = *(const double *)a;
    const double y = *(const double *)b;
    return (x > y) - (x < y);
}

/* Peak memory of this process, MB: that of its own program alone, where
 * getrusage would tell that of the program which it replaced too. */
static double own_peak(void) {
    char line[256];
    double peak = NAN;
    FILE *status = fopen("/proc/self/status", "r");
    while (status != NULL && fgets(line, sizeof line, status) != NULL) {
        if (strncmp(line, "VmHWM:", 6) == 0) {
            peak = strtod(line + 6, NULL) / 1024.0; /* kB */
        }
    }
    if (status != NULL) {
        (void)fclose(status);
    }
    return peak;
}

/* Peak memory, MB, of a fresh process that reads so and does nothing else. */
static double memory_of(int way, const char *path) {
    char command[256];
    char self[128] = "";
    double peak = NAN;
    if (readlink("/proc/self/exe", self, sizeof self - 1) <= 0) {
        return peak;
    }
    (void)snprintf(command, sizeof command, "'%s' %d %s", self, way, path);
    (void)fflush(NULL);
    FILE *child = popen(command, "r");
    if (child != NULL) {
        if (fscanf(child, "%lf", &peak) != 1) { /* NOLINT(cert-err34-c) */
            peak = NAN;
        }
        (void)pclose(child);
    }
    return peak;
}

/* Equal as numbers: 0 and -0 are. */
static bool are_equal(const double a[], const double b[]) {
    size_t i = 0;
    while (i < STEPS && a[i] == b[i]) {
        i++;
    }
    return i == STEPS;
}

static bool measure(const char *path, double seconds[WAYS][ROUNDS]) {
    static double values[WAYS][STEPS];
    for (int round = 0; round < ROUNDS; round++) {
        for (int way = 0; way < WAYS; way++) {
            const double start = seconds_now();
            if (!ways[way].read(path, values[way])) {
                return false;
            }
            seconds[way][round] = seconds_now() - start;
            if (!are_equal(values[way], values[0])) {
                return false;
            }
        }
    }
    return true;
}

static void report(const char *path, const char *name,
                   double seconds[WAYS][ROUNDS]) {
    double best = INFINITY;
    printf("%-30s", name);
    for (int way = 0; way < WAYS; way++) {
        qsort(seconds[way], ROUNDS, sizeof seconds[way][0], by_size);
        const double median = seconds[way][ROUNDS / 2];
        best = way > 0 && median < best ? median : best;
        printf(" %8.3f (%3.0f MB)", median, memory_of(way, path));
    }
    printf("  %5.2f\n", seconds[0][ROUNDS / 2] / best);
}

int main(int argc, char *argv[]) {
    if (argc == 3) { /* a way and a file: for memory_of */
        static double values[STEPS];
        if (!ways[strtol(argv[1], NULL, 10) % WAYS].read(argv[2], values)) {
            return 1;
        }
        printf("%g\n", own_peak());
        return 0;
    }
    char path[64];
    bool is_done = true;
    (void)snprintf(path, sizeof path, "bench-%ld.nc", (long)getpid());
    printf("%d steps, %d by %d points, seconds, median of %d rounds\n%-30s",
           STEPS, SIDE, SIDE, ROUNDS, "");
    for (int way = 0; way < WAYS; way++) {
        printf(" %17s", ways[way].name);
    }
    printf("  to the best\n");
    for (int k = 0; k < LAYOUTS && is_done; k++) {
        double seconds[WAYS][ROUNDS];
        is_done = write_grid(path, &layouts[k]) && measure(path, seconds);
        if (is_done) {
            report(path, layouts[k].name, seconds);
        }
        (void)remove(path);
    }
    if (!is_done) {
        fprintf(stderr, "a way of reading failed or disagrees\n");
    }
    return is_done ? 0 : 1;
}
