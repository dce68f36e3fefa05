/* Memory that runs out costs one error: never the process, a leak, half a
 * result or half a file. Every allocation of a job fails once, and once with
 * all that follow it. */
#include "memory/shortage.h"

#include <dirent.h>
#include <unistd.h>

#include "support/captured.h"
#include "support/files.h"

#include "leewater/case.h"
#include "leewater/output.h"

/* What the jobs work on. */
static struct {
    const char *everything; /* a case that names every kind of file */
    const char *wind;
    const char *axis;
    lee_case given;
    lee_case recorded;
    lee_steady_result steady;
    lee_run_result run;
    lee_problem_check check;
    char target[FOLDER_PATH];
} desk;

static const char wind_text[] =
    "time,speed [m/s],from [degree]\n"
    "2031-01-01T00:00Z,8,250\n2031-01-01T01:00Z,14,251\n"
    "2031-01-01T02:00Z,12,\n2031-01-01T03:00Z,9,253\n"
    "2031-01-01T07:00Z,16,260\n2031-01-01T08:00Z,11,262\n";

static const char axis_text[] = "chainage [km],bed [m],width [km],bearing "
                                "[degree]\n"
                                "0,9.5,2,90\n5,5,3,95\n10,9.5,2,100\n";

static const char everything_text[] =
    "title: All kinds of files\n"
    "about: {institution: An office, creator: A hand, license: none}\n"
    "lake:\n"
    "  name: Test water\n"
    "  datum: test zero\n"
    "  still_water: {file: pool.csv, utc_offset: '+01:00'}\n"
    "  water_temperature: 8 degC\n"
    "  axis: {profile: axis.csv, made_for: 12 m, end: {level: 10 m}}\n"
    "  bed: {manning: 0.025 s m-1/3}\n"
    "wind:\n"
    "  record: wind.csv\n"
    "  speed: {column: speed, unit: m/s}\n"
    "  missing: [-9, none]\n"
    "  gaps: split\n"
    "  largest_gap: 1 h\n"
    "  height: 8 m\n"
    "  over: {land: {roughness_length: 3 cm, to_water: 1.2}}\n"
    "stress: {drag: {table: drag.csv}, air_temperature: 4 degC}\n"
    "uncertainty: {wind: 10 percent, depth: 20 cm}\n"
    "stations:\n"
    "  - {name: Quay, at: 1 km, bed: 7 m, above: [10.1 m, 10.2 m]}\n"
    "  - {name: Landing, at: 9 km, below: 9.9 m}\n"
    "run: {from: 2031-01-01T01:00Z, every: 30 min}\n"
    "solver: {cells: 4, step: 10 min}\n";

#define WATER                                                                 \
    "lake:\n"                                                                 \
    "  still_water: 10 m\n"                                                   \
    "  axis: {bearing: 90 degree, profile: axis.csv}\n"                       \
    "stress: {drag: garratt-linear-1977, air_density: 1.25 kg m-3}\n"         \
    "stations:\n"                                                             \
    "  - {name: Quay \xC3\xA9, at: 1 km, bed: 7 m, above: [10.01 m, 10.2 m]}" \
    "\n"                                                                      \
    "solver: {cells: 4, step: 20 min}\n"

static const char given_text[] =
    "title: Winds\n" WATER
    "wind: {winds: [{speed: 18 m/s, from: 270 degree, duration: 1 min},\n"
    "  {speed: 30 m/s, from: 90 degree}, {speed: 9 m/s, from: 0 degree},\n"
    "  {speed: 12 m/s, from: 45 degree}]}\n";

static const char recorded_text[] =
    "title: Record\n" WATER
    "wind: {record: wind.csv, gaps: split, largest_gap: 1 h}\n"
    "run: {every: 60 min}\n";

static lee_case read_desk(const char *name, const char *text) {
    lee_case read = {0};
    lee_error error = {0};
    if (lee_case_read(folder_write(&folder, name, text), &read, &error) !=
        LEE_OK) {
        fail_msg("%s", error.message);
    }
    return read;
}

static int lay_desk(void **state) {
    const lee_run_options options = {.has_range = true, .keep_range = true};
    (void)make_folder(state);
    desk.wind = folder_write(&folder, "wind.csv", wind_text);
    desk.axis = folder_write(&folder, "axis.csv", axis_text);
    (void)folder_write(&folder, "drag.csv",
                       "speed [m/s],coefficient\n0,0.001\n30,0.002\n");
    (void)folder_write(&folder, "pool.csv",
                       "time,level [m]\n2031-01-01T00:00,10\n"
                       "2031-01-01T08:00,10.1\n");
    desk.everything = folder_write(&folder, "all.yaml", everything_text);
    desk.given = read_desk("given.yaml", given_text);
    desk.recorded = read_desk("recorded.yaml", recorded_text);
    assert_int_equal(
        lee_estimate_steady(&desk.given.problem, &desk.steady, NULL), LEE_OK);
    assert_int_equal(
        lee_estimate_run(&desk.recorded.problem, &options, &desk.run, NULL),
        LEE_OK);
    assert_int_equal(
        lee_check_problem(&desk.recorded.problem, &desk.check, NULL), LEE_OK);
    (void)snprintf(desk.target, sizeof desk.target, "%s/out.csv", folder.path);
    return 0;
}

static int clear_desk(void **state) {
    lee_problem_check_free(&desk.check);
    lee_run_result_free(&desk.run);
    lee_steady_result_free(&desk.steady);
    lee_case_free(&desk.recorded);
    lee_case_free(&desk.given);
    return remove_folder(state);
}

/* Does one thing; what it says goes to `told`. */
typedef lee_status (*job)(FILE *told, lee_error *error);

/* What a job says when nothing fails. */
static void do_undisturbed(job work, captured *told) {
    lee_error error = {0};
    capture_begin(told);
    const lee_status status = work(told->stream, &error);
    (void)capture_end(told);
    if (status != LEE_OK) {
        fail_msg("%s", error.message);
    }
}

static void check_refusal(size_t left, lee_status status,
                          const lee_error *error) {
    if (status != LEE_ERR_MEMORY || error->message[0] == '\0') {
        fail_msg("allocation %zu failed: status %d, '%s'", left + 1,
                 (int)status, error->message);
    }
    assert_int_equal(error->status, LEE_ERR_MEMORY);
}

/* Runs the job with `left` allocations; false when it needs no more. */
static bool falls_short(job work, const captured *whole, size_t left,
                        bool is_for_good) {
    captured told;
    lee_error error = {0};
    capture_begin(&told);
    shortage_begin(left, is_for_good);
    const lee_status status = work(told.stream, &error);
    const size_t refused = shortage_end();
    (void)capture_end(&told);
    if (status != LEE_OK) {
        check_refusal(left, status, &error);
    } else if (told.length != whole->length ||
               memcmp(told.text, whole->text, whole->length) != 0) {
        fail_msg("allocation %zu failed and the result differs", left + 1);
    }
    if (shortage.count > 0) {
        fail_msg("allocation %zu failed: %zu blocks leak", left + 1,
                 shortage.count);
    }
    capture_free(&told);
    return refused > 0;
}

/* Each allocation of a job fails once: the job tells so, or does without and
 * says the same; when all that follow fail too, no job is done. */
static void survives(job work) {
    captured whole;
    do_undisturbed(work, &whole);
    size_t once = 0;
    while (falls_short(work, &whole, once, false)) {
        once++;
    }
    size_t for_good = 0;
    while (falls_short(work, &whole, for_good, true)) {
        for_good++;
    }
    assert_true(once > 0);
    assert_int_equal(for_good, once);
    capture_free(&whole);
}

static lee_status read_case(FILE *told, lee_error *error) {
    lee_case read = {0};
    const lee_status status = lee_case_read(desk.everything, &read, error);
    if (status != LEE_OK) {
        assert_null(read.path);
        return status;
    }
    const lee_problem *problem = &read.problem;
    (void)fprintf(told, "%s %s %zu %zu %zu %zu %g %g %zu\n", read.title,
                  read.license, problem->station_count,
                  problem->station[0].threshold_count, problem->wind.record.n,
                  problem->drag.n, problem->exposure.land_roughness,
                  problem->lake.water_density, read.notes.n);
    (void)fprintf(told, "%g %g %g %g %g\n", problem->uncertainty.depth,
                  problem->exposure.height, problem->air.temperature,
                  problem->station[1].threshold[0].level, problem->solver.step);
    lee_case_free(&read);
    return LEE_OK;
}

static void a_case_is_read_whole_or_not_at_all(void **state) {
    (void)state;
    survives(read_case);
}

static lee_status read_wind(FILE *told, lee_error *error) {
    const lee_wind_csv how = {.column[LEE_WIND_TIME] = {.name = "time"},
                              .column[LEE_WIND_SPEED] = {.name = "speed"},
                              .column[LEE_WIND_FROM] = {.name = "from"}};
    lee_wind_record record = {0};
    const lee_status status =
        lee_wind_read_csv(desk.wind, &how, &record, error);
    for (size_t i = 0; i < record.n; i++) {
        (void)fprintf(told, "%g %g\n", record.east[i], record.north[i]);
    }
    lee_wind_record_free(&record);
    return status;
}

static void a_record_is_read_whole_or_not_at_all(void **state) {
    (void)state;
    survives(read_wind);
}

static lee_status read_axis(FILE *told, lee_error *error) {
    lee_profile profile = {0};
    const lee_status status =
        lee_profile_read_csv(desk.axis, (double)NAN, 10.0, &profile, error);
    for (size_t i = 0; i < profile.n; i++) {
        (void)fprintf(told, "%g %g\n", profile.chainage[i], profile.bed[i]);
    }
    lee_profile_free(&profile);
    return status;
}

static void an_axis_is_read_whole_or_not_at_all(void **state) {
    (void)state;
    survives(read_axis);
}

static lee_status estimate_steady(FILE *told, lee_error *error) {
    lee_steady_result result = {0};
    lee_problem one_wind = desk.given.problem;
    one_wind.wind.given_count = 1;
    const lee_status status = lee_estimate_steady(&one_wind, &result, error);
    for (size_t i = 0; i < result.count; i++) {
        (void)fprintf(told, "%.17g %.17g %zu\n", result.wind[i].set_up.low,
                      result.wind[i].tilt.high, result.wind[i].warnings.n);
    }
    lee_steady_result_free(&result);
    return status;
}

static void steady_levels_are_all_found_or_none(void **state) {
    (void)state;
    survives(estimate_steady);
}

static lee_status estimate_run(FILE *told, lee_error *error) {
    const lee_run_options options = {
        .has_range = true, .keep_range = true, .has_own_error = true};
    lee_run_result result = {0};
    const lee_status status =
        lee_estimate_run(&desk.recorded.problem, &options, &result, error);
    for (size_t i = 0; i < result.n; i++) {
        (void)fprintf(told, "%.17g %.17g\n", result.station[0].level[i],
                      result.station[0].low[i]);
    }
    (void)fprintf(told, "%.17g %zu\n", result.numerical_error,
                  result.warnings.n);
    lee_run_result_free(&result);
    return status;
}

static void a_run_is_done_or_refused(void **state) {
    (void)state;
    survives(estimate_run);
}

static lee_status check_case(FILE *told, lee_error *error) {
    lee_problem_check check = {0};
    const lee_status status =
        lee_check_problem(&desk.recorded.problem, &check, error);
    (void)fprintf(told, "%zu %zu %zu\n", check.pieces, check.method.record.n,
                  check.method.range_members.n);
    lee_problem_check_free(&check);
    return status;
}

static void a_check_is_done_or_refused(void **state) {
    (void)state;
    survives(check_case);
}

static lee_status print_steady(FILE *told, lee_error *error) {
    return lee_print_steady(told, &desk.given, &desk.steady, LEE_UNITS_SI,
                            error);
}

static lee_status print_run(FILE *told, lee_error *error) {
    return lee_print_run(told, &desk.recorded, &desk.run, LEE_UNITS_SI, error);
}

static void takes_no_memory(job work) {
    captured whole;
    do_undisturbed(work, &whole);
    assert_false(falls_short(work, &whole, 0, true));
    capture_free(&whole);
}

static void texts_are_printed_without_any_memory(void **state) {
    (void)state;
    takes_no_memory(print_steady);
    takes_no_memory(print_run);
}

static lee_status json_steady(FILE *told, lee_error *error) {
    lee_steady_result one_wind = desk.steady;
    one_wind.count = 1;
    return lee_json_steady(told, &desk.given, &one_wind, error);
}

static lee_status json_run(FILE *told, lee_error *error) {
    return lee_json_run(told, &desk.recorded, &desk.run, error);
}

static lee_status json_check(FILE *told, lee_error *error) {
    return lee_json_check(told, &desk.recorded, &desk.check, error);
}

static void a_json_summary_is_whole_or_an_error(void **state) {
    (void)state;
    survives(json_steady);
    survives(json_run);
    survives(json_check);
}

static size_t files_in_folder(void) {
    size_t count = 0;
    DIR *all = opendir(folder.path);
    assert_non_null(all);
    for (struct dirent *one; (one = readdir(all)) != NULL;) {
        count +=
            strcmp(one->d_name, ".") != 0 && strcmp(one->d_name, "..") != 0;
    }
    (void)closedir(all);
    return count;
}

/* What was written goes to `told`, and the file away; nothing else may be left
 * behind. */
static lee_status take_away(FILE *told, lee_status status) {
    assert_int_equal(files_in_folder(), folder.count + (status == LEE_OK));
    if (status != LEE_OK) {
        return status;
    }
    FILE *written = fopen(desk.target, "r");
    assert_non_null(written);
    for (int c; (c = fgetc(written)) != EOF;) {
        (void)fputc(c, told);
    }
    (void)fclose(written);
    assert_int_equal(unlink(desk.target), 0);
    return status;
}

static lee_status write_steady(FILE *told, lee_error *error) {
    return take_away(told, lee_write_steady(&(lee_target){.path = desk.target},
                                            &desk.given, &desk.steady, error));
}

static lee_status write_run(FILE *told, lee_error *error) {
    return take_away(told, lee_write_run(&(lee_target){.path = desk.target,
                                                       .with_wind = true},
                                         &desk.recorded, &desk.run, error));
}

static void a_file_is_written_whole_or_not_at_all(void **state) {
    (void)state;
    survives(write_steady);
    survives(write_run);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(a_case_is_read_whole_or_not_at_all),
        cmocka_unit_test(a_record_is_read_whole_or_not_at_all),
        cmocka_unit_test(an_axis_is_read_whole_or_not_at_all),
        cmocka_unit_test(steady_levels_are_all_found_or_none),
        cmocka_unit_test(a_run_is_done_or_refused),
        cmocka_unit_test(a_check_is_done_or_refused),
        cmocka_unit_test(texts_are_printed_without_any_memory),
        cmocka_unit_test(a_json_summary_is_whole_or_an_error),
        cmocka_unit_test(a_file_is_written_whole_or_not_at_all),
    };
    return cmocka_run_group_tests(tests, lay_desk, clear_desk);
}
