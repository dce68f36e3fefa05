"""Counts the statements of test logs: count.py BUILD...

Reads meson-logs/testlog*.json of each build directory (meson adds the name
of a wrapper) and prints "passed failed skipped". A statement is a line of the Test Anything Protocol;
a program that ended without all of its verdicts adds one that failed. What
failed or was skipped is named on standard error.
"""
import json
import pathlib
import re
import sys

VERDICT = re.compile(r"^(not )?ok\b[ ]*\d*[ ]*-?[ ]*(.*)$")
SKIP = re.compile(r"# *skip", re.IGNORECASE)
FINE = {"OK", "SKIP", "EXPECTEDFAIL"}


def verdicts(text):
    """Yields (kind, statement) for each verdict line."""
    for line in text.splitlines():
        match = VERDICT.match(line)
        if not match:
            continue
        if SKIP.search(line):
            yield "skipped", match.group(2)
        elif match.group(1):
            yield "failed", match.group(2)
        else:
            yield "passed", match.group(2)


def count(test, totals):
    """Adds one test program's verdicts to totals."""
    seen = {"passed": 0, "failed": 0, "skipped": 0}
    for kind, statement in verdicts(test.get("stdout", "")):
        seen[kind] += 1
        if kind != "passed":
            print(f"{kind}: {test['name']}: {statement}", file=sys.stderr)
    said = test["result"]
    if (said not in FINE and seen["failed"] == 0) or not any(seen.values()):
        seen["failed"] += 1
        print(f"failed: {test['name']}: ended with {said}", file=sys.stderr)
    for kind, number in seen.items():
        totals[kind] += number


def main():
    totals = {"passed": 0, "failed": 0, "skipped": 0}
    for build in sys.argv[1:]:
        for log in pathlib.Path(build, "meson-logs").glob("testlog*.json"):
            for line in log.read_text(encoding="utf-8").splitlines():
                count(json.loads(line), totals)
    print(totals["passed"], totals["failed"], totals["skipped"])


main()
