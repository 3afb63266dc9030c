"""Whole legs by SciPy, for tests/outside/scipy-legs.test.ts.

Reads a JSON list of legs on standard input and writes one JSON list of results. Nothing of the program under test is used:
positions along geodesics come from PROJ (pyproj), those along rhumb lines from the elliptic integral of the meridian and the closed
form of the isometric latitude, the field from RegularGridInterpolator (linear), and the integrals from adaptive Runge-Kutta of
order 8 (DOP853), or from Gauss-Legendre where nothing depends on time, panel by panel between the field's kinks.

A field is given by its nodes, or as a CSV file with the names of its columns, which is then read here as well.

A leg: path, from and to [lat, lon], heights [m] or null, fields (role, lon, lat, height, times in s since departure, u and v as
[time][level][lat][lon], pole), speed_m_s or another pace, and the craft's figures.
"""
import json
import sys

import numpy as np
import pyproj
from scipy.integrate import solve_ivp
from scipy.interpolate import PchipInterpolator, RegularGridInterpolator
from scipy.optimize import brentq
from scipy.special import ellipeinc

GEOD = pyproj.Geod(a=6378137.0, rf=298.257223563)
A, F = 6378137.0, 1 / 298.257223563
E2 = F * (2 - F)
E = np.sqrt(E2)
G0 = 9.80665


def meridian(phi):
    """Meridian arc from the equator, m: a (E(phi, e2) - e2 sin phi cos phi / sqrt(1 - e2 sin2 phi))."""
    s = np.sin(phi)
    return A * (ellipeinc(phi, E2) - E2 * s * np.cos(phi) / np.sqrt(1 - E2 * s * s))


def isometric(phi):
    s = np.sin(phi)
    return np.arctanh(s) - E * np.arctanh(E * s)


class Geodesic:
    def __init__(self, start, end):
        self.lat1, self.lon1 = start
        self.azi, _, self.length = GEOD.inv(start[1], start[0], end[1], end[0])

    def at(self, s):
        s = np.atleast_1d(np.asarray(s, float))
        n = np.ones_like(s)
        lon, lat, back = GEOD.fwd(self.lon1 * n, self.lat1 * n, self.azi * n, s)
        return np.asarray(lat), np.asarray(lon), np.radians(np.asarray(back) + 180)


class Rhumb:
    def __init__(self, start, end):
        self.phi1, phi2 = np.radians(start[0]), np.radians(end[0])
        self.lon1 = start[1]
        dlon = np.radians((end[1] - start[1] + 540) % 360 - 180)
        if start[0] == end[0]:
            self.course = np.copysign(np.pi / 2, dlon)
            n = A / np.sqrt(1 - E2 * np.sin(phi2) ** 2)
            self.length = abs(dlon) * n * np.cos(phi2)
            self.per_m = dlon / self.length
        else:
            self.course = np.arctan2(dlon, isometric(phi2) - isometric(self.phi1))
            self.per_m = None
            self.length = (meridian(phi2) - meridian(self.phi1)) / np.cos(self.course)

    def at(self, s):
        s = np.atleast_1d(np.asarray(s, float))
        course = np.full_like(s, self.course)
        if self.per_m is not None:
            return np.full_like(s, np.degrees(self.phi1)), self.lon1 + np.degrees(self.per_m * s), course
        wanted = meridian(self.phi1) + s * np.cos(self.course)
        phi = self.phi1 + s * np.cos(self.course) / A
        for _ in range(12):
            m = A * (1 - E2) / (1 - E2 * np.sin(phi) ** 2) ** 1.5
            phi = phi - (meridian(phi) - wanted) / m
        lon = self.lon1 + np.degrees(np.tan(self.course) * (isometric(phi) - isometric(self.phi1)))
        return np.degrees(phi), lon, course


def nodes_of_file(given):
    """A steady field of one level from a CSV file: components, or speed and the direction that the wind comes from."""
    with open(given["file"], encoding="utf-8") as lines:
        rows = np.genfromtxt((x for x in lines if not x.startswith("#")), delimiter=",", names=True)
    columns = given["columns"]
    lat, lon = rows[columns["lat"]], rows[columns["lon"]]
    if "from" in columns:
        speed, angle = rows[columns["speed"]], np.radians(rows[columns["from"]])
        u, v = -speed * np.sin(angle), -speed * np.cos(angle)
    else:
        u, v = rows[columns["u"]], rows[columns["v"]]
    lats, lons = np.unique(lat), np.unique(lon)
    grids = np.full((2, len(lats), len(lons)), np.nan)
    for grid, values in zip(grids, (u, v)):
        grid[np.searchsorted(lats, lat), np.searchsorted(lons, lon)] = values
    assert not np.any(np.isnan(grids))
    if given["global"]:
        lons = np.append(lons, lons[0] + 360)
        grids = np.concatenate([grids, grids[:, :, :1]], axis=2)
    nodes = {"lon": lons, "lat": lats, "height": None, "times": None, "u": [[grids[0]]], "v": [[grids[1]]]}
    return {**nodes, "role": given["role"], "pole": given["pole"]}


class Field:
    """Linear between nodes; beyond 85 degrees in a frame that does not turn with the meridian."""

    def __init__(self, given):
        if "file" in given:
            given = nodes_of_file(given)
        self.role = given["role"]
        self.lon, self.lat = np.array(given["lon"]), np.array(given["lat"])
        self.height, self.times = given["height"], given["times"]
        w = np.array(given["u"]) + 1j * np.array(given["v"])
        axes = [self.lat, self.lon]
        turn = np.exp(1j * np.radians(self.lon) * given["pole"])
        if self.height is None:
            w = w[:, 0]
        else:
            axes.insert(0, np.array(self.height))
        if self.times is None:
            w = w[0]
        else:
            axes.insert(0, np.array(self.times))
        self.pole = given["pole"]
        self.plain = RegularGridInterpolator(axes, w, method="linear")
        self.turned = RegularGridInterpolator(axes, w * turn, method="linear")

    def at(self, t, height, lat, lon):
        lon = self.lon[0] + np.mod(lon - self.lon[0], 360)
        # Rounding must not leave the grid's edge.
        lon = np.where(lon > self.lon[-1] + 1, lon - 360, lon)
        columns = [np.clip(lat, self.lat[0], self.lat[-1]), np.clip(lon, self.lon[0], self.lon[-1])]
        if self.height is not None:
            columns.insert(0, np.clip(height, self.height[0], self.height[-1]))
        if self.times is not None:
            columns.insert(0, np.clip(t, self.times[0], self.times[-1]))
        points = np.stack(np.broadcast_arrays(*columns), axis=-1)
        polar = np.abs(lat) > 85
        if not np.any(polar):
            return self.plain(points)
        return np.where(polar, self.turned(points) * np.exp(-1j * np.radians(lon) * self.pole), self.plain(points))


def power_curve(given):
    if given["model"] == "cube":
        return lambda v: given["power"] * (v / given["speed"]) ** 3
    if given["model"] == "table":
        return PchipInterpolator(given["speeds"], given["rates"])
    if given["model"] == "rotor":
        p0, pi, tip, v0, k = (given[key] for key in ("p0", "pi", "tip", "v0", "parasite"))
        return lambda v: (
            p0 * (1 + 3 * v**2 / tip**2)
            + pi * np.sqrt(np.sqrt(1 + v**4 / (4 * v0**4)) - v**2 / (2 * v0**2))
            + k * v**3
        ) / given["efficiency"]
    return lambda v: np.full_like(np.asarray(v, float), given["rate"])


class Leg:
    def __init__(self, given):
        self.given = given
        self.track = (Geodesic if given["path"] == "geodesic" else Rhumb)(given["from"], given["to"])
        self.fields = [Field(f) for f in given["fields"]]
        self.pace, self.craft = given["pace"], given["craft"]
        self.power = power_curve(self.craft["power"])
        self.heights = given["heights"]
        self.slope = 0 if self.heights is None else (self.heights[1] - self.heights[0]) / self.track.length

    def medium_at(self, s, t):
        """Along and cross components of each role, and the course."""
        lat, lon, course = self.track.at(s)
        height = 0 if self.heights is None else self.heights[0] + self.slope * np.asarray(s)
        out = {}
        for field in self.fields:
            w = field.at(t, height, lat, lon)
            turned = w * np.exp(1j * course)  # (u + iv) e^{i theta}: real is cross, imaginary is along
            out[field.role] = (turned.imag, turned.real)
        return out

    def motion(self, parts):
        """Ground speed, speed through the medium and rate of use, for arrays of components."""
        zero = np.zeros_like(next(iter(parts.values()))[0]) if parts else np.zeros(1)
        along, cross = parts.get(self.craft["medium"], (zero, zero))
        wind = parts.get("wind") if self.craft["windage"] is not None else None
        hold = self.pace["hold"]
        if hold == "through-speed":
            v = np.full_like(along, self.pace["speed"])
        elif hold == "ground-speed":
            v = np.hypot(self.pace["speed"] - along, cross)
        else:
            solve = self.fixed_power if hold == "power" else self.least_energy
            v = np.array([solve(i, along, cross, wind) for i in range(len(along))])
        g = along + np.sqrt(v**2 - cross**2)
        if hold == "ground-speed":
            g = np.full_like(along, self.pace["speed"])
        return g, v, self.rate(v, g, along, cross, wind)

    def rate(self, v, g, along, cross, wind):
        shaft = self.power(v)
        if wind is not None:
            shaft = shaft + self.windage(v, g, along, cross, wind)
        shaft = np.maximum(shaft, 0)
        if self.slope > 0:
            shaft = shaft + self.craft["climbForce"] * self.slope * g
        return shaft + self.craft["hotel"]

    def windage(self, v, g, along, cross, wind):
        w = self.craft["windage"]
        factor = 0.5 * w["density"] * w["area"] * w["drag"]
        ahead, aside = wind[0] - g, wind[1]
        heading = (g - along) / v, -cross / v
        relative = np.hypot(ahead, aside)
        resistance = -factor * (relative * (ahead * heading[0] + aside * heading[1]) + g**2)
        return resistance * v / w["efficiency"]

    def fixed_power(self, i, along, cross, wind):
        a, c = along[i], cross[i]
        at = None if wind is None else (wind[0][i], wind[1][i])

        def excess(v):
            g = a + np.sqrt(v**2 - c**2)
            return self.rate(v, g, a, c, at) - self.craft["hotel"] - self.pace["power"]

        return brentq(excess, max(abs(c) * 1.001, 0.5), 30, xtol=1e-15, rtol=1e-15)

    def least_energy(self, i, along, cross, wind):
        a, c = along[i], cross[i]
        p = self.craft["power"]
        assert p["model"] == "cube" and wind is None

        def slope(v):  # derivative of (P + hotel)/g, times g squared
            q = np.sqrt(v**2 - c**2)
            return 3 * self.power(v) / v * (a + q) - (self.power(v) + self.craft["hotel"]) * v / q

        low, high = self.craft["speeds"]
        return brentq(slope, max(low, abs(c) * 1.001), high, xtol=1e-15, rtol=1e-15)

    def kinks(self):
        """Places where the track meets a line of a grid, a level, or 85 degrees; the ends among them."""
        length = self.track.length
        s = np.linspace(0, length, 4001)
        lat, lon, _ = self.track.at(s)
        lon = np.unwrap(lon, period=360)
        unwrapped = lambda x, near: near + (x - near + 180) % 360 - 180
        found = []

        def crossings(values, line, at):
            side = np.sign(values - line)
            for i in np.nonzero(side[:-1] * side[1:] < 0)[0]:
                found.append(brentq(lambda x: at(x, values[i]) - line, s[i], s[i + 1], xtol=1e-7, rtol=1e-15))
            found.extend(s[1:-1][side[1:-1] == 0])

        for field in self.fields:
            for line in field.lat:
                crossings(lat, line, lambda x, _: self.track.at(x)[0][0])
            for turn in (-360, 0, 360):
                for line in field.lon:
                    crossings(lon, line + turn, lambda x, near: unwrapped(self.track.at(x)[1][0], near))
            if field.height is not None and self.slope != 0:
                found.extend((h - self.heights[0]) / self.slope for h in field.height)
        for line in (-85, 85):
            crossings(lat, line, lambda x, _: self.track.at(x)[0][0])
        inside = sorted(x for x in found if 1e-3 < x < length - 1e-3)
        ends = [0.0]
        for x in inside:
            if x - ends[-1] > 1e-3:
                ends.append(x)
        return ends + [length]

    def densities(self, s, t):
        """Per metre: time, line integral of each field, use, distance through the medium."""
        parts = self.medium_at(s, t)
        g, v, rate = self.motion(parts)
        ones = np.ones_like(g)
        along = [parts[field.role][0] for field in self.fields]
        return np.array([ones / g, *along, rate / g, v / g])

    def steady(self, order):
        x, w = np.polynomial.legendre.leggauss(order)
        total = 0
        ends = self.kinks()
        for a, b in zip(ends[:-1], ends[1:]):
            # Long panels in four: the integrand's own curvature, not the grid's.
            for k in range(4):
                p, q = a + (b - a) * k / 4, a + (b - a) * (k + 1) / 4
                total = total + (q - p) / 2 * (self.densities((p + q) / 2 + (q - p) / 2 * x, 0.0) @ w)
        return total

    def timed(self, tolerance):
        times = sorted({t for field in self.fields if field.times is not None for t in field.times})
        state = np.zeros(3 + len(self.fields))
        scale = None
        ends = self.kinks()
        for a, b in zip(ends[:-1], ends[1:]):
            s = a
            while s < b:
                later = [t for t in times if t > state[0] + 1e-7]
                event = lambda x, y: y[0] - later[0]
                event.terminal = True
                if scale is None:
                    scale = np.abs(self.densities(np.array([s]), 0.0)[:, 0]) * self.track.length + 1e-300
                run = solve_ivp(
                    lambda x, y: self.densities(np.array([x]), y[0])[:, 0],
                    (s, b),
                    state,
                    method="DOP853",
                    rtol=tolerance,
                    atol=tolerance * 0.1 * scale,
                    first_step=(b - s) / 8,
                    events=event if later else None,
                )
                s, state = run.t[-1], run.y[:, -1]
        return state

    def result(self):
        if any(field.times is not None for field in self.fields):
            fine, coarse = self.timed(1e-13), self.timed(1e-11)
        else:
            fine, coarse = self.steady(24), self.steady(16)
        names = ["time", *[field.role for field in self.fields], "use", "through"]
        return {
            "length": self.track.length,
            "values": dict(zip(names, fine.tolist())),
            # What the coarser run is off by, and the rounding of sums of thousands of terms.
            "errors": dict(zip(names, (np.abs(fine - coarse) + 1e-14 * np.abs(fine)).tolist())),
        }


json.dump([Leg(given).result() for given in json.load(sys.stdin)], sys.stdout)
