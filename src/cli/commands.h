/* commands.h - one function a command.
 *
 * Each takes its own words, argv[0] being the command's name, prints results
 * on standard output and returns what went wrong. */
#ifndef LEEWATER_CLI_COMMANDS_H
#define LEEWATER_CLI_COMMANDS_H

#include "leewater/status.h"

lee_status cmd_estimate(int argc, char *argv[], lee_error *error);
lee_status cmd_check(int argc, char *argv[], lee_error *error);
lee_status cmd_drag(int argc, char *argv[], lee_error *error);
lee_status cmd_steady(int argc, char *argv[], lee_error *error);
lee_status cmd_run(int argc, char *argv[], lee_error *error);

#endif
