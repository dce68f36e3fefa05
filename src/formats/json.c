/* json.c - building a JSON document and writing it, by jansson. */
#include "formats/json.h"

#include <assert.h>
#include <errno.h>
#include <math.h>
#include <stdlib.h>
#include <string.h>

#include <jansson.h>

#include "base/text.h"

/* Hands `value` over to the innermost open object or list. */
static void put(lee_json *json, const char *key, json_t *value) {
    assert(json->depth > 0);
    json_t *parent = json->open[json->depth - 1];
    const int refused = json_is_object(parent)
                            ? json_object_set_new(parent, key, value)
                            : json_array_append_new(parent, value);
    json->has_failed = json->has_failed || value == NULL || refused != 0;
}

static void open_value(lee_json *json, const char *key, json_t *value) {
    assert(json->depth < LEE_JSON_DEPTH);
    if (json->has_failed || value == NULL) {
        json->has_failed = true;
        json_decref(value);
        return;
    }
    if (json->depth > 0) {
        put(json, key, value);
    }
    json->open[json->depth++] = value;
}

void lee_json_open_object(lee_json *json, const char *key) {
    open_value(json, key, json_object());
}

void lee_json_open_list(lee_json *json, const char *key) {
    open_value(json, key, json_array());
}

void lee_json_close(lee_json *json) {
    if (json->has_failed) {
        return;
    }
    assert(json->depth > 1);
    json->depth--;
}

void lee_json_put_number(lee_json *json, const char *key, double value) {
    if (!json->has_failed) {
        put(json, key, isfinite(value) ? json_real(value) : json_null());
    }
}

void lee_json_put_count(lee_json *json, const char *key, size_t value) {
    if (!json->has_failed) {
        put(json, key, json_integer((json_int_t)value));
    }
}

void lee_json_put_flag(lee_json *json, const char *key, bool value) {
    if (!json->has_failed) {
        put(json, key, json_boolean(value));
    }
}

/* jansson is the judge of what is valid; what it refuses is mended. */
static json_t *text_of(const char *text) {
    json_t *value = json_string(text);
    if (value == NULL) {
        char *mended = lee_text_mended(text);
        value = mended != NULL ? json_string(mended) : NULL;
        free(mended);
    }
    return value;
}

void lee_json_put_text(lee_json *json, const char *key, const char *text) {
    if (json->has_failed) {
        return;
    }
    if (text == NULL) {
        put(json, key, json_null());
        return;
    }
    put(json, key, text_of(text));
}

lee_status lee_json_write(lee_json *json, FILE *stream, lee_error *error) {
    lee_status status = LEE_OK;
    if (json->has_failed || json->depth == 0) {
        status = lee_fail(error, LEE_ERR_MEMORY, "no room for the JSON text");
        goto done;
    }
    errno = 0;
    const int refused = json_dumpf(json->open[0], stream,
                                   JSON_INDENT(2) | JSON_REAL_PRECISION(9));
    if (refused != 0 && !ferror(stream)) {
        status = lee_fail(error, LEE_ERR_MEMORY, "no room to write JSON");
    } else if (refused != 0 || fputc('\n', stream) == EOF) {
        status = lee_fail(error, LEE_ERR_FILE, "cannot write: %s",
                          errno != 0 ? strerror(errno) : "output failed");
    }

done:
    lee_json_discard(json);
    return status;
}

void lee_json_discard(lee_json *json) {
    json_decref(json->open[0]);
    *json = (lee_json){0};
}
