"""The demo plans marched along their routes with SciPy: the reference of demo-stories.test.ts.

Written apart from the project's own code: a sphere of 6371.0088 km, a midpoint march of 200 steps a leg,
RegularGridInterpolator (linear) for the fields, PchipInterpolator for the boat's table. A missing current counts as zero.

    /usr/bin/python3 tests/data/demo_march.py      (Debian: python3-scipy; run with SciPy 1.10)
"""

import datetime
import json
import math
import pathlib
import re

import numpy
from scipy.interpolate import PchipInterpolator, RegularGridInterpolator

FOLDER = pathlib.Path(__file__).resolve().parents[2] / "data" / "demo"
RADIUS = 6371008.8
KNOT = 1852 / 3600
STEPS = 200


def read(files, separator, names):
    """Columns by short name; times in s, missing values NaN."""
    columns = {name: [] for name in names}
    for file in files:
        lines = [line for line in (FOLDER / file).read_text().splitlines() if not line.startswith("#")]
        header = lines[0].split(separator)
        for line in lines[1:]:
            cells = line.split(separator)
            for name, title in names.items():
                cell = cells[header.index(title)]
                if name == "t":
                    columns[name].append(datetime.datetime.fromisoformat(cell.replace("Z", "+00:00")).timestamp())
                else:
                    columns[name].append(float(cell) if cell else math.nan)
    return {name: numpy.array(values) for name, values in columns.items()}


def interpolators(columns, axes):
    """(u, v) as functions of the axes."""
    nodes = [numpy.unique(columns[axis]) for axis in axes]
    place = tuple(numpy.searchsorted(nodes[i], columns[axis]) for i, axis in enumerate(axes))
    result = []
    for component in ("u", "v"):
        values = numpy.full([len(n) for n in nodes], math.nan)
        values[place] = columns[component]
        result.append(RegularGridInterpolator(nodes, values))
    return lambda *at: numpy.array([float(f(at)) for f in result])


def from_polar(columns, unit):
    turn = numpy.radians(columns["from"])
    columns["u"] = -columns["speed"] * unit * numpy.sin(turn)
    columns["v"] = -columns["speed"] * unit * numpy.cos(turn)
    return columns


def degrees(value):
    if not isinstance(value, str):
        return float(value)
    whole, minutes, letter = re.match(r"(\d+)°([\d.]+)'([NSEW])", value).groups()
    angle = float(whole) + float(minutes) / 60
    return -angle if letter in "SW" else angle


def leg_points(a, b, rhumb):
    """Latitudes and continuous longitudes of STEPS + 1 points, degrees, on the sphere."""
    (lat1, lon1), (lat2, lon2) = numpy.radians(a), numpy.radians(b)
    turn = (lon2 - lon1 + math.pi) % (2 * math.pi) - math.pi
    share = numpy.linspace(0, 1, STEPS + 1)
    if rhumb:
        lat = lat1 + (lat2 - lat1) * share
        meridional = numpy.log(numpy.tan(math.pi / 4 + lat / 2))
        return numpy.degrees(lat), numpy.degrees(lon1 + turn * (meridional - meridional[0]) / (meridional[-1] - meridional[0]))
    unit = lambda p, l: numpy.array([math.cos(p) * math.cos(l), math.cos(p) * math.sin(l), math.sin(p)])
    start, end = unit(lat1, lon1), unit(lat2, lon1 + turn)
    angle = math.acos(start @ end)
    points = (numpy.outer(numpy.sin((1 - share) * angle), start) + numpy.outer(numpy.sin(share * angle), end)) / math.sin(angle)
    lon = numpy.unwrap(numpy.arctan2(points[:, 1], points[:, 0]))
    lon += 2 * math.pi * round((lon1 - lon[0]) / (2 * math.pi))
    return numpy.degrees(numpy.arcsin(points[:, 2])), numpy.degrees(lon)


def march(plan, speed, rate, hotel, current=None, wind=None, windage=None, climb=0.0, air=False):
    """Prints distance, time under way and energy of each route; speed in m/s, powers in W."""
    plan = json.loads((FOLDER / plan).read_text())
    departure = datetime.datetime.fromisoformat(plan["departure"].replace("Z", "+00:00")).timestamp()
    for route in plan["routes"]:
        clock, energy, distance, stays = departure, 0.0, 0.0, 0.0
        points = route["waypoints"]
        height = float(points[0].get("height", "0 m").split()[0])
        for a, b in zip(points, points[1:]):
            rhumb = b.get("path", route.get("path", "geodesic")) == "rhumb"
            lat, lon = leg_points(*[(degrees(p["lat"]), degrees(p["lon"])) for p in (a, b)], rhumb)
            to_height = float(b["height"].split()[0]) if "height" in b else height
            for i in range(STEPS):
                p, q = (lat[i] + lat[i + 1]) / 2, (lon[i] + lon[i + 1]) / 2
                h = height + (to_height - height) * (i + 0.5) / STEPS
                north = math.radians(lat[i + 1] - lat[i]) * RADIUS
                east = math.radians(lon[i + 1] - lon[i]) * RADIUS * math.cos(math.radians(p))
                step = math.hypot(north, east)
                track = numpy.array([east, north]) / step
                blows = wind(clock, p, q, h)
                medium = blows if air else numpy.nan_to_num(current(clock, p, q))
                across = medium[0] * track[1] - medium[1] * track[0]
                ground = medium @ track + math.sqrt(speed**2 - across**2)
                power = rate(speed) + hotel
                if windage:
                    area, drag, efficiency = windage
                    heading = (ground * track - medium) / speed
                    relative = blows - ground * track
                    force = -0.5 * 1.225 * area * drag * (numpy.linalg.norm(relative) * (relative @ heading) + ground**2)
                    power = max(0.0, rate(speed) + force * speed / efficiency) + hotel
                power += climb * max(0.0, (to_height - height) / STEPS * ground / step)
                energy += power * step / ground
                clock += step / ground
                distance += step
            if "stay" in b:
                stay = 60 * float(b["stay"].split()[0])
                energy += (rate(numpy.linalg.norm(wind(clock, lat[-1], lon[-1], to_height))) + hotel) * stay
                clock += stay
                stays += stay
            height = to_height
        print(f"{route['name']}: {distance / 1852:.2f} NM, {(clock - departure - stays) / 3600:.4f} h under way, {energy / 3.6e6:.4f} kWh")


def islands():
    names = {"t": "time", "y": "latitude", "x": "longitude", "u": "eastward_sea_water_velocity", "v": "northward_sea_water_velocity"}
    current = interpolators(read(["islands-current.csv"], ",", names), "tyx")
    names = {"t": "time", "y": "lat", "x": "lon", "speed": "wind_speed [kn]", "from": "wind_from_direction [deg]"}
    wind = interpolators(from_polar(read(["islands-wind.csv"], ",", names), KNOT), "tyx")
    table = PchipInterpolator([0, 3, 5, 6, 7, 8, 9, 10], [0.3, 1.6, 5.6, 9.8, 16, 26, 44, 72])
    march(
        "islands.plan.json", 8 * KNOT, lambda v: 1000 * float(table(v / KNOT)), 1200,
        current=current, wind=lambda t, p, q, h: wind(t, p, q + 360), windage=(13, 0.9, 0.55),
    )


def survey():
    names = {"t": "time", "y": "lat", "x": "lon", "z": "height", "speed": "speed", "from": "direction_from"}
    wind = interpolators(from_polar(read(["survey-wind.csv"], "\t", names), 1), "tzyx")

    def rotor(v):
        induced = math.sqrt(math.sqrt(1 + v**4 / (4 * 5.84**4)) - v**2 / (2 * 5.84**2))
        return (171 * (1 + 3 * v**2 / 110**2) + 536 * induced + 0.5 * 0.6 * 1.225 * 0.07 * 0.997 * v**3) / 0.8

    march("survey.plan.json", 15, rotor, 40, wind=lambda t, p, q, h: wind(t, h, p, q), climb=8.5 * 9.80665 / 0.8, air=True)


def ocean():
    columns = read(["ocean-current.csv"], ",", {"y": "latitude", "x": "longitude", "u": "u [m/s]", "v": "v [m/s]"})
    columns["x"] %= 360
    current = interpolators(columns, "yx")
    names = {"t": "time", "y": "lat", "x": "lon", "u": "eastward_wind", "v": "northward_wind"}
    wind = interpolators(read(["ocean-wind-1.csv", "ocean-wind-2.csv"], ",", names), "tyx")
    march(
        "ocean.plan.json", 13 * KNOT, lambda v: 3e6 * (v / (13 * KNOT)) ** 3, 350e3,
        current=lambda t, p, q: current(p, q % 360), wind=lambda t, p, q, h: wind(t, p, q % 360), windage=(420, 0.8, 0.65),
    )


if __name__ == "__main__":
    islands()
    survey()
    ocean()
