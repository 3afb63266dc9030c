"""The SciPy and NumPy side of the benchmarks: answers one JSON line for each that it reads.

Called as `peer.py ROUTES`: the legs of each route as places and courses every few kilometres. The wind, the speed
and the departures are those of ocean.ts. Every answer holds the seconds that the work took and what came out.
"""

import json
import sys
from time import perf_counter

import numpy as np
from scipy.integrate import solve_ivp
from scipy.interpolate import CubicSpline, RegularGridInterpolator

TIMES, LATS, LONS = 40, 721, 1440
STEP_S = 3 * 3600.0
SPEED = 16.0
WAVES = ((4, 0.0262, 0.35, 0.03), (2, 0.11, -0.6, 0.09), (1, 0.9, 1.1, 0.7))
MIDPOINT_M = 10_000


def wind():
    values = np.zeros((TIMES, LATS, LONS, 2))
    i, j = np.arange(LONS), np.arange(LATS)
    for t in range(TIMES):
        for amplitude, p, w, q in WAVES:
            values[t, :, :, 0] += amplitude * np.outer(np.cos(q * j), np.sin(p * i + w * t))
            values[t, :, :, 1] += amplitude * np.outer(np.sin(q * j), np.cos(p * i - w * t))
    return values


class Leg:
    def __init__(self, table):
        self.length = table["s"][-1]
        self.place = CubicSpline(table["s"], np.stack([table[k] for k in ("lon", "lat", "sin", "cos")], axis=1))


VALUES = wind()
LEGS = [[Leg(table) for table in route] for route in json.load(open(sys.argv[1]))]
GRID = RegularGridInterpolator(
    (STEP_S * np.arange(TIMES), np.arange(LATS) / 4 - 90, np.arange(LONS) / 4 - 180), VALUES
)


def rk45(route, departure, rtol):
    """Seconds under way: dt/ds = 1 / g(s, t), leg by leg."""

    def slowness(s, t):
        lon, lat, sin, cos = leg.place(s)
        u, v = GRID((departure + elapsed + t[0], lat, lon))
        return 1 / (u * sin + v * cos + np.sqrt(SPEED**2 - (u * cos - v * sin) ** 2))

    elapsed = evaluations = 0
    for leg in LEGS[route]:
        answer = solve_ivp(slowness, (0, leg.length), [0], method="RK45", rtol=rtol, atol=1e-6)
        elapsed += answer.y[0, -1]
        evaluations += answer.nfev
    return [elapsed, evaluations]


def time_columns(leg, s):
    """Along- and cross-track wind at places of a leg, at every valid time: arrays (place, time)."""
    lon, lat, sin, cos = leg.place(s).T
    x, y = (lon + 180) * 4, (lat + 90) * 4
    i, j = x.astype(int), y.astype(int)
    fx, fy = (x - i)[:, None], (y - j)[:, None]
    corners = lambda b, a: VALUES[:, j + b, i + a].transpose(1, 0, 2)
    fx, fy = fx[..., None], fy[..., None]
    uv = (1 - fy) * ((1 - fx) * corners(0, 0) + fx * corners(0, 1)) + fy * (
        (1 - fx) * corners(1, 0) + fx * corners(1, 1)
    )
    u, v = uv[..., 0], uv[..., 1]
    return u * sin[:, None] + v * cos[:, None], u * cos[:, None] - v * sin[:, None]


def sweep(departures):
    """Seconds under way of every route at all departures at once: midpoint steps on columns of time."""
    departures = np.asarray(departures)
    answer = []
    for route in LEGS:
        t = departures.copy()
        for leg in route:
            count = int(np.ceil(leg.length / MIDPOINT_M))
            h = leg.length / count
            along, cross = time_columns(leg, np.arange(2 * count) * h / 2)

            def slowness(n, t):
                z = t / STEP_S
                k = z.astype(int)
                f = z - k
                a = along[n, k] * (1 - f) + along[n, k + 1] * f
                c = cross[n, k] * (1 - f) + cross[n, k + 1] * f
                return 1 / (a + np.sqrt(SPEED**2 - c * c))

            for n in range(count):
                t = t + h * slowness(2 * n + 1, t + h / 2 * slowness(2 * n, t))
        answer.append(t - departures)
    return [float(x) for x in np.concatenate(answer)]


def interpolate(points):
    uv = GRID(points)
    return [float(uv[:, 0].sum()), float(uv[:, 1].sum())]


def main():
    points = np.zeros((1, 3))
    for line in sys.stdin:
        asked = json.loads(line)
        if asked["what"] == "points":
            points = np.fromfile(asked["file"]).reshape(-1, 3)
        start = perf_counter()
        if asked["what"] == "rk45":
            figures = rk45(asked["route"], asked["departure"], asked["rtol"])
        elif asked["what"] == "sweep":
            figures = sweep(asked["departures"])
        elif asked["what"] == "interpolate":
            figures = interpolate(points)
        else:
            figures = [len(points)]
        print(json.dumps({"seconds": perf_counter() - start, "figures": figures}), flush=True)


main()
