/* bench_csv.c - rate of reading a wind record in CSV.
 *
 * Three ways read the same file in turn, round by round, and the medians are
 * compared: this library, with every time and number checked; the C library's
 * usual way, lines and fields by memchr and numbers by strtod, once without
 * looking at the time column and once reading it by strptime and timegm. All
 * must come to the same sum. */
#define _XOPEN_SOURCE   700 /* strptime */
#define _DEFAULT_SOURCE 1   /* timegm */

#include <math.h>
#include <stdbool.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>
#include <time.h>
#include <unistd.h>

#include "support/dice.h"

#include "formats/csv.h"
#include "leewater/calendar.h"

enum { ROWS = 500000, NUMBERS = 3, ROUNDS = 9 };

/* What a way of reading found, so that none can skip its work. */
typedef struct tally {
    double numbers;
    int64_t times;
    size_t rows;
} tally;

static bool write_record(FILE *file) {
    dice d = {3};
    fprintf(file, "time,speed [m/s],from [degree],pressure [hPa]\n");
    for (int i = 0; i < ROWS; i++) {
        char time[LEE_TIME_TEXT];
        fprintf(file, "%s,%d.%02d,%d.%d,%d.%02d\n",
                lee_time_format(INT64_C(946684800) + 600 * i, time),
                draw(&d, 25), draw(&d, 99), draw(&d, 359), draw(&d, 9),
                950 + draw(&d, 90), draw(&d, 99));
    }
    return fflush(file) == 0 && ferror(file) == 0;
}

static bool read_time(const lee_csv_field *field, tally *t) {
    char text[64];
    int64_t time = 0;
    if (field->length >= sizeof text) {
        return false;
    }
    memcpy(text, field->bytes, field->length);
    text[field->length] = '\0';
    if (lee_time_parse(text, 0, &time, NULL, NULL) != LEE_OK) {
        return false;
    }
    t->times += time;
    return true;
}

static bool by_this_library(const char *path, tally *t) {
    lee_csv *csv = NULL;
    if (lee_csv_open(path, &csv, NULL) != LEE_OK) {
        return false;
    }
    const lee_csv_field *fields = NULL;
    bool is_read = true;
    while (is_read && lee_csv_next(csv, &fields, NULL) == LEE_OK &&
           fields != NULL) {
        is_read = read_time(&fields[0], t);
        for (size_t i = 1; i <= NUMBERS && is_read; i++) {
            double value = 0.0;
            is_read = lee_csv_number(csv, &fields[i], &value, NULL) == LEE_OK;
            t->numbers += value;
        }
        t->rows++;
    }
    lee_csv_close(csv);
    return is_read;
}

/* The whole file, terminated; NULL when it cannot be read. */
static char *slurp(const char *path, size_t *size) {
    FILE *file = fopen(path, "rb");
    char *bytes = NULL;
    if (file != NULL && fseek(file, 0, SEEK_END) == 0) {
        *size = (size_t)ftell(file);
        rewind(file);
        bytes = malloc(*size + 1);
    }
    if (bytes != NULL && fread(bytes, 1, *size, file) != *size) {
        free(bytes);
        bytes = NULL;
    }
    if (bytes != NULL) {
        bytes[*size] = '\0';
    }
    if (file != NULL) {
        (void)fclose(file);
    }
    return bytes;
}

static void read_line(char *line, char *end, bool with_time, tally *t) {
    char *first = line;
    for (int column = 0; column <= NUMBERS; column++) {
        char *last = memchr(first, ',', (size_t)(end - first));
        last = last == NULL ? end : last;
        *last = '\0';
        if (column > 0) {
            t->numbers += strtod(first, NULL);
        } else if (with_time) {
            struct tm civil = {0};
            (void)strptime(first, "%Y-%m-%dT%H:%M:%SZ", &civil);
            t->times += timegm(&civil);
        }
        first = last + 1;
    }
}

static bool by_memchr_and_strtod(const char *path, bool with_time, tally *t) {
    size_t size = 0;
    char *bytes = slurp(path, &size);
    if (bytes == NULL) {
        return false;
    }
    char *newline = memchr(bytes, '\n', size); /* of the header */
    char *line = newline == NULL ? bytes + size : newline + 1;
    while ((newline = memchr(line, '\n', (size_t)(bytes + size - line)))) {
        read_line(line, newline, with_time, t);
        t->rows++;
        line = newline + 1;
    }
    free(bytes);
    return true;
}

static bool without_times(const char *path, tally *t) {
    return by_memchr_and_strtod(path, false, t);
}

static bool with_strptime(const char *path, tally *t) {
    return by_memchr_and_strtod(path, true, t);
}

static const struct {
    const char *name;
    bool (*read)(const char *path, tally *t);
    bool reads_times;
} ways[] = {
    {"leewater: checked numbers and times", by_this_library, true },
    {"memchr + strtod, times left unread",  without_times,   false},
    {"memchr + strtod + strptime + timegm", with_strptime,   true },
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

/* Runs every way once a round; false when one cannot read or disagrees. */
static bool measure(const char *path, double seconds[WAYS][ROUNDS]) {
    for (int round = 0; round < ROUNDS; round++) {
        tally found[WAYS] = {0};
        for (int way = 0; way < WAYS; way++) {
            const double start = seconds_now();
            if (!ways[way].read(path, &found[way])) {
                return false;
            }
            seconds[way][round] = seconds_now() - start;
        }
        for (int way = 1; way < WAYS; way++) {
            if (found[way].rows != ROWS || found[0].rows != ROWS ||
                found[way].numbers != found[0].numbers ||
                (ways[way].reads_times && found[way].times != found[0].times)) {
                return false;
            }
        }
    }
    return true;
}

static void report(double size, double seconds[WAYS][ROUNDS]) {
    printf("%.1f MB, %d rows, median of %d rounds\n", 1e-6 * size, ROWS,
           ROUNDS);
    double median[WAYS];
    for (int way = 0; way < WAYS; way++) {
        qsort(seconds[way], ROUNDS, sizeof seconds[way][0], by_size);
        median[way] = seconds[way][ROUNDS / 2];
        printf("%-38s %7.0f MB/s  %6.3f s (%.3f to %.3f)\n", ways[way].name,
               1e-6 * size / median[way], median[way], seconds[way][0],
               seconds[way][ROUNDS - 1]);
    }
    for (int way = 1; way < WAYS; way++) {
        printf("leewater is %.2f times as fast as %s\n",
               median[way] / median[0], ways[way].name);
    }
}

int main(void) {
    char path[64];
    (void)snprintf(path, sizeof path, "bench-%ld.csv", (long)getpid());
    FILE *file = fopen(path, "wx");
    if (file == NULL) {
        perror(path);
        return 1;
    }
    static double seconds[WAYS][ROUNDS];
    const bool is_measured = write_record(file) && measure(path, seconds);
    const double size = (double)ftell(file);
    if (is_measured) {
        report(size, seconds);
    } else {
        fprintf(stderr, "a way of reading failed or disagrees\n");
    }
    (void)fclose(file);
    (void)remove(path);
    return is_measured ? 0 : 1;
}
