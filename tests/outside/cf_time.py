"""Times of every calendar against cftime (python3-cftime).

Ten thousand numbers in each calendar, in units and from reference dates drawn
by lot, the same in every run.

Usage: cf_time.py SOURCE_ROOT CF_TIMES
"""
import datetime
import os
import random
import subprocess
import sys

import common

COUNT = 10000
SIZES = {"days": 86400, "hours": 3600, "minutes": 60, "seconds": 1}
CALENDARS = ["standard", "gregorian", "proleptic_gregorian", "julian",
             "noleap", "365_day", "all_leap", "366_day", "360_day"]
REAL = {"standard", "gregorian", "proleptic_gregorian", "julian"}


def draw_reference(dice, cftime, calendar):
    """A date of the calendar, as text."""
    while True:
        year = dice.choice([dice.randint(1, 9990), dice.randint(1500, 1700),
                            dice.randint(1850, 2100)])
        month, day = dice.randint(1, 12), dice.randint(1, 31)
        try:
            cftime.datetime(year, month, day, calendar=calendar)
        except ValueError:
            continue
        clock = dice.choice(["", f" {dice.randint(0, 23)}:00:0.0",
                             f"T{dice.randint(0, 23):02d}:"
                             f"{dice.randint(0, 59):02d}:"
                             f"{dice.randint(0, 59):02d}Z"])
        return f"{year:04d}-{month}-{day:02d}{clock}"


def draw_line(dice, cftime, calendar):
    unit = dice.choice(list(SIZES))
    reference = draw_reference(dice, cftime, calendar)
    seconds = dice.choice([dice.randint(-10**6, 10**6),
                           dice.randint(-5 * 10**9, 5 * 10**9)])
    # A number that is a whole second to the last digit of a double.
    return f"{unit} since {reference}", seconds / SIZES[unit]


def real_text(cftime, date):
    """The proleptic Gregorian time of a real day, or None beyond the years
    of Python."""
    exact = cftime.date2num(date, "seconds since 1970-01-01",
                            calendar=date.calendar)
    if date.calendar == "julian" or date.year < 1583:
        # Days are real: from the calendar's own reference by its own count.
        same = cftime.date2num(cftime.datetime(1970, 1, 1,
                                               calendar="standard"),
                               "seconds since 2000-01-01",
                               calendar="standard")
        there = cftime.date2num(date, "seconds since 2000-01-01",
                                calendar=date.calendar)
        lag = 13 * 86400 if date.calendar == "julian" else 0
        exact = there + lag - same
    moment = (datetime.datetime(1970, 1, 1) +
              datetime.timedelta(seconds=int(exact)))
    return (f"{moment.year:04d}-{moment.month:02d}-{moment.day:02d}T"
            f"{moment.hour:02d}:{moment.minute:02d}:{moment.second:02d}Z")


def named_text(date):
    """The time of a day by its name, or None when there is no such day."""
    try:
        moment = datetime.datetime(date.year, date.month, date.day, date.hour,
                                   date.minute, date.second)
    except ValueError:
        return None
    return (f"{moment.year:04d}-{moment.month:02d}-{moment.day:02d}T"
            f"{moment.hour:02d}:{moment.minute:02d}:{moment.second:02d}Z")


def expected_text(cftime, units, number, calendar):
    """What cftime says, to the nearest second; None for no time."""
    try:
        date = cftime.num2date(number, units, calendar=calendar)
        # To the nearest second: cftime keeps microseconds.
        date += datetime.timedelta(seconds=round(date.microsecond / 1e6),
                                   microseconds=-date.microsecond)
        return (real_text(cftime, date) if calendar in REAL
                else named_text(date))
    except (ValueError, OverflowError):
        return None


def judge(verdicts, cftime, program, calendar):
    dice = random.Random("leewater " + calendar)
    lines = [draw_line(dice, cftime, calendar) for _ in range(COUNT)]
    asked = "".join(f"{units}\t{calendar}\t{number!r}\n"
                    for units, number in lines)
    said = subprocess.run([program], input=asked, text=True, check=True,
                          capture_output=True).stdout.splitlines()
    wrong, times = [], 0
    for (units, number), answer in zip(lines, said):
        expected = expected_text(cftime, units, number, calendar)
        times += expected is not None
        if expected is None and answer.startswith("none "):
            continue
        if answer != expected:
            wrong.append(f"{number!r} {units}: {answer}, cftime {expected}")
    verdicts.holds(f"{COUNT} times of the calendar {calendar} are cftime's",
                   not wrong and len(said) == COUNT, len(wrong), *wrong[:5])
    verdicts.holds(f"of the calendar {calendar} nine in ten are times",
                   times > 0.9 * COUNT, times)


def main():
    program = os.path.abspath(sys.argv[2])
    verdicts = common.Verdicts()
    try:
        import cftime
    except ImportError:
        statement = "cftime judges times in every calendar"
        if os.environ.get("CI") == "true":
            verdicts.holds(statement, False, "no module cftime")
        else:
            verdicts.skipped(statement, "no module cftime")
        verdicts.finish()
        return
    for calendar in CALENDARS:
        judge(verdicts, cftime, program, calendar)
    verdicts.finish()


main()
