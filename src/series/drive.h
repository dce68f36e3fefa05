/* drive.h - the wind of a run as a force on a channel, in time. */
#ifndef LEEWATER_SERIES_DRIVE_H
#define LEEWATER_SERIES_DRIVE_H

#include "leewater/series.h"
#include "series/air.h"
#include "series/members.h"
#include "series/setting.h"

/* The wind of a run: the problem's own record, or one made from a storm or a
 * given wind. Owns `made`, `corrections`, `piece` and `air`. */
typedef struct lee_run_wind {
    const lee_wind_record *record; /* as measured: the problem's, or &made */
    lee_wind_record made;
    lee_corrections corrections; /* with the record that drives the run */
    int64_t step;                /* usual step of the record, s */
    size_t count;
    lee_wind_piece *piece; /* [count] */
    bool starts_calm;      /* made: rest is the true state at its begin */
    lee_run_air air;
} lee_run_wind;

/* Finds the record, corrects it and parts it into its pieces. `calm` is how
 * long (s) a made record goes on after its wind.
 * Errors: LEE_ERR_DATA, LEE_ERR_MEMORY. */
lee_status lee_run_wind_init(const lee_problem *problem,
                             const lee_setting *setting, double calm,
                             lee_run_wind *wind, lee_error *error);
void lee_run_wind_free(lee_run_wind *wind);

/* Pull by the 10 m speed over open water for the bounds of a range, as a share
 * of speed squared; tables by speed, linear between rows. A bound corrects the
 * measured speed behind a row by its own drag; where stability goes by
 * temperatures of the record, its factor is that of the estimate. In the case's
 * air and without ice. Owns its table. */
typedef struct lee_pull_table {
    const lee_problem *problem;
    const lee_setting *setting;
    size_t n;
    double *low;  /* [n] Pa s2 m-2 */
    double *high; /* [n] */
} lee_pull_table;
lee_status lee_pull_table_init(const lee_problem *problem,
                               const lee_setting *setting,
                               lee_pull_table *table, lee_error *error);
void lee_pull_table_free(lee_pull_table *table);

/* Force on one channel in one piece. Owns sine and cosine, borrows the rest. */
typedef struct lee_drive {
    const lee_problem *problem;
    const lee_setting *setting;
    const lee_pull_table *table;
    const lee_run_wind *wind;
    lee_pull pull;
    lee_wind_piece piece;
    int64_t zero; /* s since 1970 of the engine's time 0 */
    size_t hint;
    size_t air_hint;
    size_t links;
    double *sine; /* [links] of the bearing */
    double *cosine;
} lee_drive;
lee_status lee_drive_init(const lee_channel *channel, lee_drive *drive,
                          lee_error *error);
void lee_drive_free(lee_drive *drive);

/* Wind at 10 m over open water (east, north) at engine time t. */
void lee_drive_wind(lee_drive *drive, double t, double at[2]);

/* Air and ice at engine time t. */
lee_air_now lee_drive_air(lee_drive *drive, double t);

/* Pull vector (east, north), Pa, of a wind at 10 m over open water. */
void lee_drive_pull(const lee_drive *drive, const double wind[2],
                    lee_air_now air, double pull[2]);

/* The engine's callback: user is a lee_drive. */
void lee_drive_forcing(void *user, double t, lee_forcing *forcing);

#endif
