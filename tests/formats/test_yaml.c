/* A YAML file becomes a tree with places, or one message with a place. */
#include "formats/yaml.h"

#include "support/files.h"

static lee_yaml_node *read_text(void **state, const char *text) {
    lee_yaml_node *root = NULL;
    lee_error error = {0};
    const char *path = folder_write(*state, "a.yaml", text);
    if (lee_yaml_read(path, &root, &error) != LEE_OK) {
        print_error("%s\n", error.message);
        fail();
    }
    return root;
}

/* The bytes are refused as a format error that reads `expected` behind the
 * folder's name, and no tree is handed out. */
static void assert_refused_bytes(void **state, size_t length,
                                 const char bytes[], const char *expected) {
    const char *path = folder_write_bytes(*state, "a.yaml", length, bytes);
    lee_yaml_node *root = NULL;
    lee_error error = {0};
    assert_int_equal(lee_yaml_read(path, &root, &error), LEE_ERR_FORMAT);
    assert_null(root);
    const size_t skipped = strlen(folder.path) + 1;
    assert_string_equal(error.message + skipped, expected);
}

static void assert_refused(void **state, const char *text,
                           const char *expected) {
    assert_refused_bytes(state, strlen(text), text, expected);
}

static void a_mapping_keeps_its_keys_in_order(void **state) {
    lee_yaml_node *root = read_text(state, "lake: Marrow\nwind: 3\n");
    assert_int_equal(root->kind, LEE_YAML_MAPPING);
    assert_int_equal(root->count, 2);
    assert_string_equal(root->child[0]->key, "lake");
    assert_string_equal(root->child[0]->text, "Marrow");
    assert_string_equal(root->child[1]->key, "wind");
    assert_string_equal(root->child[1]->text, "3");
    lee_yaml_free(root);
}

static void keys_and_values_know_their_place(void **state) {
    lee_yaml_node *root = read_text(state, "a:\n  bc: [x, yy]\n");
    const lee_yaml_node *list = lee_yaml_get(root->child[0], "bc");
    assert_non_null(list);
    assert_int_equal(list->kind, LEE_YAML_LIST);
    assert_int_equal(list->key_line, 2);
    assert_int_equal(list->key_column, 3);
    assert_int_equal(list->line, 2);
    assert_int_equal(list->column, 7);
    assert_int_equal(list->child[1]->line, 2);
    assert_int_equal(list->child[1]->column, 11);
    assert_null(list->child[1]->key);
    lee_yaml_free(root);
}

static void columns_count_characters_not_bytes(void **state) {
    lee_yaml_node *root = read_text(state, "n: {\xC3\xA9: 1, b: 2}\n");
    assert_int_equal(root->child[0]->child[1]->key_column, 11);
    lee_yaml_free(root);
}

static void scalars_stay_text(void **state) {
    lee_yaml_node *root = read_text(state, "[no, 0o17, 1:30, .nan, ~, '']\n");
    const char *const texts[] = {"no", "0o17", "1:30", ".nan", "~", ""};
    assert_int_equal(root->count, 6);
    for (size_t i = 0; i < 6; i++) {
        assert_string_equal(root->child[i]->text, texts[i]);
    }
    assert_true(root->child[4]->is_plain);
    assert_false(root->child[5]->is_plain);
    lee_yaml_free(root);
}

static void an_unknown_key_has_no_child(void **state) {
    lee_yaml_node *root = read_text(state, "a: 1\n");
    assert_null(lee_yaml_get(root, "b"));
    assert_null(lee_yaml_get(root->child[0], "a"));
    lee_yaml_free(root);
}

static void json_is_read_too(void **state) {
    lee_yaml_node *root = read_text(state, "{\"a\": {\"b\": [1, 2]}}\n");
    assert_int_equal(lee_yaml_get(root->child[0], "b")->count, 2);
    lee_yaml_free(root);
}

static void a_byte_order_mark_and_crlf_are_read(void **state) {
    lee_yaml_node *root = read_text(state, "\xEF\xBB\xBF"
                                           "a: 1\r\nb: two\r\n");
    assert_string_equal(root->child[0]->key, "a");
    assert_string_equal(root->child[1]->text, "two");
    assert_int_equal(root->child[1]->line, 2);
    lee_yaml_free(root);
}

static void a_mapping_of_many_keys_keeps_them_all(void **state) {
    enum { KEYS = 20000 };
    char *text = malloc(KEYS * 12);
    size_t length = 0;
    for (int i = 0; i < KEYS; i++) {
        length += (size_t)sprintf(text + length, "k%05d: 1\n", i);
    }
    lee_yaml_node *root = read_text(state, text);
    assert_int_equal(root->count, KEYS);
    assert_string_equal(root->child[KEYS - 1]->key, "k19999");
    lee_yaml_free(root);
    free(text);
}

static void a_repeated_key_is_refused_with_both_lines(void **state) {
    assert_refused(state, "a:\n  b: 1\n  c: 2\n  b: 3\n",
                   "a.yaml:4:3: key 'b' is given twice (first on line 2)");
}

static void the_first_of_several_repeated_keys_is_told(void **state) {
    assert_refused(state, "z: 1\na: 1\nz: 2\na: 2\n",
                   "a.yaml:3:1: key 'z' is given twice (first on line 1)");
}

static void one_key_may_stand_in_two_mappings(void **state) {
    lee_yaml_node *root = read_text(state, "a: {b: 1}\nc: {b: 1}\n");
    assert_int_equal(root->count, 2);
    lee_yaml_free(root);
}

static void a_tab_as_indentation_is_refused(void **state) {
    assert_refused(state, "a:\n  b: 1\n\tc: 2\n",
                   "a.yaml:3:1: found a tab character that violates "
                   "indentation (while scanning a plain scalar that began on "
                   "line 2)");
}

static void an_open_bracket_is_refused(void **state) {
    assert_refused(state, "a: {b: 1\nc: 2\n",
                   "a.yaml:2:2: did not find expected ',' or '}' (while "
                   "parsing a flow mapping that began on line 1)");
}

static void anchors_are_refused(void **state) {
    assert_refused(state, "a: &x 1\n",
                   "a.yaml:1:4: anchors ('&') are not allowed here");
    assert_refused(state, "a: &x [1]\n",
                   "a.yaml:1:4: anchors ('&') are not allowed here");
    assert_refused(state, "a: &x {b: 1}\n",
                   "a.yaml:1:4: anchors ('&') are not allowed here");
}

static void aliases_are_refused(void **state) {
    assert_refused(state, "a: *x\n",
                   "a.yaml:1:4: aliases ('*') are not allowed here");
}

static void tags_are_refused(void **state) {
    assert_refused(state, "a: !!str 1\n",
                   "a.yaml:1:4: tags ('!') are not allowed here");
    assert_refused(state, "a: !x [1]\n",
                   "a.yaml:1:4: tags ('!') are not allowed here");
}

static void merge_keys_are_refused(void **state) {
    assert_refused(state, "a:\n  <<: b\n",
                   "a.yaml:2:3: merge keys ('<<') are not allowed here");
}

static void keys_that_are_collections_are_refused(void **state) {
    assert_refused(state, "[a]: 1\n",
                   "a.yaml:1:1: a key has to be a single word");
    assert_refused(state, "? {a: 1}\n: 2\n",
                   "a.yaml:1:3: a key has to be a single word");
    assert_refused(state, "? |\n  a\n: 2\n",
                   "a.yaml:1:3: a key has to be a single word");
}

static void an_empty_key_is_refused(void **state) {
    assert_refused(state, "'': 2\n", "a.yaml:1:1: a key is missing before ':'");
}

static void a_second_document_is_refused(void **state) {
    assert_refused(state, "a: 1\n---\nb: 2\n",
                   "a.yaml:2:1: a second document begins; expected one");
}

static void a_file_without_content_is_refused(void **state) {
    assert_refused(state, "", "a.yaml:1:1: the file is empty");
    assert_refused(state, "# only words\n", "a.yaml:1:1: the file is empty");
    assert_refused(state, "---\n", "a.yaml:1:1: the file is empty");
}

static void an_empty_text_in_quotes_is_content(void **state) {
    lee_yaml_node *root = read_text(state, "''\n");
    assert_int_equal(root->kind, LEE_YAML_SCALAR);
    assert_string_equal(root->text, "");
    lee_yaml_free(root);
}

static void a_nul_byte_is_refused_where_it_stands(void **state) {
    assert_refused_bytes(state, 10, "a: 1\nb: \0\n",
                         "a.yaml:2:4: control characters are not allowed");
}

static void broken_utf8_is_refused_where_it_stands(void **state) {
    assert_refused(state, "a: \xC3\xA9\nb: x\xFF\n",
                   "a.yaml:2:5: invalid leading UTF-8 octet");
    assert_refused(state, "a: \xC3\xA9\xFF\n",
                   "a.yaml:1:5: invalid leading UTF-8 octet");
    assert_refused(state, "a: \xC0\xAF\n",
                   "a.yaml:1:4: invalid length of a UTF-8 sequence");
}

static void brackets_without_end_are_refused_at_depth_32(void **state) {
    enum { DEEP = 100000 };
    char *text = malloc(DEEP + 1);
    memset(text, '[', DEEP);
    text[DEEP] = '\0';
    assert_refused(state, text,
                   "a.yaml:1:33: more than 32 levels inside one another");
    free(text);
}

static void thirty_two_levels_are_read(void **state) {
    char text[80] = "";
    memset(text, '[', 32);
    memset(text + 32, ']', 32);
    lee_yaml_node *root = read_text(state, text);
    assert_int_equal(root->count, 1);
    lee_yaml_free(root);
}

static void more_than_200000_values_are_refused(void **state) {
    enum { VALUES = 200001 };
    char *text = malloc(2 * VALUES + 2);
    for (size_t i = 0; i < VALUES; i++) {
        memcpy(text + 2 * i, i == 0 ? "[1" : ",1", 2);
    }
    memcpy(text + 2 * (size_t)VALUES, "]", 2);
    assert_refused(state, text,
                   "a.yaml:1:400000: more than 200000 values in one file");
    free(text);
}

static void a_file_beyond_a_mebibyte_is_refused(void **state) {
    enum { SIZE = (1 << 20) + 1 };
    char *bytes = malloc(SIZE);
    memset(bytes, 'x', SIZE);
    memcpy(bytes, "a: ", 3);
    assert_refused_bytes(state, SIZE, bytes,
                         "a.yaml: is larger than 1 MiB, the most that is "
                         "read here");
    lee_yaml_node *root = NULL;
    const char *path = folder_write_bytes(*state, "a.yaml", SIZE - 1, bytes);
    assert_int_equal(lee_yaml_read(path, &root, NULL), LEE_OK);
    lee_yaml_free(root);
    free(bytes);
}

static void a_missing_file_is_named(void **state) {
    (void)state;
    lee_yaml_node *root = NULL;
    lee_error error = {0};
    assert_int_equal(lee_yaml_read("not-there.yaml", &root, &error),
                     LEE_ERR_FILE);
    assert_string_equal(
        error.message,
        "not-there.yaml: cannot be opened: No such file or directory");
}

static void a_directory_is_refused(void **state) {
    (void)state;
    lee_yaml_node *root = NULL;
    lee_error error = {0};
    assert_int_equal(lee_yaml_read(folder.path, &root, &error), LEE_ERR_FILE);
    assert_string_equal(error.message + strlen(folder.path),
                        ": is a directory; expected a file");
}

static void a_device_is_refused(void **state) {
    (void)state;
    lee_yaml_node *root = NULL;
    lee_error error = {0};
    assert_int_equal(lee_yaml_read("/dev/null", &root, &error), LEE_ERR_FILE);
    assert_string_equal(error.message,
                        "/dev/null: is a pipe or a device; expected a file");
}

/* Knuth's MMIX congruential generator, so that a failure can be repeated. */
static unsigned next_random(uint64_t *seed) {
    *seed = *seed * 6364136223846793005U + 1442695040888963407U;
    return (unsigned)(*seed >> 33U);
}

static void damage(size_t length, char bytes[], uint64_t *seed) {
    static const char bad[] = "\t\n {}[]:,&*!|>'\"%@`#-?<\\\xFF\xC3~0a";
    const unsigned hits = 1 + next_random(seed) % 4;
    for (unsigned i = 0; i < hits; i++) {
        const size_t place = next_random(seed) % length;
        bytes[place] = bad[next_random(seed) % sizeof bad];
    }
}

static void check_places(const lee_yaml_node *node) {
    assert_true(node->line >= 1 && node->column >= 1);
    assert_true(node->kind != LEE_YAML_SCALAR || node->text != NULL);
    for (size_t i = 0; i < node->count; i++) {
        const bool is_keyed = node->kind == LEE_YAML_MAPPING;
        assert_int_equal(node->child[i]->key != NULL, is_keyed);
        check_places(node->child[i]);
    }
}

/* A damaged file either still reads or is refused with a place: nothing
 * else. Sanitizers watch over the rest. */
static void a_damaged_file_is_read_or_refused_with_a_place(void **state) {
    static const char whole[] =
        "title: January gale\nlake:\n  name: Marrow Tarn # invented\n"
        "  axis: {bearing: 65 degree, profile: marrow.csv}\n"
        "wind:\n  - \"22 m/s\"\n  - 'it''s'\n  - |\n    words\n    more\n";
    uint64_t seed = 20310110;
    size_t refused = 0;
    enum { ROUNDS = 2000 };
    for (int i = 0; i < ROUNDS; i++) {
        char bytes[sizeof whole];
        memcpy(bytes, whole, sizeof whole);
        damage(sizeof whole - 1, bytes, &seed);
        const char *path =
            folder_write_bytes(*state, "a.yaml", sizeof whole - 1, bytes);
        lee_yaml_node *root = NULL;
        lee_error error = {0};
        const lee_status status = lee_yaml_read(path, &root, &error);
        if (status == LEE_OK) {
            check_places(root);
            lee_yaml_free(root);
            continue;
        }
        refused++;
        assert_int_equal(status, LEE_ERR_FORMAT);
        size_t line = 0;
        size_t column = 0;
        const char *place = error.message + strlen(path);
        assert_int_equal(sscanf(place, ":%zu:%zu: ", &line, &column), 2);
        assert_true(line >= 1 && line <= 12 && column >= 1);
    }
    assert_true(refused > ROUNDS / 10 && refused < ROUNDS);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        FOLDER_TEST(a_mapping_keeps_its_keys_in_order),
        FOLDER_TEST(keys_and_values_know_their_place),
        FOLDER_TEST(columns_count_characters_not_bytes),
        FOLDER_TEST(scalars_stay_text),
        FOLDER_TEST(an_unknown_key_has_no_child),
        FOLDER_TEST(json_is_read_too),
        FOLDER_TEST(a_byte_order_mark_and_crlf_are_read),
        FOLDER_TEST(a_mapping_of_many_keys_keeps_them_all),
        FOLDER_TEST(a_repeated_key_is_refused_with_both_lines),
        FOLDER_TEST(the_first_of_several_repeated_keys_is_told),
        FOLDER_TEST(one_key_may_stand_in_two_mappings),
        FOLDER_TEST(a_tab_as_indentation_is_refused),
        FOLDER_TEST(an_open_bracket_is_refused),
        FOLDER_TEST(anchors_are_refused),
        FOLDER_TEST(aliases_are_refused),
        FOLDER_TEST(tags_are_refused),
        FOLDER_TEST(merge_keys_are_refused),
        FOLDER_TEST(keys_that_are_collections_are_refused),
        FOLDER_TEST(an_empty_key_is_refused),
        FOLDER_TEST(a_second_document_is_refused),
        FOLDER_TEST(a_file_without_content_is_refused),
        FOLDER_TEST(an_empty_text_in_quotes_is_content),
        FOLDER_TEST(a_nul_byte_is_refused_where_it_stands),
        FOLDER_TEST(broken_utf8_is_refused_where_it_stands),
        FOLDER_TEST(brackets_without_end_are_refused_at_depth_32),
        FOLDER_TEST(thirty_two_levels_are_read),
        FOLDER_TEST(more_than_200000_values_are_refused),
        FOLDER_TEST(a_file_beyond_a_mebibyte_is_refused),
        FOLDER_TEST(a_missing_file_is_named),
        FOLDER_TEST(a_directory_is_refused),
        FOLDER_TEST(a_device_is_refused),
        FOLDER_TEST(a_damaged_file_is_read_or_refused_with_a_place),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
