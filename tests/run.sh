#!/bin/sh
# run.sh - every check there is, on a fresh Debian 12 machine.
#
# Usage: sh tests/run.sh [--all]
#
# Installs what is missing (as root; without root it says what to install),
# builds with gcc and with clang under the address and undefined behaviour
# sanitizers, runs every suite in both, checks layout and lint, and closes
# with one line: N passed, N failed, N skipped.
#
#   --all    the suites under valgrind too, and the benchmarks
#   CI=true  a skipped statement counts as a failure
#
# Exit: 0 all is well; 1 something failed; 2 usage; 3 packages are missing.
# Suites see LEE_REDUCED=1 under sanitizers, and keep fetched data in
# LEE_CACHE.
set -eu
export LC_ALL=C
cd "$(dirname "$0")/.."
. tests/support/packages.sh

all=
case "${1:-}" in
'') ;;
--all) all=1 ;;
*) echo "usage: sh tests/run.sh [--all]" >&2 && exit 2 ;;
esac

need $build_packages binutils cdo clang clang-format clang-tidy \
    libclang-rt-14-dev libcmocka-dev nco netcdf-bin python3 python3-cftime \
    python3-netcdf4 python3-numpy python3-xarray udunits-bin \
    ${all:+valgrind} || exit 3

work=build-tests
mkdir -p "$work"
export LEE_CACHE="$PWD/$work/data"
passed=0
failed=0
skipped=0

# statement SENTENCE COMMAND...: one check of this script's own.
statement() {
    sentence=$1
    shift
    if "$@" >"$work/statement.log" 2>&1 </dev/null; then
        passed=$((passed + 1))
        echo "ok - $sentence"
    else
        failed=$((failed + 1))
        echo "not ok - $sentence"
        tail -n 60 "$work/statement.log" | sed 's/^/#   /'
    fi
}

# build NAME OPTION...: a fresh or an up to date build in build-tests/NAME.
build() {
    [ -f "$work/$1/build.ninja" ] || meson setup "$work/$1" "$2" "$3"
    ninja -C "$work/$1"
}

# suites NAME OPTION...: runs every suite of a build and adds its verdicts.
suites() {
    name=$1
    shift
    rm -f "$work/$name"/meson-logs/testlog*.json
    meson test -C "$work/$name" --no-rebuild --print-errorlogs "$@" \
        </dev/null || true
    if ! ls "$work/$name"/meson-logs/testlog*.json >/dev/null 2>&1; then
        failed=$((failed + 1))
        echo "not ok - the suites of $name run"
        return
    fi
    set -- $(/usr/bin/python3 tests/support/count.py "$work/$name")
    passed=$((passed + $1))
    failed=$((failed + $2))
    skipped=$((skipped + $3))
}

sources() {
    find src include tests examples -name "$1" 2>/dev/null | sort
}

formatted() {
    sources '*.[ch]' | xargs clang-format --dry-run -Werror
}

tidy() {
    find src -name '*.c' | sort |
        xargs -P "$(nproc)" -n 3 clang-tidy -p "$work/gcc" --quiet
}

statement 'the sources are laid out by clang-format' formatted

# The promise of the README, kept on a copy that holds sources alone.
quickstart() {
    rm -rf "$work/fresh"
    mkdir -p "$work/fresh"
    tar -cf - --exclude='./build*' --exclude=./out --exclude=./.git . |
        tar -xf - -C "$work/fresh"
    sh "$work/fresh/examples/quickstart.sh" &&
        sh "$work/fresh/examples/quickstart.sh" &&
        [ -s "$work/fresh/out/harbour.json" ] &&
        [ "$(grep -vc '^#' "$work/fresh/out/harbour-levels.csv")" -gt 1000 ]
}

export CC=gcc
statement 'gcc builds it without a warning' \
    build gcc -Db_sanitize=none -Db_lundef=true
suites gcc
statement 'gcc builds a release without a warning' \
    build release --buildtype=release -Dtests=false
statement 'the quickstart runs, and runs again' quickstart
statement 'clang-tidy has nothing to say' tidy
if [ -n "$all" ]; then
    # UDUNITS keeps its database to the end: "possibly lost" is no error.
    # Scripts are left out: the shell's own leaks are no concern of ours.
    suites gcc --no-suite architecture --no-suite outside --no-suite cli \
        --no-suite demo -t 20 --wrapper 'valgrind -q --error-exitcode=9
        --leak-check=full --show-leak-kinds=definite
        --errors-for-leak-kinds=definite'
    statement 'the benchmarks run' meson test -C "$work/gcc" --benchmark -v
    cat "$work/statement.log"
fi

export CC=clang LEE_REDUCED=1
export ASAN_OPTIONS=detect_leaks=1:strict_string_checks=1
export UBSAN_OPTIONS=halt_on_error=1:print_stacktrace=1
statement 'clang builds it with sanitizers without a warning' \
    build clang -Db_sanitize=address,undefined -Db_lundef=false
suites clang -t 4

echo "$passed passed, $failed failed, $skipped skipped"
[ "$failed" -eq 0 ] || exit 1
[ "${CI:-}" != true ] || [ "$skipped" -eq 0 ] || exit 1
