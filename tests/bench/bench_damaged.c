/* bench_damaged.c - what becomes of a thousand damaged NetCDF files of each
 * kind: read, refused, or a child that broke down over them. */
#include "support/damage.h"

#include <time.h>

static double seconds_now(void) {
    struct timespec now;
    (void)clock_gettime(CLOCK_MONOTONIC, &now);
    return (double)now.tv_sec + 1e-9 * (double)now.tv_nsec;
}

int main(void) {
    enum { COUNT = 1000 };
    dice d = {1};
    int untold = 0;
    folder_make(&folder);
    printf("%-20s %6s %8s %10s %7s %8s\n", "kind", "read", "refused",
           "child died", "untold", "seconds");
    for (size_t kind = 0; kind < DAMAGE_KINDS; kind++) {
        const double start = seconds_now();
        const damage_tally tally = damage_many(&folder, kind, COUNT, &d);
        printf("%-20s %6d %8d %10d %7d %8.1f\n", damage_kind[kind], tally.read,
               tally.refused, tally.broke, tally.untold, seconds_now() - start);
        untold += tally.untold;
    }
    folder_remove(&folder);
    return untold == 0 ? 0 : 1;
}
