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

/* 10^0 to 10^22: those a double holds exactly. */
static const double exact_power[] = {
    1e0,  1e1,  1e2,  1e3,  1e4,  1e5,  1e6,  1e7,  1e8,  1e9,  1e10, 1e11,
    1e12, 1e13, 1e14, 1e15, 1e16, 1e17, 1e18, 1e19, 1e20, 1e21, 1e22,
};
enum { EXACT_POWERS = sizeof exact_power / sizeof exact_power[0] };

/* The first `length` bytes, 1 to 8, as one word: the first byte lowest, zeros
 * above the last. Words are the one place where unsigned arithmetic earns its
 * keep. */
static inline uint64_t word_of(size_t length, const char text[]) {
    uint64_t word = 0;
    if (length < 4) {
        for (size_t i = length; i > 0; i--) {
            word = word << 8 | (unsigned char)text[i - 1];
        }
        return word;
    }
    uint32_t first;
    uint32_t last; /* overlaps the first one where length < 8 */
    memcpy(&first, text, sizeof first);
    memcpy(&last, text + length - 4, sizeof last);
#if __BYTE_ORDER__ == __ORDER_BIG_ENDIAN__
    first = __builtin_bswap32(first);
    last = __builtin_bswap32(last);
#endif
    return (uint64_t)last << 8 * (length - 4) | first;
}

static const uint64_t every_byte = UINT64_C(0x0101010101010101);
static const uint64_t low_bits = UINT64_C(0x7F7F7F7F7F7F7F7F);

/* The number that eight digits make, the first one in the lowest byte; false
 * when one is no digit. Neighbours are joined to pairs, fours and eight, all
 * at once (common practice). */
static inline bool eight_digits(uint64_t digits, int64_t *number) {
    uint64_t x = digits ^ (every_byte * '0');
    if (((x | (x + every_byte * (0x80 - 10))) & ~low_bits) != 0) {
        return false;
    }
    x = (x * (10 * 0x100 + 1)) >> 8;
    x = ((x & UINT64_C(0x00FF00FF00FF00FF)) * (100 * 0x10000 + 1)) >> 16;
    x = ((x & UINT64_C(0x0000FFFF0000FFFF)) *
         (10000 * UINT64_C(0x100000000) + 1)) >>
        32;
    *number = (int64_t)x;
    return true;
}

/* The top bit of each byte of `word` that equals `byte`: x is zero there, when
 * neither it nor its lower seven bits plus 127 reach the top bit (Warren 2013,
 * section 6-1, from memory) [warren2013]. */
static inline uint64_t bytes_equal(uint64_t word, char byte) {
    const uint64_t x = word ^ (every_byte * (unsigned char)byte);
    return ~(((x & low_bits) + low_bits) | x | low_bits);
}

/* Reads one to eight characters that are digits and at most one decimal sign,
 * which is what most fields of a table are; false for all else. */
static inline bool short_value(size_t length, const char text[], char sign,
                               double *value) {
    const uint64_t word = word_of(length, text);
    const uint64_t found = bytes_equal(word, sign);
    size_t digits = length;
    uint64_t joined = word;
    size_t behind = 0; /* digits behind the decimal sign */
    if (found != 0) {
        const uint64_t above = found ^ (found - 1); /* up to the sign's top */
        joined = (word & (above >> 8)) | ((word & ~above) >> 8);
        digits--;
        behind = digits - (size_t)__builtin_ctzll(found) / 8;
    }
    if (digits == 0) {
        return false;
    }
    /* Zeros in front, in the low bytes, make it eight. */
    const uint64_t zeros = (every_byte * '0') >> 8 * (digits - 1) >> 8;
    int64_t number = 0;
    if (!eight_digits(joined << 8 * (8 - digits) | zeros, &number)) {
        return false;
    }
    *value = (double)number / exact_power[behind];
    return true;
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

/* Reads a decimal number of any shape. Kept out of the way of short ones. */
__attribute__((noinline)) static bool
any_value(size_t length, const char text[], char sign, double *value) {
    static const int64_t exact_mantissa = 9007199254740992; /* 2^53 */
    decimal d = {0};
    if (!read_decimal(text, text + length, sign, &d)) {
        return false;
    }
    const bool is_exact = !d.is_cut && d.mantissa <= exact_mantissa &&
                          d.exponent < EXACT_POWERS &&
                          d.exponent > -EXACT_POWERS;
    if (!is_exact) {
        return slow_value(length, text, sign, value);
    }
    const double mantissa = (double)d.mantissa;
    const double size = d.exponent < 0 ? mantissa / exact_power[-d.exponent]
                                       : mantissa * exact_power[d.exponent];
    *value = d.is_negative ? -size : size;
    return true;
}

bool lee_number_parse(size_t length, const char text[], char decimal_sign,
                      double *value) {
    return (length > 0 && length <= 8 &&
            short_value(length, text, decimal_sign, value)) ||
           any_value(length, text, decimal_sign, value);
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
