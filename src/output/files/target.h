/* target.h - may the field of a run be written to a file? */
#ifndef LEEWATER_OUTPUT_FILES_TARGET_H
#define LEEWATER_OUTPUT_FILES_TARGET_H

#include "leewater/output.h"

/* As lee_check_target, for a field: .nc only, stations or not.
 * Errors: LEE_ERR_ARGUMENT, LEE_ERR_FILE, LEE_ERR_MEMORY. */
lee_status lee_target_check_field(const lee_target *target,
                                  const lee_case *from, lee_error *error);

#endif
