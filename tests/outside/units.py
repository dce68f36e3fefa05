"""The program's reading of units against the udunits2 command.

Usage: units.py SOURCE_ROOT PROGRAM
"""
import os
import pathlib
import re
import shutil
import subprocess
import sys
import tempfile

import common

# A unit as people write it, and the same one as udunits2 knows it: mph, kph
# and kn are misread or unknown there.
SPEEDS = {
    "m s-1": "m s-1", "m/s": "m s-1", "knots": "knot", "knot": "knot",
    "kt": "knot", "kts": "knot", "kn": "knot", "km/h": "km h-1",
    "kph": "km h-1", "mph": "mile/hour", "ft/s": "ft s-1",
    "cm/s": "cm s-1", "M/S": "m s-1",
}
LENGTHS = {"m": "m", "km": "km", "ft": "ft", "mi": "mile",
           "nmi": "nautical_mile"}


def factor(unit, wanted):
    """What udunits2 multiplies by, with the 6 digits it prints."""
    said = subprocess.run(["udunits2", "-H", unit, "-W", wanted], text=True,
                          capture_output=True, check=True).stdout
    return float(re.search(r"1 \S.* = (\S+) ", said).group(1))


def write_case(work, speed_unit, length_unit):
    (work / "lake.csv").write_text(
        f"chainage [{length_unit}],bed [m],width [m]\n0,-4,500\n"
        "2.5,-4,500\n", encoding="ascii")
    (work / "wind.csv").write_text(
        f"time,speed [{speed_unit}],from [degree]\n"
        "2031-01-10T00:00Z,10,270\n2031-01-10T01:00Z,10,270\n",
        encoding="ascii")
    (work / "case.yaml").write_text(
        "lake:\n  still_water: 0 m\n"
        "  axis: {bearing: 90 degree, profile: lake.csv}\n"
        "wind:\n  record: wind.csv\n  time: time\n  speed: speed\n"
        "  from: from\n  height: 10 m\n", encoding="ascii")


def main():
    program = os.path.abspath(sys.argv[2])
    verdicts = common.Verdicts()
    if shutil.which("udunits2") is None:
        verdicts.skipped("units are those of udunits2", "no udunits2 here")
        verdicts.finish()
        return
    # The judge prints 6 digits.
    close = 1e-5
    with tempfile.TemporaryDirectory() as folder:
        work = pathlib.Path(folder)
        for written, known in SPEEDS.items():
            write_case(work, written, "km")
            record = common.summary(program, "check",
                                    work / "case.yaml")["wind"]
            expected = 10 * factor(known, "m s-1")
            verdicts.holds(
                f"10 {written} is {expected:g} m/s",
                abs(record["fastest_m_s"] - expected) <= close * expected,
                record["fastest_m_s"])
        for written, known in LENGTHS.items():
            write_case(work, "knots", written)
            lake = common.summary(program, "check",
                                  work / "case.yaml")["water"]
            expected = 2.5 * factor(known, "m")
            verdicts.holds(
                f"2.5 {written} is {expected:g} m",
                abs(lake["wetted_length_m"] - expected) <= close * expected,
                lake)
    verdicts.finish()


main()
