#!/usr/bin/env python3
"""Makes the demo data: an invented lake and an invented winter record.

Nothing here was measured. The same bytes come out on every machine: only the
uniform numbers of a seeded generator and exact rounding are used.

Usage: make_demo.py [FOLDER]      (default: the folder of this script)
"""

import datetime
import math
import os
import random
import sys

STILL_WATER = 101.35  # m above Marrow gauge zero

# chainage km, mean depth m at still water, width km, bearing degree
AXIS = [
    (0.0, 0.25, 0.30, 48),
    (0.2, 0.80, 0.46, 48),
    (0.4, 1.40, 0.58, 48),
    (0.7, 1.85, 0.72, 48),
    (1.0, 2.20, 0.85, 48),
    (1.5, 2.65, 1.02, 48),
    (2.0, 3.05, 1.15, 55),
    (2.5, 3.40, 1.24, 55),
    (3.0, 3.70, 1.30, 55),
    (3.6, 3.95, 1.22, 55),
    (4.2, 4.10, 1.05, 65),
    (4.8, 4.05, 0.88, 65),
    (5.4, 4.20, 0.92, 65),
    (6.0, 4.45, 1.10, 65),
    (6.6, 4.60, 1.32, 65),
    (7.2, 4.55, 1.48, 74),
    (7.8, 4.35, 1.57, 74),
    (8.4, 4.05, 1.60, 74),
    (9.0, 3.70, 1.55, 74),
    (9.6, 3.30, 1.44, 82),
    (10.2, 2.85, 1.28, 82),
    (10.8, 2.35, 1.08, 82),
    (11.3, 1.85, 0.88, 82),
    (11.7, 1.30, 0.66, 82),
    (12.0, 0.75, 0.47, 82),
    (12.2, 0.20, 0.28, 82),
]

# The weather at its turning points: hours from the start, speed m/s,
# direction it blows from in degrees (unwrapped, so that it turns as meant).
WEATHER = [
    (0, 6.5, 215),
    (14, 8.0, 225),
    (26, 9.5, 235),
    (40, 7.0, 250),
    (54, 5.0, 235),
    (66, 2.5, 210),
    (71, 0.0, 200),  # calm night
    (77, 0.0, 200),
    (84, 3.5, 190),
    (96, 8.0, 200),
    (106, 14.0, 218),
    (114, 20.0, 232),
    (119, 22.3, 240),  # ahead of the front
    (121, 22.6, 243),
    (121.5, 17.5, 285),  # the front passes: a veer, a drop
    (123, 18.5, 300),
    (130, 14.0, 305),
    (142, 9.0, 310),
    (156, 4.0, 330),
    (168, 2.0, 380),
    (178, 5.5, 425),
    (190, 10.5, 440),  # an easterly against the axis
    (200, 11.0, 445),
    (212, 6.5, 455),
    (226, 4.0, 500),
    (240, 3.0, 520),
]
START = datetime.datetime(2031, 1, 10, tzinfo=datetime.timezone.utc)
STEP = 10  # minutes
SAMPLES = 240 * 60 // STEP + 1
MISSING = [(38 * 60, 38 * 60 + 20), (164 * 60 + 30, 166 * 60)]  # minutes
SEED = 20310110


def write_axis(folder):
    with open(os.path.join(folder, "marrow_axis.csv"), "w",
              newline="\n") as out:
        out.write(
            "# Marrow Tarn, an invented lake: section mean bed and width at\n"
            "# the still water of 101.35 m above Marrow gauge zero. CC0.\n"
            "# Made by make_demo.py.\n"
            "chainage [km],bed [m],width [km],bearing [degree]\n")
        for chainage, depth, width, bearing in AXIS:
            out.write("%.1f,%.2f,%.2f,%d\n"
                      % (chainage, STILL_WATER - depth, width, bearing))


def weather_at(hour):
    for (h0, u0, d0), (h1, u1, d1) in zip(WEATHER, WEATHER[1:]):
        if hour <= h1:
            share = (hour - h0) / (h1 - h0)
            return u0 + share * (u1 - u0), d0 + share * (d1 - d0)
    raise ValueError(hour)


def noise(source):
    """About normal: mean 0, deviation 1 (a sum of twelve uniforms)."""
    return sum(source.random() for _ in range(12)) - 6.0


def is_missing(minute):
    return any(first <= minute < end for first, end in MISSING)


def write_wind(folder):
    source = random.Random(SEED)
    memory = 0.9  # of the ten minute before
    fresh = math.sqrt(1.0 - memory * memory)
    wobble = [0.0, 0.0]
    with open(os.path.join(folder, "marrow_wind.csv"), "w",
              newline="\n") as out:
        out.write(
            "# An invented winter record: ten days with a gale, its front,\n"
            "# a calm night and an easterly. Nothing was measured. CC0.\n"
            "# 10 min means read as instants, 10 m over the water. Made by\n"
            "# make_demo.py.\n"
            "time,speed [m/s],from [degree]\n")
        for i in range(SAMPLES):
            minute = STEP * i
            when = START + datetime.timedelta(minutes=minute)
            speed, come_from = weather_at(minute / 60.0)
            wobble = [memory * w + fresh * noise(source) for w in wobble]
            speed = max(0.0, speed * (1.0 + 0.05 * wobble[0]))
            come_from += 6.0 * wobble[1]
            stamp = when.strftime("%Y-%m-%dT%H:%MZ")
            if is_missing(minute):
                out.write("%s,,\n" % stamp)
            elif speed < 0.05:
                out.write("%s,0.0,\n" % stamp)
            else:
                out.write("%s,%.1f,%d\n"
                          % (stamp, speed, round(come_from) % 360))


def air_at(hour):
    """Mild air ahead of the front, cold behind it, degC."""
    if hour <= 121:
        return 3.0 + 5.0 * hour / 121.0
    return max(-4.0, 8.0 - 1.5 * (hour - 121)) + hour / 100.0


def write_airfield(folder):
    """The same weather as an airfield 6 m mast tells it: gusts in whole
    knots, the vane set to magnetic north, 3 degrees east of true here."""
    with open(os.path.join(folder, "marrow_airfield.csv"), "w",
              newline="\n") as out:
        out.write(
            "# The invented weather of marrow_wind.csv at an airfield: 3 s\n"
            "# gusts of the last 10 min, 6 m over grass, directions from\n"
            "# magnetic north. Nothing was measured. CC0. Made by\n"
            "# make_demo.py.\n"
            "time,gust [knots],from [degree],air [degC],water [degC]\n")
        for hour in range(241):
            when = START + datetime.timedelta(hours=hour)
            speed, come_from = weather_at(hour)
            gust = round(speed / 1.2 * 1.6 / 0.514444)
            direction = "" if gust == 0 else "%d" % (
                round((come_from - 3) / 10.0) * 10 % 360)
            water = "" if 60 <= hour < 66 else "%.1f" % (4.6 - hour / 400.0)
            out.write("%s,%d,%s,%.1f,%s\n"
                      % (when.strftime("%Y-%m-%dT%H:%MZ"), gust, direction,
                         air_at(hour), water))


def main():
    here = os.path.dirname(os.path.abspath(__file__))
    folder = sys.argv[1] if len(sys.argv) > 1 else here
    write_axis(folder)
    write_wind(folder)
    write_airfield(folder)


if __name__ == "__main__":
    main()
