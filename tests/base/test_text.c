/* Text grows, is shown without harm, and finds the word that was meant. */
#include "support/check.h"

#include <stdlib.h>
#include <string.h>

#include "base/text.h"

static void text_grows_by_what_is_added(void **state) {
    (void)state;
    lee_text text = {0};
    for (int i = 0; i < 1000; i++) {
        lee_text_add(&text, "%d,", i % 10);
    }
    assert_false(text.has_failed);
    assert_int_equal(text.length, 2000);
    assert_int_equal(strlen(text.bytes), 2000);
    assert_memory_equal(text.bytes + 1980, "0,1,2,3,4,5,6,7,8,9,", 21);
    lee_text_free(&text);
    assert_null(text.bytes);
}

static void an_addition_longer_than_the_text_is_kept_whole(void **state) {
    (void)state;
    char word[5000];
    memset(word, 'w', sizeof word - 1);
    word[sizeof word - 1] = '\0';
    lee_text text = {0};
    lee_text_add(&text, "%s", word);
    assert_string_equal(text.bytes, word);
    lee_text_free(&text);
}

static void a_copy_is_equal_and_its_own(void **state) {
    (void)state;
    const char *string = "reed";
    char *copy = lee_text_copy(string);
    assert_string_equal(copy, string);
    assert_ptr_not_equal(copy, string);
    free(copy);
}

static void a_copy_of_nothing_is_nothing(void **state) {
    (void)state;
    assert_null(lee_text_copy(NULL));
}

static void trimming_takes_blanks_at_both_ends_only(void **state) {
    (void)state;
    char *trimmed = lee_text_trimmed(" \tm s-1\r\n");
    assert_string_equal(trimmed, "m s-1");
    free(trimmed);
    trimmed = lee_text_trimmed(" \t ");
    assert_string_equal(trimmed, "");
    free(trimmed);
}

/* Bytes and how they are shown. */
static const struct {
    const char *bytes;
    const char *shown;
} showings[] = {
    {"speed",                         "speed"                        },
    {"",                              ""                             },
    {"a\x01\n\x7F\x1B[2J",            "a????[2J"                     },
    {"Gr\xC3\xBC\xC3\x9F",            "Gr\xC3\xBC\xC3\x9F"           },
    {"\xE2\x82\xAC \xF0\x9F\x8C\x8A", "\xE2\x82\xAC \xF0\x9F\x8C\x8A"},
 /* Latin-1 */
    {"\xB0 C",                        "? C"                          },
 /* '/' in more bytes than it takes */
    {"\xC0\xAF",                      "??"                           },
    {"\xE0\x80\xAF",                  "???"                          },
 /* a surrogate; above U+10FFFF; cut off */
    {"\xED\xA0\x80",                  "???"                          },
    {"\xF4\x90\x80\x80",              "????"                         },
    {"\xE2\x82",                      "??"                           },
 /* control sequence introducer; right-to-left override */
    {"\302\23331m",                   "?31m"                         },
    {"\342\200\256txt",               "?txt"                         },
};

static void what_is_shown_can_be_printed(void **state) {
    (void)state;
    for (size_t i = 0; i < sizeof showings / sizeof showings[0]; i++) {
        char shown[LEE_SHOWN];
        const char *bytes = showings[i].bytes;
        assert_ptr_equal(lee_text_show(strlen(bytes), bytes, shown), shown);
        assert_string_equal(shown, showings[i].shown);
    }
}

static void a_nul_byte_is_shown_as_a_question_mark(void **state) {
    (void)state;
    char shown[LEE_SHOWN];
    assert_string_equal(lee_text_show(3, "a\0b", shown), "a?b");
}

static void forty_characters_are_shown_whole(void **state) {
    (void)state;
    char shown[LEE_SHOWN];
    const char *forty = "1234567890123456789012345678901234567890";
    assert_string_equal(lee_text_show(40, forty, shown), forty);
}

static void what_is_longer_is_cut_and_says_so(void **state) {
    (void)state;
    char shown[LEE_SHOWN];
    assert_string_equal(
        lee_text_show(41, "12345678901234567890123456789012345678901", shown),
        "1234567890123456789012345678901234567890...");
}

static void a_cut_never_parts_a_character(void **state) {
    (void)state;
    char bytes[4 * 20 + 1] = "";
    for (int i = 0; i < 20; i++) {
        strcat(bytes, "\xF0\x9F\x8C\x8A");
    }
    char shown[LEE_SHOWN];
    lee_text_show(strlen(bytes), bytes, shown);
    /* 11 waves of 4 bytes, 3 dots and the terminator are 48 bytes. */
    assert_int_equal(strlen(shown), 47);
    assert_memory_equal(shown, bytes, 44);
    assert_string_equal(shown + 44, "...");
}

static void bytes_that_are_no_character_are_mended(void **state) {
    (void)state;
    char *mended = lee_text_mended("a\xFF\xC3\xA9\xC3");
    assert_string_equal(mended, "a\xEF\xBF\xBD\xC3\xA9\xEF\xBF\xBD");
    free(mended);
}

static void a_text_without_bytes_is_mended_to_one(void **state) {
    (void)state;
    char *mended = lee_text_mended("");
    assert_string_equal(mended, "");
    free(mended);
}

static void what_fits_ends_with_a_whole_character(void **state) {
    (void)state;
    assert_int_equal(lee_text_fits("ab\xC3\xA9", 4), 4);
    assert_int_equal(lee_text_fits("ab\xC3\xA9", 3), 2);
    assert_int_equal(lee_text_fits("ab", 9), 2);
}

static const char *const words[] = {"depth", "width", "fetch", "from", "to"};

static const char *nearest(const char *word) {
    return lee_text_nearest(word, sizeof words / sizeof words[0], words);
}

static void a_word_with_one_slip_is_recognised(void **state) {
    (void)state;
    assert_string_equal(nearest("fetsh"), "fetch");  /* a letter changed   */
    assert_string_equal(nearest("fech"), "fetch");   /* a letter left out  */
    assert_string_equal(nearest("fettch"), "fetch"); /* a letter too many  */
    assert_string_equal(nearest("wdith"), "width");  /* neighbours swapped */
}

static void letters_of_either_case_are_alike(void **state) {
    (void)state;
    assert_string_equal(nearest("DEPTH"), "depth");
}

static void two_slips_in_a_short_word_are_too_many(void **state) {
    (void)state;
    assert_null(nearest("fitsh"));
}

static void three_slips_in_a_long_word_are_recognised(void **state) {
    (void)state;
    const char *const known[] = {"roughness_length"};
    assert_ptr_equal(lee_text_nearest("rouhgnes_lenght", 1, known), known[0]);
    assert_null(lee_text_nearest("rouhgnes_lngthh!", 1, known));
}

static void the_nearest_of_two_near_words_is_chosen(void **state) {
    (void)state;
    const char *const known[] = {"speed_from", "speed_form_x", "speed_to"};
    assert_ptr_equal(lee_text_nearest("speed_form", 3, known), known[0]);
}

static void the_first_of_two_words_equally_near_is_chosen(void **state) {
    (void)state;
    const char *const known[] = {"nord", "nort"};
    assert_ptr_equal(lee_text_nearest("nor", 2, known), known[0]);
}

static void an_endless_word_is_near_nothing(void **state) {
    (void)state;
    char word[3000];
    memset(word, 'a', sizeof word - 1);
    word[sizeof word - 1] = '\0';
    assert_null(nearest(word));
}

static void sameness_ignores_case_and_nothing_else(void **state) {
    (void)state;
    assert_true(lee_text_same("Speed", "sPEED"));
    assert_true(lee_text_same("", ""));
    assert_false(lee_text_same("speed", "speeds"));
    assert_false(lee_text_same("speeds", "speed"));
    assert_false(lee_text_same("a[b", "a{b"));
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(text_grows_by_what_is_added),
        cmocka_unit_test(an_addition_longer_than_the_text_is_kept_whole),
        cmocka_unit_test(a_copy_is_equal_and_its_own),
        cmocka_unit_test(a_copy_of_nothing_is_nothing),
        cmocka_unit_test(trimming_takes_blanks_at_both_ends_only),
        cmocka_unit_test(what_is_shown_can_be_printed),
        cmocka_unit_test(a_nul_byte_is_shown_as_a_question_mark),
        cmocka_unit_test(forty_characters_are_shown_whole),
        cmocka_unit_test(what_is_longer_is_cut_and_says_so),
        cmocka_unit_test(a_cut_never_parts_a_character),
        cmocka_unit_test(bytes_that_are_no_character_are_mended),
        cmocka_unit_test(a_text_without_bytes_is_mended_to_one),
        cmocka_unit_test(what_fits_ends_with_a_whole_character),
        cmocka_unit_test(a_word_with_one_slip_is_recognised),
        cmocka_unit_test(letters_of_either_case_are_alike),
        cmocka_unit_test(two_slips_in_a_short_word_are_too_many),
        cmocka_unit_test(three_slips_in_a_long_word_are_recognised),
        cmocka_unit_test(the_nearest_of_two_near_words_is_chosen),
        cmocka_unit_test(the_first_of_two_words_equally_near_is_chosen),
        cmocka_unit_test(an_endless_word_is_near_nothing),
        cmocka_unit_test(sameness_ignores_case_and_nothing_else),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
