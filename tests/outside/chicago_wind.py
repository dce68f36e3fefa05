"""The spikes of a daily record of Chicago, 2001-2016.

Data: Chicago of the Debian package r-cran-modeldata (MIT), daily; the greatest
wind of a day, wind_max, holds 406.2, 240.5 and 126.6 among values below 60:
miles per hour, inferred. A fourth day of 50.6 between calm ones is a spike by
the rule as well. The direction is invented here, 270 degrees, so that
the record can be read as wind; no verdict rests on it.

Usage: chicago_wind.py SOURCE_ROOT PROGRAM
"""
import datetime
import os
import pathlib
import sys
import tempfile

import common
import rdata

PACKAGE = "r-cran-modeldata"
FOLDER = "usr/lib/R/site-library/modeldata/data/"
MILE_PER_HOUR = 0.44704  # m s-1, exact

CASE = """\
lake:
  still_water: 176.0 m
  axis: {bearing: 90 degree, uniform: {length: 10 km, depth: 5 m, width: 1 km}}
wind:
  record: wind.csv
  year: year
  month: month
  day: day
  utc_offset: Z
  speed: speed
  from: from
"""


def spikes_of(speed):
    """By the documented rule: faster than both neighbours by 15 m/s and by a
    factor of 3."""
    return [i for i in range(1, len(speed) - 1)
            if all(speed[i] > speed[j] + 15 and speed[i] > 3 * speed[j]
                   for j in (i - 1, i + 1))]


def main():
    program = os.path.abspath(sys.argv[2])
    data = common.fetch(PACKAGE, FOLDER + "Rdata.rdx", FOLDER + "Rdata.rdb")
    if data is None:
        common.without_data(PACKAGE)
        return
    verdicts = common.Verdicts()
    frame = rdata.read_set(data / FOLDER, "Chicago")
    days = [datetime.date(1970, 1, 1) + datetime.timedelta(days=int(day))
            for day in frame["date"]]
    speed = [value * MILE_PER_HOUR for value in frame["wind_max"]]
    spikes = spikes_of(speed)
    with tempfile.TemporaryDirectory() as folder:
        work = pathlib.Path(folder)
        with open(work / "wind.csv", "w", encoding="ascii") as stream:
            stream.write("year,month,day,speed [mph],from [degree]\n")
            for day, value in zip(days, frame["wind_max"]):
                stream.write(f"{day.year},{day.month},{day.day},"
                             f"{value!r},270\n")
        (work / "case.yaml").write_text(CASE, encoding="ascii")
        found = common.summary(program, "check", work / "case.yaml")
    record = found["wind"]
    verdicts.holds("the data has three spikes beyond reason and one within it",
                   [round(frame["wind_max"][i], 1) for i in spikes]
                   == [240.5, 406.2, 50.6, 126.6], spikes)
    verdicts.holds("all days are read", record["samples"] == len(days) == 5698
                   and record["missing"] == 0, record)
    verdicts.holds("the four spikes are told, and no other",
                   record["spikes"] == 4, record)
    verdicts.holds("two of them are beyond belief",
                   record["beyond_belief"] == 2, record)
    verdicts.holds("the fastest wind is the greatest of them, at its day",
                   abs(record["fastest_m_s"] - max(speed)) < 1e-6 and
                   record["fastest_time"] == f"{days[spikes[1]]}T00:00:00Z",
                   record)
    verdicts.holds("among the largest storms they are marked as spikes",
                   {storm["time"][:10] for storm in record["storms"]
                    if storm["is_spike"]} == {str(days[i]) for i in spikes},
                   record["storms"])
    warnings = " ".join(found["warnings"])
    verdicts.holds("and the warnings name the first of both",
                   "spike" in warnings and str(days[spikes[0]]) in warnings,
                   warnings)
    verdicts.finish()


main()
