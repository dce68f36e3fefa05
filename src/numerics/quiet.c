/* quiet.c - keeps GSL from aborting the process. */
#include <gsl/gsl_errno.h>

#include "leewater/status.h"

void lee_quiet_gsl(void) {
    (void)gsl_set_error_handler_off();
}
