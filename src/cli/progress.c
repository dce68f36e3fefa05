/* progress.c - tells how far a run is, and hears Ctrl-C. */
#include "cli/progress.h"

#include <math.h>
#include <stdio.h>

#include <unistd.h>

/* Seconds (design choices): silence at first, then between two lines. */
static const double silence = 2.0;
static const double pause_on_terminal = 0.5;
static const double pause_in_file = 10.0;

static double since(const struct timespec *start) {
    struct timespec now;
    (void)clock_gettime(CLOCK_MONOTONIC, &now);
    return (double)(now.tv_sec - start->tv_sec) +
           1e-9 * (double)(now.tv_nsec - start->tv_nsec);
}

static void add_unless_ignored(sigset_t *stops, int number) {
    struct sigaction now;
    if (sigaction(number, NULL, &now) == 0 && now.sa_handler != SIG_IGN) {
        (void)sigaddset(stops, number);
    }
}

void progress_begin(progress *at, const char *command, bool is_quiet) {
    *at = (progress){.command = command,
                     .is_quiet = is_quiet,
                     .is_terminal = isatty(STDERR_FILENO) != 0,
                     .next = silence};
    (void)clock_gettime(CLOCK_MONOTONIC, &at->start);
    (void)sigemptyset(&at->stops);
    add_unless_ignored(&at->stops, SIGINT);
    add_unless_ignored(&at->stops, SIGTERM);
    (void)sigprocmask(SIG_BLOCK, &at->stops, &at->before);
}

static bool is_asked_to_stop(const progress *at) {
    static const int signals[] = {SIGINT, SIGTERM};
    sigset_t pending;
    (void)sigemptyset(&pending);
    (void)sigpending(&pending);
    for (size_t i = 0; i < sizeof signals / sizeof signals[0]; i++) {
        if (sigismember(&at->stops, signals[i]) == 1 &&
            sigismember(&pending, signals[i]) == 1) {
            return true;
        }
    }
    return false;
}

static void tell(progress *at, double share) {
    const double percent = floor(100.0 * fmin(fmax(share, 0.0), 1.0));
    if (at->is_terminal) {
        (void)fprintf(stderr, "\rleewater %s: %3.0f %% done", at->command,
                      percent);
        (void)fflush(stderr);
        at->is_shown = true;
    } else {
        (void)fprintf(stderr, "leewater %s: %.0f %% done\n", at->command,
                      percent);
    }
}

bool progress_goes_on(void *user, double share) {
    progress *at = user;
    const double elapsed = since(&at->start);
    if (!at->is_quiet && elapsed >= at->next) {
        tell(at, share);
        at->next =
            elapsed + (at->is_terminal ? pause_on_terminal : pause_in_file);
    }
    return !is_asked_to_stop(at);
}

void progress_clear(progress *at) {
    if (at->is_shown) {
        (void)fprintf(stderr, "\r%30s\r", "");
        (void)fflush(stderr);
        at->is_shown = false;
    }
}

void progress_end(progress *at) {
    (void)sigprocmask(SIG_SETMASK, &at->before, NULL);
}
