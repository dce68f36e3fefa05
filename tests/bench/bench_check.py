#!/usr/bin/env python3
"""Times `check` on ten and forty years of an hourly station record, as one
file and as a file a year.

usage: bench_check.py PROGRAM [FOLDER]

The station is invented: a seeded autoregressive wind that turns, over land,
in knots and tens of degrees, with missing codes, variable winds, calms,
repeated rows, a lost fortnight and one spike. `check` reads, corrects, checks
and sums it up. With FOLDER the files stay there.
"""

import datetime
import math
import os
import random
import statistics
import subprocess
import sys
import tempfile
import time

SEED = 11
FIRST_YEAR = 1991
YEARS = 40
HEAD = "time [UTC],speed [knots],from [degree]\n"

CASE = """\
lake:
  still_water: 0 m
  axis: {{bearing: 90 degree, uniform: {{length: 12 km, depth: 4 m, width: 1 km}}}}
wind:
  record: {record}
  missing: [-999]
  variable: VRB
  height: 8 m
  averaging: 10 min
  over: {{land: {{roughness_length: 0.03 m, to_water: 1.2}}}}
  gaps: split
"""


def field(draw, hour, east, north):
    """Speed and direction as the station writes them."""
    knots = round(math.hypot(east, north))
    tens = round(math.degrees(math.atan2(-east, -north)) % 360.0 / 10) % 36
    chance = draw.random()
    if chance < 0.01:
        return "-999,-999"
    if hour == 50000:
        return "88,240"
    if 1 <= knots <= 3 and chance < 0.2:
        return f"{knots},VRB"
    return f"{knots},{10 * tens}" if knots > 0 else "0,"


def write_years(folder, years):
    draw = random.Random(SEED)
    east = north = 0.0
    hour = 0
    for year in range(FIRST_YEAR, FIRST_YEAR + years):
        when = datetime.datetime(year, 1, 1)
        with open(os.path.join(folder, f"{year}.csv"), "w",
                  encoding="ascii") as file:
            file.write(HEAD)
            while when.year == year:
                season = 1.0 + 0.4 * math.cos(when.timetuple().tm_yday / 58.1)
                east = 0.95 * east + draw.gauss(0.4, 3.0) * season
                north = 0.95 * north + draw.gauss(0.0, 2.0) * season
                row = f"{when:%Y-%m-%dT%H:%M},{field(draw, hour, east, north)}"
                lost = when.year == FIRST_YEAR + 3 and when.month == 5 \
                    and when.day <= 14
                if not lost:
                    file.write(row + "\n")
                    if draw.random() < 0.0002:
                        file.write(row + "\n")
                when += datetime.timedelta(hours=1)
                hour += 1


def join_years(folder, years, name):
    with open(os.path.join(folder, name), "w", encoding="ascii") as whole:
        whole.write(HEAD)
        for year in range(FIRST_YEAR, FIRST_YEAR + years):
            with open(os.path.join(folder, f"{year}.csv"),
                      encoding="ascii") as part:
                whole.writelines(part.readlines()[1:])


def write_case(folder, name, record):
    with open(os.path.join(folder, name), "w", encoding="ascii") as file:
        file.write(CASE.format(record=record))


def measure(program, case, runs, folder):
    walls, processors, memory = [], [], 0
    for _ in range(runs):
        begin = time.perf_counter()
        child = subprocess.Popen([program, "check", case], cwd=folder,
                                 stdout=subprocess.DEVNULL)
        _, status, usage = os.wait4(child.pid, 0)
        walls.append(time.perf_counter() - begin)
        if status != 0:
            sys.exit(f"check {case}: status {status}")
        processors.append(usage.ru_utime + usage.ru_stime)
        memory = max(memory, usage.ru_maxrss / 1024)
    return statistics.median(walls), statistics.median(processors), memory


def run(program, folder):
    write_years(folder, YEARS)
    join_years(folder, 10, "ten.csv")
    join_years(folder, YEARS, "forty.csv")
    names = [f"{FIRST_YEAR + i}.csv" for i in range(YEARS)]
    rows = [
        ("ten years, one file", "ten.yaml", "ten.csv", 11),
        ("ten years, a file a year", "ten_files.yaml",
         f"[{', '.join(names[:10])}]", 11),
        ("forty years, one file", "forty.yaml", "forty.csv", 5),
        ("forty years, a file a year", "forty_files.yaml",
         f"[{', '.join(names)}]", 5),
    ]
    print(f"{'':34}{'wall s':>9}{'cpu s':>9}{'MB':>8}{'runs':>6}")
    for name, case, record, runs in rows:
        write_case(folder, case, record)
        wall, processor, memory = measure(program, case, runs, folder)
        print(f"{name:34}{wall:9.3f}{processor:9.3f}{memory:8.1f}{runs:6}")
    print(f"(ten.csv: {os.path.getsize(os.path.join(folder, 'ten.csv'))} "
          "bytes)")


def main():
    program = os.path.abspath(sys.argv[1])
    if len(sys.argv) > 2:
        os.makedirs(sys.argv[2], exist_ok=True)
        run(program, sys.argv[2])
        return
    with tempfile.TemporaryDirectory() as folder:
        run(program, folder)


if __name__ == "__main__":
    main()
