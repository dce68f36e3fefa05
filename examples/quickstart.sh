#!/bin/sh
# quickstart.sh - from a fresh Debian 12 machine to water levels at a harbour.
#
# Usage: sh examples/quickstart.sh
#
# Installs what is missing (as root; without root it says what to install),
# builds the program in build/, runs the demo case and leaves its files in
# out/. Safe to run again: it builds what has changed and replaces its own
# files.
set -eu
cd "$(dirname "$0")/.."
. tests/support/packages.sh
need $build_packages || exit 3

if [ ! -f build/build.ninja ]; then
    # As packagers do: a newer compiler's warning shall not stop a user.
    meson setup build --buildtype=release -Dwerror=false -Dtests=false >&2
fi
ninja -C build src/leewater >&2

program=build/src/leewater
case=examples/harbour.yaml
mkdir -p out
$program check $case >out/harbour-check.txt
$program run $case --force -o out/harbour-levels.csv >out/harbour.txt
$program run $case --json >out/harbour.json

cat out/harbour.txt
cat <<EOT

The program   $program (try: $program --help)
The case      $case
What was read out/harbour-check.txt
The summary   out/harbour.txt, for machines out/harbour.json
The levels    out/harbour-levels.csv
EOT
