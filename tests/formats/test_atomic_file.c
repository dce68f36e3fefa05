/* A file appears whole or not at all, and what was there stays till then. */
#include "support/check.h"
#include "support/files.h"

#include <dirent.h>
#include <fcntl.h>
#include <signal.h>
#include <sys/resource.h>
#include <sys/stat.h>

#include "formats/atomic_file.h"

/* Path of a name in the folder. */
static const char *in_folder(const char *name, char path[FOLDER_PATH]) {
    (void)snprintf(path, FOLDER_PATH, "%s/%s", folder.path, name);
    return path;
}

static int files_in_folder(void) {
    int count = 0;
    DIR *all = opendir(folder.path);
    assert_non_null(all);
    for (struct dirent *one; (one = readdir(all)) != NULL;) {
        count +=
            strcmp(one->d_name, ".") != 0 && strcmp(one->d_name, "..") != 0;
    }
    (void)closedir(all);
    return count;
}

static void assert_holds(const char *path, const char *text) {
    char bytes[64] = "";
    FILE *file = fopen(path, "r");
    assert_non_null(file);
    const size_t length = fread(bytes, 1, sizeof bytes - 1, file);
    (void)fclose(file);
    assert_int_equal(length, strlen(text));
    assert_string_equal(bytes, text);
}

static void assert_missing(const char *path) {
    struct stat about;
    assert_int_not_equal(lstat(path, &about), 0);
}

static lee_atomic_file opened(const char *path, bool force) {
    lee_atomic_file file = {0};
    lee_error error = {0};
    const lee_status status = lee_atomic_open(path, force, &file, &error);
    assert_string_equal(error.message, "");
    assert_int_equal(status, LEE_OK);
    return file;
}

static void commit(lee_atomic_file *file) {
    lee_error error = {0};
    const lee_status status = lee_atomic_commit(file, &error);
    assert_string_equal(error.message, "");
    assert_int_equal(status, LEE_OK);
}

/* Fails unless opening is refused with "path<expected>". */
static void refused(const char *path, bool force, const char *expected) {
    lee_atomic_file file = {0};
    lee_error error = {0};
    assert_int_equal(lee_atomic_open(path, force, &file, &error), LEE_ERR_FILE);
    char message[256];
    (void)snprintf(message, sizeof message, "%s%s", path, expected);
    assert_string_equal(error.message, message);
    assert_null(file.stream);
}

/* Fails unless committing is refused with "path<expected>". */
static void refused_commit(lee_atomic_file *file, const char *path,
                           const char *expected) {
    lee_error error = {0};
    assert_int_equal(lee_atomic_commit(file, &error), LEE_ERR_FILE);
    char message[256];
    (void)snprintf(message, sizeof message, "%s%s", path, expected);
    assert_string_equal(error.message, message);
}

static void a_new_file_appears_when_it_is_committed(void **state) {
    (void)state;
    char path[FOLDER_PATH];
    lee_atomic_file file = opened(in_folder("new.csv", path), false);
    assert_true(fputs("time,level\n", file.stream) >= 0);
    assert_missing(path);
    commit(&file);
    assert_holds(path, "time,level\n");
    assert_int_equal(files_in_folder(), 1);
}

static void a_file_in_the_working_folder_needs_no_slash(void **state) {
    (void)state;
    lee_atomic_file file = opened("test-atomic.csv", true);
    assert_true(fputs("here", file.stream) >= 0);
    commit(&file);
    assert_holds("test-atomic.csv", "here");
    (void)remove("test-atomic.csv");
}

static void what_is_discarded_leaves_nothing(void **state) {
    (void)state;
    char path[FOLDER_PATH];
    lee_atomic_file file = opened(in_folder("new.csv", path), false);
    assert_true(fputs("half", file.stream) >= 0);
    lee_atomic_discard(&file);
    assert_int_equal(files_in_folder(), 0);
    lee_atomic_discard(&file); /* twice does no harm */
}

static void discarding_after_committing_keeps_the_file(void **state) {
    (void)state;
    char path[FOLDER_PATH];
    lee_atomic_file file = opened(in_folder("new.csv", path), false);
    commit(&file);
    lee_atomic_discard(&file);
    assert_holds(path, "");
}

static void a_file_that_exists_is_replaced_by_force_only(void **state) {
    (void)state;
    const char *path = folder_write(&folder, "old.csv", "old");
    refused(path, false, ": exists already; only --force replaces it");
    assert_holds(path, "old");
    lee_atomic_file file = opened(path, true);
    assert_true(fputs("new", file.stream) >= 0);
    assert_holds(path, "old");
    commit(&file);
    assert_holds(path, "new");
    assert_int_equal(files_in_folder(), 1);
}

static void discarding_keeps_the_file_that_was_to_be_replaced(void **state) {
    (void)state;
    const char *path = folder_write(&folder, "old.csv", "old");
    lee_atomic_file file = opened(path, true);
    assert_true(fputs("new", file.stream) >= 0);
    lee_atomic_discard(&file);
    assert_holds(path, "old");
    assert_int_equal(files_in_folder(), 1);
}

static void a_file_that_appears_meanwhile_is_kept(void **state) {
    (void)state;
    char path[FOLDER_PATH];
    lee_atomic_file file = opened(in_folder("race.csv", path), false);
    assert_true(fputs("mine", file.stream) >= 0);
    folder_write(&folder, "race.csv", "theirs");
    refused_commit(&file, path,
                   ": has appeared meanwhile and is kept; only --force "
                   "replaces it");
    assert_holds(path, "theirs");
    assert_int_equal(files_in_folder(), 1);
}

static void two_files_can_be_written_at_once(void **state) {
    (void)state;
    char a[FOLDER_PATH];
    char b[FOLDER_PATH];
    lee_atomic_file first = opened(in_folder("a.csv", a), false);
    lee_atomic_file second = opened(in_folder("b.csv", b), false);
    assert_true(fputs("a", first.stream) >= 0);
    assert_true(fputs("b", second.stream) >= 0);
    commit(&first);
    commit(&second);
    assert_holds(a, "a");
    assert_holds(b, "b");
}

static void what_is_no_file_is_never_replaced(void **state) {
    (void)state;
    char pipe[FOLDER_PATH];
    assert_int_equal(mkfifo(in_folder("pipe", pipe), 0600), 0);
    refused(pipe, true, ": is a pipe or a device; expected a file");
    refused("/dev/null", true, ": is a pipe or a device; expected a file");
    refused(folder.path, true, ": is a directory; expected a file");
    refused("", true, "the name of a file to write is blank");
    assert_int_equal(files_in_folder(), 1);
}

static void a_folder_that_is_not_there_is_an_error(void **state) {
    (void)state;
    refused("no/such/levels.csv", false,
            ": cannot be created: No such file or directory");
}

static void
the_file_behind_a_link_is_replaced_and_the_link_stays(void **state) {
    (void)state;
    const char *path = folder_write(&folder, "real.csv", "old");
    char link[FOLDER_PATH];
    assert_int_equal(symlink("real.csv", in_folder("link.csv", link)), 0);
    lee_atomic_file file = {0};
    lee_error error = {0};
    assert_int_equal(lee_atomic_open(link, false, &file, &error), LEE_ERR_FILE);
    file = opened(link, true);
    assert_true(fputs("new", file.stream) >= 0);
    commit(&file);
    assert_holds(path, "new");
    struct stat about;
    assert_int_equal(lstat(link, &about), 0);
    assert_true(S_ISLNK(about.st_mode));
    assert_int_equal(files_in_folder(), 2);
}

static void a_link_to_nothing_or_to_a_device_is_refused(void **state) {
    (void)state;
    char link[FOLDER_PATH];
    in_folder("link.csv", link);
    assert_int_equal(symlink("nothing.csv", link), 0);
    refused(link, true,
            ": cannot be followed as a link: No such file or directory");
    (void)remove(link);
    assert_int_equal(symlink("/dev/null", link), 0);
    lee_atomic_file file = {0};
    lee_error error = {0};
    assert_int_equal(lee_atomic_open(link, true, &file, &error), LEE_ERR_FILE);
    assert_string_equal(error.message,
                        "/dev/null: is a pipe or a device; expected a file");
    (void)remove(link);
}

static mode_t permissions(const char *path) {
    struct stat about;
    assert_int_equal(stat(path, &about), 0);
    return about.st_mode & 0777;
}

static void a_new_file_has_the_permissions_of_any_new_file(void **state) {
    (void)state;
    char path[FOLDER_PATH];
    const mode_t before = umask(027);
    lee_atomic_file file = opened(in_folder("new.csv", path), false);
    (void)umask(before);
    commit(&file);
    assert_int_equal(permissions(path), 0640);
}

static void a_replaced_file_keeps_its_permissions(void **state) {
    (void)state;
    const char *path = folder_write(&folder, "old.csv", "old");
    assert_int_equal(chmod(path, 0604), 0);
    lee_atomic_file file = opened(path, true);
    commit(&file);
    assert_int_equal(permissions(path), 0604);
}

/* Lets no file of this process grow beyond 8 KiB, as ulimit -f does; returns
 * the limit there was. */
static struct rlimit limit_files(void) {
    struct rlimit before;
    assert_int_equal(getrlimit(RLIMIT_FSIZE, &before), 0);
    const struct rlimit low = {.rlim_cur = 8192, .rlim_max = before.rlim_max};
    (void)signal(SIGXFSZ, SIG_IGN);
    assert_int_equal(setrlimit(RLIMIT_FSIZE, &low), 0);
    return before;
}

static void lift_limit(const struct rlimit *before) {
    assert_int_equal(setrlimit(RLIMIT_FSIZE, before), 0);
    (void)signal(SIGXFSZ, SIG_DFL);
}

static void write_much(lee_atomic_file *file) {
    for (int i = 0; i < 10000; i++) {
        (void)fputs("0123456789\n", file->stream);
    }
}

static void
a_file_that_cannot_grow_is_an_error_and_leaves_nothing(void **state) {
    (void)state;
    char path[FOLDER_PATH];
    lee_atomic_file file = opened(in_folder("large.csv", path), false);
    const struct rlimit before = limit_files();
    write_much(&file);
    lee_error error = {0};
    const lee_status status = lee_atomic_commit(&file, &error);
    lift_limit(&before);
    assert_int_equal(status, LEE_ERR_FILE);
    assert_non_null(strstr(error.message, "large.csv: cannot be written to "
                                          "the end: File too large"));
    assert_int_equal(files_in_folder(), 0);
}

/* The limit is gone when the file is committed: only the stream still knows
 * that something is missing. */
static void a_failed_write_is_not_forgotten(void **state) {
    (void)state;
    const char *path = folder_write(&folder, "old.csv", "old");
    lee_atomic_file file = opened(path, true);
    const struct rlimit before = limit_files();
    write_much(&file);
    lift_limit(&before);
    refused_commit(&file, path, ": cannot be written to the end");
    assert_holds(path, "old");
    assert_int_equal(files_in_folder(), 1);
}

static void a_folder_in_the_place_of_the_file_is_an_error(void **state) {
    (void)state;
    char path[FOLDER_PATH];
    lee_atomic_file file = opened(in_folder("place", path), true);
    assert_int_equal(mkdir(path, 0700), 0);
    refused_commit(&file, path, ": cannot be put in place: Is a directory");
    assert_int_equal(files_in_folder(), 1);
    assert_int_equal(rmdir(path), 0);
}

/* Standard output of this program led elsewhere, and back. */
static int lead_stdout_to(const char *path) {
    (void)fflush(stdout);
    const int before = dup(STDOUT_FILENO);
    const int other = open(path, O_WRONLY | O_CREAT | O_TRUNC, 0600);
    assert_true(before >= 0 && other >= 0);
    assert_true(dup2(other, STDOUT_FILENO) >= 0);
    (void)close(other);
    return before;
}

static void lead_stdout_back(int before) {
    clearerr(stdout);
    assert_true(dup2(before, STDOUT_FILENO) >= 0);
    (void)close(before);
}

static void a_dash_is_standard_output(void **state) {
    (void)state;
    const char *path = folder_write(&folder, "stdout", "");
    const int before = lead_stdout_to(path);
    lee_atomic_file file = {0};
    const lee_status status = lee_atomic_open("-", false, &file, NULL);
    const bool is_stdout = file.stream == stdout;
    (void)fputs("levels\n", file.stream);
    const lee_status committed = lee_atomic_commit(&file, NULL);
    lead_stdout_back(before);
    assert_int_equal(status, LEE_OK);
    assert_true(is_stdout);
    assert_int_equal(committed, LEE_OK);
    assert_holds(path, "levels\n");
}

static void a_full_device_at_standard_output_is_an_error(void **state) {
    (void)state;
    const int before = lead_stdout_to("/dev/full");
    lee_atomic_file file = {0};
    lee_error error = {0};
    const lee_status status = lee_atomic_open("-", false, &file, NULL);
    (void)fputs("levels\n", file.stream);
    const lee_status committed = lee_atomic_commit(&file, &error);
    lead_stdout_back(before);
    assert_int_equal(status, LEE_OK);
    assert_int_equal(committed, LEE_ERR_FILE);
    assert_string_equal(error.message,
                        "standard output: cannot be written to the end: No "
                        "space left on device");
}

static int remove_all(void **state) {
    static const char *const names[] = {"new.csv", "race.csv", "a.csv",
                                        "b.csv",   "pipe",     "link.csv"};
    for (size_t i = 0; i < sizeof names / sizeof names[0]; i++) {
        char path[FOLDER_PATH];
        (void)remove(in_folder(names[i], path));
    }
    return remove_folder(state);
}

#define TEST(name) \
    cmocka_unit_test_setup_teardown(name, make_folder, remove_all)

int main(void) {
    const struct CMUnitTest tests[] = {
        TEST(a_new_file_appears_when_it_is_committed),
        TEST(a_file_in_the_working_folder_needs_no_slash),
        TEST(what_is_discarded_leaves_nothing),
        TEST(discarding_after_committing_keeps_the_file),
        TEST(a_file_that_exists_is_replaced_by_force_only),
        TEST(discarding_keeps_the_file_that_was_to_be_replaced),
        TEST(a_file_that_appears_meanwhile_is_kept),
        TEST(two_files_can_be_written_at_once),
        TEST(what_is_no_file_is_never_replaced),
        TEST(a_folder_that_is_not_there_is_an_error),
        TEST(the_file_behind_a_link_is_replaced_and_the_link_stays),
        TEST(a_link_to_nothing_or_to_a_device_is_refused),
        TEST(a_new_file_has_the_permissions_of_any_new_file),
        TEST(a_replaced_file_keeps_its_permissions),
        TEST(a_file_that_cannot_grow_is_an_error_and_leaves_nothing),
        TEST(a_failed_write_is_not_forgotten),
        TEST(a_folder_in_the_place_of_the_file_is_an_error),
        TEST(a_dash_is_standard_output),
        TEST(a_full_device_at_standard_output_is_an_error),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
