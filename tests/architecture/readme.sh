#!/bin/sh
# readme.sh - proves that the README shows what the program prints.
#
# Usage: readme.sh SOURCE_ROOT PROGRAM
set -eu
root=$1
program=$(realpath "$2")
. "$root/tests/support/tap.sh"
work=$(mktemp -d)
trap 'rm -rf "$work"' EXIT
found=$work/found
cd "$root"

# Each block that begins with "$ leewater": the command, and what is shown of
# its output, which may be cut short at its end.
awk -v work="$work" '
    /^```/ { inside = !inside; name = ""; next }
    inside && /^\$ leewater / { n++; name = work "/" n
        print substr($0, 12) >(name ".command"); next }
    inside && name != "" { print >(name ".shown") }
' README.md

[ -e "$work/1.command" ] || echo 'no command is shown' >"$found"
holds 'the README shows the program at work' "$found"

for command in "$work"/*.command; do
    shown=${command%.command}.shown
    arguments=$(cat "$command")
    eval "$program $arguments" 2>/dev/null |
        head -n "$(wc -l <"$shown")" >"$work/printed"
    diff -u "$shown" "$work/printed" >"$found" || true
    holds "it prints what is shown: $arguments" "$found"
done
finish
