/* status.c - errors, notes, and the words every output shares. */
#include "leewater/status.h"

#include <stdarg.h>
#include <stdbool.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>

#include "version.h"

lee_status lee_fail(lee_error *error, lee_status status, const char *format,
                    ...) {
    if (error == NULL) {
        return status;
    }
    va_list arguments;
    va_start(arguments, format);
    (void)vsnprintf(error->message, sizeof error->message, format, arguments);
    va_end(arguments);
    error->status = status;
    return status;
}

void lee_context(lee_error *error, const char *format, ...) {
    if (error == NULL || error->status == LEE_OK) {
        return;
    }
    char place[512];
    va_list arguments;
    va_start(arguments, format);
    (void)vsnprintf(place, sizeof place, format, arguments);
    va_end(arguments);
    char message[sizeof error->message];
    (void)snprintf(message, sizeof message, "%s%.*s", place,
                   (int)(sizeof message - sizeof place), error->message);
    memcpy(error->message, message, sizeof message);
}

static const struct {
    int exit_code;
    const char *text;
} statuses[] = {
#define LEE_ENTRY(name, exit_code, text) {exit_code, text},
    LEE_STATUS_LIST(LEE_ENTRY)
#undef LEE_ENTRY
};

const char *lee_status_text(lee_status status) {
    return statuses[status].text;
}

int lee_status_exit_code(lee_status status) {
    return statuses[status].exit_code;
}

LEE_PRINTF(1, 0)
static char *formatted(const char *format, va_list arguments) {
    va_list again;
    va_copy(again, arguments);
    const int length = vsnprintf(NULL, 0, format, again);
    va_end(again);
    char *text = length < 0 ? NULL : malloc((size_t)length + 1);
    if (text != NULL) {
        (void)vsnprintf(text, (size_t)length + 1, format, arguments);
    }
    return text;
}

static bool is_noted(const lee_notes *notes, const char *text) {
    for (size_t i = 0; i < notes->n; i++) {
        if (strcmp(notes->text[i], text) == 0) {
            return true;
        }
    }
    return false;
}

lee_status lee_notes_add(lee_notes *notes, lee_error *error, const char *format,
                         ...) {
    va_list arguments;
    va_start(arguments, format);
    char *text = formatted(format, arguments);
    va_end(arguments);
    if (text != NULL && is_noted(notes, text)) {
        free(text);
        return LEE_OK;
    }
    char **grown = text == NULL
                       ? NULL
                       : realloc(notes->text, (notes->n + 1) * sizeof *grown);
    if (grown == NULL) {
        free(text);
        return lee_fail(error, LEE_ERR_MEMORY, "no room for a note");
    }
    notes->text = grown;
    notes->text[notes->n++] = text;
    return LEE_OK;
}

void lee_notes_free(lee_notes *notes) {
    for (size_t i = 0; i < notes->n; i++) {
        free(notes->text[i]);
    }
    free(notes->text);
    *notes = (lee_notes){0};
}

const char *lee_version(void) {
    return LEE_VERSION;
}

const char *lee_caution(void) {
    return "Planning estimates. Flood warnings and decisions rest with the "
           "local authorities; design is for licensed practice under local "
           "codes.";
}

static const char *const limits[] = {
    "homogeneous water; no wave set-up and no wave run-up",
    "one dimension along the fetch; the tilt across it is an estimate",
    "no rotation of the earth: large or deep lakes differ",
    "barriers inside the lake only as sills or narrows of the profile",
};

const char *lee_limit_at(size_t index) {
    const size_t count = sizeof limits / sizeof limits[0];
    return index < count ? limits[index] : NULL;
}
