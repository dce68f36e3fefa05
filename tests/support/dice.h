/* dice.h - numbers drawn by lot, the same in every run. */
#ifndef LEEWATER_TESTS_DICE_H
#define LEEWATER_TESTS_DICE_H

#include <stdint.h>

/* Starts with the seed in it: dice d = {1}. */
typedef struct dice {
    uint64_t state;
} dice;

/* One of 0 to last, last < 2^31. A linear congruential sequence with the
 * multiplier of Knuth's MMIX (from memory); its upper bits serve. */
static inline int draw(dice *d, int last) {
    d->state = d->state * 6364136223846793005u + 1442695040888963407u;
    return (int)((d->state >> 33) % ((uint64_t)last + 1));
}

#endif
