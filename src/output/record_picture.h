/* record_picture.h - a record drawn on one screen. */
#ifndef LEEWATER_OUTPUT_RECORD_PICTURE_H
#define LEEWATER_OUTPUT_RECORD_PICTURE_H

#include "output/print.h"

/* Coverage by month, wind rose, largest storms and what was corrected: at most
 * 80 columns and 40 rows of plain ASCII, which looks the same in every
 * locale, terminal, pipe and letter. Nothing for a record without samples. */
void lee_print_record_picture(const lee_printer *to,
                              const lee_problem_check *check);

#endif
