/* atomic_file.c - files that appear whole or not at all. */
/* NOLINTNEXTLINE(bugprone-reserved-identifier,readability-identifier-naming) */
#define _XOPEN_SOURCE 700 /* realpath */

#include "formats/atomic_file.h"

#include <errno.h>
#include <fcntl.h>
#include <stdlib.h>
#include <string.h>
#include <sys/stat.h>
#include <unistd.h>

#include "base/text.h"

static lee_status cannot(const char *path, const char *what, int reason,
                         lee_error *error) {
    return lee_fail(error, reason == ENOMEM ? LEE_ERR_MEMORY : LEE_ERR_FILE,
                    "%s: cannot be %s%s%s", path, what, reason == 0 ? "" : ": ",
                    reason == 0 ? "" : strerror(reason));
}

/* What stands at a path before it is written. */
typedef struct target {
    bool exists;
    mode_t mode;
} target;

/* Finds the file to write: `path`, or what a symbolic link leads to. */
static lee_status follow(const char *path, char **followed, lee_error *error) {
    struct stat about;
    if (lstat(path, &about) == 0 && S_ISLNK(about.st_mode)) {
        *followed = realpath(path, NULL);
        return *followed != NULL
                   ? LEE_OK
                   : cannot(path, "followed as a link", errno, error);
    }
    *followed = lee_text_copy(path);
    return *followed != NULL
               ? LEE_OK
               : lee_fail(error, LEE_ERR_MEMORY, "%s: no room", path);
}

/* Refuses what must not be replaced. */
static lee_status judge(const char *path, bool force, target *found,
                        lee_error *error) {
    struct stat about;
    if (stat(path, &about) != 0) {
        *found = (target){.exists = false};
        return errno == ENOENT ? LEE_OK : cannot(path, "written", errno, error);
    }
    *found = (target){.exists = true, .mode = about.st_mode & 0777};
    if (!S_ISREG(about.st_mode)) {
        return lee_fail(error, LEE_ERR_FILE, "%s: is %s; expected a file", path,
                        S_ISDIR(about.st_mode) ? "a directory"
                                               : "a pipe or a device");
    }
    if (!force) {
        return lee_fail(error, LEE_ERR_FILE,
                        "%s: exists already; only --force replaces it", path);
    }
    return LEE_OK;
}

/* Length of "folder/" in a path; 0 when it names none. */
static size_t folder_length(const char *path) {
    const char *slash = strrchr(path, '/');
    return slash == NULL ? 0 : (size_t)(slash + 1 - path);
}

/* Creates a file of a name that is free in the folder of `path`, open for
 * writing, with the permissions that any new file gets. */
static int create_beside(const char *path, char **temporary) {
    enum { ATTEMPTS = 1000 };
    for (int i = 0; i < ATTEMPTS; i++) {
        lee_text name = {0};
        lee_text_add(&name, "%.*s.leewater-%ld-%d", (int)folder_length(path),
                     path, (long)getpid(), i);
        if (name.has_failed) {
            lee_text_free(&name);
            errno = ENOMEM;
            return -1;
        }
        const int file =
            open(name.bytes, O_WRONLY | O_CREAT | O_EXCL | O_CLOEXEC, 0666);
        if (file >= 0) {
            *temporary = name.bytes;
            return file;
        }
        lee_text_free(&name);
        if (errno != EEXIST) {
            return -1;
        }
    }
    return -1;
}

static lee_status open_temporary(lee_atomic_file *file, const target *found,
                                 lee_error *error) {
    const int descriptor = create_beside(file->path, &file->temporary);
    if (descriptor < 0) {
        return cannot(file->path, "created", errno, error);
    }
    file->stream = fdopen(descriptor, "w");
    if (file->stream == NULL) {
        const int reason = errno;
        (void)close(descriptor);
        return cannot(file->path, "created", reason, error);
    }
    if (found->exists && fchmod(descriptor, found->mode) != 0) {
        return cannot(file->path, "given the permissions it had", errno, error);
    }
    return LEE_OK;
}

lee_status lee_atomic_open(const char *path, bool force, lee_atomic_file *file,
                           lee_error *error) {
    *file = (lee_atomic_file){.may_replace = force};
    if (strcmp(path, "-") == 0) {
        file->stream = stdout;
        return LEE_OK;
    }
    if (*path == '\0') {
        return lee_fail(error, LEE_ERR_FILE,
                        "the name of a file to write is blank");
    }
    target found = {0};
    lee_status status = follow(path, &file->path, error);
    if (status == LEE_OK) {
        status = judge(file->path, force, &found, error);
    }
    if (status == LEE_OK) {
        status = open_temporary(file, &found, error);
    }
    if (status != LEE_OK) {
        lee_atomic_discard(file);
    }
    return status;
}

/* Brings all to the disk, or says why not. A write that failed before is told
 * by the stream alone; flushing what it still holds mostly fails again, and
 * then there is a reason to tell. */
static lee_status finish_stream(FILE *stream, bool to_disk, const char *name,
                                lee_error *error) {
    const bool has_failed = ferror(stream) != 0;
    errno = 0;
    if (fflush(stream) != 0 || has_failed ||
        (to_disk && fsync(fileno(stream)) != 0)) {
        return cannot(name, "written to the end", errno, error);
    }
    return LEE_OK;
}

/* Where the file system has no hard links: takes the name with an empty file,
 * which nobody else can then have, and moves the whole one over it. */
static int move_to_free_name(const char *from, const char *to) {
    const int reserved =
        open(to, O_WRONLY | O_CREAT | O_EXCL | O_CLOEXEC, 0666);
    if (reserved < 0) {
        return -1;
    }
    (void)close(reserved);
    if (rename(from, to) == 0) {
        return 0;
    }
    const int reason = errno;
    (void)unlink(to);
    errno = reason;
    return -1;
}

/* Gives the temporary file its name; 0, or -1 and errno. A second name by
 * link() fails where the first is taken, which rename() does not. */
static int place(const lee_atomic_file *file) {
    if (file->may_replace) {
        return rename(file->temporary, file->path);
    }
    if (link(file->temporary, file->path) == 0) {
        return unlink(file->temporary);
    }
    const bool has_links = errno != EPERM && errno != ENOSYS &&
                           errno != ENOTSUP && errno != EMLINK;
    return has_links ? -1 : move_to_free_name(file->temporary, file->path);
}

/* Brings the new name to the disk. Some file systems cannot: the file is
 * whole under its name all the same, so this is no error. */
static void sync_folder(const char *path) {
    const size_t length = folder_length(path);
    lee_text folder = {0};
    lee_text_add(&folder, "%.*s.", (int)length, path);
    const int opened =
        folder.has_failed ? -1 : open(folder.bytes, O_RDONLY | O_CLOEXEC);
    if (opened >= 0) {
        (void)fsync(opened);
        (void)close(opened);
    }
    lee_text_free(&folder);
}

/* Closes and names a temporary file that is whole on the disk. */
static lee_status close_and_place(lee_atomic_file *file, lee_error *error) {
    FILE *stream = file->stream;
    file->stream = NULL;
    if (fclose(stream) != 0) {
        return cannot(file->path, "written to the end", errno, error);
    }
    if (place(file) != 0) {
        const int reason = errno;
        return reason == EEXIST
                   ? lee_fail(error, LEE_ERR_FILE,
                              "%s: has appeared meanwhile and is kept; only "
                              "--force replaces it",
                              file->path)
                   : cannot(file->path, "put in place", reason, error);
    }
    sync_folder(file->path);
    free(file->temporary);
    file->temporary = NULL;
    return LEE_OK;
}

lee_status lee_atomic_commit(lee_atomic_file *file, lee_error *error) {
    const bool is_stdout = file->temporary == NULL;
    lee_status status =
        finish_stream(file->stream, !is_stdout,
                      is_stdout ? "standard output" : file->path, error);
    if (status == LEE_OK && !is_stdout) {
        status = close_and_place(file, error);
    }
    lee_atomic_discard(file);
    return status;
}

void lee_atomic_discard(lee_atomic_file *file) {
    if (file->temporary != NULL) {
        if (file->stream != NULL) {
            (void)fclose(file->stream);
        }
        (void)unlink(file->temporary);
    }
    free(file->temporary);
    free(file->path);
    *file = (lee_atomic_file){0};
}
