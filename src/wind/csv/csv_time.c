/* csv_time.c - the time of a row of a CSV record. */
#include "wind/csv/csv_layout.h"

#include <string.h>

#include "base/number.h"
#include "base/text.h"
#include "leewater/calendar.h"
#include "wind/columns.h"

enum { LONGEST_TIME = 64, SECONDS_A_DAY = 86400 };

static lee_status refuse_unzoned(const lee_wind_layout *layout,
                                 const lee_csv_field *field, lee_error *error) {
    char shown[LEE_SHOWN];
    return lee_csv_fail(layout->csv, field, error,
                        "time '%s' has no zone; give 'utc_offset' in the case "
                        "(Z for UTC, +01:00 for an hour east)",
                        lee_text_show(field->length, field->bytes, shown));
}

/* Parses once more for the message: a failing row is the last one. */
static lee_status refuse_time(const lee_wind_layout *layout,
                              const lee_csv_field *field, const char *text,
                              lee_error *error) {
    lee_error inner = {0};
    int64_t time;
    (void)lee_time_parse(text, 0, &time, NULL, &inner);
    return lee_csv_fail(layout->csv, field, error, "%s", inner.message);
}

/* Reads an ISO time; `field` is where a message points. */
static lee_status parse_iso(const lee_wind_layout *layout,
                            const lee_csv_field *field, const char *text,
                            int64_t *time, lee_error *error) {
    bool is_zoned = false;
    const int64_t offset = layout->has_utc_offset ? layout->utc_offset : 0;
    if (lee_time_parse(text, offset, time, &is_zoned, NULL) != LEE_OK) {
        return refuse_time(layout, field, text, error);
    }
    if (!is_zoned && !layout->has_utc_offset) {
        return refuse_unzoned(layout, field, error);
    }
    return LEE_OK;
}

static lee_status refuse_length(const lee_wind_layout *layout,
                                const lee_csv_field *field, lee_error *error) {
    char shown[LEE_SHOWN];
    return lee_csv_fail(layout->csv, field, error,
                        "'%s' is too long for a time",
                        lee_text_show(field->length, field->bytes, shown));
}

static lee_status whole_time(const lee_wind_layout *layout,
                             const lee_csv_field *field, int64_t *time,
                             lee_error *error) {
    char text[LONGEST_TIME];
    if (field->length >= sizeof text) {
        return refuse_length(layout, field, error);
    }
    memcpy(text, field->bytes, field->length);
    text[field->length] = '\0';
    return parse_iso(layout, field, text, time, error);
}

static lee_status dated_time(const lee_wind_layout *layout,
                             const lee_csv_field *date,
                             const lee_csv_field *clock, int64_t *time,
                             lee_error *error) {
    char text[LONGEST_TIME];
    if (date->length + 1 + clock->length >= sizeof text) {
        return refuse_length(layout, date, error);
    }
    memcpy(text, date->bytes, date->length);
    text[date->length] = 'T';
    memcpy(text + date->length + 1, clock->bytes, clock->length);
    text[date->length + 1 + clock->length] = '\0';
    return parse_iso(layout, date, text, time, error);
}

/* A whole number from low to high in one of the columns of a split time. */
static lee_status split_part(const lee_wind_layout *layout,
                             const lee_csv_field fields[],
                             lee_wind_column column, const int range[2],
                             int *part, lee_error *error) {
    if (!layout->is_there[column]) {
        *part = 0;
        return LEE_OK;
    }
    const lee_csv_field *field = &fields[layout->index[column]];
    int64_t value = 0;
    if (!lee_integer_parse(field->length, field->bytes, &value) ||
        value < range[0] || value > range[1]) {
        char shown[LEE_SHOWN];
        return lee_csv_fail(layout->csv, field, error,
                            "%s '%s' is not a whole number from %d to %d",
                            lee_wind_column_name(column),
                            lee_text_show(field->length, field->bytes, shown),
                            range[0], range[1]);
    }
    *part = (int)value;
    return LEE_OK;
}

/* Mends a two-digit year, when the case says of which century it is. */
static lee_status whole_year(const lee_wind_layout *layout,
                             const lee_csv_field fields[], int *year,
                             lee_error *error) {
    if (*year >= 1000) {
        return LEE_OK;
    }
    if (*year < 100 && layout->century != 0) {
        *year += layout->century;
        return LEE_OK;
    }
    const lee_csv_field *field = &fields[layout->index[LEE_WIND_YEAR]];
    return lee_csv_fail(layout->csv, field, error,
                        "year %d has not four digits; two are read when the "
                        "case says 'century: 1900' or the like",
                        *year);
}

static lee_status split_time(const lee_wind_layout *layout,
                             const lee_csv_field fields[], int64_t *time,
                             lee_error *error) {
    static const lee_wind_column column[] = {LEE_WIND_YEAR, LEE_WIND_MONTH,
                                             LEE_WIND_DAY, LEE_WIND_HOUR,
                                             LEE_WIND_MINUTE};
    static const int range[][2] = {
        {0, 9999},
        {1, 12  },
        {1, 31  },
        {0, 24  },
        {0, 59  }
    };
    enum { YEAR, MONTH, DAY, HOUR, MINUTE, PARTS };
    int part[PARTS];
    lee_status status = LEE_OK;
    for (size_t i = 0; i < PARTS && status == LEE_OK; i++) {
        status =
            split_part(layout, fields, column[i], range[i], &part[i], error);
    }
    if (status == LEE_OK) {
        status = whole_year(layout, fields, &part[YEAR], error);
    }
    if (status != LEE_OK) {
        return status;
    }
    const lee_csv_field *field = lee_wind_layout_time_field(layout, fields);
    /* Hour 24 is midnight at the end of the day (ISO 8601:2004). */
    const bool is_late = part[HOUR] == 24 && part[MINUTE] == 0;
    if (!lee_time_from_civil(part[YEAR], part[MONTH], part[DAY],
                             is_late ? 0 : part[HOUR], part[MINUTE], 0, time)) {
        return lee_csv_fail(layout->csv, field, error,
                            "%04d-%02d-%02d %02d:%02d is not in the calendar",
                            part[YEAR], part[MONTH], part[DAY], part[HOUR],
                            part[MINUTE]);
    }
    if (!layout->has_utc_offset) {
        return refuse_unzoned(layout, field, error);
    }
    *time += (is_late ? SECONDS_A_DAY : 0) - layout->utc_offset;
    return LEE_OK;
}

const lee_csv_field *lee_wind_layout_time_field(const lee_wind_layout *layout,
                                                const lee_csv_field fields[]) {
    static const lee_wind_column first[] = {LEE_WIND_TIME, LEE_WIND_DATE,
                                            LEE_WIND_YEAR};
    size_t i = 0;
    while (i < 2 && !layout->is_there[first[i]]) {
        i++;
    }
    return &fields[layout->index[first[i]]];
}

lee_status lee_wind_layout_time(const lee_wind_layout *layout,
                                const lee_csv_field fields[], int64_t *time,
                                lee_error *error) {
    if (layout->is_there[LEE_WIND_TIME]) {
        return whole_time(layout, &fields[layout->index[LEE_WIND_TIME]], time,
                          error);
    }
    if (layout->is_there[LEE_WIND_DATE]) {
        return dated_time(layout, &fields[layout->index[LEE_WIND_DATE]],
                          &fields[layout->index[LEE_WIND_CLOCK]], time, error);
    }
    return split_time(layout, fields, time, error);
}
