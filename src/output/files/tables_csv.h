/* tables_csv.h - results as CSV with a commented head, whole or not at all; as
 * the functions of leewater/output.h say. */
#ifndef LEEWATER_OUTPUT_FILES_TABLES_CSV_H
#define LEEWATER_OUTPUT_FILES_TABLES_CSV_H

#include "leewater/output.h"

lee_status lee_csv_steady(const lee_target *target, const lee_case *from,
                          const lee_steady_result *result, lee_error *error);
lee_status lee_csv_run(const lee_target *target, const lee_case *from,
                       const lee_run_result *result, lee_error *error);

#endif
