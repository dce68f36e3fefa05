/* apart.c - a child process that reads, and what becomes of it. */
#include "formats/apart.h"

#include <errno.h>
#include <fcntl.h>
#include <signal.h>
#include <stdbool.h>
#include <stdint.h>
#include <stdlib.h>
#include <string.h>
#include <sys/resource.h>
#include <sys/stat.h>
#include <sys/wait.h>
#include <unistd.h>

#ifdef __has_feature
#if __has_feature(address_sanitizer) || __has_feature(thread_sanitizer)
#define IS_SANITIZED 1
#endif
#endif
#if defined(__SANITIZE_ADDRESS__) || defined(__SANITIZE_THREAD__)
#define IS_SANITIZED 1
#endif
#ifndef IS_SANITIZED
#define IS_SANITIZED 0
#endif

/* What goes through the pipe first; then the parcel. */
typedef struct report {
    lee_error error;
    uint64_t length; /* of the parcel */
} report;

lee_status lee_parcel_add(lee_parcel *parcel, const void *bytes, size_t length,
                          lee_error *error) {
    if (length > parcel->room - parcel->length) {
        const size_t room = 2 * parcel->room + length + 256;
        char *grown = realloc(parcel->bytes, room);
        if (grown == NULL) {
            return lee_fail(error, LEE_ERR_MEMORY, "no room for %zu bytes",
                            room);
        }
        parcel->bytes = grown;
        parcel->room = room;
    }
    if (length > 0) {
        memcpy(parcel->bytes + parcel->length, bytes, length);
        parcel->length += length;
    }
    return LEE_OK;
}

void lee_parcel_free(lee_parcel *parcel) {
    free(parcel->bytes);
    *parcel = (lee_parcel){0};
}

lee_apart_limits lee_apart_usual_limits(const char *path) {
    /* At least 2 MB of file a second of computing: a tenth of what inflating
     * takes (docs/validation.md). */
    enum { LEAST = 10, BYTES_A_SECOND = 2000000, MOST = 86400 };
    struct stat about;
    uint64_t seconds = LEAST;
    if (stat(path, &about) == 0 && about.st_size > 0) {
        seconds += (uint64_t)about.st_size / BYTES_A_SECOND;
    }
    seconds = seconds < MOST ? seconds : MOST;
    return (lee_apart_limits){.processor_seconds = (unsigned)seconds,
                              .seconds = 6 * (unsigned)seconds,
                              .mebibytes = 4096};
}

/* A limit that can't be set is not worth failing for. */
static void limit(int resource, rlim_t value) {
    struct rlimit bounds;
    if (getrlimit(resource, &bounds) == 0 &&
        (bounds.rlim_max == RLIM_INFINITY || bounds.rlim_max > value)) {
        bounds.rlim_cur = value;
        (void)setrlimit(resource, &bounds);
    }
}

/* Handlers of the caller are no business of the child. An interruption that
 * the caller ignores (nohup, a job in the background) is ignored on; the
 * signals of crashes and limits end the child, whatever the caller blocks. */
static void settle_signals(void) {
    static const int interruptions[] = {SIGINT, SIGTERM, SIGHUP};
    static const int ends[] = {SIGALRM, SIGXCPU, SIGPIPE, SIGSEGV,
                               SIGBUS,  SIGABRT, SIGFPE,  SIGILL};
    sigset_t unblocked;
    (void)sigemptyset(&unblocked);
    for (size_t i = 0; i < sizeof interruptions / sizeof *interruptions; i++) {
        if (signal(interruptions[i], SIG_DFL) == SIG_IGN) {
            (void)signal(interruptions[i], SIG_IGN);
        }
    }
    for (size_t i = 0; i < sizeof ends / sizeof *ends; i++) {
        (void)signal(ends[i], SIG_DFL);
        (void)sigaddset(&unblocked, ends[i]);
    }
    (void)sigprocmask(SIG_UNBLOCK, &unblocked, NULL);
}

/* Streams of the caller are no business of the child; where standard error
 * was closed the pipe may have its number. */
static void settle(const lee_apart_limits *limits, int pipe_end) {
    settle_signals();
    const int nowhere = open("/dev/null", O_WRONLY | O_CLOEXEC);
    if (nowhere >= 0 && pipe_end != STDERR_FILENO) {
        (void)dup2(nowhere, STDERR_FILENO);
    }
    limit(RLIMIT_CORE, 0);
    if (limits->processor_seconds > 0) {
        limit(RLIMIT_CPU, limits->processor_seconds);
    }
    if (limits->mebibytes > 0 && IS_SANITIZED == 0) {
        limit(RLIMIT_AS, (rlim_t)limits->mebibytes << 20U);
    }
    (void)alarm(limits->seconds);
}

static bool write_all(int pipe_end, const void *bytes, size_t length) {
    const char *p = bytes;
    while (length > 0) {
        const ssize_t done = write(pipe_end, p, length);
        if (done < 0 && errno != EINTR) {
            return false;
        }
        p += done > 0 ? done : 0;
        length -= done > 0 ? (size_t)done : 0;
    }
    return true;
}

/* The whole life of the child; it never returns to the caller's code. */
static void live(int pipe_end, lee_apart_work *work, const void *subject) {
    report told = {0};
    lee_parcel found = {0};
    told.error.status = work(subject, &found, &told.error);
    told.length = told.error.status == LEE_OK ? found.length : 0;
    const bool is_told = write_all(pipe_end, &told, sizeof told) &&
                         write_all(pipe_end, found.bytes, (size_t)told.length);
    _exit(is_told ? 0 : 1);
}

/* Reads to the end of the pipe. */
static lee_status listen_to(int pipe_end, lee_parcel *heard, lee_error *error) {
    enum { PIECE = 65536 };
    char piece[PIECE];
    for (;;) {
        const ssize_t got = read(pipe_end, piece, sizeof piece);
        if (got == 0) {
            return LEE_OK;
        }
        if (got < 0 && errno == EINTR) {
            continue;
        }
        if (got < 0) {
            return lee_fail(error, LEE_ERR_FILE, "a pipe cannot be read: %s",
                            strerror(errno));
        }
        const lee_status status =
            lee_parcel_add(heard, piece, (size_t)got, error);
        if (status != LEE_OK) {
            return status;
        }
    }
}

static lee_status judge_death(const char *path, int ended,
                              const lee_apart_limits *limits,
                              lee_error *error) {
    const int by = WIFSIGNALED(ended) ? WTERMSIG(ended) : 0;
    if (by == SIGXCPU || by == SIGALRM) {
        return lee_fail(
            error, LEE_ERR_FORMAT,
            "%s: is damaged, or too slow to read: nothing came of "
            "it within %u seconds",
            path, by == SIGALRM ? limits->seconds : limits->processor_seconds);
    }
    if (by == SIGINT || by == SIGTERM || by == SIGHUP) {
        return lee_fail(error, LEE_ERR_INTERRUPTED,
                        "%s: reading was interrupted", path);
    }
    if (by == SIGKILL) {
        return lee_fail(error, LEE_ERR_MEMORY,
                        "%s: reading was killed from outside, as a system "
                        "short of memory does",
                        path);
    }
    return lee_fail(error, LEE_ERR_FORMAT,
                    "%s: is damaged: the library that reads it broke down "
                    "over it",
                    path);
}

/* Takes the report apart from the parcel behind it. */
static bool unpack(lee_parcel *heard, report *told) {
    if (heard->length < sizeof *told) {
        return false;
    }
    memcpy(told, heard->bytes, sizeof *told);
    if (heard->length - sizeof *told != told->length) {
        return false;
    }
    memmove(heard->bytes, heard->bytes + sizeof *told, (size_t)told->length);
    heard->length = (size_t)told->length;
    return true;
}

static lee_status judge(const char *path, int ended,
                        const lee_apart_limits *limits, lee_parcel *heard,
                        lee_error *error) {
    report told;
    if (!WIFEXITED(ended) || WEXITSTATUS(ended) != 0 || !unpack(heard, &told)) {
        return judge_death(path, ended, limits, error);
    }
    if (told.error.status != LEE_OK && error != NULL) {
        *error = told.error;
    }
    return told.error.status;
}

lee_status lee_apart(const char *path, const lee_apart_limits *limits,
                     lee_apart_work *work, const void *subject,
                     lee_parcel *found, lee_error *error) {
    int ends[2];
    *found = (lee_parcel){0};
    if (pipe(ends) != 0) {
        return lee_fail(error, LEE_ERR_MEMORY, "%s: no pipe can be had: %s",
                        path, strerror(errno));
    }
    const pid_t child = fork();
    if (child == 0) {
        (void)close(ends[0]);
        settle(limits, ends[1]);
        live(ends[1], work, subject);
    }
    (void)close(ends[1]);
    lee_status status;
    if (child < 0) {
        status =
            lee_fail(error, LEE_ERR_MEMORY, "%s: no process can be had: %s",
                     path, strerror(errno));
        (void)close(ends[0]);
    } else {
        int ended = 0;
        status = listen_to(ends[0], found, error);
        (void)close(ends[0]); /* a child that still writes ends by that */
        while (waitpid(child, &ended, 0) < 0 && errno == EINTR) {
        }
        if (status == LEE_OK) {
            status = judge(path, ended, limits, found, error);
        }
    }
    if (status != LEE_OK) {
        lee_parcel_free(found);
    }
    return status;
}
