#!/bin/sh
# demo.sh - proves that the committed demo data is what its script makes.
#
# Usage: demo.sh SOURCE_ROOT
set -eu
root=$1
. "$root/tests/support/tap.sh"
work=$(mktemp -d)
trap 'rm -rf "$work"' EXIT
python3 "$root/data/demo/make_demo.py" "$work"
for file in marrow_axis.csv marrow_wind.csv marrow_airfield.csv; do
    cmp "$root/data/demo/$file" "$work/$file" >"$work/found" 2>&1 || true
    holds "$file is what make_demo.py makes" "$work/found"
done
finish
