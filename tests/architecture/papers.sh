#!/bin/sh
# papers.sh - proves that the papers behind the code can be found: every key
# used has its entry, every link in the documents its target.
#
# Usage: papers.sh SOURCE_ROOT
set -eu
root=$1
. "$root/tests/support/tap.sh"
work=$(mktemp -d)
trap 'rm -rf "$work"' EXIT
found=$work/found
cd "$root"

grep -oE '^- \*\*[a-z0-9-]+\*\*' docs/references.md |
    sed -E 's/^- \*\*(.*)\*\*/\1/' >"$work/keys"

# A key is a name and a year (GSL's manual has none): in square brackets in
# prose, in double quotes in tables of the code.
key='(gsl|[a-z]+(1[89]|20)[0-9]{2}[a-z]?)'
{
    find src include tests docs -name '*.[ch]' -o -name '*.md' \
        -o -name '*.py' | sort | xargs grep -noE "\[$key\]"
    find src -name '*.c' | sort | xargs grep -noE "\"$key\""
} | sed -E 's/[]["]//g' >"$work/used"

[ -s "$work/used" ] || echo 'no key was found at all' >"$found"
holds 'sources are cited by key' "$found"

while IFS=: read -r path line key; do
    grep -qx "$key" "$work/keys" || echo "$path:$line: [$key]"
done <"$work/used" >"$found"
holds 'every key used has its entry in docs/references.md' "$found"

sort "$work/keys" | uniq -d >"$found"
holds 'no key stands twice in docs/references.md' "$found"

LC_ALL=C sort -c "$work/keys" 2>"$found" || true
holds 'the keys stand in alphabetical order' "$found"

# Entries run from "- **key**" to the next one and say what they serve.
awk '/^- \*\*/ { if (key != "" && !used) print key; key = $2; used = 0 }
     /Used for:/ { used = 1 }
     END { if (key != "" && !used) print key }' docs/references.md >"$found"
holds 'every entry says what it is used for' "$found"

sed -n 's/^ *\.name = "\([a-z0-9-]*\)".*/\1/p' src/stress/drag_relations.c \
    >"$work/relations"
: >"$found"
[ -s "$work/relations" ] || echo "no relation was found" >"$found"
while read -r name; do
    grep -qF "\`$name\`" docs/references.md || echo "$name"
done <"$work/relations" >>"$found"
holds 'every drag relation is named by the entry of its paper' "$found"

sed -n 's/^ *{"\([a-z0-9-]*\)", *"\([a-z0-9]*\)", *RISE_TILT.*/\1 \2/p' \
    src/setup/formulas.c >"$work/formulas"
: >"$found"
[ -s "$work/formulas" ] || echo "no formula was found" >"$found"
while read -r name key; do
    grep "^- \*\*$key\*\*" docs/references.md | grep -qF "\`$name\`" ||
        echo "$name: [$key]"
done <"$work/formulas" >>"$found"
holds 'every handbook formula is named by the entry of its source' "$found"

# Relative links of every document, without their anchors.
for file in *.md $(find docs -name '*.md'); do
    grep -oE '\]\([^)#][^)]*\)' "$file" | sed -E 's/^\]\(([^)#]*).*\)$/\1/' |
        grep -vE '^(https?|mailto):' | while read -r target; do
        [ -e "$(dirname "$file")/$target" ] || echo "$file: $target"
    done
done >"$found"
holds 'every link of the documents leads somewhere' "$found"
finish
