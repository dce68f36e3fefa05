/* number.c - decimal numbers from text, the same in every locale. */
#include "base/number.h"

#include <locale.h>
#include <stdlib.h>
#include <string.h>

/* A decimal number taken apart: (-1)^is_negative mantissa 10^exponent. */
typedef struct decimal {
    bool is_negative;
    bool is_cut; /* more digits than the mantissa holds */
    int64_t mantissa;
    int64_t exponent;
} decimal;

static bool is_digit(char c) {
    return c >= '0' && c <= '9';
}

/* Adds a run of digits to the mantissa; returns the end of the run. */
static const char *read_digits(const char *p, const char *end, decimal *d) {
    static const int64_t room = 100000000000000000; /* 1e17: 18 digits fit */
    for (; p < end && is_digit(*p); p++) {
        if (d->mantissa < room) {
            d->mantissa = 10 * d->mantissa + (*p - '0');
        } else {
            d->is_cut = true;
        }
    }
    return p;
}

/* Adds "e-12"; returns its end, or NULL when no digit follows. */
static const char *read_exponent(const char *p, const char *end, decimal *d) {
    static const int64_t beyond = 1000000; /* far out of a double's range */
    p++;
    const bool is_negative = p < end && *p == '-';
    if (p < end && (*p == '-' || *p == '+')) {
        p++;
    }
    const char *first = p;
    int64_t exponent = 0;
    for (; p < end && is_digit(*p); p++) {
        exponent = exponent < beyond ? 10 * exponent + (*p - '0') : exponent;
    }
    d->exponent += is_negative ? -exponent : exponent;
    return p == first ? NULL : p;
}

/* Takes the whole text apart; false when it is no decimal number. */
static bool read_decimal(const char *p, const char *end, char sign,
                         decimal *d) {
    if (p < end && (*p == '-' || *p == '+')) {
        d->is_negative = *p == '-';
        p++;
    }
    const char *whole = p;
    p = read_digits(p, end, d);
    size_t digits = (size_t)(p - whole);
    if (p < end && *p == sign) {
        const char *fraction = p + 1;
        p = read_digits(fraction, end, d);
        digits += (size_t)(p - fraction);
        d->exponent = fraction - p;
    }
    if (digits == 0) {
        return false;
    }
    if (p < end && (*p == 'e' || *p == 'E')) {
        p = read_exponent(p, end, d);
    }
    return p == end;
}

/* strtod of a text that is known to be a decimal number. The locale of the
 * calling thread is put aside meanwhile: in some, ',' is the decimal sign. */
static bool slow_value(size_t length, const char text[], char sign,
                       double *value) {
    char near[64];
    char *copy = length < sizeof near ? near : malloc(length + 1);
    const locale_t plain = newlocale(LC_ALL_MASK, "C", (locale_t)0);
    const bool is_ready = copy != NULL && plain != (locale_t)0;
    if (is_ready) {
        memcpy(copy, text, length);
        copy[length] = '\0';
        char *comma = sign == '.' ? NULL : strchr(copy, sign);
        if (comma != NULL) {
            *comma = '.';
        }
        const locale_t callers = uselocale(plain);
        *value = strtod(copy, NULL);
        (void)uselocale(callers);
    }
    if (plain != (locale_t)0) {
        freelocale(plain);
    }
    if (copy != near) {
        free(copy);
    }
    return is_ready;
}

/* 10^0 to 10^22: those a double holds exactly. */
static const double exact_power[] = {
    1e0,  1e1,  1e2,  1e3,  1e4,  1e5,  1e6,  1e7,  1e8,  1e9,  1e10, 1e11,
    1e12, 1e13, 1e14, 1e15, 1e16, 1e17, 1e18, 1e19, 1e20, 1e21, 1e22,
};
enum { EXACT_POWERS = sizeof exact_power / sizeof exact_power[0] };

bool lee_number_parse(size_t length, const char text[], char decimal_sign,
                      double *value) {
    static const int64_t exact_mantissa = 9007199254740992; /* 2^53 */
    decimal d = {0};
    if (!read_decimal(text, text + length, decimal_sign, &d)) {
        return false;
    }
    const bool is_exact = !d.is_cut && d.mantissa <= exact_mantissa &&
                          d.exponent < EXACT_POWERS &&
                          d.exponent > -EXACT_POWERS;
    if (!is_exact) {
        return slow_value(length, text, decimal_sign, value);
    }
    const double mantissa = (double)d.mantissa;
    const double size = d.exponent < 0 ? mantissa / exact_power[-d.exponent]
                                       : mantissa * exact_power[d.exponent];
    *value = d.is_negative ? -size : size;
    return true;
}

bool lee_integer_parse(size_t length, const char text[], int64_t *value) {
    const bool is_negative = length > 0 && text[0] == '-';
    size_t at = length > 0 && (text[0] == '-' || text[0] == '+') ? 1 : 0;
    if (at == length) {
        return false;
    }
    /* Counted downwards: there is one more negative number than positive. */
    int64_t read = 0;
    for (; at < length; at++) {
        const int digit = text[at] - '0';
        if (!is_digit(text[at]) || read < (INT64_MIN + digit) / 10) {
            return false;
        }
        read = 10 * read - digit;
    }
    if (!is_negative && read == INT64_MIN) {
        return false;
    }
    *value = is_negative ? read : -read;
    return true;
}
