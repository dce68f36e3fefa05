/* progress.h - tells how far a run is, and hears Ctrl-C. */
#ifndef LEEWATER_CLI_PROGRESS_H
#define LEEWATER_CLI_PROGRESS_H

#include <signal.h>
#include <stdbool.h>
#include <time.h>

typedef struct progress {
    const char *command;
    bool is_quiet;
    bool is_terminal; /* standard error is one: one line, rewritten */
    bool is_shown;    /* something stands on that line              */
    struct timespec start;
    double next;     /* s after the start: when to tell again */
    sigset_t stops;  /* signals that end the run              */
    sigset_t before; /* signals that were blocked before      */
} progress;

/* Starts the clock, and from here on holds back SIGINT and SIGTERM, unless the
 * program was started with them ignored: they are answered by
 * progress_goes_on, so that nothing is left half done. */
void progress_begin(progress *at, const char *command, bool is_quiet);

/* The callback of a run; `user` is a progress. Tells the share done after two
 * seconds, then each half second on a terminal and each ten seconds else.
 * False once SIGINT or SIGTERM has come. */
bool progress_goes_on(void *user, double share);

/* Clears the line. Signals stay held back. */
void progress_clear(progress *at);

/* Lets signals through again: one that came ends the process here. */
void progress_end(progress *at);

#endif
