"""Write moon_places.csv: where the Moon stands and how much of it is lit, from places all over the Earth, 1975 to 2045.

It does not know gloamline; it knows refraction and heights above the ellipsoid as little as polar motion.
"""

import random
from datetime import timedelta
from math import cos, radians
from pathlib import Path

from sky import EARTH, MOON, SUN, iso, time_at, utc, wgs84, write_table
from sun_places import place

SEED = 20261202
ROWS = 360
COLUMNS = [
    "utc", "lat_deg", "lon_deg", "declination_deg", "gha_deg", "distance_km", "elevation_deg", "azimuth_deg",
    "elongation_deg", "phase_angle_deg", "illuminated",
]
CERTIFICATE = {
    "script": "moon_places.py with sky.py, sun_places.py and seasons.py",
    "packages": ["skyfield", "skyfield-data", "jplephem", "numpy"],
    "settings": "JPL ephemeris DE421; UT1 = UTC exactly (TT-UT1 = 32.184 s + TAI-UTC, 37 s since 2017); polar motion zero; "
    "IAU 2000A nutation and IAU 2006 precession as in skyfield; light time and aberration in; bending of light out (deflectors=())",
    "columns": "utc (ISO 8601); lat_deg and lon_deg (degrees, WGS84 geodetic, north and east positive); declination_deg and "
    "gha_deg (GAST minus right ascension, 0 to 360) (degrees, apparent geocentric, true equator and equinox of date); distance_km "
    "(geocentric, Earth now and Moon a light time ago); elevation_deg and azimuth_deg (degrees, topocentric at height 0, airless, "
    "centre of the Moon, azimuth from true north through east; at a pole north is the limit along the meridian of lon_deg); "
    "elongation_deg (geocentric angle between apparent Sun and Moon); phase_angle_deg (Earth's centre, Moon, Sun); illuminated "
    "(lit part of the disc seen from the Earth's centre, half of 1 + cos phase angle)",
    "rounding": "utc exact to the microsecond; degrees to 9 decimals; km to 4 decimals; illuminated to 9 decimals",
    "rows": f"{ROWS} pseudo-random instants (seed {SEED}); the first places are chosen and the others spread evenly over the "
    "sphere or beyond 60 degrees of latitude, as in sun_places.csv",
    "source": "computed here from the named packages and DE421 (Folkner and others 2008, JPL IOM 343R-08-003)",
    "licence": "figures computed here, same licence as gloamline; skyfield and skyfield-data are MIT; DE421 is a JPL publication",
    "mark": "C",
}


def row(instant, lat_deg, lon_deg):
    """One line of the table."""
    t = time_at(instant)
    earth = EARTH.at(t)
    moon, sun = (earth.observe(body).apparent(deflectors=()) for body in (MOON, SUN))
    ra, dec, distance = moon.radec("date")
    gha = (t.gast * 15.0 - ra.hours * 15.0) % 360.0
    observer = EARTH + wgs84.latlon(lat_deg, lon_deg, elevation_m=0.0)
    elevation, azimuth, _ = observer.at(t).observe(MOON).apparent(deflectors=()).altaz()
    phase_angle_deg = earth.observe(MOON).phase_angle(SUN).degrees
    illuminated = (1.0 + cos(radians(phase_angle_deg))) / 2.0
    degrees = (elevation.degrees, azimuth.degrees, moon.separation_from(sun).degrees, phase_angle_deg)
    return (
        [iso(instant), repr(lat_deg), repr(lon_deg), f"{dec.degrees:.9f}", f"{gha:.9f}", f"{distance.km:.4f}"]
        + [f"{value:.9f}" for value in (*degrees, illuminated)]
    )


def main():
    """Make the table."""
    dice = random.Random(SEED)
    first, last = utc(1975, 1, 1), utc(2046, 1, 1)
    span_us = (last - first) // timedelta(microseconds=1)
    instants = [first + timedelta(microseconds=dice.randrange(span_us)) for _ in range(ROWS)]
    rows = [row(instant, *place(dice, index)) for index, instant in enumerate(instants)]
    write_table(Path(__file__).with_name("moon_places.csv"), dict(CERTIFICATE), COLUMNS, rows)


if __name__ == "__main__":
    main()
