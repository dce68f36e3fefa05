/* members.h - the members of a range: how hard the wind pulls, how deep the
 * lake is. */
#ifndef LEEWATER_SERIES_MEMBERS_H
#define LEEWATER_SERIES_MEMBERS_H

#include "leewater/series.h"
#include "series/setting.h"

/* The estimate itself, then the bounds: weakest and strongest pull, each over
 * the deepest and (when the depth is uncertain) the shallowest bed. */
enum { LEE_MEMBERS = 5 };

typedef enum lee_pull { LEE_PULL_MAIN, LEE_PULL_LOW, LEE_PULL_HIGH } lee_pull;

typedef struct lee_member {
    lee_pull pull;
    double bed_shift; /* m added to the bed                                  */
    double bed_share; /* share added to the value of the bed law: the weak
                         pull meets the rougher bed                          */
} lee_member;

/* Lists the members of a problem's range, the estimate itself first; returns
 * their number. */
size_t lee_members_list(const lee_problem *problem,
                        lee_member member[LEE_MEMBERS]);

/* Pull of one kind. */
double lee_pull_of(const lee_pull_range *range, lee_pull pull);

/* The profile of a member: a copy with the bed shifted. Free it.
 * Errors: LEE_ERR_MEMORY. */
lee_status lee_member_profile(const lee_profile *profile, double bed_shift,
                              lee_profile *shifted, lee_error *error);

/* The bed law of a member: rougher for a positive share. */
lee_bed_law lee_member_bed(const lee_bed_law *bed, double share);

#endif
