#!/bin/sh
# sizes.sh - proves that files and folders stay small enough to be read, and
# that nothing written is left out of the build.
#
# Usage: sizes.sh SOURCE_ROOT
set -eu
root=$1
. "$root/tests/support/tap.sh"
found=$(mktemp)
trap 'rm -f "$found"' EXIT
cd "$root"

sources() {
    find src include tests examples -name '*.[ch]' 2>/dev/null | sort
}

sources | xargs wc -l | awk '$2 != "total" && $1 > 600 {
    print $2 " has " $1 " lines, more than 600" }' >"$found"
holds 'no file is longer than 600 lines' "$found"

sources | xargs awk 'length($0) > 80 {
    print FILENAME ":" FNR ": " length($0) " characters" }' >"$found"
holds 'no line is wider than 80 characters' "$found"

# A body opens with the first ") {" after the last brace in the first column,
# and closes with the next one: the formatter sees to that.
sources | xargs awk '
    FNR == 1 { open = 0 }
    /\) \{$/ && !open { open = FNR }
    /^}/ {
        if (open && FNR - open - 1 > 70) {
            print FILENAME ":" open ": " FNR - open - 1 " lines"
        }
        open = 0
    }' >"$found"
holds 'no function is longer than 70 lines' "$found"

# A matter of several files may have a folder of its own inside its stage.
for folder in src/*/ src/*/*/; do
    [ -d "$folder" ] || continue
    count=$(find "$folder" -maxdepth 1 -name '*.c' | wc -l)
    [ "$count" -le 14 ] || echo "$folder holds $count sources"
done >"$found"
holds 'no folder of src holds more than 14 sources' "$found"

# known FILE: is "'FILE'" in the text of a build file?
known() {
    case $build_file in *"'$1'"*) return 0 ;; esac
    return 1
}

build_file=$(cat src/meson.build)
for file in $(find src -name '*.c'); do
    known "${file#src/}" || echo "$file is not built"
done >"$found"
holds 'every source is in src/meson.build' "$found"

for folder in tests/*/; do
    suite=${folder#tests/}
    # The lines of the suite's list, from "'suite': [" to the bracket.
    build_file=$(sed -n "/'${suite%/}': \[/,/\]/p" tests/meson.build)
    for file in "$folder"test_*.c; do
        name=${file#"$folder"test_}
        [ ! -e "$file" ] || known "${name%.c}" || echo "$file is not run"
    done
done >"$found"
holds 'every test program is in tests/meson.build' "$found"

build_file=$(cat include/leewater/meson.build &&
    sed "s/\"/'/g" include/leewater/leewater.h)
for file in include/leewater/*.h; do
    name=${file##*/}
    known "$name" || echo "$name is not installed"
    [ "$name" = leewater.h ] || known "leewater/$name" ||
        echo "$name is not in leewater.h"
done >"$found"
holds 'every public header is installed and in leewater.h' "$found"

# "/* name.c - what it holds": the first line of a source. A test's first
# line is a sentence that says what it proves.
awk 'FNR == 1 {
    name = FILENAME
    sub(".*/", "", name)
    if (index($0, "/* " name " - ") != 1) print FILENAME
}' src/*/*.[ch] include/leewater/*.h tests/support/*.h >"$found"
holds 'every source begins with its name and its responsibility' "$found"

sources | xargs grep -nE '(TODO|FIXME|XXX)' | grep -v 'issue [0-9]' \
    >"$found" || true
holds 'nothing is left open without an issue' "$found"
finish
