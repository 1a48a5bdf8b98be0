"""Crossings of the Sun's limits beneath the recorded flight, found by looking every second with JPL DE421.

Knows nothing of repairs: the recording has none that move a point. Run with the packages of ../README.md.
"""

import csv
import sys
from datetime import datetime, timedelta, timezone
from pathlib import Path

import numpy as np
from pyproj import Geod

HERE = Path(__file__).parent
sys.path.insert(0, str(HERE.parent / "skyfield-de421"))

from flights import CERTIFICATE, crossings  # noqa: E402
from sky import SunTrack, iso, write_table  # noqa: E402

GEOD = Geod(ellps="WGS84")


def points():
    """Seconds since 1970, latitudes and longitudes of the recording, in its order."""
    with open(HERE / "flight.csv", encoding="utf-8") as file:
        rows = list(csv.DictReader(line for line in file if not line.startswith("#")))
    columns = (np.array([float(row[name]) for row in rows]) for name in ("timestamp", "lat", "lon"))
    return tuple(columns)


def main():
    """Make the table."""
    stamps, lats, lons = points()
    assert np.all(np.diff(stamps) > 0)
    start = datetime.fromtimestamp(stamps[0], timezone.utc)
    at_s = stamps - stamps[0]
    azimuths, _, metres = GEOD.inv(lons[:-1], lats[:-1], lons[1:], lats[1:])
    sun = SunTrack(start, int(at_s[-1]))

    def place(seconds):
        leg = np.clip(np.searchsorted(at_s, seconds, side="right") - 1, 0, len(metres) - 1)
        share = (seconds - at_s[leg]) / (at_s[leg + 1] - at_s[leg])
        lon, lat, _ = GEOD.fwd(lons[leg], lats[leg], azimuths[leg], share * metres[leg])
        return np.asarray(lat), np.asarray(lon)

    def elevation(seconds):
        seconds = np.atleast_1d(np.asarray(seconds, dtype=float))
        return sun.elevation_deg(seconds, *place(seconds))

    def one(second):
        return float(elevation(second)[0])

    seconds = np.arange(0.0, at_s[-1] + 0.5)
    rows = []
    for number, (second, limit, direction) in enumerate(crossings(one, seconds, elevation(seconds)), start=1):
        lat, lon = place(np.array([second]))
        rate = (one(second + 0.5) - one(second - 0.5)) * 3600.0
        instant = start + timedelta(milliseconds=round(second * 1000))
        rows.append([str(number), iso(instant, "milliseconds"), limit, direction, f"{lat[0]:.6f}", f"{lon[0]:.6f}", f"{rate:.4f}"])
    certificate = {
        **CERTIFICATE,
        "script": "crossings.py with flights.py and sky.py of skyfield-de421",
        "columns": "seq (from 1 in order of time); utc (ISO 8601); limit and direction as in skyfield-de421/crossings.csv; lat_deg and "
        "lon_deg (degrees, point below the aircraft); rate_deg_per_h (degrees of elevation per hour there)",
    }
    header = ["seq", "utc", "limit", "direction", "lat_deg", "lon_deg", "rate_deg_per_h"]
    write_table(HERE / "crossings.csv", certificate, header, rows)


if __name__ == "__main__":
    main()
