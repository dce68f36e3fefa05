/* course.c - one run of the engine over the spans of a record. */
#include "series/course.h"

#include <math.h>
#include <stdlib.h>

/* Steps between two breaks above which a step is no step (docs/formats.md says
 * what a case may ask for). */
static const double most_parts = 1e9;

/* Cell-steps between two questions whether to go on: about a millisecond. */
static const double work_between_questions = 2e4;

/* Eta below which a set-up volume is not worth dividing by, m (docs/theory.md,
 * "Levels in time"). */
static const double least_eta = 1e-3;

/* Times a step is cut in four before a run is given up: the engine halves it
 * five times by itself. */
enum { MOST_SHORTENED = 4 };

/* C_f of thin water under a linear law or none, [1]: the usual quadratic
 * coefficient of a bed (common practice, 1e-3 to 5e-3). */
static const double film_drag = 2.5e-3;

/* One span being run. */
typedef struct leg {
    const lee_course *course;
    const lee_span *span;
    const lee_channel *channel;
    lee_transient *engine;
    lee_drive drive;
    size_t break_count;
    int64_t *breaks; /* times that steps must hit, increasing */
    size_t next_output;
    double *at_stations; /* [stations] scratch */
    double *bed_at;      /* [stations] of the profile itself, m */
    double *poured;      /* [nodes] m3, scratch */
    double *along_nodes; /* [nodes] scratch of a field */
    double *along_links; /* [links] */
    double pool;         /* still water at the engine's time, m */
    double start_volume;
    double largest_loss;   /* |V - V0 - inflow|, m3 */
    double largest_set_up; /* integral of b |eta| / 2, m3 */
    double fastest;        /* current, m s-1 */
    double area;
} leg;

static int by_time(const void *a, const void *b) {
    const int64_t left = *(const int64_t *)a;
    const int64_t right = *(const int64_t *)b;
    return (left > right) - (left < right);
}

/* Times around sample i at which the wind may bend or jump. */
static size_t sample_breaks(const lee_run_wind *wind, size_t i, int64_t at[2]) {
    const int64_t time = wind->record->time[i];
    const int64_t half = wind->step / 2;
    switch (wind->record->stamp) {
    case LEE_STAMP_INSTANT:
        at[0] = time;
        return 1;
    case LEE_STAMP_START:
        at[0] = time;
        at[1] = time + wind->step; /* held up to the next when that is sooner */
        if (i + 1 < wind->record->n && wind->record->time[i + 1] < at[1]) {
            at[1] = wind->record->time[i + 1];
        }
        return 2;
    case LEE_STAMP_MIDDLE:
        at[0] = time - half;
        at[1] = time - half + wind->step;
        return 2;
    case LEE_STAMP_END:
        at[0] = time - wind->step;
        at[1] = time;
        return 2;
    }
    return 0;
}

static void add_break(leg *l, int64_t time) {
    if (time >= l->span->from && time <= l->span->to) {
        l->breaks[l->break_count++] = time;
    }
}

/* Times at which a series of levels bends. */
static void add_bends(leg *l, const lee_level_series *series) {
    for (size_t i = 0; series->n > 1 && i < series->n; i++) {
        add_break(l, series->time[i]);
    }
}

static lee_status gather_breaks(leg *l, lee_error *error) {
    const lee_course *course = l->course;
    const lee_wind_piece *piece = &l->span->piece;
    const lee_lake *lake = &course->problem->lake;
    const size_t room = 2 * (piece->end - piece->first) + course->time_count +
                        lake->still_water.n + lake->start.level.n +
                        lake->end.level.n + 2;
    l->breaks = calloc(room, sizeof *l->breaks);
    if (l->breaks == NULL) {
        return lee_fail(error, LEE_ERR_MEMORY, "no room for %zu times", room);
    }
    add_break(l, l->span->from);
    add_break(l, l->span->to);
    for (size_t i = piece->first; i < piece->end; i++) {
        int64_t at[2];
        const size_t count = sample_breaks(course->wind, i, at);
        for (size_t k = 0; k < count; k++) {
            add_break(l, at[k]);
        }
    }
    for (size_t i = 0; i < course->time_count; i++) {
        add_break(l, course->time[i]);
    }
    add_bends(l, &lake->still_water);
    add_bends(l, &lake->start.level);
    add_bends(l, &lake->end.level);
    qsort(l->breaks, l->break_count, sizeof *l->breaks, by_time);
    size_t kept = 1;
    for (size_t i = 1; i < l->break_count; i++) {
        if (l->breaks[i] != l->breaks[kept - 1]) {
            l->breaks[kept++] = l->breaks[i];
        }
    }
    l->break_count = kept;
    return LEE_OK;
}

/* Level of an end at a time; NaN at a wall. */
static double held_level(const lee_end *end, double time) {
    return end->is_held ? lee_level_at(&end->level, time) : NAN;
}

/* Levels of equilibrium with the wind at the begin of the span. */
static lee_status steady_levels(leg *l, const lee_profile *profile,
                                double level[], lee_error *error) {
    const lee_course *course = l->course;
    const lee_lake *lake = &course->problem->lake;
    const double begin = (double)l->span->from;
    double wind[2];
    lee_steady steady = {0};
    lee_drive_wind(&l->drive, 0.0, wind);
    lee_steady_input input = {
        .profile = profile,
        .still_water = l->pool,
        .return_flow = 1.0, /* lambda is in the pull */
        .water_density = course->setting->fluids.water_density,
        .gravity = course->setting->gravity,
        .dry_depth = course->problem->solver.dry_depth,
        .start_level = held_level(&lake->start, begin),
        .end_level = held_level(&lake->end, begin),
    };
    lee_drive_pull(&l->drive, wind, lee_drive_air(&l->drive, 0.0),
                   input.stress);
    const lee_status status = lee_steady_solve(&input, &steady, error);
    for (size_t i = 0; i < l->channel->nodes && status == LEE_OK; i++) {
        const double found =
            lee_steady_level_at(&steady, l->channel->chainage[i]);
        level[i] = isnan(found) ? l->channel->bed[i] : found;
    }
    lee_steady_free(&steady);
    return status;
}

static lee_status start_engine(leg *l, const lee_profile *profile,
                               lee_error *error) {
    const size_t n = l->channel->nodes;
    l->pool = lee_level_at(&l->course->problem->lake.still_water,
                           (double)l->span->from);
    double *level = calloc(n, sizeof *level);
    if (level == NULL) {
        return lee_fail(error, LEE_ERR_MEMORY, "no room for %zu levels", n);
    }
    lee_status status = LEE_OK;
    for (size_t i = 0; i < n; i++) {
        level[i] = fmax(l->channel->bed[i], l->pool);
        l->area += l->channel->area[i] * (l->pool > l->channel->bed[i]);
    }
    if (l->span->starts_steady) {
        status = steady_levels(l, profile, level, error);
    }
    if (status == LEE_OK) {
        lee_transient_start(l->engine, 0.0, level);
        l->start_volume = lee_transient_volume(l->engine);
    }
    free(level);
    return status;
}

/* Still water at the engine's time, m above the datum. */
static double pool_now(const leg *l) {
    const lee_level_series *pool = &l->course->problem->lake.still_water;
    return lee_level_at(pool,
                        (double)l->span->from + lee_transient_time(l->engine));
}

/* A still water given as a series lifts or lowers a closed lake: the volume
 * between the old and the new pool is poured where the pool stands. */
static void follow_pool(leg *l) {
    const lee_lake *lake = &l->course->problem->lake;
    const double before = l->pool;
    l->pool = pool_now(l);
    if (lake->still_water.n < 2 || lake->start.is_held || lake->end.is_held) {
        return;
    }
    for (size_t i = 0; i < l->channel->nodes; i++) {
        const double bed = l->channel->bed[i];
        l->poured[i] =
            l->channel->area[i] * (fmax(bed, l->pool) - fmax(bed, before));
    }
    lee_transient_pour(l->engine, l->poured);
}

/* Keeps the volume's books at an output time. */
static void audit(leg *l) {
    const double *level = lee_transient_level(l->engine);
    const double loss = lee_transient_volume(l->engine) - l->start_volume -
                        lee_transient_inflow(l->engine);
    double moved = 0.0;
    for (size_t i = 0; i < l->channel->nodes; i++) {
        const double still = fmax(l->channel->bed[i], l->pool);
        moved += 0.5 * l->channel->area[i] * fabs(level[i] - still);
    }
    const double *speed = lee_transient_speed(l->engine);
    for (size_t i = 0; i < l->channel->links; i++) {
        l->fastest = fmax(l->fastest, fabs(speed[i]));
    }
    l->largest_loss = fmax(l->largest_loss, fabs(loss));
    l->largest_set_up = fmax(l->largest_set_up, moved);
}

/* Looks at the stations at the engine's present time. Cells know the mean of
 * their bed, a station knows its own: where the level stands no dry depth over
 * it the station is dry. */
static void look(leg *l) {
    const lee_course *course = l->course;
    const double time = (double)l->span->from + lee_transient_time(l->engine);
    const double least = course->problem->solver.dry_depth;
    course->watch->still_water = l->pool;
    for (size_t i = 0; i < course->watch->count; i++) {
        const double level =
            lee_transient_level_at(l->engine, course->watch->station[i].at);
        l->at_stations[i] = level - l->bed_at[i] >= least ? level : NAN;
    }
    lee_watch_see(course->watch, time, l->at_stations,
                  time >= (double)l->span->judged_from);
}

/* Gives the water along the axis to who takes it. */
static lee_status give_field(leg *l, int64_t time, lee_error *error) {
    const lee_course *course = l->course;
    const lee_run_options *options = course->progress->options;
    const double *level = lee_transient_level(l->engine);
    const double dry_depth = course->problem->solver.dry_depth;
    lee_field field = {
        .channel = l->channel,
        .index = l->next_output,
        .count = course->time_count,
        .time = time,
        .still_water = l->pool,
        .level = l->along_nodes,
        .transport = lee_transient_transport(l->engine),
        .stress = l->along_links,
    };
    double pull[2];
    for (size_t i = 0; i < l->channel->nodes; i++) {
        const bool is_dry = level[i] - l->channel->bed[i] < dry_depth;
        l->along_nodes[i] = is_dry ? NAN : level[i];
    }
    const double now = lee_transient_time(l->engine);
    lee_drive_wind(&l->drive, now, field.wind);
    lee_drive_pull(&l->drive, field.wind, lee_drive_air(&l->drive, now), pull);
    for (size_t i = 0; i < l->channel->links; i++) {
        l->along_links[i] =
            (pull[0] * l->drive.sine[i] + pull[1] * l->drive.cosine[i]) /
            course->setting->return_flow;
    }
    return options->take_field(options->field_user, &field, error);
}

/* Writes levels when `time` is an output time. */
static lee_status write_levels(leg *l, int64_t time, lee_error *error) {
    const lee_course *course = l->course;
    lee_status status = LEE_OK;
    if (l->next_output >= course->time_count ||
        course->time[l->next_output] != time) {
        return status;
    }
    audit(l);
    for (size_t i = 0; course->level != NULL && i < course->watch->count; i++) {
        course->level[i][l->next_output] = l->at_stations[i];
    }
    if (course->gives_field && course->progress->options->take_field != NULL) {
        status = give_field(l, time, error);
    }
    l->next_output++;
    return status;
}

/* Steps to `end`; where the engine's own halvings do not suffice, in four
 * shorter steps from where it stands. */
static lee_status step_to(leg *l, double end, int shortened, lee_error *error) {
    const double from = lee_transient_time(l->engine);
    lee_status status = lee_transient_step(l->engine, end - from,
                                           lee_drive_forcing, &l->drive, error);
    if (status != LEE_ERR_CONVERGENCE || shortened == MOST_SHORTENED) {
        return status;
    }
    const double reached = lee_transient_time(l->engine);
    status = LEE_OK;
    for (int k = 1; k <= 4 && status == LEE_OK; k++) {
        const double next = k == 4 ? end : reached + 0.25 * k * (end - reached);
        status = step_to(l, next, shortened + 1, error);
    }
    return status;
}

static lee_status tell_progress(lee_progress *progress, lee_error *error) {
    const lee_run_options *options = progress->options;
    progress->told = progress->done;
    if (options->keep_going != NULL &&
        !options->keep_going(options->user,
                             fmin(1.0, progress->done / progress->total))) {
        return lee_fail(error, LEE_ERR_INTERRUPTED, "interrupted");
    }
    return LEE_OK;
}

/* Counts a step, and asks now and then whether to go on. */
static lee_status count_step(leg *l, lee_error *error) {
    lee_progress *progress = l->course->progress;
    progress->done += (double)l->channel->nodes;
    return progress->done - progress->told < work_between_questions
               ? LEE_OK
               : tell_progress(progress, error);
}

static lee_status go_to(leg *l, int64_t from, int64_t to, lee_error *error) {
    const double distance = (double)(to - from);
    const double wanted = ceil(distance / l->course->step - 1e-9);
    if (!(wanted <= most_parts)) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "steps of %g s are too short for %g s", l->course->step,
                        distance);
    }
    const int64_t parts = wanted > 1.0 ? (int64_t)wanted : 1;
    const double end = (double)(to - l->span->from);
    for (int64_t k = 0; k < parts; k++) {
        const double now = lee_transient_time(l->engine);
        const double step = (end - now) / (double)(parts - k);
        lee_status status = step_to(l, now + step, 0, error);
        if (status == LEE_OK) {
            follow_pool(l);
            look(l);
            status = count_step(l, error);
        }
        if (status != LEE_OK) {
            return status;
        }
    }
    return LEE_OK;
}

static lee_status run_leg(leg *l, lee_error *error) {
    lee_watch_break(l->course->watch);
    while (l->next_output < l->course->time_count &&
           l->course->time[l->next_output] < l->span->from) {
        l->next_output++;
    }
    look(l);
    lee_status status = write_levels(l, l->span->from, error);
    for (size_t i = 1; i < l->break_count && status == LEE_OK; i++) {
        status = go_to(l, l->breaks[i - 1], l->breaks[i], error);
        if (status == LEE_OK) {
            status = write_levels(l, l->breaks[i], error);
        }
    }
    audit(l);
    return status == LEE_OK ? tell_progress(l->course->progress, error)
                            : status;
}

static lee_transient_options engine_options(const lee_course *course) {
    const lee_problem *problem = course->problem;
    lee_transient_options options = lee_transient_defaults();
    options.gravity = course->setting->gravity;
    options.water_density = course->setting->fluids.water_density;
    options.return_flow = 1.0; /* lambda is in the pull */
    options.bed = lee_member_bed(&problem->bed, course->member.bed_share);
    options.film_drag = film_drag;
    options.dry_depth = problem->solver.dry_depth;
    options.has_advection = problem->solver.has_advection;
    options.start_held = problem->lake.start.is_held;
    options.end_held = problem->lake.end.is_held;
    return options;
}

static lee_status prepare_leg(leg *l, const lee_profile *profile,
                              lee_error *error) {
    const lee_course *course = l->course;
    const lee_transient_options options = engine_options(course);
    l->drive = (lee_drive){
        .problem = course->problem,
        .setting = course->setting,
        .table = course->table,
        .wind = course->wind,
        .pull = course->member.pull,
        .piece = l->span->piece,
        .zero = l->span->from,
    };
    l->at_stations = calloc(course->watch->count + 1, sizeof(double));
    l->bed_at = calloc(course->watch->count + 1, sizeof(double));
    l->poured = calloc(l->channel->nodes, sizeof *l->poured);
    l->along_nodes = calloc(l->channel->nodes, sizeof *l->along_nodes);
    l->along_links = calloc(l->channel->links, sizeof *l->along_links);
    if (l->at_stations == NULL || l->bed_at == NULL || l->poured == NULL ||
        l->along_nodes == NULL || l->along_links == NULL) {
        return lee_fail(error, LEE_ERR_MEMORY, "no room for stations");
    }
    for (size_t i = 0; i < course->watch->count; i++) {
        l->bed_at[i] = lee_profile_bed(profile, course->watch->station[i].at);
    }
    lee_status status = lee_drive_init(l->channel, &l->drive, error);
    if (status == LEE_OK) {
        status = lee_transient_new(l->channel, &options, &l->engine, error);
    }
    if (status == LEE_OK) {
        status = gather_breaks(l, error);
    }
    return status == LEE_OK ? start_engine(l, profile, error) : status;
}

static lee_status run_span(const lee_course *course, const lee_span *span,
                           const lee_profile *profile,
                           const lee_channel *channel,
                           lee_course_report *report, lee_error *error) {
    leg l = {.course = course, .span = span, .channel = channel};
    lee_status status = prepare_leg(&l, profile, error);
    if (status == LEE_OK) {
        status = run_leg(&l, error);
    }
    report->volume_defect =
        fmax(report->volume_defect,
             l.largest_loss / fmax(l.largest_set_up, least_eta * l.area));
    report->fastest = fmax(report->fastest, l.fastest);
    lee_transient_free(l.engine);
    lee_drive_free(&l.drive);
    free(l.breaks);
    free(l.at_stations);
    free(l.bed_at);
    free(l.poured);
    free(l.along_nodes);
    free(l.along_links);
    return status;
}

lee_status lee_course_run(const lee_course *course, lee_course_report *report,
                          lee_error *error) {
    lee_profile profile = {0};
    lee_channel channel = {0};
    *report = (lee_course_report){0};
    lee_status status =
        lee_member_profile(&course->problem->lake.profile,
                           course->member.bed_shift, &profile, error);
    if (status == LEE_OK) {
        status =
            lee_channel_from_profile(&profile, course->cells, &channel, error);
    }
    for (size_t i = 0; i < course->span_count && status == LEE_OK; i++) {
        status = run_span(course, &course->span[i], &profile, &channel, report,
                          error);
    }
    lee_watch_break(course->watch);
    lee_channel_free(&channel);
    lee_profile_free(&profile);
    return status;
}

double lee_course_work(const lee_course *course) {
    double seconds = 0.0;
    for (size_t i = 0; i < course->span_count; i++) {
        seconds += (double)(course->span[i].to - course->span[i].from);
    }
    return seconds / course->step * (double)course->cells;
}
