"""Write moon_crossings.csv: when the Moon rises and sets beneath the flights of flights.csv, and its place at their ends.

It does not know gloamline; it samples every second, and knows only a point at height 0 on WGS84 below the aircraft.
"""

import csv
import random
import sys
from datetime import datetime, timedelta
from pathlib import Path

import numpy as np
from flights import Course, turning_points
from routes import Plan
from scipy.optimize import brentq
from sky import AU_M, MOON, SunTrack, WGS84_A_M, iso, time_at, topocentric, write_table

# the almanacs': horizontal refraction, and the Moon's radius over the Earth's equatorial one
REFRACTION_DEG = 34.0 / 60.0
RADIUS_M = 0.2725076 * WGS84_A_M
# aberration is taken for the Moon's direction from the Earth's centre, up to a degree from that below the aircraft: 20.5 arcsec
# times that degree in radians, 1e-4 degree; light time to the centre instead of the observer adds 3.3e-6 degree
CHECK_DEG = 1.2e-4
# nearer than this a good series for the Moon might see a crossing more or less: 18 arcsec
CLEAR_DEG = 0.005
CHECKS_PER_FLIGHT = 6
HEADER = ["id", "seq", "utc", "event", "lat_deg", "lon_deg", "rate_deg_per_h", "limit_deg"]
CERTIFICATE = {
    "script": "moon_crossings.py with flights.py, routes.py and sky.py",
    "packages": ["skyfield", "skyfield-data", "jplephem", "numpy", "scipy", "pyproj"],
    "settings": "JPL ephemeris DE421; UT1 = UTC (TAI-UTC from skyfield's list, 37 s since 2017); polar motion zero; airless "
    "topocentric elevation of the Moon's centre at height 0 on WGS84 below the aircraft, with light time, aberration and parallax, "
    "without bending of light, against -(34 arcmin + geocentric semidiameter), the radius 0.2725076 of the Earth's equatorial one; "
    "Earth-fixed Moon splined (order 5, 10-minute nodes, axes turning with the mean Sun) and checked against skyfield itself to "
    "1.2e-4 degree (aberration is that at the Earth's centre); each leg a WGS84 geodesic at steady speed; sampled every second, turning points sought between samples, crossings "
    "refined to 1e-5 s",
    "rounding": "instants to 1 ms; computed places to 7 decimals of a degree; limit to 6 decimals of a degree",
    "source": "computed here from the named packages and DE421 (Folkner and others 2008, JPL IOM 343R-08-003)",
    "licence": "figures computed here, same licence as gloamline; skyfield, skyfield-data, pyproj are MIT; DE421 is a JPL publication",
    "mark": "C",
    "columns": "id (of flights.csv); seq (from 1 in order of time; 0: the Moon does not cross on this flight, cells behind it empty); utc "
    "(ISO 8601); event (moonrise or moonset beneath the aircraft); lat_deg and lon_deg (degrees, point below the aircraft); "
    "rate_deg_per_h (degrees of elevation above the limit per hour there: an error of elevation divided by it is that of the instant); "
    "limit_deg (the limit there, degrees)",
}


def rows_of(table):
    """Rows of a table beside this script."""
    with Path(__file__).with_name(table).open(encoding="ascii") as lines:
        return list(csv.DictReader(line for line in lines if not line.startswith("#")))


class MoonFlight:
    """A flight of the table with the Moon over it."""

    def __init__(self, row, points):
        route = [(float(p["lat_deg"]), float(p["lon_deg"])) for p in points]
        self.name = row["id"]
        self.takeoff = datetime.fromisoformat(row["takeoff"])
        # the pace does not matter: the times of the points are those of the table
        self.course = Course(Plan(self.name, "", self.takeoff, route, [400] * (len(route) - 1)))
        self.course.at_s = np.array([float(p["seconds_after_takeoff"]) for p in points])
        self.course.airborne_s = int(row["airborne_s"])
        self.moon = SunTrack(self.takeoff, self.course.airborne_s, MOON)

    def limit_deg(self, seconds):
        """Elevation of the centre when the upper limb is on the horizon."""
        metres = np.linalg.norm(self.moon.fixed(seconds)[0], axis=0) * AU_M
        return -(REFRACTION_DEG + np.degrees(np.arcsin(RADIUS_M / metres)))

    def elevation_deg(self, seconds):
        """Elevation of the Moon's centre."""
        return self.moon.elevation_deg(seconds, *self.course.place(seconds))

    def above_deg(self, seconds):
        """Elevation above the limit."""
        seconds = np.atleast_1d(np.asarray(seconds, dtype=float))
        return self.elevation_deg(seconds) - self.limit_deg(seconds)

    def one(self, second):
        """The same for one instant."""
        return float(self.above_deg(second)[0])


def events_of(flight):
    """Crossings as (second, event), and how near an end or a turn comes to the limit."""
    seconds = np.arange(0.0, flight.course.airborne_s + 0.5)
    values = flight.above_deg(seconds)
    turns = turning_points(flight.one, seconds, values)
    at = np.concatenate([seconds, [second for second, _, _ in turns]])
    of = np.concatenate([values, [value for _, value, _ in turns]])
    order = np.argsort(at, kind="stable")
    at, of = at[order], of[order]
    above = of > 0.0
    found = [
        (brentq(flight.one, at[i], at[i + 1], xtol=1e-5), "moonrise" if above[i + 1] else "moonset")
        for i in np.nonzero(above[1:] != above[:-1])[0]
    ]
    return found, min([abs(of[0]), abs(of[-1])] + [abs(value) for _, value, _ in turns])


def check_against_skyfield(flight, dice):
    """Stop unless skyfield itself gives the same elevation at random seconds of the flight."""
    for _ in range(CHECKS_PER_FLIGHT):
        second = float(dice.randrange(flight.course.airborne_s))
        lat, lon = (float(value[0]) for value in flight.course.place(second))
        seen = topocentric(time_at(flight.takeoff + timedelta(seconds=second)), lat, lon, MOON).altaz()[0].degrees
        off = abs(seen - float(flight.elevation_deg(np.array([second]))[0]))
        assert off < CHECK_DEG, f"{flight.name} at {second} s: {off} degree off"


def lines_of(flight, events):
    """The lines of a flight."""
    lines = []
    for seq, (second, event) in enumerate(events, 1):
        lat, lon = (float(value[0]) for value in flight.course.place(second))
        rate = (flight.one(second + 0.5) - flight.one(second - 0.5)) * 3600.0
        clock = iso(flight.takeoff + timedelta(milliseconds=round(second * 1000)), "milliseconds")
        limit = float(flight.limit_deg(np.array([second]))[0])
        lines.append([flight.name, str(seq), clock, event, f"{lat:.7f}", f"{lon:.7f}", f"{rate:.4f}", f"{limit:.6f}"])
    return lines or [[flight.name, "0", "", "", "", "", "", ""]]


def main():
    """Make the table."""
    dice = random.Random(20261203)
    points, lines, left_out = rows_of("flight_points.csv"), [], []
    for row in rows_of("flights.csv"):
        flight = MoonFlight(row, [p for p in points if p["id"] == row["id"]])
        events, nearest = events_of(flight)
        check_against_skyfield(flight, dice)
        print(f"{flight.name}: {len(events)} crossings, nearest {nearest:.4f} deg", file=sys.stderr)
        if nearest < CLEAR_DEG:
            left_out.append(flight.name)
        else:
            lines += lines_of(flight, events)
    note = f"left out because an end or a turn comes within {CLEAR_DEG} degree of the limit: {'; '.join(left_out) or 'none'}"
    write_table(Path(__file__).with_name("moon_crossings.csv"), {**CERTIFICATE, "note": note}, HEADER, lines)


if __name__ == "__main__":
    main()
