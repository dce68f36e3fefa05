/* shared.c - what several commands do alike. */
#include "cli/shared.h"

#include <math.h>
#include <string.h>

#include "base/text.h"

lee_status find_relation(const char *name, const lee_drag_relation **relation,
                         lee_error *error) {
    char shown[LEE_SHOWN];
    *relation = lee_drag_find(name);
    if (*relation != NULL) {
        return LEE_OK;
    }
    const char *nearest = lee_drag_nearest(name);
    (void)lee_text_show(strlen(name), name, shown);
    if (nearest == NULL) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "no drag relation is called '%s'; 'leewater drag' "
                        "lists them",
                        shown);
    }
    return lee_fail(error, LEE_ERR_ARGUMENT,
                    "no drag relation is called '%s'; did you mean '%s'?",
                    shown, nearest);
}

int choose(const char *word, const char *first, const char *second) {
    if (strcmp(word, first) == 0) {
        return 0;
    }
    return strcmp(word, second) == 0 ? 1 : -1;
}

double turn_of(double angle) {
    const double full = 8.0 * atan(1.0);
    const double rest = fmod(angle, full);
    return rest < 0.0 ? rest + full : rest;
}
