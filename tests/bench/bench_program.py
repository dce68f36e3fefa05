#!/usr/bin/env python3
"""Times the program as a whole: start, and a year of hourly wind.

usage: bench_program.py PROGRAM

The year: an invented hourly record (a seeded autoregressive wind that turns)
over an even lake of 60 km and 8 m, Manning 0.025, 200 cells, 300 s. Each
figure is the median of its runs, wall and processor seconds of the process.
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

SEED = 7
HOURS = 8760

CASE = """\
lake:
  still_water: 0 m
  axis: {bearing: 90 degree, uniform: {length: 60 km, depth: 8 m, width: 5 km}}
  bed: {manning: 0.025}
wind: {record: wind.csv, height: 10 m, over: water}
uncertainty: {wind: 10 percent, depth: 0.2 m}
stations:
  - {name: west, at: 0 km}
  - {name: east, at: 60 km}
solver: {cells: 200, step: 300 s}
"""


def write_record(path):
    draw = random.Random(SEED)
    east = north = 0.0
    start = datetime.datetime(2031, 1, 1)
    with open(path, "w", encoding="ascii") as file:
        file.write("time,speed [m/s],from [degree]\n")
        for hour in range(HOURS):
            east = 0.95 * east + draw.gauss(0.3, 2.0)
            north = 0.95 * north + draw.gauss(0.0, 1.5)
            when = start + datetime.timedelta(hours=hour)
            direction = math.degrees(math.atan2(-east, -north)) % 360.0
            file.write(f"{when:%Y-%m-%dT%H:%M}Z,{math.hypot(east, north):.1f},"
                       f"{direction:.0f}\n")


def measure(arguments, runs, folder):
    """Median wall and processor seconds, and the largest memory in MB."""
    walls, processors, memory = [], [], 0
    for _ in range(runs):
        begin = time.perf_counter()
        child = subprocess.Popen(arguments, cwd=folder,
                                 stdout=subprocess.DEVNULL,
                                 stderr=subprocess.DEVNULL)
        _, status, usage = os.wait4(child.pid, 0)
        walls.append(time.perf_counter() - begin)
        if status != 0:
            sys.exit(f"{' '.join(arguments)}: status {status}")
        processors.append(usage.ru_utime + usage.ru_stime)
        memory = max(memory, usage.ru_maxrss / 1024)
    return statistics.median(walls), statistics.median(processors), memory


def main():
    program = os.path.abspath(sys.argv[1])
    with tempfile.TemporaryDirectory() as folder:
        write_record(os.path.join(folder, "wind.csv"))
        with open(os.path.join(folder, "year.yaml"), "w",
                  encoding="ascii") as file:
            file.write(CASE)
        rows = [
            ("estimate", 21, ["estimate", "--fetch", "12 km", "--depth", "4 m",
                              "--wind", "22 m/s"]),
            ("check, a year of hourly wind", 5, ["check", "year.yaml"]),
            ("run, the estimate alone", 5,
             ["run", "year.yaml", "-q", "--no-range", "--no-error"]),
            ("run, with range and own error", 3, ["run", "year.yaml", "-q"]),
        ]
        print(f"{'':34}{'wall s':>9}{'cpu s':>9}{'MB':>8}{'runs':>6}")
        for name, runs, arguments in rows:
            wall, processor, memory = measure([program] + arguments, runs,
                                              folder)
            print(f"{name:34}{wall:9.3f}{processor:9.3f}{memory:8.1f}"
                  f"{runs:6}")


if __name__ == "__main__":
    main()
