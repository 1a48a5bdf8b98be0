"""The Sun and the Moon as skyfield and DE421 give them, with UT1 equal to UTC and no polar motion.

It does not know of flights or files other than the ephemeris, reads no clock and needs no network.
"""

import warnings
from datetime import datetime, timedelta, timezone
from importlib.metadata import version
from pathlib import Path

import numpy as np
import skyfield_data
from scipy.interpolate import make_interp_spline
from skyfield.api import load, load_file, wgs84
from skyfield.framelib import ecliptic_frame, itrs
from skyfield.timelib import Timescale

# the expiry that skyfield-data warns of is that of its Earth-rotation file, which nothing here reads
warnings.filterwarnings("ignore", message="The file finals2000A.all has expired")

MADE_ON = "2026-12-01"
DAY_S = 86400.0
TT_MINUS_TAI_S = 32.184
AU_M = 149597870700.0
LIGHT_M_S = 299792458.0
EARTH_SPIN_RAD_S = 7.292115e-5
WGS84_A_M = 6378137.0
WGS84_F = 1.0 / 298.257223563
NODE_S = 600.0
MARGIN_S = 3600.0

KERNEL = load_file(str(Path(skyfield_data.get_skyfield_data_path()) / "de421.bsp"))
SUN, EARTH, MOON = KERNEL["sun"], KERNEL["earth"], KERNEL["moon"]

_builtin = load.timescale(builtin=True)
LEAP_JD, LEAP_S = np.array(_builtin.leap_dates), np.array(_builtin.leap_offsets)


def tai_minus_utc(jd_utc):
    """TAI minus UTC in seconds, from skyfield's own list of leap seconds (37 s since 2017)."""
    return LEAP_S[np.searchsorted(LEAP_JD, jd_utc, side="right") - 1]


def _delta_t(tt):
    """TT minus UT1 for UT1 equal to UTC; a minute either side of a leap second is not to be asked for."""
    return TT_MINUS_TAI_S + tai_minus_utc(np.asarray(tt) - 60.0 / DAY_S)


TIMESCALE = Timescale(_delta_t, _builtin.leap_dates, _builtin.leap_offsets)


def midnight_of(instant):
    """0h UTC of the day that holds the instant."""
    return instant.replace(hour=0, minute=0, second=0, microsecond=0)


def times(midnight, seconds):
    """Skyfield times at UTC seconds after a 0h UTC, whole days and fraction kept apart."""
    jd = midnight.toordinal() + 1721424.5
    seconds = np.asarray(seconds, dtype=float)
    offset = tai_minus_utc(jd + seconds / DAY_S) + TT_MINUS_TAI_S
    t = TIMESCALE.tt_jd(jd, (seconds + offset) / DAY_S)
    wrong_s = (np.asarray(t.whole) - jd + np.asarray(t.ut1_fraction)) * DAY_S - seconds
    assert np.max(np.abs(wrong_s)) < 1e-5, "UT1 must equal UTC"
    return t


def time_at(instant):
    """One skyfield time for a UTC datetime."""
    midnight = midnight_of(instant)
    return times(midnight, (instant - midnight) / timedelta(seconds=1))


def geocentric(t, body=SUN):
    """Apparent geocentric Sun or other body: light time and aberration, no bending of light."""
    return EARTH.at(t).observe(body).apparent(deflectors=())


def topocentric(t, lat_deg, lon_deg, body=SUN):
    """Apparent Sun or other body for an observer at height 0 on WGS84; skyfield adds the Earth's own bending, at most 0.0006 arcsec."""
    observer = EARTH + wgs84.latlon(lat_deg, lon_deg, elevation_m=0.0)
    return observer.at(t).observe(body).apparent(deflectors=())


def ecliptic_longitude_deg(t):
    """Apparent geocentric longitude on the true ecliptic and equinox of date."""
    return geocentric(t).frame_latlon(ecliptic_frame)[1].degrees


def distance_au(t):
    """Distance of the apparent geocentric Sun: Earth now, Sun a light time ago."""
    return geocentric(t).distance().au


def _turned(vector, angle):
    """The vector seen from axes turned by the angle about z."""
    c, s = np.cos(angle), np.sin(angle)
    return np.array([c * vector[0] + s * vector[1], c * vector[1] - s * vector[0], vector[2]])


class SunTrack:
    """Earth-fixed geocentric Sun, or other body, and its aberration over a span, splined in axes that turn with the mean Sun."""

    def __init__(self, start, span_s, body=SUN):
        self.midnight = midnight_of(start)
        first = (start - self.midnight) / timedelta(seconds=1) - MARGIN_S
        nodes = np.arange(first, first + span_s + 2 * MARGIN_S + NODE_S, NODE_S)
        t = times(self.midnight, nodes)
        seen = geocentric(t, body).frame_xyz(itrs).au
        unaberrated = EARTH.at(t).observe(body).frame_xyz(itrs).au
        shift = seen / np.linalg.norm(seen, axis=0) - unaberrated / np.linalg.norm(unaberrated, axis=0)
        slow = [_turned(vector, -2 * np.pi * nodes / DAY_S) for vector in (unaberrated, shift)]
        self.splines = [make_interp_spline(nodes, vector.T, k=5) for vector in slow]
        self.start_s = first + MARGIN_S

    def fixed(self, seconds):
        """Earth-fixed Sun in au, without aberration, and the shift by aberration of its direction."""
        day_s = np.asarray(seconds, dtype=float) + self.start_s
        return [_turned(spline(day_s).T, 2 * np.pi * day_s / DAY_S) for spline in self.splines]

    def elevation_deg(self, seconds, lat_deg, lon_deg):
        """Airless topocentric elevation of the centre, with parallax and the aberration of the Earth's spin."""
        normal, place_m = normal_and_place(lat_deg, lon_deg)
        sun_au, shift = self.fixed(seconds)
        ray = sun_au - place_m / AU_M
        spin = EARTH_SPIN_RAD_S / LIGHT_M_S
        ray = ray / np.linalg.norm(ray, axis=0) + shift + spin * np.array([-place_m[1], place_m[0], np.zeros_like(place_m[2])])
        up = np.sum(ray * normal, axis=0)
        across = np.linalg.norm(np.cross(ray, normal, axis=0), axis=0)
        return np.degrees(np.arctan2(up, across))


def normal_and_place(lat_deg, lon_deg):
    """Unit normal of the WGS84 ellipsoid, and the Earth-fixed point of height 0 in metres."""
    lat, lon = np.radians(lat_deg), np.radians(lon_deg)
    normal = np.array([np.cos(lat) * np.cos(lon), np.cos(lat) * np.sin(lon), np.sin(lat)])
    squared = WGS84_F * (2.0 - WGS84_F)
    radius = WGS84_A_M / np.sqrt(1.0 - squared * np.sin(lat) ** 2)
    return normal, np.array([normal[0] * radius, normal[1] * radius, normal[2] * radius * (1.0 - squared)])


def utc(*parts):
    """A UTC datetime."""
    return datetime(*parts, tzinfo=timezone.utc)


def iso(instant, timespec="microseconds"):
    """ISO 8601 with Z; the instant must already be rounded to what is shown."""
    return instant.replace(tzinfo=None).isoformat(timespec=timespec) + "Z"


def write_table(path, certificate, header, rows):
    """Write a table with its birth certificate; the packages and the day are added here."""
    packages = ", ".join(f"{name} {version(name)}" for name in certificate.pop("packages"))
    lines = [f"# made by: {certificate.pop('script')} with {packages}", f"# made on: {MADE_ON}"]
    lines += [f"# {key}: {value}" for key, value in certificate.items()]
    assert not any(mark in cell for row in rows for cell in row for mark in ',"'), "a cell may not need quoting"
    lines.append(",".join(header))
    lines += [",".join(row) for row in rows]
    path.write_text("\n".join(lines) + "\n", encoding="ascii")
