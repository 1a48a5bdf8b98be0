"""Write seasons.csv: equinoxes, solstices, perihelion and aphelion of chosen years.

It does not know gloamline nor civil calendars: every instant is UTC with UT1 equal to it.
"""

from datetime import timedelta
from pathlib import Path

from scipy.optimize import brentq
from sky import distance_au, ecliptic_longitude_deg, iso, midnight_of, times, utc, write_table

YEARS = [1975, 1990, 2000, 2010, *range(2020, 2031), 2040, 2045]
SEASON_DEG = (0.0, 90.0, 180.0, 270.0)
NAMES = {0.0: "march_equinox", 90.0: "june_solstice", 180.0: "september_equinox", 270.0: "december_solstice"}
GUESS = {0.0: (3, 20), 90.0: (6, 21), 180.0: (9, 23), 270.0: (12, 22)}
DAY_S = 86400.0
# wide enough for the slope to rise above rounding, narrow enough that the curve's own skewness shifts it by 2 ms
HALF_STEP_S = 86.4
CERTIFICATE = {
    "script": "seasons.py",
    "packages": ["skyfield", "skyfield-data", "jplephem", "numpy", "scipy"],
    "settings": "JPL ephemeris DE421; UT1 = UTC (TAI-UTC from skyfield's list, 37 s since 2017); light time and aberration in; "
    "no bending of light; seasons: apparent geocentric longitude on the true ecliptic and equinox of date is 0, 90, 180, 270; "
    "apsides: extreme of the geocentric distance from the Earth's centre now to the Sun's centre a light time ago (not of the "
    "Earth-Moon barycentre)",
    "columns": "event; utc (ISO 8601); longitude_deg (degrees, empty for apsides); distance_au (au)",
    "rounding": "utc to 0.1 s; au to 9 decimals; an apsis is flat: 0.1 s is the arithmetic, another ephemeris may differ by seconds",
    "source": "computed here from the named packages and DE421 (Folkner and others 2008, JPL IOM 343R-08-003)",
    "licence": "figures computed here, same licence as gloamline; skyfield and skyfield-data are MIT; DE421 is a JPL publication",
    "mark": "C",
}


def _root(function, guess, reach_days):
    """The instant, to 0.1 s, at which a function of (midnight, seconds) is zero."""
    midnight, reach = midnight_of(guess), reach_days * DAY_S
    seconds = brentq(lambda s: function(midnight, s), -reach, reach, xtol=1e-4, rtol=1e-15)
    return midnight + timedelta(milliseconds=100 * round(10 * seconds))


def season_instant(year, deg):
    """The instant, to 0.1 s, at which the apparent longitude is deg."""

    def behind(midnight, seconds):
        return (ecliptic_longitude_deg(times(midnight, seconds)) - deg + 180.0) % 360.0 - 180.0

    return _root(behind, utc(year, *GUESS[deg]), 5)


def apsis_instant(year, month):
    """The instant at which the distance stands still about the fourth of January or July."""

    def slope(midnight, seconds):
        late, early = (distance_au(times(midnight, seconds + step)) for step in (HALF_STEP_S, -HALF_STEP_S))
        return late - early

    return _root(slope, utc(year, month, 4), 12)


def _row(event, instant, longitude):
    midnight = midnight_of(instant)
    au = distance_au(times(midnight, (instant - midnight) / timedelta(seconds=1)))
    return [event, iso(instant, "milliseconds")[:-3] + "Z", longitude, f"{au:.9f}"]


def year_rows(year):
    """The six rows of one year."""
    rows = [_row(NAMES[deg], season_instant(year, deg), f"{deg:.0f}") for deg in SEASON_DEG]
    apsides = (("perihelion", 1), ("aphelion", 7))
    return rows + [_row(event, apsis_instant(year, month), "") for event, month in apsides]


def main():
    """Make the table."""
    rows = [row for year in YEARS for row in year_rows(year)]
    path = Path(__file__).with_name("seasons.csv")
    write_table(path, dict(CERTIFICATE), ["event", "utc", "longitude_deg", "distance_au"], rows)


if __name__ == "__main__":
    main()
