# tap.sh - statements with a verdict, in the Test Anything Protocol.
#
# Source it, call holds, refuted or skipped once a statement, then finish.
# The shell's standard output is the protocol; diagnostics begin with '# '.

tap_count=0

# holds STATEMENT [FILE]: true when FILE is empty or absent; what stands in
# FILE is the list of what speaks against the statement.
holds() {
    tap_count=$((tap_count + 1))
    if [ -n "${2:-}" ] && [ -s "$2" ]; then
        echo "not ok $tap_count - $1"
        sed 's/^/#   /' "$2"
    else
        echo "ok $tap_count - $1"
    fi
}

# skipped STATEMENT REASON
skipped() {
    tap_count=$((tap_count + 1))
    echo "ok $tap_count - $1 # SKIP $2"
}

# Closes the protocol; the plan stands last, so a script that dies early has
# none and fails.
finish() {
    echo "1..$tap_count"
}
