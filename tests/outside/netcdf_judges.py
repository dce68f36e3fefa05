"""NetCDF that is written, read by the tools of others: the same numbers.

xarray (python3-xarray), ncdump (netcdf-bin), CDO (cdo) and NCO (nco) each open
the files of three estimates and are asked for the levels and their times. The
measure is the CSV file of the same estimate, to half of its last digit. None
of them may warn.

Usage: netcdf_judges.py SOURCE_ROOT PROGRAM
"""
import csv
import datetime
import math
import os
import pathlib
import shutil
import subprocess
import sys
import tempfile

import numpy

import common

TOOLS = {"ncdump": "netcdf-bin", "cdo": "cdo", "ncks": "nco"}

# Levels in a CSV file have four decimals; the sum of a double's own rounding
# near 1000 m and of decimals typed by a tool is below a hundredth of that.
HALF_DIGIT = 0.5e-4 + 1e-6  # m
LARGE = 10e6  # bytes of levels, from which a file is deflated NetCDF-4

BYTES = {"spin_up"}

LARGE_CASE = """\
lake:
  still_water: 10 m
  axis: {bearing: 90 degree, uniform: {length: 12 km, depth: 4 m, width: 2 km}}
wind: {record: wind.csv, time: time, speed: speed, from: from}
stations:
  - {name: West, at: 0 km, lon: 8.0 degree, lat: 47.0 degree}
  - {name: Middle, at: 6 km, lon: 8.05 degree, lat: 47.05 degree}
  - {name: East, at: 12 km, lon: 8.1 degree, lat: 47.1 degree}
run: {every: 3 min}
solver: {cells: 8, step: 180 s}
"""
LARGE_HOURS = 21000  # at 20 levels an hour and 3 stations: 10.08 MB


def ask(*command):
    """What a tool prints; a tool that fails or warns ends the test."""
    done = subprocess.run(list(map(str, command)), text=True, check=False,
                          stdin=subprocess.DEVNULL, capture_output=True)
    if done.returncode != 0 or done.stderr.strip():
        raise RuntimeError(f"{' '.join(map(str, command))}: "
                           f"{done.returncode} {done.stderr.strip()}")
    return done.stdout


def numbers(text):
    """Numbers parted by blanks or commas; "_" and "nan" are missing."""
    for mark, blank in ((",", " "), (";", " "), ("_", "nan")):
        text = text.replace(mark, blank)
    return numpy.array(text.split(), dtype=float)


def dumped(path, name):
    """A variable as ncdump prints it, to 17 digits."""
    text = ask("ncdump", "-p", "9,17", "-v", name, path)
    data = text[text.index("\ndata:"):]
    return numbers(data[data.index("=") + 1:data.rindex("}")])


def by_xarray(path, names):
    """In a process of its own, in which warnings are errors but for those of
    numpy's own interface (other builds of numpy, which are not ours)."""
    program = (
        "import sys, warnings, numpy\n"
        "warnings.simplefilter('ignore')\n"
        "import netCDF4, xarray\n"
        "warnings.simplefilter('error')\n"
        "warnings.filterwarnings('ignore', 'numpy.ndarray size changed')\n"
        "with xarray.open_dataset(sys.argv[1]) as data:\n"
        "    out = {}\n"
        "    for name in sys.argv[3:]:\n"
        "        value = data[name].values\n"
        "        if value.dtype.kind == 'M':\n"
        "            value = value.astype('datetime64[s]').astype('int64')\n"
        "        out[name] = value\n"
        "numpy.savez(sys.argv[2], **out)\n")
    out = str(path) + ".npz"
    ask(sys.executable, "-B", "-c", program, path, out, *names)
    with numpy.load(out) as found:
        return {name: found[name].astype(float).ravel() for name in names}


def by_ncdump(path, names):
    return {name: dumped(path, name) for name in names}


def by_nco(path, names):
    return {name: numbers(ask("ncks", "-H", "-C", "-s",
                              "%d\\n" if name in BYTES else "%.17g\\n",
                              "-v", name, path)) for name in names}


def by_cdo(path, names):
    """CDO tells times as dates."""
    found = {}
    for name in names:
        if name == "time":
            found[name] = numpy.array([seconds(word) for word in ask(
                "cdo", "-s", "showtimestamp", path).split()], dtype=float)
        else:
            found[name] = numbers(ask("cdo", "-s", "outputf,%.17g,1",
                                      f"-selname,{name}", path))
    return found


READERS = {"xarray": by_xarray, "ncdump": by_ncdump, "CDO": by_cdo,
           "NCO": by_nco}


def seconds(text):
    moment = datetime.datetime.fromisoformat(text.replace("Z", ""))
    return int((moment - datetime.datetime(1970, 1, 1)).total_seconds())


def table(path):
    """Columns of a CSV file that was written, by name; numbers, or times."""
    with open(path, encoding="utf-8") as stream:
        rows = list(csv.reader(line for line in stream
                               if not line.startswith("#")))
    columns = dict(zip(rows[0], zip(*rows[1:])))
    found = {}
    for name, values in columns.items():
        if name == "time":
            found[name] = numpy.array([seconds(v) for v in values], float)
        elif name.endswith("]") or name == "spin-up":
            found[name] = numpy.array([float(v or "nan") for v in values])
    return found


def is_same(read, written, tolerance):
    """The same numbers, missing where missing."""
    return (read.shape == written.shape and
            numpy.array_equal(numpy.isnan(read), numpy.isnan(written)) and
            not (numpy.abs(read - written) > tolerance).any())


def expected_of(columns, stations, ends):
    """name in the file -> (values by time or wind, then station; digits)."""
    expected = {}
    for end in ends:
        parts = [columns[f"{name}{end} [m]"] for name in stations]
        expected["water_level" + end] = (numpy.array(parts).T.ravel(),
                                         HALF_DIGIT)
    return expected


def judge(verdicts, what, path, expected, readers):
    for reader in readers:
        read = READERS[reader]
        statement = f"{reader} reads the numbers of {what}, without a warning"
        try:
            found = read(path, list(expected))
        except (RuntimeError, OSError, ValueError) as error:
            verdicts.holds(statement, False, error)
            continue
        wrong = [name for name, (values, digit) in expected.items()
                 if not is_same(found[name], values, digit)]
        verdicts.holds(statement, not wrong,
                       *[f"{name}: {found[name][:6]} of "
                         f"{found[name].size}, written {expected[name][0][:6]}"
                         for name in wrong])


def write(program, command, case, out, *options):
    done = subprocess.run([program, command, case, "-q", "-o", out,
                           *options], text=True, check=False,
                          stdin=subprocess.DEVNULL, capture_output=True,
                          env={**os.environ,
                               "SOURCE_DATE_EPOCH": "1925000000"})
    if done.returncode != 0:
        raise SystemExit(f"{command} {case}: {done.stderr}")


def judge_bytes(verdicts, what, written, program, command, case, *options):
    """Written once more, under another name: equal to the byte."""
    again = written.with_name("again-" + written.name)
    write(program, command, case, again, *options)
    verdicts.holds(f"{what} of one date is the same to the byte",
                   again.read_bytes() == written.read_bytes())


def judge_harbour(verdicts, program, root, work):
    """The example of a harbour with its range: classic, 1441 times."""
    case = root / "examples/harbour.yaml"
    write(program, "run", case, work / "harbour.nc", "--range")
    write(program, "run", case, work / "harbour.csv", "--range", "--with-wind")
    columns = table(work / "harbour.csv")
    expected = expected_of(columns, ["North quay", "Lee landing"],
                           ["", "_low", "_high"])
    expected["time"] = (columns["time"], 0)
    expected["spin_up"] = (columns["spin-up"], 0)
    # Three decimals and one in the table.
    expected["wind_speed"] = (
        columns["wind 10 m over water [m s-1]"], 0.5e-3 + 1e-6)
    expected["wind_from_direction"] = (columns["wind from [degree]"],
                                       0.05 + 1e-6)
    verdicts.holds("the harbour's file is classic, 64-bit offsets",
                   ask("ncdump", "-k", work / "harbour.nc").strip()
                   == "64-bit offset")
    judge(verdicts, "a run", work / "harbour.nc", expected, READERS)
    verdicts.holds("ncdump tells every time as a date, without a warning",
                   "2031" in ask("ncdump", "-t", work / "harbour.nc"))
    judge_bytes(verdicts, "a run", work / "harbour.nc", program, "run", case,
                "--range")


def judge_steady(verdicts, program, root, work):
    case = root / "examples/planner.yaml"
    write(program, "steady", case, work / "planner.nc")
    write(program, "steady", case, work / "planner.csv")
    columns = table(work / "planner.csv")
    stations = [name[:-len("_low [m]")] for name in columns
                if name.endswith("_low [m]") and "set" not in name
                and not name.startswith("tilt")]
    expected = expected_of(columns, stations, ["", "_low", "_high"])
    for name, column in (("set_up", "set-up [m]"),
                         ("set_down_high", "set-down_high [m]"),
                         ("tilt", "tilt [m]")):
        expected[name] = (columns[column], HALF_DIGIT)
    verdicts.holds("the planner's table has winds and three stations",
                   len(stations) == 3 and len(columns["tilt [m]"]) > 1,
                   stations)
    judge(verdicts, "steady levels", work / "planner.nc", expected, READERS)
    judge_bytes(verdicts, "a file of steady levels", work / "planner.nc",
                program, "steady", case)


def write_wind(path):
    begin = datetime.datetime(1990, 1, 1)
    with open(path, "w", encoding="ascii") as stream:
        stream.write("time,speed [m/s],from [degree]\n")
        for hour in range(LARGE_HOURS + 1):
            time = begin + datetime.timedelta(hours=hour)
            speed = 8 + 6 * math.sin(hour / 37)
            stream.write(f"{time.isoformat()}Z,{speed:.2f},{hour * 7 % 360}\n")


def judge_large(verdicts, program, work):
    """Two years and five months by three minutes: deflated NetCDF-4."""
    write_wind(work / "wind.csv")
    case = work / "large.yaml"
    case.write_text(LARGE_CASE, encoding="ascii")
    options = ["--no-range", "--no-error"]
    is_reduced = os.environ.get("LEE_REDUCED") == "1"
    write(program, "run", case, work / "large.nc", *options)
    write(program, "run", case, work / "large.csv", *options)
    columns = table(work / "large.csv")
    expected = expected_of(columns, ["West", "Middle", "East"], [""])
    expected["time"] = (columns["time"], 0)
    header = ask("ncdump", "-hs", work / "large.nc")
    levels = expected["water_level"][0].size * 8
    verdicts.holds("above 10 MB the levels are NetCDF-4, deflated",
                   levels > LARGE and
                   ask("ncdump", "-k", work / "large.nc").strip()
                   == "netCDF-4 classic model" and
                   "water_level:_DeflateLevel = 1" in header and
                   (work / "large.nc").stat().st_size < levels, levels, header)
    # CDO takes half a minute for all of it: steps around two chunks' bounds
    # of 8192, in a file of its own making.
    cut = work / "cut.nc"
    steps = numpy.r_[0:3, 8189:8195, 401400:401412]
    ask("cdo", "-s", "seltimestep," + ",".join(str(i + 1) for i in steps),
        work / "large.nc", cut)
    judge(verdicts, "a large run", work / "large.nc", expected,
          ["xarray"] if is_reduced else ["xarray", "ncdump", "NCO"])
    judge(verdicts, "a part of a large run, cut out by CDO", cut,
          {"time": (expected["time"][0][steps], 0),
           "water_level": (expected["water_level"][0]
                           .reshape(-1, 3)[steps].ravel(), HALF_DIGIT)},
          ["CDO", "xarray"])
    if not is_reduced:
        judge_bytes(verdicts, "a large run", work / "large.nc", program,
                    "run", case, *options)


def missing_tools():
    missing = [package for tool, package in TOOLS.items()
               if shutil.which(tool) is None]
    found = subprocess.run([sys.executable, "-c", "import netCDF4, xarray"],
                           check=False, capture_output=True)
    return missing + (["python3-xarray"] if found.returncode != 0 else [])


def main():
    root, program = pathlib.Path(sys.argv[1]), os.path.abspath(sys.argv[2])
    verdicts = common.Verdicts()
    missing = missing_tools()
    if missing:
        statement = "the tools of others read what is written"
        reason = "not installed: " + " ".join(missing)
        if os.environ.get("CI") == "true":
            verdicts.holds(statement, False, reason)
        else:
            verdicts.skipped(statement, reason)
        verdicts.finish()
        return
    with tempfile.TemporaryDirectory() as folder:
        work = pathlib.Path(folder)
        judge_harbour(verdicts, program, root, work)
        judge_steady(verdicts, program, root, work)
        judge_large(verdicts, program, work)
    verdicts.finish()


main()
