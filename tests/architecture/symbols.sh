#!/bin/sh
# symbols.sh - proves on the built library what reading cannot: names,
# state, and that the library leaves process and console alone.
#
# Usage: symbols.sh SOURCE_ROOT LIBRARY (a static library without sanitizers)
set -eu
root=$1
library=$2
. "$root/tests/support/tap.sh"
work=$(mktemp -d)
trap 'rm -rf "$work"' EXIT
found=$work/found

# Objects are called folder_file.c.o: "folder symbol" for each one undefined.
nm -A -u "$library" 2>/dev/null |
    sed -E 's|^[^ ]*:([a-z]+)_[^ :]*\.o: *U (.*)$|\1 \2|' >"$work/undefined"
nm -A --defined-only "$library" 2>/dev/null >"$work/defined"

# callers SYMBOLS ROOMS: who outside of ROOMS uses one of SYMBOLS.
callers() {
    awk -v symbols="$1" -v rooms="$2" '
        BEGIN {
            n = split(symbols, s, " "); for (i = 1; i <= n; i++) bad[s[i]] = 1
            n = split(rooms, r, " "); for (i = 1; i <= n; i++) fine[r[i]] = 1
        }
        ($2 in bad) && !($1 in fine) { print $1 " uses " $2 }
    ' "$work/undefined" | sort -u
}

[ -s "$work/undefined" ] && [ -s "$work/defined" ] || echo "$library" >"$found"
holds 'the library can be read' "$found"

awk '$2 ~ /^[A-Z]$/ && $3 !~ /^lee_/ { print $0 }' "$work/defined" >"$found"
holds 'every exported symbol begins with lee_' "$found"

# Writable data of any kind: .data, .bss, common. Constant tables of pointers
# live in .data.rel.ro, which the loader makes read-only.
objdump -t "$library" 2>/dev/null |
    awk '/file format/ { object = $1 }
        $0 ~ / O / && $0 ~ / (\.data|\.bss|\.tdata|\.tbss|\*COM\*)[^r]/ &&
        $0 !~ /\.data\.rel\.ro/ { print object " " $NF }' |
    sed 's/\.c\.o://' | sort -u >"$work/writable"
# The unit database of UDUNITS costs 6 ms to read and is kept; units.h says
# that it is not thread-safe.
grep -v '^base_units ' "$work/writable" >"$found" || true
holds 'no source but units.c keeps state that changes' "$found"

callers 'exit _Exit quick_exit abort raise kill signal sigaction atexit' \
    '' >"$found"
# A child process has to end somewhere, and its signals are its own; signal() is
# __sysv_signal() by the macros of POSIX.
callers '_exit __sysv_signal' 'formats' >>"$found"
holds 'the library neither ends the process nor catches signals' "$found"

callers 'printf puts putchar putc vprintf perror stderr __printf_chk
    __vprintf_chk' '' >"$found"
holds 'the library does not print' "$found"

callers 'stdout' 'formats' >"$found"
holds 'standard output is known to the files that may be "-" alone' "$found"

callers 'getenv secure_getenv setenv putenv environ' '' >"$found"
holds 'the library does not read the environment' "$found"

callers 'setlocale' '' >"$found"
holds 'the library does not set the locale' "$found"

callers 'rand srand random srandom drand48 time clock gettimeofday
    clock_gettime' '' >"$found"
holds 'no result depends on the clock or on a hidden random state' "$found"

callers 'fopen fopen64 open open64 fdopen rename unlink remove mkstemp
    mkstemp64' 'formats' >"$found"
holds 'files are opened, renamed and removed in formats alone' "$found"

callers 'fork vfork execve execv execvp system popen posix_spawn' 'formats' \
    >"$found"
holds 'child processes are the business of formats alone' "$found"

awk '$2 ~ /^gsl_/ && $1 != "numerics" { print $1 " uses " $2 }
     $2 ~ /^(yaml|json|nc)_/ && $1 != "formats" { print $1 " uses " $2 }
     $2 ~ /^(ut|cv)_/ && $1 != "base" { print $1 " uses " $2 }' \
    "$work/undefined" | sort -u >"$found"
holds 'foreign libraries are called from their rooms alone' "$found"
finish
