/* chain.h - the factors of the chain for one sample. */
#ifndef LEEWATER_EXPOSURE_CHAIN_H
#define LEEWATER_EXPOSURE_CHAIN_H

#include <stdbool.h>

#include "leewater/exposure.h"

typedef struct lee_links {
    double factor[LEE_CORRECTIONS]; /* 1 for the direction */
    bool is_extrapolated[LEE_CORRECTIONS];
    bool is_missing; /* the stability link lacks a temperature */
    double speed;    /* 10 m over water, m s-1 */
} lee_links;

lee_links lee_links_find(const lee_exposure *exposure, const lee_drag *drag,
                         const lee_drag_input *fluids,
                         const lee_exposure_sample *sample);

#endif
