/* drive.c - the wind of a run as a force on a channel, in time. */
#include "series/drive.h"

#include <math.h>
#include <stdlib.h>

/* Steps of made records, s (common practice: a 10 min mean). */
static const int64_t made_step = 600;

/* Rows of the pull tables each 0.1 m s-1, up to 100 m s-1, and the measured
 * speeds that are tried for them: up to the fastest a record may hold. */
static const double table_spacing = 0.1;
enum { TABLE_ROWS = 1001, MEASURED_ROWS = 3401 };

/* One given wind that begins at once, lasts, and is followed by calm: a
 * record of means, so that begin and end are sharp. Where whole seconds do
 * not part the duration evenly some steps are a second shorter: a mean is
 * held up to the next. */
static lee_status given_record(const lee_given_wind *wind, int64_t start,
                               double calm, lee_run_wind *made,
                               lee_error *error) {
    const int64_t duration = (int64_t)llround(wind->duration);
    const int64_t parts = (duration + made_step - 1) / made_step;
    const int64_t step = (duration + parts - 1) / parts;
    const int64_t after = (int64_t)ceil(calm / (double)step);
    const size_t n = (size_t)(parts + after);
    const lee_status status = lee_wind_record_init(&made->made, n, error);
    if (status != LEE_OK) {
        return status;
    }
    made->made.stamp = LEE_STAMP_START;
    made->step = step;
    for (int64_t i = 0; i < parts + after; i++) {
        made->made.time[i] =
            start +
            (i < parts ? i * duration / parts : duration + (i - parts) * step);
        lee_wind_components(i < parts ? wind->speed : 0.0, wind->from,
                            &made->made.east[i], &made->made.north[i]);
    }
    return LEE_OK;
}

static lee_status make_record(const lee_problem *problem, double calm,
                              lee_run_wind *wind, lee_error *error) {
    const lee_wind_source *source = &problem->wind;
    const int64_t start = problem->run.has_from ? problem->run.from : 0;
    wind->record = &wind->made;
    wind->step = made_step;
    if (source->kind == LEE_WIND_STORM) {
        wind->starts_calm = !(source->storm.before > 0.0);
        return lee_storm_record(&source->storm, start, made_step,
                                (int64_t)ceil(calm), &wind->made, error);
    }
    wind->starts_calm = true;
    if (source->given_count != 1 || !(source->given[0].duration >= 60.0)) {
        return lee_fail(error, LEE_ERR_DATA,
                        "a run of a given wind needs one wind with a duration "
                        "of at least 1 min");
    }
    return given_record(&source->given[0], start, calm, wind, error);
}

static lee_status find_pieces(const lee_problem *problem,
                              const lee_setting *setting, lee_run_wind *wind,
                              lee_error *error) {
    lee_wind_check check = {0};
    lee_status status =
        lee_wind_check_record(wind->record, &problem->wind.gap, &check, error);
    if (status == LEE_OK) {
        wind->step = wind->made.n > 0 ? wind->step : check.step;
        status = lee_corrections_find(problem, setting, wind->record,
                                      wind->step, &wind->corrections, error);
    }
    if (status == LEE_OK) {
        status = lee_wind_pieces(&wind->corrections.water, &problem->wind.gap,
                                 &wind->piece, &wind->count, error);
    }
    lee_wind_check_free(&check);
    return status == LEE_OK ? lee_run_air_init(problem, wind->record,
                                               wind->step, &wind->air, error)
                            : status;
}

lee_status lee_run_wind_init(const lee_problem *problem,
                             const lee_setting *setting, double calm,
                             lee_run_wind *wind, lee_error *error) {
    *wind = (lee_run_wind){0};
    lee_status status = LEE_OK;
    switch (problem->wind.kind) {
    case LEE_WIND_RECORD:
        wind->record = &problem->wind.record;
        break;
    case LEE_WIND_STORM:
    case LEE_WIND_GIVEN:
        status = make_record(problem, calm, wind, error);
        break;
    case LEE_WIND_NONE:
    case LEE_WIND_SCAN:
        status = lee_fail(error, LEE_ERR_DATA,
                          "a run needs a wind record, a storm, or one given "
                          "wind with a duration; lists and scans of winds are "
                          "for 'steady'");
        break;
    }
    if (status == LEE_OK) {
        status = find_pieces(problem, setting, wind, error);
    }
    if (status != LEE_OK) {
        lee_run_wind_free(wind);
    }
    return status;
}

void lee_run_wind_free(lee_run_wind *wind) {
    free(wind->piece);
    lee_corrections_free(&wind->corrections);
    lee_run_air_free(&wind->air);
    lee_wind_record_free(&wind->made);
    *wind = (lee_run_wind){0};
}

/* The measured speed whose 10 m speed is `wanted`: walks on from `row`, where
 * the last one was found. A record's own temperatures take no part. */
static double measured_for(const lee_pull_table *table, double wanted,
                           size_t *row, double last[2]) {
    while (last[1] < wanted && *row + 1 < MEASURED_ROWS) {
        (*row)++;
        const lee_exposure_sample next =
            lee_measured((double)*row * table_spacing);
        last[0] = last[1];
        last[1] = lee_setting_speed(table->problem, table->setting, &next);
    }
    const double growth = last[1] - last[0];
    const double share =
        growth > 0.0 ? fmin(1.0, (wanted - last[0]) / growth) : 1.0;
    return ((double)*row - 1.0 + share) * table_spacing;
}

lee_status lee_pull_table_init(const lee_problem *problem,
                               const lee_setting *setting,
                               lee_pull_table *table, lee_error *error) {
    *table = (lee_pull_table){
        .problem = problem,
        .setting = setting,
        .n = TABLE_ROWS,
        .low = calloc(TABLE_ROWS, sizeof *table->low),
        .high = calloc(TABLE_ROWS, sizeof *table->high),
    };
    if (table->low == NULL || table->high == NULL) {
        lee_pull_table_free(table);
        return lee_fail(error, LEE_ERR_MEMORY, "no room for the range");
    }
    size_t row = 0;
    double last[2] = {0.0, 0.0};
    for (size_t i = 1; i < TABLE_ROWS; i++) {
        const double speed = (double)i * table_spacing;
        const lee_exposure_sample measured =
            lee_measured(measured_for(table, speed, &row, last));
        const lee_pull_range range =
            lee_setting_pull(problem, setting, &measured);
        table->low[i] = range.low / (speed * speed);
        table->high[i] = range.high / (speed * speed);
    }
    table->low[0] = table->low[1];
    table->high[0] = table->high[1];
    return LEE_OK;
}

void lee_pull_table_free(lee_pull_table *table) {
    free(table->low);
    free(table->high);
    *table = (lee_pull_table){0};
}

lee_status lee_drive_init(const lee_channel *channel, lee_drive *drive,
                          lee_error *error) {
    drive->links = channel->links;
    drive->sine = calloc(channel->links, sizeof *drive->sine);
    drive->cosine = calloc(channel->links, sizeof *drive->cosine);
    if (drive->sine == NULL || drive->cosine == NULL) {
        lee_drive_free(drive);
        return lee_fail(error, LEE_ERR_MEMORY, "no room for %zu links",
                        channel->links);
    }
    for (size_t i = 0; i < channel->links; i++) {
        drive->sine[i] = sin(channel->bearing[i]);
        drive->cosine[i] = cos(channel->bearing[i]);
    }
    return LEE_OK;
}

void lee_drive_free(lee_drive *drive) {
    free(drive->sine);
    free(drive->cosine);
    drive->sine = NULL;
    drive->cosine = NULL;
}

void lee_drive_wind(lee_drive *drive, double t, double at[2]) {
    lee_wind_at(&drive->wind->corrections.water, &drive->piece,
                drive->wind->step, (double)drive->zero + t, at, &drive->hint);
}

/* Every sample has air and ice, so there is nothing left to bridge further. */
static double sampled(lee_drive *drive, const double column[], double t) {
    const lee_gap_rule any = {.largest = INT64_MAX / 4};
    return lee_wind_column_at(drive->wind->record, column, &any,
                              drive->wind->step, (double)drive->zero + t,
                              &drive->air_hint);
}

lee_air_now lee_drive_air(lee_drive *drive, double t) {
    const lee_run_air *air = &drive->wind->air;
    lee_air_now now = lee_air_of_case(drive->problem, drive->setting);
    if (air->density != NULL) {
        now.density = sampled(drive, air->density, t);
    }
    if (air->ice != NULL) {
        now.open = 1.0 - sampled(drive, air->ice, t);
    }
    return now;
}

/* Pull over speed squared of a bound, Pa s2 m-2. */
static double tabled(const lee_pull_table *table, const double column[],
                     double speed) {
    const double place =
        fmin(speed / table_spacing, (double)(table->n - 1) - 1e-9);
    const size_t row = (size_t)place;
    const double share = place - (double)row;
    return column[row] + share * (column[row + 1] - column[row]);
}

/* Pull of the estimate over speed, Pa s m-1, on open water. */
static double estimate_pull(const lee_drive *drive, double speed,
                            double density) {
    lee_drag_input in = drive->setting->fluids;
    in.air_density = density;
    in.speed = speed;
    return drive->setting->return_flow * density *
           lee_drag_coefficient(&drive->setting->drag, &in, NULL, NULL) * speed;
}

/* Pull of a bound over speed. The table's air is the case's, and stress goes
 * with density. Where the estimate itself is by a share of the water's density,
 * which does not, the range still holds it: it is a member. */
static double bound_pull(const lee_drive *drive, double speed, double density) {
    const bool is_low = drive->pull == LEE_PULL_LOW;
    const double *column = is_low ? drive->table->low : drive->table->high;
    const double ratio = density / drive->setting->fluids.air_density;
    return ratio * tabled(drive->table, column, speed) * speed;
}

void lee_drive_pull(const lee_drive *drive, const double wind[2],
                    lee_air_now air, double pull[2]) {
    const double speed = hypot(wind[0], wind[1]);
    double per_speed = 0.0; /* pull over speed, Pa s m-1 */
    if (speed > 0.0) {
        per_speed = air.open * (drive->pull == LEE_PULL_MAIN
                                    ? estimate_pull(drive, speed, air.density)
                                    : bound_pull(drive, speed, air.density));
    }
    pull[0] = per_speed * wind[0];
    pull[1] = per_speed * wind[1];
}

void lee_drive_forcing(void *user, double t, lee_forcing *forcing) {
    lee_drive *drive = user;
    double wind[2];
    double pull[2];
    lee_drive_wind(drive, t, wind);
    lee_drive_pull(drive, wind, lee_drive_air(drive, t), pull);
    for (size_t i = 0; i < drive->links; i++) {
        forcing->stress[i] =
            pull[0] * drive->sine[i] + pull[1] * drive->cosine[i];
    }
    const lee_lake *lake = &drive->problem->lake;
    const double time = (double)drive->zero + t;
    if (lake->start.is_held) {
        forcing->start_level = lee_level_at(&lake->start.level, time);
    }
    if (lake->end.is_held) {
        forcing->end_level = lee_level_at(&lake->end.level, time);
    }
}
