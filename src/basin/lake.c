/* lake.c - a lake as a case gives it. */
#include "leewater/basin.h"

#include <stdlib.h>

void lee_lake_free(lee_lake *lake) {
    free(lake->name);
    free(lake->datum);
    lee_level_series_free(&lake->still_water);
    lee_profile_free(&lake->profile);
    lee_level_series_free(&lake->start.level);
    lee_level_series_free(&lake->end.level);
    *lake = (lee_lake){0};
}
