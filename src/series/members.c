/* members.c - the members of a range. */
#include "series/members.h"

#include <math.h>

static double or_zero(double value) {
    return isnan(value) ? 0.0 : value;
}

size_t lee_members_list(const lee_problem *problem,
                        lee_member member[LEE_MEMBERS]) {
    const double depth = or_zero(problem->uncertainty.depth);
    const double bed = or_zero(problem->uncertainty.bed);
    size_t count = 0;
    member[count++] = (lee_member){LEE_PULL_MAIN, 0.0, 0.0};
    member[count++] = (lee_member){LEE_PULL_LOW, -depth, bed};
    member[count++] = (lee_member){LEE_PULL_HIGH, depth, -bed};
    if (depth > 0.0) {
        member[count++] = (lee_member){LEE_PULL_LOW, depth, bed};
        member[count++] = (lee_member){LEE_PULL_HIGH, -depth, -bed};
    }
    return count;
}

double lee_pull_of(const lee_pull_range *range, lee_pull pull) {
    switch (pull) {
    case LEE_PULL_MAIN:
        return range->main;
    case LEE_PULL_LOW:
        return range->low;
    case LEE_PULL_HIGH:
        return range->high;
    }
    return NAN;
}

lee_status lee_member_profile(const lee_profile *profile, double bed_shift,
                              lee_profile *shifted, lee_error *error) {
    const lee_status status = lee_profile_init(shifted, profile->n, error);
    if (status != LEE_OK) {
        return status;
    }
    for (size_t i = 0; i < profile->n; i++) {
        shifted->chainage[i] = profile->chainage[i];
        shifted->bed[i] = profile->bed[i] + bed_shift;
        shifted->width[i] = profile->width[i];
        shifted->bearing[i] = profile->bearing[i];
    }
    return LEE_OK;
}

lee_bed_law lee_member_bed(const lee_bed_law *bed, double share) {
    lee_bed_law changed = *bed;
    changed.value *=
        bed->kind == LEE_BED_CHEZY ? 1.0 / (1.0 + share) : 1.0 + share;
    return changed;
}
