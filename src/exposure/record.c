/* record.c - a whole record brought to 10 m over open water, once. */
#include <math.h>
#include <stdlib.h>

#include "exposure/chain.h"

/* Factors of each link for the samples with wind so far. Owns them. */
typedef struct tally {
    size_t count;
    double *factor[LEE_CORRECTIONS]; /* [count] */
} tally;

static bool asks_for_temperatures(const lee_exposure *exposure) {
    return exposure->stability == LEE_STABILITY_MONIN_OBUKHOV ||
           exposure->stability == LEE_STABILITY_RATIO;
}

static lee_exposure_sample with_speed(const lee_exposure_task *task,
                                      size_t index, double speed) {
    lee_exposure_sample sample = {speed, NAN, NAN};
    if (asks_for_temperatures(task->exposure)) {
        const lee_wind_conditions conditions =
            lee_wind_conditions_of(task->record, task->rule, task->step, index);
        sample.air_temperature = conditions.air_temperature;
        sample.water_temperature = conditions.water_temperature;
    }
    return sample;
}

lee_exposure_sample lee_exposure_sample_of(const lee_exposure_task *task,
                                           size_t index) {
    return with_speed(
        task, index,
        hypot(task->record->east[index], task->record->north[index]));
}

static void count_links(const lee_links *links, tally *all,
                        lee_exposure_summary *summary) {
    for (size_t i = 0; i < LEE_CORRECTIONS; i++) {
        all->factor[i][all->count] = links->factor[i];
        summary->link[i].extrapolated += links->is_extrapolated[i];
    }
    summary->link[LEE_LINK_STABILITY].missing += links->is_missing;
    all->count++;
}

/* Scales and turns a wind; not by its angle, which would round it. */
static void set_wind(const lee_exposure_task *task, size_t index, double speed,
                     lee_wind_record *corrected) {
    const double east = task->record->east[index];
    const double north = task->record->north[index];
    const double measured = hypot(east, north);
    const double ratio = measured > 0.0 ? speed / measured : 1.0;
    const double cosine = cos(task->exposure->direction_offset);
    const double sine = sin(task->exposure->direction_offset);
    corrected->east[index] = ratio * (east * cosine + north * sine);
    corrected->north[index] = ratio * (north * cosine - east * sine);
}

static void correct_sample(const lee_exposure_task *task, size_t index,
                           lee_wind_record *corrected, tally *all,
                           lee_exposure_summary *summary) {
    const lee_wind_record *record = task->record;
    const double speed = hypot(record->east[index], record->north[index]);
    if (isnan(speed)) {
        return; /* stays missing */
    }
    const lee_exposure_sample sample = with_speed(task, index, speed);
    const lee_links links =
        lee_links_find(task->exposure, task->drag, task->fluids, &sample);
    if (speed > 0.0) {
        count_links(&links, all, summary);
    }
    if (corrected != NULL) {
        set_wind(task, index, links.speed, corrected);
    }
}

static int by_size(const void *a, const void *b) {
    const double x = *(const double *)a;
    const double y = *(const double *)b;
    return (x > y) - (x < y);
}

static void find_spread(size_t n, double factor[], lee_link_spread *spread) {
    spread->least = NAN;
    spread->median = NAN;
    spread->greatest = NAN;
    if (n > 0) {
        qsort(factor, n, sizeof *factor, by_size);
        spread->least = factor[0];
        spread->median = factor[(n - 1) / 2];
        spread->greatest = factor[n - 1];
    }
}

static lee_status correct(const lee_exposure_task *task,
                          lee_wind_record *corrected, tally *all,
                          lee_exposure_summary *summary, lee_error *error) {
    const size_t n = task->record->n;
    for (size_t i = 0; i < LEE_CORRECTIONS; i++) {
        all->factor[i] = calloc(n + 1, sizeof *all->factor[i]);
        if (all->factor[i] == NULL) {
            return lee_fail(error, LEE_ERR_MEMORY,
                            "no room for the factors of %zu samples", n);
        }
    }
    if (corrected != NULL) {
        const lee_status status = lee_wind_record_init(corrected, n, error);
        if (status != LEE_OK) {
            return status;
        }
        corrected->stamp = task->record->stamp;
    }
    for (size_t i = 0; i < n; i++) {
        if (corrected != NULL) {
            corrected->time[i] = task->record->time[i];
        }
        correct_sample(task, i, corrected, all, summary);
    }
    return LEE_OK;
}

lee_status lee_exposure_record(const lee_exposure_task *task,
                               lee_wind_record *corrected,
                               lee_exposure_summary *summary,
                               lee_error *error) {
    tally all = {0};
    *summary = (lee_exposure_summary){0};
    const lee_status status = correct(task, corrected, &all, summary, error);
    summary->winds = all.count;
    for (size_t i = 0; i < LEE_CORRECTIONS; i++) {
        if (status == LEE_OK) {
            find_spread(all.count, all.factor[i], &summary->link[i]);
        }
        free(all.factor[i]);
    }
    return status;
}
