/* Slips of form are told with their place and what was expected. */
#include "support/case_text.h"

static void an_unknown_key_is_told_with_the_nearest_known(void **state) {
    static const case_slip slips[] = {
        SLIP("lkae: {}\n" LAKE,
             "a.yaml:1:1: unknown key 'lkae' in the case file; did you mean "
             "'lake'?"),
        SLIP(LAKE "  altitute: 3 m\n",
             "a.yaml:4:3: unknown key 'altitute' in 'lake'; did you mean "
             "'altitude'?"),
        SLIP(
            LAKE "wind: {spede: 3 m/s, from: 4 degree, speed: 3 m/s}\n",
            "a.yaml:4:8: unknown key 'spede' in 'wind'; did you mean 'speed'?"),
        SLIP(LAKE "stations: [{name: a, at: 1 km, abvoe: 3 m}]\n",
             "a.yaml:4:32: unknown key 'abvoe' in 'stations[1]'; did you mean "
             "'above'?"),
        SLIP(LAKE "  bed: {maning: 0.02}\n",
             "a.yaml:4:9: unknown key 'maning' in 'lake.bed'; did you mean "
             "'manning'?"),
    };
    assert_all_told(state, slips);
}

static void an_unknown_key_far_from_all_is_told_with_the_list(void **state) {
    static const case_slip slips[] = {
        SLIP(LAKE "solver: {threads: 4}\n",
             "a.yaml:4:10: unknown key 'threads' in 'solver'; expected cells, "
             "step, dry_depth, advection"),
        SLIP(LAKE "fjord: 3\n",
             "a.yaml:4:1: unknown key 'fjord' in the case file"),
    };
    assert_all_told(state, slips);
}

static void a_required_key_is_missed(void **state) {
    static const case_slip slips[] = {
        SLIP("title: no lake\n",
             "a.yaml:1:1: required key 'lake' is missing from the case file"),
        SLIP(
            "lake: {axis: {bearing: 1 deg, uniform: {length: 1 km, depth: 1 m, "
            "width: 1 m}}}\n",
            "a.yaml:1:7: required key 'still_water' is missing from 'lake'"),
        SLIP("lake:\n  still_water: 1 m\n",
             "a.yaml:2:3: required key 'axis' is missing from 'lake'"),
        SLIP(LAKE "stations: [{name: quay}]\n",
             "a.yaml:4:12: required key 'at' is missing from 'stations[1]'"),
        SLIP(LAKE "storm: {from: 1 degree, rise: 1 h, fall: 1 h}\n",
             "a.yaml:4:8: required key 'peak' is missing from 'storm'"),
    };
    assert_all_told(state, slips);
}

static void a_value_of_the_wrong_kind_is_told(void **state) {
    static const case_slip slips[] = {
        SLIP("- lake\n",
             "a.yaml:1:1: the case file should hold keys such as 'lake:' and "
             "'wind:', but is a list"),
        SLIP("lake\n",
             "a.yaml:1:1: the case file should hold keys such as 'lake:' and "
             "'wind:', but is a single value"),
        SLIP("lake: 3 m\n",
             "a.yaml:1:7: 'lake' should hold keys, but is a single value"),
        SLIP(LAKE "  altitude: [3 m]\n",
             "a.yaml:4:13: 'lake.altitude' should be a single value such as "
             "'12 m', but is a list"),
        SLIP(LAKE "  altitude: {a: 3 m}\n",
             "a.yaml:4:13: 'lake.altitude' should be a single value such as "
             "'12 m', but is a mapping"),
        SLIP(
            LAKE "title: [a]\n",
            "a.yaml:4:8: 'title' should be a single value such as 'some text', "
            "but is a list"),
        SLIP(
            LAKE "run: {start: [rest]}\n",
            "a.yaml:4:14: 'run.start' should be a single value such as 'rest', "
            "but is a list"),
        SLIP(LAKE "stations: {name: a}\n",
             "a.yaml:4:11: 'stations' should be a list of 1 to 1000 stations "
             "such as [{name: North quay, at: 0.4 km}]"),
        SLIP(LAKE "stations: [quay]\n",
             "a.yaml:4:12: 'stations[1]' should hold keys, but is a single "
             "value"),
    };
    assert_all_told(state, slips);
}

static void an_empty_value_is_told(void **state) {
    static const case_slip slips[] = {
        SLIP(LAKE "  altitude:\n",
             "a.yaml:4:12: 'lake.altitude' is empty; expected a value such as "
             "'12 m'"),
        SLIP(LAKE "title: ''\n",
             "a.yaml:4:8: 'title' is empty; expected a value such as 'some "
             "text'"),
    };
    assert_all_told(state, slips);
}

static void a_quantity_needs_a_unit_that_fits(void **state) {
    static const case_slip slips[] = {
        SLIP(LAKE "  altitude: 340\n",
             "a.yaml:4:13: 'lake.altitude' cannot be read: '340' has no unit; "
             "write 340 m"),
        SLIP(LAKE "  altitude: 340 metrs\n",
             "a.yaml:4:13: 'lake.altitude' cannot be read: unit 'metrs' is not "
             "known"),
        SLIP(LAKE "  altitude: 340 kg\n",
             "a.yaml:4:13: 'lake.altitude' cannot be read: unit 'kg' cannot be "
             "converted to m"),
        SLIP(LAKE "wind: {speed: 15 knotz, from: 4 degree}\n",
             "a.yaml:4:15: 'wind.speed' cannot be read: unit 'knotz' is not "
             "known"),
        SLIP(LAKE "uncertainty: {wind: 1 m}\n",
             "a.yaml:4:21: 'uncertainty.wind' cannot be read: unit 'm' cannot "
             "be converted to a plain number"),
    };
    assert_all_told(state, slips);
}

static void what_is_no_finite_number_is_told(void **state) {
    static const case_slip slips[] = {
        SLIP(LAKE "  altitude: .nan\n",
             "a.yaml:4:13: 'lake.altitude' cannot be read: '.nan' is not a "
             "number with its unit; expected one such as 12 m"),
        SLIP(LAKE "  altitude: NaN m\n",
             "a.yaml:4:13: 'lake.altitude' cannot be read: 'NaN m' is not a "
             "number with its unit; expected one such as 12 m"),
        SLIP(LAKE "  altitude: 1e999 m\n",
             "a.yaml:4:13: 'lake.altitude' cannot be read: '1e999 m' is not a "
             "finite number"),
        SLIP(LAKE "  altitude: high\n",
             "a.yaml:4:13: 'lake.altitude' cannot be read: 'high' is not a "
             "number with its unit; expected one such as 12 m"),
        SLIP(LAKE "stress: {drag_cap: 1e999}\n",
             "a.yaml:4:20: 'stress.drag_cap' cannot be read: '1e999' is not a "
             "finite number"),
    };
    assert_all_told(state, slips);
}

#define UNIFORM(shape)                                     \
    "lake: {still_water: 1 m, axis: {bearing: 9 degree,\n" \
    "uniform: {" shape "}}}\n"

static void a_negative_size_is_refused_everywhere(void **state) {
    static const case_slip slips[] = {
        SLIP(
            UNIFORM("length: -1 km, depth: 1 m, width: 1 m"),
            "a.yaml:2:19: 'lake.axis.uniform.length' is '-1 km'; expected more "
            "than 0 and up to 2000000 m"),
        SLIP(UNIFORM("length: 1 km, depth: -1 m, width: 1 m"),
             "a.yaml:2:32: 'lake.axis.uniform.depth' is '-1 m'; expected more "
             "than 0 and up to 2000 m"),
        SLIP(UNIFORM("length: 1 km, depth: 1 m, width: -1 m"),
             "a.yaml:2:44: 'lake.axis.uniform.width' is '-1 m'; expected more "
             "than 0 and up to 1000000 m"),
        SLIP(
            LAKE "  water_density: -1000 kg m-3\n",
            "a.yaml:4:18: 'lake.water_density' is '-1000 kg m-3'; expected 900 "
            "to 1400 kg m-3"),
        SLIP(LAKE "  gravity: -9.81 m s-2\n",
             "a.yaml:4:12: 'lake.gravity' is '-9.81 m s-2'; expected 9 to 11 m "
             "s-2"),
        SLIP(LAKE "  bed: {manning: -0.02}\n",
             "a.yaml:4:18: 'lake.bed.manning' is '-0.02'; expected more than 0 "
             "and up to 0.5"),
        SLIP(LAKE "wind: {speed: -3 m/s, from: 4 degree}\n",
             "a.yaml:4:15: 'wind.speed' is '-3 m/s'; expected 0 to 100 m/s"),
        SLIP(LAKE "wind: {speed: 3 m/s, from: 4 degree, height: -2 m}\n",
             "a.yaml:4:46: 'wind.height' is '-2 m'; expected 0.5 to 200 m"),
        SLIP(LAKE "wind: {speed: 3 m/s, from: 4 degree, averaging: -2 min}\n",
             "a.yaml:4:49: 'wind.averaging' is '-2 min'; expected more than 0 "
             "and up to 44640 min"),
        SLIP(LAKE
             "storm: {peak: 3 m/s, from: 1 degree, rise: -1 h, fall: 1 h}\n",
             "a.yaml:4:44: 'storm.rise' is '-1 h'; expected 0 to 240 h"),
        SLIP(LAKE "stress: {air_density: -1 kg m-3}\n",
             "a.yaml:4:23: 'stress.air_density' is '-1 kg m-3'; expected 0.3 "
             "to 2 kg m-3"),
        SLIP(LAKE "stress: {drag: -1e-3}\n",
             "a.yaml:4:16: 'stress.drag' is '-1e-3'; expected more than 0 and "
             "up to 0.02"),
        SLIP(LAKE "uncertainty: {depth: -1 m}\n",
             "a.yaml:4:22: 'uncertainty.depth' is '-1 m'; expected 0 to 100 m"),
        SLIP(LAKE "run: {every: -10 min}\n",
             "a.yaml:4:14: 'run.every' is '-10 min'; expected more than 0 and "
             "up to 44640 min"),
        SLIP(LAKE "solver: {dry_depth: -1 cm}\n",
             "a.yaml:4:21: 'solver.dry_depth' is '-1 cm'; expected more than 0 "
             "and up to 1 m"),
        SLIP(LAKE "solver: {step: -1 s}\n",
             "a.yaml:4:16: 'solver.step' is '-1 s'; expected auto, or 0.01 "
             "to 86400 s"),
    };
    assert_all_told(state, slips);
}

static void zero_is_refused_where_something_has_to_be_there(void **state) {
    static const case_slip slips[] = {
        SLIP(UNIFORM("length: 1 km, depth: 0 m, width: 1 m"),
             "a.yaml:2:32: 'lake.axis.uniform.depth' is '0 m'; expected more "
             "than 0 and up to 2000 m"),
        SLIP(LAKE "  bed: {roughness_length: 0 m}\n",
             "a.yaml:4:27: 'lake.bed.roughness_length' is '0 m'; expected more "
             "than 0 and up to 10 m"),
        SLIP(
            LAKE "run: {every: 0 s}\n",
            "a.yaml:4:14: 'run.every' is '0 s'; expected more than 0 and up to "
            "44640 min"),
    };
    assert_all_told(state, slips);
}

static void a_direction_beyond_the_circle_is_refused(void **state) {
    static const case_slip slips[] = {
        SLIP(LAKE "wind: {speed: 3 m/s, from: 361 degree}\n",
             "a.yaml:4:28: 'wind.from' is '361 degree'; expected 0 to 360 "
             "degree"),
        SLIP(LAKE "wind: {speed: 3 m/s, from: -1 degree}\n",
             "a.yaml:4:28: 'wind.from' is '-1 degree'; expected 0 to 360 "
             "degree"),
    };
    assert_all_told(state, slips);
}

static void a_count_is_a_whole_number_in_range(void **state) {
    static const case_slip slips[] = {
        SLIP(LAKE "solver: {cells: 3}\n",
             "a.yaml:4:17: 'solver.cells' is '3'; expected auto, or 4 to "
             "100000, a whole number"),
        SLIP(LAKE "solver: {cells: 12.5}\n",
             "a.yaml:4:17: 'solver.cells' is '12.5'; expected auto, or 4 to "
             "100000, a whole number"),
        SLIP(LAKE "wind: {speed: 3 m/s, directions: -36}\n",
             "a.yaml:4:34: 'wind.directions' is '-36'; expected 2 to 720, a "
             "whole number"),
    };
    assert_all_told(state, slips);
}

static void a_time_step_of_output_is_whole_seconds(void **state) {
    assert_told(state, LAKE "run: {every: 0.5 s}\n",
                "a.yaml:4:14: 'run.every' is '0.5 s'; expected whole seconds");
}

/* Rounded it would be 0, which stands for automatic. */
static void a_time_step_of_output_is_not_next_to_nothing(void **state) {
    assert_told(state, LAKE "run: {every: 0.5 us}\n",
                "a.yaml:4:14: 'run.every' is '0.5 us'; expected whole "
                "seconds");
}

static void
a_solver_step_below_a_hundredth_of_a_second_is_refused(void **state) {
    assert_told(state, LAKE "solver: {step: 9 ms}\n",
                "a.yaml:4:16: 'solver.step' is '9 ms'; expected auto, or 0.01 "
                "to 86400 s");
}

static void a_word_outside_its_list_is_told_with_the_list(void **state) {
    static const case_slip slips[] = {
        SLIP(LAKE "run: {start: reset}\n",
             "a.yaml:4:14: 'run.start' is 'reset'; expected one of rest, "
             "steady"),
        SLIP(LAKE "solver: {advection: maybe}\n",
             "a.yaml:4:21: 'solver.advection' is 'maybe'; expected one of on, "
             "off, yes, no, true, false"),
    };
    assert_all_told(state, slips);
}

static void each_word_for_on_and_off_is_read(void **state) {
    static const struct {
        const char *text;
        bool is_on;
    } words[] = {
        {LAKE "solver: {advection: on}\n",    true },
        {LAKE "solver: {advection: off}\n",   false},
        {LAKE "solver: {advection: yes}\n",   true },
        {LAKE "solver: {advection: no}\n",    false},
        {LAKE "solver: {advection: true}\n",  true },
        {LAKE "solver: {advection: false}\n", false},
    };
    for (size_t i = 0; i < sizeof words / sizeof words[0]; i++) {
        lee_case c = read_case(state, words[i].text);
        assert_int_equal(c.problem.solver.has_advection, words[i].is_on);
        lee_case_free(&c);
    }
}

static void a_time_that_is_none_is_told(void **state) {
    lee_case c = {0};
    lee_error error = {0};
    const char *path =
        folder_write(*state, "a.yaml", LAKE "run: {from: 2031-13-10}\n");
    assert_int_equal(lee_case_read(path, &c, &error), LEE_ERR_FORMAT);
    assert_non_null(
        strstr(error.message, "a.yaml:4:13: 'run.from' cannot be read: "));
    assert_non_null(strstr(error.message, "2031-13-10"));
}

static void a_text_of_more_than_a_line_is_refused(void **state) {
    static const case_slip slips[] = {
        SLIP(LAKE "title: \"a\\nb\"\n",
             "a.yaml:4:8: 'title' holds a line break, a tab or a control "
             "character"),
        SLIP(LAKE "stations: [{at: 1 km, name: \"a\\eb\"}]\n",
             "a.yaml:4:29: 'stations[1].name' holds a line break, a tab or a "
             "control character"),
    };
    assert_all_told(state, slips);
}

static void a_text_without_end_is_refused(void **state) {
    char text[800] = LAKE "title: ";
    const size_t head = strlen(text);
    memset(text + head, 'x', 501);
    memcpy(text + head + 501, "\n", 2);
    assert_told(state, text,
                "a.yaml:4:8: 'title' is longer than 500 bytes, the most that "
                "is kept");
}

static void what_the_file_holds_is_printed_tamed(void **state) {
    assert_told(state, LAKE "run: {start: \"\\e[31m\"}\n",
                "a.yaml:4:14: 'run.start' is '?[31m'; expected one of rest, "
                "steady");
}

static void a_key_given_twice_is_told_with_both_lines(void **state) {
    assert_told(state, LAKE "title: a\ntitle: b\n",
                "a.yaml:5:1: key 'title' is given twice (first on line 4)");
}

static void several_problems_are_told_in_order_of_their_place(void **state) {
    assert_told(state,
                "lake:\n  still_water: 100\n  axis: {bearing: 65}\n"
                "run: {start: now}\n",
                "a.yaml:2:16: 'lake.still_water' cannot be read: '100' has no "
                "unit; write 100 m\n"
                "a.yaml:3:9: 'lake.axis' needs one of the keys 'profile' and "
                "'uniform'\n"
                "a.yaml:3:19: 'lake.axis.bearing' cannot be read: '65' has no "
                "unit; write 65 degree\n"
                "a.yaml:4:14: 'run.start' is 'now'; expected one of rest, "
                "steady");
}

static size_t count_lines(const char *text) {
    size_t lines = 1;
    for (const char *c = text; *c != '\0'; c++) {
        lines += *c == '\n' ? 1 : 0;
    }
    return lines;
}

static void twenty_problems_are_told_and_the_rest_counted(void **state) {
    char text[1024] = LAKE;
    for (int i = 0; i < 25; i++) {
        char line[16];
        (void)snprintf(line, sizeof line, "z%d: 1\n", i);
        strcat(text, line);
    }
    lee_case c = {0};
    lee_error error = {0};
    const char *path = folder_write(*state, "a.yaml", text);
    assert_int_equal(lee_case_read(path, &c, &error), LEE_ERR_FORMAT);
    assert_int_equal(count_lines(error.message), 21);
    assert_string_equal(strrchr(error.message, '\n'), "\n5 more problems");
}

/* A case of 19 stations with one name and chainages that are none: 19 + 18
 * problems, whose lines grow with `longer`. */
static void assert_told_in_whole_lines(void **state, size_t longer) {
    char text[4096] = LAKE "stations:\n";
    char line[128] = "  - {name: quay, at: far ";
    memset(line + strlen(line), 'r', longer);
    strcat(line, "}\n");
    for (int i = 0; i < 19; i++) {
        strcat(text, line);
    }
    lee_case c = {0};
    lee_error error = {0};
    const char *path = folder_write(*state, "a.yaml", text);
    assert_int_equal(lee_case_read(path, &c, &error), LEE_ERR_FORMAT);
    const char *last = strrchr(error.message, '\n');
    size_t left = 0;
    char rest = '?';
    assert_int_equal(sscanf(last, "\n%zu more problem%c", &left, &rest), 2);
    assert_int_equal(rest, 's');
    assert_int_equal(count_lines(error.message) - 1 + left, 19 + 18);
    const char *told = error.message;
    while (told < last) {
        assert_ptr_equal(strstr(told, path), told);
        told = strchr(told, '\n') + 1;
    }
}

/* A message holds 2047 bytes; lines that do not fit are left out whole,
 * wherever its end falls. */
static void long_problems_are_told_in_whole_lines(void **state) {
    for (size_t longer = 1; longer < 35; longer++) {
        assert_told_in_whole_lines(state, longer);
    }
}

/* Knuth's MMIX congruential generator, so that a failure can be repeated. */
static unsigned next_random(uint64_t *seed) {
    *seed = *seed * 6364136223846793005U + 1442695040888963407U;
    return (unsigned)(*seed >> 33U);
}

/* Whatever one changes in a case, it is read or refused with a message: the
 * sanitizers watch over the rest. */
static void a_damaged_case_is_read_or_refused_with_a_message(void **state) {
    static const char good[] =
        LAKE "  bed: {chezy: 50}\n"
             "wind:\n  winds:\n    - {speed: 20 m/s, from: 240 degree}\n"
             "  over: {land: {roughness_length: 0.1 m, to_water: 1.1}}\n"
             "stress: {drag: wu-1982, drag_cap: none}\n"
             "stations:\n  - {name: a, at: 1 km, above: [101 m, 102 m]}\n"
             "run: {from: 2031-01-10, every: 10 min}\n"
             "solver: {cells: 40, step: auto}\n";
    static const char bytes[] = " \n:{}[],-0129.ekmn";
    uint64_t seed = 20310120;
    size_t refused = 0;
    enum { ROUNDS = 1500 };
    for (int i = 0; i < ROUNDS; i++) {
        char text[sizeof good];
        memcpy(text, good, sizeof good);
        for (unsigned hits = next_random(&seed) % 3 + 1; hits > 0; hits--) {
            text[next_random(&seed) % (sizeof good - 1)] =
                bytes[next_random(&seed) % (sizeof bytes - 1)];
        }
        lee_case c = {0};
        lee_error error = {0};
        const char *path = folder_write(*state, "a.yaml", text);
        const lee_status status = lee_case_read(path, &c, &error);
        if (status == LEE_OK) {
            assert_true(c.problem.lake.profile.n >= 2);
            lee_case_free(&c);
            continue;
        }
        refused++;
        assert_true(status == LEE_ERR_FORMAT || status == LEE_ERR_DATA);
        assert_non_null(strstr(error.message, "a.yaml:"));
    }
    assert_true(refused > ROUNDS / 2 && refused < ROUNDS);
}

static void one_problem_more_than_twenty_is_one_problem(void **state) {
    char text[1024] = LAKE;
    for (int i = 0; i < 21; i++) {
        char line[16];
        (void)snprintf(line, sizeof line, "z%d: 1\n", i);
        strcat(text, line);
    }
    lee_case c = {0};
    lee_error error = {0};
    const char *path = folder_write(*state, "a.yaml", text);
    assert_int_equal(lee_case_read(path, &c, &error), LEE_ERR_FORMAT);
    assert_string_equal(strrchr(error.message, '\n'), "\n1 more problem");
}

static void what_stands_at_the_limit_of_a_key_is_taken(void **state) {
    lee_case low =
        read_case(state, LAKE
                  "wind: {speed: 0 m/s, from: 0 degree, height: 0.5 m}\n"
                  "stress: {air_temperature: -60 degC, air_pressure: 300 hPa,\n"
                  "  drag_cap: 5e-4}\n"
                  "uncertainty: {wind: 0, depth: 0 m, bed: 0}\n"
                  "solver: {cells: 4}\n");
    assert_near(low.problem.air.temperature, 213.15, 1e-10); /* rounding */
    assert_near(low.problem.exposure.height, 0.5, 0.0);
    lee_case_free(&low);
    lee_case high =
        read_case(state, LAKE
                  "wind: {speed: 100 m/s, from: 360 degree, height: 200 m}\n"
                  "stress: {air_temperature: 60 degC, air_pressure: 1100 hPa,\n"
                  "  drag_cap: 0.02}\n"
                  "uncertainty: {wind: 0.9, depth: 100 m, bed: 0.9}\n"
                  "solver: {cells: 100000, step: 86400 s}\n");
    assert_near(high.problem.air.temperature, 333.15, 1e-10);
    assert_near(high.problem.exposure.height, 200.0, 0.0);
    lee_case_free(&high);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        CASE_TEST(an_unknown_key_is_told_with_the_nearest_known),
        CASE_TEST(an_unknown_key_far_from_all_is_told_with_the_list),
        CASE_TEST(a_required_key_is_missed),
        CASE_TEST(a_value_of_the_wrong_kind_is_told),
        CASE_TEST(an_empty_value_is_told),
        CASE_TEST(a_quantity_needs_a_unit_that_fits),
        CASE_TEST(what_is_no_finite_number_is_told),
        CASE_TEST(a_negative_size_is_refused_everywhere),
        CASE_TEST(zero_is_refused_where_something_has_to_be_there),
        CASE_TEST(a_direction_beyond_the_circle_is_refused),
        CASE_TEST(a_count_is_a_whole_number_in_range),
        CASE_TEST(a_time_step_of_output_is_whole_seconds),
        CASE_TEST(a_time_step_of_output_is_not_next_to_nothing),
        CASE_TEST(a_solver_step_below_a_hundredth_of_a_second_is_refused),
        CASE_TEST(a_word_outside_its_list_is_told_with_the_list),
        CASE_TEST(each_word_for_on_and_off_is_read),
        CASE_TEST(a_time_that_is_none_is_told),
        CASE_TEST(a_text_of_more_than_a_line_is_refused),
        CASE_TEST(a_text_without_end_is_refused),
        CASE_TEST(what_the_file_holds_is_printed_tamed),
        CASE_TEST(a_key_given_twice_is_told_with_both_lines),
        CASE_TEST(several_problems_are_told_in_order_of_their_place),
        CASE_TEST(twenty_problems_are_told_and_the_rest_counted),
        CASE_TEST(long_problems_are_told_in_whole_lines),
        CASE_TEST(a_damaged_case_is_read_or_refused_with_a_message),
        CASE_TEST(one_problem_more_than_twenty_is_one_problem),
        CASE_TEST(what_stands_at_the_limit_of_a_key_is_taken),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
