/* json.c - building a JSON document and writing it, by jansson. */
#include "formats/json.h"

#include <assert.h>
#include <errno.h>
#include <math.h>
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

/* Bytes of the UTF-8 character that text begins with; 0 when it is broken.
 * jansson is the judge of what is valid. */
static size_t character_length(const char *text) {
    const size_t left = strnlen(text, 4);
    for (size_t n = 1; n <= left; n++) {
        json_t *trial = json_stringn(text, n);
        if (trial != NULL) {
            json_decref(trial);
            return n;
        }
    }
    return 0;
}

static json_t *repaired(const char *text) {
    lee_text mended = {0};
    while (*text != '\0') {
        const size_t length = character_length(text);
        if (length == 0) {
            lee_text_add(&mended, "\xEF\xBF\xBD"); /* U+FFFD */
            text++;
        } else {
            lee_text_add(&mended, "%.*s", (int)length, text);
            text += length;
        }
    }
    json_t *value = mended.has_failed ? NULL : json_string(mended.bytes);
    lee_text_free(&mended);
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
    json_t *value = json_string(text);
    put(json, key, value != NULL ? value : repaired(text));
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
