#!/bin/sh
# layers.sh - proves the include table of docs/architecture.md, and that
# foreign libraries stay in the one room that knows them.
#
# Reads the sources; needs no build. Usage: layers.sh SOURCE_ROOT
set -eu
root=$1
. "$root/tests/support/tap.sh"
found=$(mktemp)
trap 'rm -f "$found"' EXIT
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
    formats)  echo status ;;
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

# Lines "file:line:target" of the includes of one kind: '"' or '<'.
includes() {
    grep -nHE "^[[:space:]]*#[[:space:]]*include[[:space:]]*$2" "$1" |
        sed -E 's/^([^:]*:[0-9]+):[^"<]*["<]([^">]*)[">].*/\1:\2/' || true
}

# What stands in quotes must be "stage/file.h", "leewater/file.h" or the
# version that the build writes.
misplaced_includes() {
    stage=$1
    for file in $(find "src/$stage" -name '*.[ch]'); do
        includes "$file" '"' | while IFS=: read -r path line target; do
            case $target in
            leewater/*)
                name=${target#leewater/}
                is_in "${name%.h}" "$(allowed_public "$stage")" ||
                    echo "$path:$line: $stage may not include $target"
                ;;
            version.h) [ "$stage" = base ] ||
                echo "$path:$line: only base knows version.h" ;;
            */*)
                is_in "${target%%/*}" "$stage $(allowed "$stage")" ||
                    echo "$path:$line: $stage may not include $target"
                ;;
            *) echo "$path:$line: \"$target\" names no folder" ;;
            esac
        done
    done
}

# Foreign headers, the folder that may include them. Anything else in angle
# brackets must belong to C17 or POSIX.
foreign_room() {
    case $1 in
    gsl/*) echo numerics ;;
    udunits2.h) echo base ;;
    yaml.h) echo formats ;;
    jansson.h) echo formats ;;
    netcdf*.h) echo formats ;;
    assert.h | ctype.h | errno.h | fenv.h | float.h | inttypes.h | limits.h | \
        math.h | stdarg.h | stdbool.h | stddef.h | stdint.h | stdio.h | \
        stdlib.h | string.h | time.h) echo any ;;
    locale.h | pthread.h) echo base ;;
    fcntl.h | unistd.h | sys/*.h) echo base formats cli ;;
    signal.h | getopt.h) echo cli ;;
    emmintrin.h) echo formats ;;
    *) echo nobody ;;
    esac
}

strange_headers() {
    for stage in $stages; do
        for file in $(find "src/$stage" -name '*.[ch]'); do
            includes "$file" '<' | while IFS=: read -r path line target; do
                rooms=$(foreign_room "$target")
                [ "$rooms" = any ] || is_in "$stage" "$rooms" ||
                    echo "$path:$line: <$target> belongs to: $rooms"
            done
        done
    done
}

# A public header knows the C library and other public headers only.
strange_public_headers() {
    for file in include/leewater/*.h; do
        includes "$file" '"' | grep -v ':leewater/' || true
        includes "$file" '<' | while IFS=: read -r path line target; do
            [ "$(foreign_room "$target")" = any ] ||
                echo "$path:$line: <$target> in a public header"
        done
    done
}

# Includes that form a circle among the public headers: tsort names them.
public_circles() {
    for file in include/leewater/*.h; do
        includes "$file" '"' | while IFS=: read -r path _ target; do
            echo "${path#include/} $target"
        done
    done | tsort 2>&1 >/dev/null || true
}

unknown_folders() {
    for folder in src/*/; do
        name=$(basename "$folder")
        is_in "$name" "$(echo $stages)" || echo "src/$name is not in the table"
    done
}

: >"$found"
unknown_folders >"$found"
holds 'every folder of src is in the table' "$found"
for stage in $stages; do
    : >"$found"
    [ ! -d "src/$stage" ] || misplaced_includes "$stage" >"$found"
    holds "$stage includes only what stands below it" "$found"
done
strange_headers >"$found"
holds 'foreign headers stay in the rooms that know them' "$found"
strange_public_headers >"$found"
holds 'public headers include public headers and the C library only' "$found"
public_circles >"$found"
holds 'public headers do not include each other in a circle' "$found"
finish
