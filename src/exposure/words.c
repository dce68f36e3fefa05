/* words.c - the chain in words: name, method and source of each link. */
#include <math.h>
#include <stdio.h>

#include "exposure/chain.h"

/* A factor this near to 1 corrects nothing. */
static const double identity = 1e-12;

static bool is_told(const lee_exposure *exposure, lee_link link,
                    double factor) {
    switch (link) {
    case LEE_LINK_DIRECTION:
        return exposure->direction_offset != 0.0;
    case LEE_LINK_TO_WATER:
        if (exposure->to_water_method != LEE_TO_WATER_FACTOR) {
            return exposure->is_over_land;
        }
        break;
    case LEE_LINK_STABILITY:
        if (exposure->stability != LEE_STABILITY_FACTOR) {
            return exposure->stability != LEE_STABILITY_NONE;
        }
        break;
    case LEE_LINK_AVERAGING:
    case LEE_LINK_HEIGHT:
    case LEE_CORRECTIONS:
        break;
    }
    return !(fabs(factor - 1.0) <= identity);
}

/* A link with constant words. */
static void say(lee_correction *link, const char *method, const char *source) {
    (void)snprintf(link->method, sizeof link->method, "%s", method);
    link->source = source;
}

static void say_averaging(const lee_exposure *exposure, lee_correction *link) {
    if (!exposure->is_gust) {
        link->name = "averaging";
        say(link, "highest mean to hourly mean", "EM 1110-2-1100 fig. II-2-1");
        return;
    }
    link->name = "gust";
    (void)snprintf(link->method, sizeof link->method,
                   "highest %g s mean in %g min to the mean, %s",
                   exposure->gust_duration, exposure->gust_period / 60.0,
                   lee_gust_class_name(exposure->gust_class));
    link->source = "Harper, Kepert & Ginger (2010), WMO/TD-No. 1555";
}

static void say_height(const lee_exposure *exposure, lee_correction *link) {
    link->name = "height";
    switch (exposure->height_method) {
    case LEE_HEIGHT_POWER:
        say(link, "1/7 power profile", "EM 1110-2-1100 eq. II-2-9");
        return;
    case LEE_HEIGHT_FACTOR:
        say(link, "given factor", "given");
        return;
    case LEE_HEIGHT_LOG:
        break;
    }
    say(link,
        exposure->is_over_land
            ? "neutral log profile, roughness of the land"
            : "neutral log profile, roughness of the drag relation",
        "common practice");
}

static void say_to_water(const lee_exposure *exposure, lee_correction *link) {
    link->name = "land to water";
    switch (exposure->to_water_method) {
    case LEE_TO_WATER_FACTOR:
        say(link, "given factor", "given");
        return;
    case LEE_TO_WATER_RESERVOIR:
        (void)snprintf(link->method, sizeof link->method,
                       "reservoir ratio at a fetch of %.4g km",
                       1e-3 * exposure->to_water_fetch);
        link->source = "Saville, McClendon & Cochran (1962), "
                       "EM 1110-2-1420 ch. 15 (from memory)";
        return;
    case LEE_TO_WATER_HSU_1980:
        say(link, "3 U^(2/3), covers 3 to 20 m/s over land", "Hsu (1980)");
        return;
    case LEE_TO_WATER_HSU_1981:
        say(link, "1.62 + 1.17 U, covers 2 to 20 m/s over land",
            "Hsu (1981) (from memory)");
        return;
    case LEE_TO_WATER_TABLE:
        break;
    }
    (void)snprintf(link->method, sizeof link->method,
                   "table of %zu rows by speed over land",
                   exposure->to_water_table.n);
    link->source = "given";
}

static void say_stability(const lee_exposure *exposure, lee_correction *link) {
    link->name = "stability";
    switch (exposure->stability) {
    case LEE_STABILITY_MONIN_OBUKHOV:
        (void)snprintf(link->method, sizeof link->method,
                       "Monin-Obukhov, functions %s, to the neutral wind",
                       exposure->functions->name);
        link->source = exposure->functions->source;
        return;
    case LEE_STABILITY_RATIO:
        say(link, "ratio by air minus water temperature",
            "Resio & Vincent (1977), fit to SPM (1984) fig. 3-14 (from "
            "memory)");
        return;
    case LEE_STABILITY_NONE:
    case LEE_STABILITY_FACTOR:
        break;
    }
    say(link, "given factor", "given");
}

static void say_direction(lee_correction *link) {
    link->name = "direction offset";
    say(link, "added to each direction measured", "given");
}

static void say_link(const lee_exposure *exposure, lee_link link,
                     lee_correction *told) {
    switch (link) {
    case LEE_LINK_DIRECTION:
        say_direction(told);
        told->turn = exposure->direction_offset;
        return;
    case LEE_LINK_AVERAGING:
        say_averaging(exposure, told);
        return;
    case LEE_LINK_HEIGHT:
        say_height(exposure, told);
        return;
    case LEE_LINK_TO_WATER:
        say_to_water(exposure, told);
        return;
    case LEE_LINK_STABILITY:
        say_stability(exposure, told);
        return;
    case LEE_CORRECTIONS:
        return;
    }
}

size_t lee_exposure_chain(const lee_exposure *exposure, const lee_drag *drag,
                          const lee_drag_input *fluids,
                          const lee_exposure_sample *sample,
                          const lee_exposure_summary *summary,
                          lee_correction chain[LEE_CORRECTIONS]) {
    const lee_links links = lee_links_find(exposure, drag, fluids, sample);
    size_t count = 0;
    for (int i = 0; i < LEE_CORRECTIONS; i++) {
        const lee_link link = (lee_link)i;
        if (!is_told(exposure, link, links.factor[i])) {
            continue;
        }
        lee_correction *told = &chain[count++];
        *told = (lee_correction){
            .factor = links.factor[i],
            .is_extrapolated = links.is_extrapolated[i],
            .is_missing = link == LEE_LINK_STABILITY && links.is_missing,
        };
        if (summary != NULL && summary->winds > 0) {
            told->has_spread = true;
            told->spread = summary->link[i];
        }
        say_link(exposure, link, told);
    }
    return count;
}
