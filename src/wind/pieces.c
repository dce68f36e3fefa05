/* pieces.c - parts a record where its gaps are beyond the rule. */
#include "leewater/wind.h"

#include <inttypes.h>
#include <stdlib.h>

#include "leewater/calendar.h"
#include "wind/spacing.h"

static lee_status refuse_gap(const lee_wind_record *record, size_t before,
                             size_t after, int64_t allowed, lee_error *error) {
    char from[LEE_TIME_TEXT];
    char to[LEE_TIME_TEXT];
    const int64_t apart = record->time[after] - record->time[before];
    return lee_fail(error, LEE_ERR_DATA,
                    "no wind between %s and %s: %g h apart, at most %g h are "
                    "bridged; raise 'largest_gap' or write 'gaps: split'",
                    lee_time_format_short(record->time[before], from),
                    lee_time_format_short(record->time[after], to),
                    (double)apart / 3600.0, (double)allowed / 3600.0);
}

/* Does a piece end with the sample `before`, the next with wind being `after`
 * (n: none)? */
static bool ends_piece(const lee_wind_record *record, const lee_gap_rule *rule,
                       int64_t step, size_t before, size_t after) {
    return after == record->n ||
           lee_wind_is_long_gap(rule, step,
                                record->time[after] - record->time[before]);
}

/* Counts the pieces, and lists them when `piece` is there. */
static size_t find_pieces(const lee_wind_record *record,
                          const lee_gap_rule *rule, int64_t step,
                          lee_wind_piece piece[]) {
    const size_t n = record->n;
    size_t count = 0;
    size_t first = lee_wind_seek(record, 0, n);
    size_t before = first;
    while (before < n) {
        const size_t after = lee_wind_seek(record, before + 1, n);
        const bool is_end = ends_piece(record, rule, step, before, after);
        if (is_end && piece != NULL) {
            piece[count] = (lee_wind_piece){first, before + 1};
        }
        count += is_end ? 1 : 0;
        first = is_end ? after : first;
        before = after;
    }
    return count;
}

lee_status lee_wind_pieces(const lee_wind_record *record,
                           const lee_gap_rule *rule, lee_wind_piece **pieces,
                           size_t *count, lee_error *error) {
    *pieces = NULL;
    *count = 0;
    int64_t step = 0;
    const lee_status status = lee_wind_usual_step(record, &step, error);
    if (status != LEE_OK) {
        return status;
    }
    const size_t found = find_pieces(record, rule, step, NULL);
    if (found == 0) {
        return lee_fail(error, LEE_ERR_DATA,
                        "none of the record's %zu samples has a wind",
                        record->n);
    }
    lee_wind_piece *piece = calloc(found, sizeof *piece);
    if (piece == NULL) {
        return lee_fail(error, LEE_ERR_MEMORY, "no room for %zu pieces", found);
    }
    (void)find_pieces(record, rule, step, piece);
    if (found > 1 && !rule->split) {
        const size_t before = piece[0].end - 1;
        const size_t after = piece[1].first;
        free(piece);
        return refuse_gap(record, before, after, step + rule->largest, error);
    }
    *pieces = piece;
    *count = found;
    return LEE_OK;
}
