#!/bin/sh
# layers.sh - proves the include table of docs/architecture.md, and that
# foreign libraries stay in the one room that knows them.
#
# Reads the sources; needs no build. Usage: layers.sh SOURCE_ROOT
set -eu
root=$1
. "$root/tests/support/tap.sh"
work=$(mktemp -d)
trap 'rm -rf "$work"' EXIT
found=$work/found
includes=$work/includes
cd "$root"

stages='base numerics formats wind stress exposure basin setup series case
output cli'

# Which private folders, beside its own, each folder may include.
allowed() {
    case $1 in
    base)     echo ;;
    numerics) echo base ;;
    formats)  echo base ;;
    wind)     echo base numerics formats ;;
    stress)   echo base numerics ;;
    exposure) echo base numerics wind stress ;;
    basin)    echo base numerics formats ;;
    setup)    echo base numerics stress basin ;;
    series)   echo base numerics wind exposure stress basin setup ;;
    case)     echo base formats ;;
    output)   echo base formats wind stress exposure basin setup series ;;
    cli)      echo base ;;
    esac
}

# Which public headers each folder may include. A header that a stage offers
# is known to that stage and to those above it.
allowed_public() {
    case $1 in
    base)     echo status calendar units ;;
    numerics) echo status ;;
    formats)  echo status units ;;
    wind)     echo status calendar units wind ;;
    stress)   echo status units stress ;;
    exposure) echo status units stress wind exposure ;;
    basin)    echo status calendar units basin ;;
    setup)    echo status stress basin setup ;;
    series)   echo status calendar units stress wind exposure basin setup \
        series ;;
    case)     echo status calendar units stress wind exposure basin setup \
        series case ;;
    output)   echo status calendar units stress wind exposure basin setup \
        series case output ;;
    cli)      echo leewater status calendar units stress wind exposure basin \
        setup series case output ;;
    esac
}

is_in() {
    case " $2 " in *" $1 "*) return 0 ;; esac
    return 1
}

# Every include of the tree: path, line, '"' or '<', target.
grep -rnE '^[[:space:]]*#[[:space:]]*include' src include --include='*.[ch]' |
    sed -E 's/^([^:]*):([0-9]+):[^"<]*(["<])([^">]*)[">].*/\1 \2 \3 \4/' |
    sort >"$includes"

# What stands in quotes must be "stage/file.h", "leewater/file.h" or the
# version that the build writes.
misplaced_includes() {
    private="$1 $(allowed "$1")"
    public=$(allowed_public "$1")
    grep "^src/$1/[^ ]* [0-9]* \"" "$includes" |
        while read -r path line _ target; do
            place="$path:$line: $1 may not include $target"
            name=${target#leewater/}
            case $target in
            leewater/*) is_in "${name%.h}" "$public" || echo "$place" ;;
            version.h) [ "$1" = base ] || echo "$place" ;;
            */*) is_in "${target%%/*}" "$private" || echo "$place" ;;
            *) echo "$place: it names no folder" ;;
            esac
        done
}

# Sets `rooms` to the folders that may include a foreign header; what is in
# angle brackets and not named here must not be used at all.
find_rooms() {
    case $1 in
    gsl/*) rooms=numerics ;;
    udunits2.h) rooms=base ;;
    yaml.h | jansson.h | netcdf*.h) rooms=formats ;;
    assert.h | ctype.h | errno.h | fenv.h | float.h | inttypes.h | limits.h | \
        math.h | stdarg.h | stdbool.h | stddef.h | stdint.h | stdio.h | \
        stdlib.h | string.h | time.h) rooms=any ;;
    locale.h | pthread.h) rooms=base ;;
    fcntl.h | unistd.h | sys/*.h) rooms='base formats cli' ;;
    signal.h) rooms='formats cli' ;;
    getopt.h) rooms=cli ;;
    emmintrin.h) rooms=formats ;;
    *) rooms=nobody ;;
    esac
}

strange_headers() {
    grep '^src/[^ ]* [0-9]* <' "$includes" |
        while read -r path line _ target; do
            find_rooms "$target"
            stage=${path#src/}
            [ "$rooms" = any ] || is_in "${stage%%/*}" "$rooms" ||
                echo "$path:$line: <$target> belongs to: $rooms"
        done
}

# A public header knows the C library and other public headers only.
strange_public_headers() {
    grep '^include/' "$includes" | while read -r path line mark target; do
        find_rooms "$target"
        case "$mark$target" in
        '"leewater/'*) ;;
        '"'*) echo "$path:$line: \"$target\" in a public header" ;;
        *) [ "$rooms" = any ] ||
            echo "$path:$line: <$target> in a public header" ;;
        esac
    done
}

# Includes that form a circle among the public headers: tsort names them.
public_circles() {
    sed -nE 's|^include/([^ ]*) [0-9]* " (.*)|\1 \2|p' "$includes" |
        tsort 2>&1 >/dev/null || true
}

unknown_folders() {
    for folder in src/*/; do
        name=$(basename "$folder")
        is_in "$name" "$(echo $stages)" || echo "src/$name is not in the table"
    done
}

unknown_folders >"$found"
holds 'every folder of src is in the table' "$found"
for stage in $stages; do
    misplaced_includes "$stage" >"$found"
    holds "$stage includes only what stands below it" "$found"
done
strange_headers >"$found"
holds 'foreign headers stay in the rooms that know them' "$found"
strange_public_headers >"$found"
holds 'public headers include public headers and the C library only' "$found"
public_circles >"$found"
holds 'public headers do not include each other in a circle' "$found"
finish
