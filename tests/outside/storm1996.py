"""The January 1996 storm, as gridded in open data, through an invented lake.

Data: u and v at the surface, 6-hourly, of the Debian package libncarg-data
(BSD-style licence), read off the files: 64 times from 1996-01-05T00:00Z;
metres per second are inferred from the values; the height is not stated and
taken as 10 m. v is wholly missing at two times at which u is there.

Usage: storm1996.py SOURCE_ROOT PROGRAM
"""
import csv
import datetime
import math
import os
import pathlib
import shutil
import sys
import tempfile

import netCDF4
import numpy

import common

PACKAGE = "libncarg-data"
FOLDER = "usr/share/ncarg/data/cdf/"
LATITUDE, LONGITUDE = 42.5, -87.5  # over the southern Great Lakes

# The case's own numbers, for the reckoning here.
AIR, WATER, GRAVITY = 1.25, 999.7, 9.80665
LENGTH, DEPTH, BEARING = 64e3, 11.0, math.radians(345.0)


def read_winds(data):
    """Times, and components where both are there (NaN elsewhere)."""
    with netCDF4.Dataset(data / (FOLDER + "Ustorm.cdf")) as east, \
            netCDF4.Dataset(data / (FOLDER + "Vstorm.cdf")) as north:
        row = int(numpy.argmin(abs(east["lat"][:] - LATITUDE)))
        column = int(numpy.argmin(abs(east["lon"][:] - LONGITUDE)))
        u = east["u"][:, row, column].filled(numpy.nan).astype(float)
        v = north["v"][:, row, column].filled(numpy.nan).astype(float)
        reference = b"".join(east["reftime"][:].data.tolist()).decode()
        start = datetime.datetime.strptime(reference.strip("\0"),
                                           "%Y %m %d %H:%M")
        hours = [int(hour) for hour in east["timestep"][:]]
    return [start + datetime.timedelta(hours=hour) for hour in hours], u, v


def write_winds(path, times, u, v):
    with open(path, "w", newline="", encoding="ascii") as stream:
        table = csv.writer(stream)
        table.writerow(["time", "u [m s-1]", "v [m s-1]"])
        for time, east, north in zip(times, u, v):
            table.writerow([utc(time)] + [
                "" if math.isnan(part) else repr(float(part))
                for part in (east, north)])


def projected_stress(u, v):
    """Garratt (1977) [garratt1977], linear form, capped at 3e-3, along the
    axis; Pa."""
    speed = numpy.hypot(u, v)
    drag = numpy.minimum((0.75 + 0.067 * speed) * 1e-3, 3e-3)
    along = u * math.sin(BEARING) + v * math.cos(BEARING)
    return AIR * drag * speed * along


def closed_set_up(stress):
    """Rise at the lee wall of a closed trough of even depth and width: the
    depth's square grows evenly, H^2 = c + 2 a x, and the volume stays."""
    a = abs(stress) / (WATER * GRAVITY)
    low, high = DEPTH / 2, DEPTH  # depth at the windward wall, by bisection
    for _ in range(60):
        middle = (low + high) / 2
        far = math.sqrt(middle ** 2 + 2 * a * LENGTH)
        volume = (far ** 3 - middle ** 3) / (3 * a)
        low, high = (middle, high) if volume < DEPTH * LENGTH else (low,
                                                                    middle)
    return math.sqrt(low ** 2 + 2 * a * LENGTH) - DEPTH


def utc(time):
    return time.isoformat() + "Z"


def seconds_apart(text, time):
    moment = datetime.datetime.strptime(text, "%Y-%m-%dT%H:%M:%SZ")
    return abs((moment - time).total_seconds())


def judge_check(verdicts, found, times, u, v):
    """What `check` says of the record against what the files hold."""
    record = found["wind"]
    speed = numpy.hypot(u, v)
    gone = [i for i in range(len(times)) if math.isnan(speed[i])]
    verdicts.holds("every sample of the grid point is read",
                   record["samples"] == len(times), record)
    verdicts.holds("the two times without v are missing, nothing else is",
                   len(gone) == 2 and record["missing"] == 2, record)
    verdicts.holds("both gaps are told by the samples around them",
                   [(gap["after"], gap["before"]) for gap in record["gaps"]]
                   == [(utc(times[i - 1]), utc(times[i + 1])) for i in gone],
                   record["gaps"])
    verdicts.holds("the usual step is six hours",
                   record["step_s"] == 6 * 3600, record)
    verdicts.holds("the strongest wind is the data's own, to its digits",
                   abs(record["fastest_m_s"] - numpy.nanmax(speed)) < 1e-5,
                   record)
    verdicts.holds("the strongest wind stands at its time",
                   seconds_apart(record["fastest_time"],
                                 times[int(numpy.nanargmax(speed))]) == 0,
                   record)


def judge_run(verdicts, found, times, stress):
    """Levels against a reckoning of their own."""
    south, north = found["stations"]
    still = found["still_water_m"]
    strongest = int(numpy.nanargmax(abs(stress)))
    lee, windward = (north, south) if stress[strongest] > 0 else (south,
                                                                 north)
    rise = lee["max_m"] - still
    steady = closed_set_up(stress[strongest])
    period = found["first_period_s"]
    # An undamped mode under a load that grows over r overshoots by at most
    # T/(pi r) of it: sin(x)/x with x = pi r/T (linear oscillator, common
    # practice). The record's step is the shortest growth there is.
    overshoot = period / (math.pi * 6 * 3600)
    verdicts.holds("the lee end is where the strongest stress points",
                   rise > 0 and rise > windward["max_m"] - still,
                   found["stations"])
    verdicts.holds("the peak comes within one step of the strongest stress",
                   seconds_apart(lee["max_time"], times[strongest])
                   <= 6 * 3600, lee["max_time"], times[strongest])
    verdicts.holds("the windward end falls at the same time",
                   windward["min_m"] < still and seconds_apart(
                       windward["min_time"], times[strongest]) <= 6 * 3600,
                   windward)
    verdicts.holds("the peak is the equilibrium's, but for its overshoot",
                   steady * (1 - overshoot) <= rise
                   <= steady * (1 + overshoot), rise, steady, overshoot)
    # Half the two-node wave: T1 = 2 L/sqrt(g h) [merian1828]; 0.1 %.
    merian = 2 * LENGTH / math.sqrt(GRAVITY * DEPTH)
    verdicts.holds("the first period is Merian's",
                   abs(period / merian - 1) <= 1e-3, period, merian)
    verdicts.holds("no water is made or lost",
                   0 <= found["volume_defect"] <= 1e-12,
                   found["volume_defect"])
    verdicts.holds("the method names the missing samples",
                   any("missing" in note or "without wind" in note
                       for note in found["method"]["record"]),
                   found["method"]["record"])


def judge_steady(verdicts, program, case, u, v):
    """The storm's strongest wind, held: the closed form."""
    stress = projected_stress(u, v)
    speed, origin = math.hypot(u, v), math.degrees(math.atan2(-u, -v)) % 360
    case.write_text(case.read_text(encoding="ascii")
                    .replace("SPEED", f"{speed:.9f}")
                    .replace("FROM", f"{origin:.9f}"), encoding="ascii")
    wind = common.summary(program, "steady", case)["winds"][0]
    expected = closed_set_up(stress)
    # The solver's goal is 1e-6 of the tilt; twice the set-up is about that.
    verdicts.holds("held for ever, it gives the closed form's set-up",
                   abs(wind["set_up_m"] - expected) <= 2e-6 * expected,
                   wind["set_up_m"], expected)
    verdicts.holds("and the set-up stands at the lee end",
                   wind["set_up_at_m"] == (LENGTH if stress > 0 else 0),
                   wind["set_up_at_m"])


def judge_table(verdicts, path, times):
    """The CSV series: a row each six hours, every level finite."""
    with open(path, encoding="utf-8") as stream:
        rows = list(csv.reader(line for line in stream
                               if not line.startswith("#")))
    verdicts.holds("the table has a row for each time of the record",
                   len(rows) == 1 + len(times), len(rows))
    columns = [i for i, name in enumerate(rows[0]) if " end" in name]
    levels = [float(row[i] or "nan") for row in rows[1:] for i in columns]
    verdicts.holds("every level of both stations is finite",
                   len(columns) >= 2 and
                   all(math.isfinite(level) for level in levels), rows[0])
    verdicts.holds("the table's times are the record's, in UTC",
                   [row[0] for row in rows[1:]] ==
                   [utc(time) for time in times], rows[1])


def judge_gaps(verdicts, program, work, times, u, v):
    """Twelve hours between samples with wind: too much for a rule of five
    beyond the step of six."""
    done = common.run(program, "run", work / "refused.yaml")
    gone = [i for i in range(len(times)) if math.isnan(u[i] + v[i])]
    verdicts.holds("a gap beyond the rule is refused as unfit data",
                   done.returncode == 5 and done.stdout == "",
                   done.returncode, done.stdout)
    before, after = times[gone[0] - 1], times[gone[0] + 1]
    verdicts.holds("the message names both ends of the gap",
                   f"{before:%Y-%m-%dT%H:%M}" in done.stderr.replace(" ", "T")
                   and f"{after:%Y-%m-%dT%H:%M}" in
                   done.stderr.replace(" ", "T"), done.stderr)
    found = common.summary(program, "run", work / "split.yaml")
    verdicts.holds("a split run has a piece for each stretch between gaps",
                   found["pieces"] == len(gone) + 1, found["pieces"])


def series(program, case, out):
    """What drives the water and what it does, unrounded."""
    done = common.run(program, "run", case, "--no-range", "--no-error", "-q",
                      "-o", out)
    if done.returncode != 0:
        raise SystemExit(f"run {case}: {done.stderr}")
    with netCDF4.Dataset(out) as file:
        return {name: numpy.ma.filled(file[name][:], numpy.nan)
                for name in ("time", "wind_speed", "wind_from_direction",
                             "water_level")}


def judge_grids(verdicts, program, work, checked, u, v):
    """The record straight out of the two grids: that of the table, to the
    bit, for both hold the same single-precision numbers."""
    found = common.summary(program, "check", work / "grid.yaml")["wind"]
    told = {key for key in checked["wind"] if key not in ("files", "read")}
    verdicts.holds("check says the same of the grids as of a table of them",
                   told <= found.keys() and
                   all(found[key] == checked["wind"][key] for key in told),
                   [key for key in told
                    if found.get(key) != checked["wind"][key]])
    grids = series(program, work / "grid.yaml", work / "grid.nc")
    table = series(program, work / "bridged.yaml", work / "table.nc")
    verdicts.holds("every sample and level of a run is the same, to the bit",
                   all(numpy.array_equal(grids[name], table[name])
                       for name in grids),
                   {name: abs(grids[name] - table[name]).max()
                    for name in grids})
    speed = numpy.hypot(u, v)
    good = ~numpy.isnan(speed)
    verdicts.holds("the winds that drive the water are the grids' own",
                   numpy.allclose(grids["wind_speed"][good], speed[good],
                                  rtol=1e-12, atol=0),
                   grids["wind_speed"][good][:6], speed[good][:6])
    case = work / "grid.yaml"
    told = ", unit: hours since 1996-01-05 00:00"
    case.write_text(case.read_text(encoding="ascii").replace(told, ""),
                    encoding="ascii")
    done = common.run(program, "check", case)
    verdicts.holds("times without units are refused until the case says them",
                   done.returncode == 4 and done.stdout == "" and
                   "Ustorm.cdf: time 'timestep' has no units" in done.stderr,
                   done.returncode, done.stderr)


def main():
    root, program = pathlib.Path(sys.argv[1]), os.path.abspath(sys.argv[2])
    data = common.fetch(PACKAGE, FOLDER + "Ustorm.cdf", FOLDER + "Vstorm.cdf")
    if data is None:
        common.without_data(PACKAGE)
        return
    verdicts = common.Verdicts()
    times, u, v = read_winds(data)
    with tempfile.TemporaryDirectory() as folder:
        work = pathlib.Path(folder)
        for file in (root / "tests/outside/storm1996").iterdir():
            shutil.copy(file, work)
        write_winds(work / "wind.csv", times, u, v)
        checked = common.summary(program, "check", work / "bridged.yaml")
        judge_check(verdicts, checked, times, u, v)
        table = work / "levels.csv"
        found = common.summary(program, "run", work / "bridged.yaml", "-o",
                               table)
        stress = projected_stress(u, v)
        judge_run(verdicts, found, times, stress)
        strongest = int(numpy.nanargmax(abs(stress)))
        judge_steady(verdicts, program, work / "steady.yaml", u[strongest],
                     v[strongest])
        judge_table(verdicts, table, times)
        judge_gaps(verdicts, program, work, times, u, v)
        for name in ("Ustorm.cdf", "Vstorm.cdf"):
            shutil.copy(data / (FOLDER + name), work)
        judge_grids(verdicts, program, work, checked, u, v)
    verdicts.finish()


main()
