"""Write sun_places.csv: where the Sun stands, geocentric and from places all over the Earth, 1975 to 2045.

It does not know gloamline; it knows refraction and heights above the ellipsoid as little as polar motion.
"""

import random
from datetime import timedelta
from math import asin, degrees
from pathlib import Path

from seasons import SEASON_DEG, season_instant
from sky import geocentric, iso, time_at, topocentric, utc, write_table

SEED = 20261201
RANDOM_ROWS = 468
SEASON_YEARS = range(1975, 2046, 5)
SPECIAL_PLACES = [
    (90.0, 0.0), (-90.0, 0.0), (90.0, 180.0), (-90.0, -120.0), (0.0, 0.0), (0.0, 180.0), (0.0, -180.0),
    (51.5, 180.0), (51.5, -180.0), (-17.0, 180.0), (-17.0, -180.0), (66.56, 25.0), (-66.56, -60.0),
    (23.43, 100.0), (-23.43, -45.0), (89.999, 77.0), (-89.999, -77.0), (78.25, 15.5), (-77.85, 166.67),
    (0.0, -90.0), (0.000001, 90.0), (71.29, -156.76),
]
COLUMNS = [
    "utc", "lat_deg", "lon_deg", "declination_deg", "gha_deg", "right_ascension_deg", "distance_au",
    "elevation_deg", "azimuth_deg",
]
CERTIFICATE = {
    "script": "sun_places.py",
    "packages": ["skyfield", "skyfield-data", "jplephem", "numpy"],
    "settings": "JPL ephemeris DE421; UT1 = UTC exactly (TT-UT1 = 32.184 s + TAI-UTC, 37 s since 2017); polar motion zero; "
    "IAU 2000A nutation and IAU 2006 precession as in skyfield; light time and aberration in; bending of light by Sun, "
    "Jupiter and Saturn out (deflectors=())",
    "columns": "utc (ISO 8601); lat_deg and lon_deg (degrees, WGS84 geodetic, north and east positive); declination_deg, "
    "gha_deg (GAST minus right ascension, 0 to 360) and right_ascension_deg (degrees, apparent geocentric, true equator and "
    "equinox of date); distance_au (au, geocentric, Earth now and Sun a light time ago); elevation_deg and azimuth_deg "
    "(degrees, topocentric at height 0, airless, centre of the Sun, azimuth from true north through east; at a pole north is "
    "the limit along the meridian of lon_deg; aberration by the spin of the Earth and its bending of light under 0.0006 arcsec in)",
    "rounding": "utc exact to the microsecond; degrees to 9 decimals; au to 11 decimals",
    "rows": f"{RANDOM_ROWS} pseudo-random instants (seed {SEED}) then the equinoxes and solstices of every fifth year; "
    f"the first places are chosen and the others spread evenly over the sphere or beyond 60 degrees of latitude",
    "source": "computed here from the named packages and DE421 (Folkner and others 2008, JPL IOM 343R-08-003)",
    "licence": "figures computed here, same licence as gloamline; skyfield and skyfield-data are MIT; DE421 is a JPL publication",
    "mark": "C",
}


def instants(dice):
    """The random instants, then those of the seasons."""
    first, last = utc(1975, 1, 1), utc(2046, 1, 1)
    span_us = (last - first) // timedelta(microseconds=1)
    chosen = [first + timedelta(microseconds=dice.randrange(span_us)) for _ in range(RANDOM_ROWS)]
    return chosen + [season_instant(year, deg) for year in SEASON_YEARS for deg in SEASON_DEG]


def place(dice, index):
    """A chosen place first, afterwards one spread over the sphere or, every third, over high latitudes."""
    if index < 2 * len(SPECIAL_PLACES):
        return SPECIAL_PLACES[index % len(SPECIAL_PLACES)]
    lon = round(dice.uniform(-180.0, 180.0), 5)
    if index % 3 == 0:
        return round(dice.choice([-1, 1]) * dice.uniform(60.0, 89.9), 5), lon
    return round(degrees(asin(dice.uniform(-1.0, 1.0))), 5), lon


def row(instant, lat_deg, lon_deg):
    """One line of the table."""
    t = time_at(instant)
    ra, dec, distance = geocentric(t).radec("date")
    gha = (t.gast * 15.0 - ra.hours * 15.0) % 360.0
    elevation, azimuth, _ = topocentric(t, lat_deg, lon_deg).altaz()
    return (
        [iso(instant), repr(lat_deg), repr(lon_deg)]
        + [f"{value:.9f}" for value in (dec.degrees, gha, ra.hours * 15.0)]
        + [f"{distance.au:.11f}", f"{elevation.degrees:.9f}", f"{azimuth.degrees:.9f}"]
    )


def main():
    """Make the table."""
    dice = random.Random(SEED)
    rows = [row(instant, *place(dice, index)) for index, instant in enumerate(instants(dice))]
    write_table(Path(__file__).with_name("sun_places.csv"), dict(CERTIFICATE), COLUMNS, rows)


if __name__ == "__main__":
    main()
