#!/bin/sh
# install.sh - proves that what is installed suffices: a stranger's program
# builds against the headers and the pkg-config file, and the command runs.
#
# Usage: install.sh SOURCE_ROOT BUILD_ROOT
set -eu
root=$1
build=$2
. "$root/tests/support/tap.sh"
work=$(mktemp -d)
trap 'rm -rf "$work"' EXIT
found=$work/found

# verdict SENTENCE COMMAND...: holds when the command succeeds.
verdict() {
    sentence=$1
    shift
    if "$@" >"$work/log" 2>&1; then : >"$found"; else
        { echo "failed: $*" && cat "$work/log"; } >"$found"
    fi
    holds "$sentence" "$found"
}

verdict 'meson installs into a folder of its own' \
    meson install -C "$build" --no-rebuild --destdir "$work/root"

find "$work/root" -type f | sed "s|^$work/root||" | sort >"$work/files"
prefix=$(sed -n 's|/bin/leewater$||p' "$work/files")
pc=$(dirname "$(grep '/leewater\.pc$' "$work/files")")
export PKG_CONFIG_PATH="$work/root$pc"

flags() {
    pkg-config --define-variable=prefix="$work/root$prefix" "$@" leewater
}
compile() {
    "${CC:-cc}" -std=c17 -Wall -Wextra -Werror -o "$work/estimate" \
        "$root/examples/estimate.c" $(flags --cflags --libs)
}
# The example uses a part of the library; this takes in all of it.
whole() {
    echo 'int main(void) { return 0; }' >"$work/whole.c"
    "${CC:-cc}" -o "$work/whole" "$work/whole.c" $(flags --libs | sed \
        's/-lleewater/-Wl,--whole-archive & -Wl,--no-whole-archive/')
}
sensible() {
    "$work/estimate" >"$work/out" && cat "$work/out"
    # At 20 m/s over 12 km of 5 m: 0.3 m or so at either end (the zero order
    # a L/(2 h) with a = tau/(rho g), tau = 1.2 * 2.1e-3 * 400 Pa, is 0.12 m;
    # the return flow adds up to a half).
    awk '/^set-up/ { up = $2 } /^set-down/ { down = $2 }
        END { exit !(up > 0.08 && up < 0.25 && down < -0.08 && down > -0.25) }
    ' "$work/out"
}

for header in "$root"/include/leewater/*.h; do
    grep -q "/include/leewater/$(basename "$header")\$" "$work/files" ||
        basename "$header"
done >"$found"
holds 'every public header is installed' "$found"
verdict 'pkg-config knows the library' flags --modversion
verdict 'a program builds against the installed library' compile
verdict 'all of the library links with what pkg-config names' whole
verdict 'the program prints a set-up and a set-down of the right size' sensible
verdict 'the installed command says its version' \
    "$work/root$prefix/bin/leewater" --version
finish
