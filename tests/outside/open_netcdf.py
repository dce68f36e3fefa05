"""NetCDF of others through the reader: what it reads, and what it refuses.

Data, as it stands in Debian packages (read off the files):
- ferret-datasets: monthly winds of 1982-92 on a grid (units M/S, times in
  "hour since"); a climatology that counts from year 0.
- libncarg-data: reports of 18 March 1995 from some 2000 stations, a row of
  the file being no station; and files whose winds cannot be had from them.
- r-cran-stars, r-cran-ncmeta, r-cran-ncdfgeom: layouts of the CF conventions.
netCDF4 (python3-netcdf4) reads the same files and says what is in them.

Usage: open_netcdf.py SOURCE_ROOT PROGRAM
"""
import datetime
import math
import os
import pathlib
import shutil
import sys
import tempfile

import cftime
import netCDF4
import numpy

import common

LAKE = """\
lake:
  still_water: 176.0 m
  axis:
    bearing: 345 degree
    uniform: {length: 64 km, depth: 11 m, width: 20 km}
stations: [{name: South end, at: 0 km}]
wind:
"""
CDF = "usr/share/ncarg/data/cdf/"
FERRET = "usr/share/ferret-vis/data/"
STARS = "usr/lib/R/site-library/stars/nc/"
NCMETA = "usr/lib/R/site-library/ncmeta/extdata/"
GEOM = "usr/lib/R/site-library/ncdfgeom/extdata/"
FILES = {
    "libncarg-data": [CDF + name for name in (
        "950318_sao.cdf", "ced1.lf00.t00z.eta.nc", "uv300.nc", "nc4uvt.nc",
        "fice.nc")],
    "ferret-datasets": [FERRET + "monthly_navy_winds.cdf",
                        FERRET + "coads_climatology.cdf"],
    "r-cran-stars": [STARS + "timeseries.nc", STARS + "sub.nc"],
    "r-cran-ncmeta": [NCMETA + "guam.nc", NCMETA + "gridmet_sample.nc",
                      NCMETA + "daymet_sample.nc"],
    "r-cran-ncdfgeom": [GEOM + "example_huc_eta.nc"],
}

# Singles hold a wind to 6e-8 of itself; JSON prints 9 digits.
SINGLE = 2e-7  # share
EPOCH = datetime.datetime(1970, 1, 1)


class Bench:
    """The program, where cases are written, and verdicts."""

    def __init__(self, program, work):
        self.program = program
        self.work = work
        self.verdicts = common.Verdicts()

    def case(self, path, *lines):
        case = self.work / "case.yaml"
        case.write_text(LAKE + f"  record: {path}\n" + "".join(
            f"  {line}\n" for line in lines), encoding="ascii")
        return case

    def check(self, path, *lines):
        """What `check` says of the wind; None when it fails."""
        try:
            return common.summary(self.program, "check",
                                  self.case(path, *lines))["wind"]
        except SystemExit as error:
            print("#", error)
            return None

    def refuses(self, statement, path, lines, status, *words, command="check"):
        """One line that names the file and says why; nothing else."""
        done = common.run(self.program, command, self.case(path, *lines))
        said = done.stderr
        self.verdicts.holds(
            statement,
            done.returncode == status and done.stdout == "" and
            said.count("\n") == 1 and all(word in said for word in words) and
            (command != "check" or path.name in said),
            done.returncode, said, done.stdout)


def pick(*names):
    return [f"eastward: {names[0]}", f"northward: {names[1]}"]


def at(longitude, latitude, method="nearest"):
    return (f"position: {{lon: {longitude} degree, lat: {latitude} degree, "
            f"method: {method}}}")


def stamp(seconds):
    return (EPOCH + datetime.timedelta(seconds=int(seconds))).strftime(
        "%Y-%m-%dT%H:%M:%SZ")


def seconds_of(variable):
    """Times by cftime, to whole seconds."""
    dates = cftime.num2date(variable[:].astype(float), variable.units,
                            getattr(variable, "calendar", "standard"))
    return [round((datetime.datetime(*date.timetuple()[:6]) - EPOCH)
                  .total_seconds()) for date in dates]


def agrees(found, times, u, v):
    """Does `check` say what netCDF4 reads, of times, gaps and winds?"""
    if found is None:
        return False
    speed = numpy.hypot(u, v)
    good = ~numpy.isnan(speed)
    strongest = int(numpy.nanargmax(speed))
    return (found["samples"] == len(times) and
            found["missing"] == int((~good).sum()) and
            found["calms"] == int((speed[good] == 0).sum()) and
            found["first"] == stamp(times[0]) and
            found["last"] == stamp(times[-1]) and
            found["fastest_time"] in {
                stamp(time) for time, value in zip(times, speed)
                if value >= speed[strongest] * (1 - SINGLE)} and
            math.isclose(found["fastest_m_s"], speed[strongest],
                         rel_tol=SINGLE, abs_tol=1e-9) and
            math.isclose(found["mean_m_s"], speed[good].mean(),
                         rel_tol=SINGLE, abs_tol=1e-9))


def column(variable, *index):
    """Values of a variable as doubles, NaN where missing."""
    return numpy.ma.filled(variable[(slice(None), *index)].astype(float),
                           numpy.nan)


def judge_monthly(bench, data):
    path = data["ferret-datasets"] / (FERRET + "monthly_navy_winds.cdf")
    lines = pick("UWND", "VWND") + ["stamp: middle", at(-87.5, 42.5)]
    with netCDF4.Dataset(path) as file:
        row = int(numpy.argmin(abs(file["FNOCY"][:] - 42.5)))
        col = int(numpy.argmin(abs(file["FNOCX"][:] % 360 - 272.5)))
        times = seconds_of(file["TIME"])
        u, v = (column(file[name], row, col) for name in ("UWND", "VWND"))
    found = bench.check(path, *lines)
    bench.verdicts.holds(
        "monthly winds in M/S by 'hour since' are netCDF4's",
        agrees(found, times, u, v) and len(times) == 132, found)
    bench.refuses("means of a month are refused by a run", path, lines, 5,
                  "730 h", "shorter than a day", command="run")
    with netCDF4.Dataset(path) as file:
        four = [[column(file[name], r, c) for name in ("UWND", "VWND")]
                for r in (row, row + 1) for c in (col, col + 1)]
        north = float(file["FNOCY"][row + 1] - file["FNOCY"][row])
        east = float(file["FNOCX"][col + 1] - file["FNOCX"][col])
        latitude = float(file["FNOCY"][row]) + 0.25 * north
        longitude = float(file["FNOCX"][col]) + 0.5 * east
    weights = (0.375, 0.375, 0.125, 0.125)  # 3/4, 1/4 north by 1/2, 1/2 east
    u, v = (sum(w * point[k] for w, point in zip(weights, four))
            for k in (0, 1))
    found = bench.check(path, *lines[:3],
                        at(longitude, latitude, "bilinear"))
    bench.verdicts.holds("between four points they are weighed by distance",
                         agrees(found, times, u, v), found)


def judge_climatology(bench, data):
    path = data["ferret-datasets"] / (FERRET + "coads_climatology.cdf")
    lines = pick("UWND", "VWND") + [at(-87.5, 42.5)]
    bench.refuses("a climatology of year 0 is refused in the standard "
                  "calendar", path, lines, 4, "0000-01-01",
                  "not in the calendar 'standard'")
    bench.refuses("in a calendar that has a year 0 its times are too early",
                  path, lines + ["calendar: proleptic_gregorian"], 4,
                  "'TIME' at index 0", "years 1 to 9999")


def text(letters):
    return b"".join(letters.tolist()).decode("latin-1").strip("\0 ")


def reports(path):
    """station -> {seconds: (speed, direction)}, of which the first told
    counts; and the stations that tell two winds of one time."""
    found, torn = {}, set()
    with netCDF4.Dataset(path) as file:
        file.set_auto_mask(False)
        file.set_auto_chartostring(False)
        names, times = file["id"][:], file["time"][:]
        speeds, directions = file["SPD"][:], file["DIR"][:]
    for row in numpy.argwhere(names[:, :, 0] != b"\0"):
        at_ = tuple(row)
        name = text(names[at_])
        moment = datetime.datetime.strptime(text(times[at_]),
                                            "%Y %m %d %H:%M UTC")
        seconds = int((moment - EPOCH).total_seconds())
        wind = (float(speeds[at_]), float(directions[at_]))
        station = found.setdefault(name, {})
        if station.setdefault(seconds, wind) != wind:
            torn.add(name)
    return found, torn


def write_stations(path, stations):
    """One after another: CF Conventions H.2.4, contiguous ragged."""
    with netCDF4.Dataset(path, "w", format="NETCDF3_CLASSIC") as file:
        file.featureType = "timeSeries"
        total = sum(len(station) for station in stations.values())
        file.createDimension("station", len(stations))
        file.createDimension("length", 12)
        file.createDimension("obs", total)
        name = file.createVariable("name", "S1", ("station", "length"))
        name.cf_role = "timeseries_id"
        rows = file.createVariable("rows", "i4", ("station",))
        rows.sample_dimension = "obs"
        time = file.createVariable("time", "f8", ("obs",))
        time.setncatts({"standard_name": "time",
                        "units": "seconds since 1970-01-01"})
        parts = [file.createVariable(part, "f8", ("obs",), fill_value=-9999.0)
                 for part in ("SPD", "DIR")]
        parts[0].setncatts({"units": "meters/second",
                            "standard_name": "wind_speed"})
        parts[1].setncatts({"units": "degrees",
                            "standard_name": "wind_from_direction"})
        begin = 0
        for i, (key, station) in enumerate(stations.items()):
            end = begin + len(station)
            name[i] = netCDF4.stringtochar(numpy.array([key], "S12"))
            rows[i] = len(station)
            time[begin:end] = sorted(station)
            for k in (0, 1):
                parts[k][begin:end] = [station[s][k] for s in sorted(station)]
            begin = end


def components(station):
    """Times in order and components; a wind without speed, or moving without
    a direction, is missing."""
    times = sorted(station)
    speed, angle = numpy.array([station[s] for s in times]).T
    speed = numpy.where(speed == -9999.0, numpy.nan, speed)
    angle = numpy.where(angle == -9999.0, numpy.nan, numpy.radians(angle))
    angle = numpy.where(speed == 0, 0.0, angle)
    return times, -speed * numpy.sin(angle), -speed * numpy.cos(angle)


def is_fair(station):
    winds = list(station.values())
    return (len(winds) >= 20 and any(speed > 0 for speed, _ in winds) and
            all(direction == -9999.0 or 0 <= direction <= 360
                for _, direction in winds))


def judge_reports(bench, data):
    path = data["libncarg-data"] / (CDF + "950318_sao.cdf")
    winds = ["speed: SPD", "from: DIR", "station: ORD"]
    bench.refuses("reports without a time that is a number are refused",
                  path, winds, 4, "no time was found")
    bench.refuses("a time that is text is refused as that", path,
                  winds + ["time: time"], 4, "'time' is text")
    stations, torn = reports(path)
    fair = [name for name in stations
            if name not in torn and is_fair(stations[name])]
    asked = fair[:: max(1, len(fair) // 12)][:12]
    calm = max(fair, key=lambda name: sum(
        speed == 0 for speed, _ in stations[name].values()))
    grouped = bench.work / "grouped.nc"
    keep = {name: stations[name] for name in
            sorted({*asked, calm, "TISX"})}
    write_stations(grouped, keep)
    wrong = [name for name in asked
             if not agrees(bench.check(grouped, f"station: {name}"),
                           *components(stations[name]))]
    bench.verdicts.holds("grouped by station, twelve stations are read by "
                         "their names", len(asked) == 12 and not wrong, wrong)
    found = bench.check(grouped, f"station: {calm}")
    bench.verdicts.holds(
        "calms told as direction 0 are calms, all of a calm station's",
        found is not None and found["calms"] == sum(
            speed == 0 for speed, _ in stations[calm].values()) > 5, found)
    bench.refuses("a direction of -70 is refused at its index", grouped,
                  ["station: TISX"], 4, "'DIR'", "index", "-70")
    found = bench.check(grouped, "station: TISX",
                        "from: DIR", "speed: SPD", "missing: [-70]")
    bench.verdicts.holds("and is missing when the case says so",
                         found is not None and found["missing"] >= 1, found)
    bench.refuses("a station that is not there is refused", grouped,
                  ["station: NOWHERE"], 5, "NOWHERE")


def changed(bench, path, **attributes):
    """A copy in which variables have other attributes."""
    copy = bench.work / path.name
    shutil.copy(path, copy)
    os.chmod(copy, 0o644)
    with netCDF4.Dataset(copy, "a") as file:
        for name, values in attributes.items():
            file[name].setncatts(values)
    return copy


def judge_stations(bench, data):
    """Stations of others; their numbers are no wind, and are called one."""
    path = data["r-cran-stars"] / (STARS + "timeseries.nc")
    bench.refuses("rain is refused as wind", path, pick("pr", "pr") +
                  ['station: "2"'], 4, "'pr'", "kg m-2 s-1", "m s-1")
    copy = changed(bench, path, pr={"units": "m s-1",
                                    "standard_name": "eastward_wind"})
    with netCDF4.Dataset(path) as file:
        times = seconds_of(file["time"])
        # [station][time], of which station 2 is the second.
        values = numpy.ma.filled(file["pr"][1].astype(float), numpy.nan)
    same = pick("pr", "{column: pr, file: north.nc}")
    shutil.copy(copy, bench.work / "north.nc")
    with netCDF4.Dataset(bench.work / "north.nc", "a") as file:
        file["pr"].standard_name = "northward_wind"
    for which in ('"#2"', '"2"'):
        found = bench.check(copy, *same, f"station: {which}")
        bench.verdicts.holds(
            f"a station numbered in the file is read as {which}",
            agrees(found, times, values, values), found)
    path = data["r-cran-ncdfgeom"] / (GEOM + "example_huc_eta.nc")
    copy = changed(bench, path, et={"units": "m s-1"})
    with netCDF4.Dataset(path) as file:
        times = seconds_of(file["time"])
        values = numpy.ma.filled(file["et"][0].astype(float), numpy.nan)
        file.set_auto_chartostring(False)
        file.set_auto_mask(False)
        name = text(file["station_name"][0])
    found = bench.check(copy, *pick("et", "et"), f'station: "{name}"')
    bench.verdicts.holds("a station is read by its name out of whole numbers "
                         "with missing_value",
                         agrees(found, times, values, values), found)


def judge_grids(bench, data):
    path = data["r-cran-stars"] / (STARS + "sub.nc")
    bench.refuses("winds at two pressure levels are refused", path,
                  [at(6, 51)], 4, "'u'", "level")
    flat = bench.work / "flat.nc"
    with netCDF4.Dataset(path) as file:
        times = seconds_of(file["time"])
        row = int(numpy.argmin(abs(file["latitude"][:] - 51)))
        col = int(numpy.argmin(abs(file["longitude"][:] - 6)))
        u, v = (column(file[name], 0, row, col) for name in "uv")
        with netCDF4.Dataset(flat, "w", format="NETCDF3_CLASSIC") as out:
            copy_level(file, out)
    found = bench.check(flat, at(6, 51))
    bench.verdicts.holds("packed winds in m s**-1 of one level are netCDF4's",
                         agrees(found, times, u, v), found)
    bench.refuses("a position off the grid is refused with its distance",
                  flat, [at(10, 50)], 5, "off the grid", "214 km")
    path = data["r-cran-ncmeta"] / (NCMETA + "guam.nc")
    there = at(144.8, 13.4)
    bench.refuses("winds of a curved grid that nothing calls eastward are "
                  "refused", path, pick("U10_present", "V10_present") +
                  [there], 4, "curved or turned axes")
    copy = changed(bench, path,
                   U10_present={"standard_name": "eastward_wind"},
                   V10_present={"standard_name": "northward_wind"})
    with netCDF4.Dataset(path) as file:
        times = seconds_of(file["Time"])
        away = ((file["XLAT"][:] - 13.4) ** 2 +
                ((file["XLONG"][:] - 144.8) * math.cos(math.radians(13.4)))
                ** 2)
        row, col = numpy.unravel_index(int(numpy.argmin(away)), away.shape)
        u, v = (column(file[name + "10_present"], row, col) for name in "UV")
    found = bench.check(copy, there)
    bench.verdicts.holds("called so, they are read at the nearest point",
                         agrees(found, times, u, v), found)


def copy_level(file, out):
    """The first level of a grid, packed as it is."""
    file.set_auto_maskandscale(False)
    for name in ("time", "latitude", "longitude"):
        out.createDimension(name, len(file.dimensions[name]))
    for name, variable in file.variables.items():
        if name == "level":
            continue
        kept = [d for d in variable.dimensions if d != "level"]
        attributes = {key: variable.getncattr(key)
                      for key in variable.ncattrs()}
        fill = attributes.pop("_FillValue", None)
        made = out.createVariable(name, variable.dtype, kept, fill_value=fill)
        made.set_auto_maskandscale(False)
        made.setncatts(attributes)
        made[:] = (variable[:, 0] if "level" in variable.dimensions
                   else variable[:])


def judge_refusals(bench, data):
    """Files without a wind that could be had from them."""
    inside = data["libncarg-data"] / CDF
    here = at(-87.5, 42.5)
    grid = pick("U_GRD_6_HTGL", "V_GRD_6_HTGL") + [here]
    bench.refuses("a wind without times is refused",
                  inside / "ced1.lf00.t00z.eta.nc", grid, 4,
                  "no time was found")
    timed = bench.work / "timed.nc"
    with netCDF4.Dataset(inside / "ced1.lf00.t00z.eta.nc") as file, \
            netCDF4.Dataset(timed, "w", format="NETCDF3_CLASSIC") as out:
        copy_timed(file, out)
    bench.refuses("given times and positions, a wind along the axes of its "
                  "grid is refused", timed, grid, 4, "'U_GRD_6_HTGL'",
                  "curved or turned axes")
    for name, parts in (("uv300.nc", pick("U", "V")),
                        ("nc4uvt.nc", pick("U", "V")),
                        ("nc4uvt.nc", pick("grp1/U", "grp1/V"))):
        bench.refuses(f"months as times are refused: {name}, {parts[0]}",
                      inside / name, parts + [here], 4, "months or years")
    ice = "{column: fice, unit: m s-1}"
    bench.refuses("times with an origin, but no date they count since, are "
                  "refused", inside / "fice.nc", pick(ice, ice) + [here], 4,
                  "'days' does not say since when")
    extra = data["r-cran-ncmeta"] / NCMETA
    bench.refuses("a file without a sample is refused as data",
                  extra / "daymet_sample.nc", pick("prcp", "prcp") + [here],
                  5, "holds no sample")
    copy = changed(bench, extra / "gridmet_sample.nc",
                   precipitation_amount={"units": "m s-1",
                                         "standard_name": "eastward_wind"})
    bench.refuses("a packed file whose only time is missing is refused", copy,
                  pick("precipitation_amount", "precipitation_amount") +
                  [here], 4, "missing at index 0")


def copy_timed(file, out):
    """Winds at 10 m on their grid, with a time and positions of our own: the
    file names its latitudes and longitudes, and does not hold them."""
    out.createDimension("time", 1)
    for name in ("gridx_6", "gridy_6"):
        out.createDimension(name, len(file.dimensions[name]))
    time = out.createVariable("time", "f8", ("time",))
    time.setncatts({"standard_name": "time",
                    "units": "hours since 1995-10-24"})
    time[:] = 0
    for name, unit, begin in (("gridlat_6", "degrees_north", 20.0),
                              ("gridlon_6", "degrees_east", -120.0)):
        place = out.createVariable(name, "f4", ("gridx_6", "gridy_6"))
        place.units = unit
        rows, columns = numpy.indices(place.shape)
        place[:] = begin + (rows if unit == "degrees_north" else columns)
    for name in ("U_GRD_6_HTGL", "V_GRD_6_HTGL"):
        variable = file[name]
        attributes = {key: variable.getncattr(key)
                      for key in variable.ncattrs() if key != "_FillValue"}
        made = out.createVariable(name, "f4", ("time", "gridx_6", "gridy_6"),
                                  fill_value=-999.0)
        made.setncatts(attributes)
        made[0] = variable[:]


def main():
    program = os.path.abspath(sys.argv[2])
    data = {}
    for package, files in FILES.items():
        data[package] = common.fetch(package, *files)
        if data[package] is None:
            common.without_data(package)
            return
        data[package] = data[package].absolute()
    with tempfile.TemporaryDirectory() as folder:
        bench = Bench(program, pathlib.Path(folder))
        judge_monthly(bench, data)
        judge_climatology(bench, data)
        judge_reports(bench, data)
        judge_stations(bench, data)
        judge_grids(bench, data)
        judge_refusals(bench, data)
    bench.verdicts.finish()


main()
