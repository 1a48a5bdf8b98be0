"""Write flights, flight_points, crossings, extremes and turns: what the Sun does beneath known flights.

It does not know gloamline; it samples every second, which a real tool should not need, and it knows only a
point at height 0 on WGS84 below the aircraft, with no refraction.
"""

import random
import sys
from datetime import timedelta
from pathlib import Path

import numpy as np
from pyproj import Geod
from routes import GRAZES, PLANS
from scipy.optimize import brentq, minimize_scalar
from sky import SunTrack, iso, time_at, topocentric, write_table

GEOD = Geod(ellps="WGS84")
KNOT_M_S = 1852.0 / 3600.0
LIMITS = {"horizon": -50.0 / 60.0, "civil": -6.0, "nautical": -12.0, "astronomical": -18.0}
# against skyfield itself: the Earth's bending of light, which skyfield puts in, is 8e-8 on the horizon
CHECK_DEG = 1.2e-7
# nearer than this another good ephemeris might see a crossing more or less
CLEAR_DEG = 7e-4
CHECKS_PER_FLIGHT = 12
SEARCH_STEP_S = 30.0
COLUMNS = {
    "flights": (
        ["id", "reason", "takeoff", "airborne_s", "route"],
        "id; reason (why it is here); takeoff (UTC, ISO 8601, exact); airborne_s (seconds, exact); route (lat lon in degrees, "
        "WGS84, points parted by semicolons; the times of the points between are in flight_points.csv)",
    ),
    "flight_points": (
        ["id", "seq", "lat_deg", "lon_deg", "seconds_after_takeoff"],
        "id (of flights.csv); seq (from 1); lat_deg and lon_deg (degrees, exact); seconds_after_takeoff (seconds, exact); the ground "
        "speed between two points is steady",
    ),
    "crossings": (
        ["id", "seq", "utc", "limit", "direction", "lat_deg", "lon_deg", "rate_deg_per_h"],
        "id (of flights.csv); seq (from 1 in order of time); utc (ISO 8601); limit (horizon -50 arcmin, civil -6, nautical -12, "
        "astronomical -18 degrees of elevation of the Sun's centre); direction (rising or setting of the Sun beneath the aircraft); "
        "lat_deg and lon_deg (degrees, point below the aircraft); rate_deg_per_h (degrees of elevation per hour there, to 4 decimals: an "
        "error of elevation divided by it is the error of the instant); a flight without lines here meets no limit",
    ),
    "extremes": (
        ["id", "kind", "utc", "elevation_deg"],
        "id (of flights.csv); kind (highest or lowest over the whole flight, ends included); utc (ISO 8601; where the elevation is "
        "flat the instant is good to a second or so only); elevation_deg (degrees)",
    ),
    "turns": (
        ["id", "kind", "utc", "elevation_deg"],
        "id (of flights.csv); kind (top or bottom: the elevation turns there, ends of the flight not included, kinks at waypoints "
        "included); utc (ISO 8601; flat, so good to a second or so only); elevation_deg (degrees)",
    ),
}
CERTIFICATE = {
    "script": "flights.py with routes.py and sky.py",
    "packages": ["skyfield", "skyfield-data", "jplephem", "numpy", "scipy", "pyproj"],
    "settings": "JPL ephemeris DE421; UT1 = UTC (TAI-UTC from skyfield's list, 37 s since 2017); polar motion zero; airless "
    "topocentric elevation of the Sun's centre at height 0 on WGS84 below the aircraft, with light time, aberration (the spin of the "
    "Earth included, the aircraft's own motion not) and parallax, without bending of light; Earth-fixed Sun splined (order 5, 10-minute "
    "nodes, axes turning with the mean Sun) and checked against skyfield itself to 1.2e-7 degree; each leg a WGS84 geodesic at steady "
    "speed; sampled every second, turning points sought between samples, crossings refined to 1e-5 s; no end and no turn of a flight is within 0.0007 degree of a limit",
    "rounding": "instants to 1 ms; computed places to 7 decimals of a degree; elevations to 6 decimals of a degree",
    "source": "computed here from the named packages and DE421 (Folkner and others 2008, JPL IOM 343R-08-003)",
    "licence": "figures computed here, same licence as gloamline; skyfield, skyfield-data, pyproj are MIT; DE421 is a JPL publication",
    "mark": "C",
}


class Course:
    """A route flown at a steady pace along the WGS84 geodesic of each leg."""

    def __init__(self, plan):
        self.lats, self.lons = (np.array(column) for column in zip(*plan.points))
        self.azimuths, _, self.metres = GEOD.inv(self.lons[:-1], self.lats[:-1], self.lons[1:], self.lats[1:])
        seconds = np.rint(self.metres / (np.array(plan.knots, dtype=float) * KNOT_M_S))
        assert len(plan.knots) == len(self.metres) and np.all(seconds > 0)
        self.at_s = np.concatenate([[0.0], np.cumsum(seconds)])
        self.airborne_s = int(self.at_s[-1])

    def place(self, seconds):
        """Latitude and longitude in degrees at seconds after take-off."""
        seconds = np.atleast_1d(np.asarray(seconds, dtype=float))
        leg = np.clip(np.searchsorted(self.at_s, seconds, side="right") - 1, 0, len(self.metres) - 1)
        share = (seconds - self.at_s[leg]) / (self.at_s[leg + 1] - self.at_s[leg])
        lons, lats, _ = GEOD.fwd(self.lons[leg], self.lats[leg], self.azimuths[leg], share * self.metres[leg])
        return np.asarray(lats), np.asarray(lons)


class Flight:
    """A course, its take-off and the Sun over it."""

    def __init__(self, plan, takeoff):
        self.plan, self.takeoff, self.course = plan, takeoff, Course(plan)
        self.sun = SunTrack(takeoff, self.course.airborne_s)

    def elevation_deg(self, seconds):
        """Elevation of the Sun's centre beneath the aircraft, in degrees."""
        seconds = np.atleast_1d(np.asarray(seconds, dtype=float))
        return self.sun.elevation_deg(seconds, *self.course.place(seconds))

    def one(self, second):
        """The same for one instant."""
        return float(self.elevation_deg(second)[0])

    def clock(self, second):
        """ISO instant to the millisecond."""
        return iso(self.takeoff + timedelta(milliseconds=round(second * 1000)), "milliseconds")


def turning_points(elevation, seconds, values):
    """Interior turning points as (second, elevation, kind), found finer than the samples.

    A turn within the first or the last second would be missed; `check_clear` sees to it that none could matter.
    """
    step = np.sign(np.diff(values))
    found = []
    for i in np.nonzero(step[1:] * step[:-1] <= 0)[0] + 1:
        sign, kind = (-1.0, "top") if values[i] >= values[i - 1] else (1.0, "bottom")
        bounds = (seconds[i - 1], seconds[i + 1])
        best = minimize_scalar(lambda s: sign * elevation(s), bounds=bounds, method="bounded", options={"xatol": 1e-3})
        if best.fun < sign * values[i]:
            found.append((best.x, sign * best.fun, kind))
        else:
            found.append((seconds[i], values[i], kind))
    return found


def crossings(elevation, seconds, values):
    """Every crossing of a limit as (second, limit, direction), in order of time."""
    found = []
    for name, limit in LIMITS.items():
        above = values > limit
        for i in np.nonzero(above[1:] != above[:-1])[0]:
            second = brentq(lambda s: elevation(s) - limit, seconds[i], seconds[i + 1], xtol=1e-5)
            found.append((second, name, "rising" if above[i + 1] else "setting"))
    return sorted(found)


def sampled(flight):
    """Samples at every second with every turning point put in between, and those turning points."""
    seconds = np.arange(0.0, flight.course.airborne_s + 0.5)
    values = flight.elevation_deg(seconds)
    turns = turning_points(flight.one, seconds, values)
    at = np.concatenate([seconds, [second for second, _, _ in turns]])
    of = np.concatenate([values, [value for _, value, _ in turns]])
    order = np.argsort(at, kind="stable")
    return at[order], of[order], turns


def check_against_skyfield(flight, dice):
    """Stop unless skyfield itself gives the same elevation at random seconds of the flight."""
    worst = 0.0
    for _ in range(CHECKS_PER_FLIGHT):
        second = float(dice.randrange(flight.course.airborne_s))
        lat, lon = (float(value[0]) for value in flight.course.place(second))
        seen = topocentric(time_at(flight.takeoff + timedelta(seconds=second)), lat, lon).altaz()[0].degrees
        worst = max(worst, abs(seen - flight.one(second)))
    assert worst < CHECK_DEG, f"{flight.plan.name}: {worst} degrees from skyfield"
    return worst


def check_clear(flight, values, turns):
    """Stop if an end or a turn stands so near a limit that a crossing there would be a matter of taste."""
    for value in (values[0], values[-1], *(value for _, value, _ in turns)):
        off = min(abs(value - limit) for limit in LIMITS.values())
        assert off > CLEAR_DEG, f"{flight.plan.name}: {value} is {off} from a limit"


def rate_deg_per_h(flight, second):
    """How fast the elevation changes at an instant, from half a second either side."""
    return (flight.one(second + 0.5) - flight.one(second - 0.5)) * 3600.0


def limit_reached(graze, course, sun):
    """Lowest bottom or highest top, as a function of the seconds by which take-off is shifted; NaN where none."""
    seconds = np.arange(0.0, course.airborne_s, SEARCH_STEP_S)
    lats, lons = course.place(seconds)
    sign = 1.0 if graze.kind == "lowest" else -1.0

    def reached(shift_s):
        heights = sign * sun.elevation_deg(seconds + shift_s, lats, lons)
        low = np.nonzero((heights[1:-1] < heights[:-2]) & (heights[1:-1] <= heights[2:]))[0] + 1
        if len(low) == 0:
            return np.nan
        before, here, after = heights[low - 1], heights[low], heights[low + 1]
        return sign * np.min(here - (after - before) ** 2 / (8.0 * (before - 2.0 * here + after)))

    return reached


def sought_takeoff(graze):
    """The whole second within half a day of the plan's that brings the Sun to the wanted margin from the limit."""
    course, target = Course(graze.plan), LIMITS[graze.limit] + graze.margin_deg
    half_day = 43200
    sun = SunTrack(graze.plan.takeoff - timedelta(seconds=half_day), 2 * half_day + course.airborne_s)
    reached = limit_reached(graze, course, sun)
    shifts = np.arange(0.0, 2 * half_day, 600.0)
    behind = np.array([reached(shift) - target for shift in shifts])
    for i in sorted(np.nonzero(behind[1:] * behind[:-1] < 0)[0], key=lambda i: abs(shifts[i] - half_day)):
        shift = round(brentq(lambda s: reached(s) - target, shifts[i], shifts[i + 1], xtol=1e-3))
        miss = (reached(shift) - LIMITS[graze.limit]) * np.sign(graze.margin_deg)
        if 0.001 < miss < 0.01:
            return graze.plan.takeoff + timedelta(seconds=shift - half_day)
    raise AssertionError(f"{graze.plan.name}: no take-off found")


def check_graze(graze, turns):
    """Stop unless a turning point of the flight as sampled stands where the search wanted it."""
    kind = "bottom" if graze.kind == "lowest" else "top"
    off = [(value - LIMITS[graze.limit]) * np.sign(graze.margin_deg) for _, value, k in turns if k == kind]
    assert any(0.001 < one < 0.01 for one in off), graze.plan.name


def rows_of(flight, dice):
    """The lines this flight adds to each table."""
    at, of, turns = sampled(flight)
    check_clear(flight, of, turns)
    worst = check_against_skyfield(flight, dice)
    events = crossings(flight.one, at, of)
    name, course = flight.plan.name, flight.course
    print(f"{name}: {course.airborne_s} s, {len(events)} crossings, {len(turns)} turns, {worst:.1e} deg off", file=sys.stderr)
    route = ";".join(f"{lat!r} {lon!r}" for lat, lon in flight.plan.points)
    places = [[float(value[0]) for value in course.place(second)] for second, _, _ in events]
    ends = (("highest", int(np.argmax(of))), ("lowest", int(np.argmin(of))))
    return turns, {
        "flights": [[name, flight.plan.reason, iso(flight.takeoff, "seconds"), str(course.airborne_s), route]],
        "flight_points": [
            [name, str(seq), repr(lat), repr(lon), f"{second:.0f}"]
            for seq, ((lat, lon), second) in enumerate(zip(flight.plan.points, course.at_s), 1)
        ],
        "crossings": [
            [name, str(seq), flight.clock(second), limit, direction, f"{lat:.7f}", f"{lon:.7f}", f"{rate_deg_per_h(flight, second):.4f}"]
            for seq, ((second, limit, direction), (lat, lon)) in enumerate(zip(events, places), 1)
        ],
        "extremes": [[name, kind, flight.clock(at[i]), f"{of[i]:.6f}"] for kind, i in ends],
        "turns": [[name, kind, flight.clock(second), f"{value:.6f}"] for second, value, kind in sorted(turns)],
    }


def main():
    """Make the five tables."""
    dice = random.Random(20261201)
    tables = {name: [] for name in COLUMNS}
    for item in [*PLANS, *GRAZES]:
        graze = item if item in GRAZES else None
        plan = graze.plan if graze else item
        turns, rows = rows_of(Flight(plan, sought_takeoff(graze) if graze else plan.takeoff), dice)
        if graze:
            check_graze(graze, turns)
        for name, lines in rows.items():
            tables[name] += lines
    for name, rows in tables.items():
        certificate = {**CERTIFICATE, "columns": COLUMNS[name][1]}
        write_table(Path(__file__).with_name(f"{name}.csv"), certificate, COLUMNS[name][0], rows)


if __name__ == "__main__":
    main()
