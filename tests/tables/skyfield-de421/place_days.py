"""Write polar_dates.csv, place_events.csv and moon_events.csv: civil days at places, as skyfield, DE421 and IANA give them.

It does not know gloamline: it looks at the Sun every 20 seconds and at the Moon every minute, and takes the days from
Python's own zoneinfo.
"""

import random
from datetime import date, datetime, timedelta
from pathlib import Path
from zoneinfo import ZoneInfo

import numpy as np
from scipy.optimize import brentq
from sky import DAY_S, EARTH, KERNEL, SunTrack, geocentric, iso, time_at, times, utc, wgs84, write_table

SEED = 20261203
MOON = KERNEL["moon"]
LIMITS = {"horizon": -50.0 / 60.0, "civil": -6.0, "nautical": -12.0, "astronomical": -18.0}
STEP_S = 20.0
MOON_STEP_S = 60.0
MOON_RADIUS_KM = 0.2725076 * 6378.137
REFRACTION_DEG = 34.0 / 60.0
# places as decimal degrees with the zone of the aerodrome named first
POLAR = [
    ("ENTC", 69.6833, 18.9189, "Europe/Oslo"),
    ("ENSB", 78.2461, 15.4656, "Arctic/Longyearbyen"),
    ("ENNA", 70.0688, 24.9735, "Europe/Oslo"),
    ("BGTL", 76.5312, -68.7032, "America/Thule"),
    ("CYLT", 82.5178, -62.2806, "America/Toronto"),
    ("PABR", 71.2854, -156.766, "America/Anchorage"),
    ("UODD", 73.5178, 80.3797, "Asia/Krasnoyarsk"),
    ("NZIR", -77.854, 166.469, "Antarctica/McMurdo"),
    ("NZSP", -90.0, 0.0, "Pacific/Auckland"),
]
OTHERS = [
    ("EGLL", 51.4706, -0.4619, "Europe/London"),
    ("WSSS", 1.3502, 103.994, "Asia/Singapore"),
    ("PHNL", 21.3187, -157.922, "Pacific/Honolulu"),
    ("YPDN", -12.4147, 130.877, "Australia/Darwin"),
    ("YLHI", -31.5383, 159.077, "Australia/Lord_Howe"),
    ("CYYT", 47.6186, -52.7519, "America/St_Johns"),
    ("VNKT", 27.6966, 85.3591, "Asia/Kathmandu"),
    ("SAWH", -54.8433, -68.2958, "America/Argentina/Ushuaia"),
    ("PLCH", 1.9862, -157.35, "Pacific/Kiritimati"),
    ("BIKF", 63.985, -22.6056, "Atlantic/Reykjavik"),
]
# dates on which clocks change, and others at the edges
CHOSEN = [
    ("EGLL", "2026-03-29"), ("EGLL", "2026-10-25"), ("YLHI", "2026-04-05"), ("YLHI", "2026-10-04"),
    ("CYYT", "2026-03-08"), ("CYYT", "2026-11-01"), ("ENTC", "2026-05-17"), ("ENTC", "2026-11-26"),
    ("ENSB", "2026-03-29"), ("BIKF", "2026-06-21"), ("NZSP", "2026-03-20"), ("NZIR", "2026-09-27"),
]
SETTINGS = (
    "JPL ephemeris DE421; UT1 = UTC; polar motion zero; light time and aberration in; bending of light by the Sun out; observer "
    "at height 0 on WGS84; airless elevations; civil days by Python's zoneinfo; "
)
COMMON = {
    "source": "computed here from the named packages and DE421 (Folkner and others 2008, JPL IOM 343R-08-003)",
    "licence": "figures computed here, same licence as gloamline; skyfield and skyfield-data are MIT; DE421 is a JPL publication",
    "mark": "C",
}
PACKAGES = ["skyfield", "skyfield-data", "jplephem", "numpy", "scipy"]
SCRIPT = "place_days.py with sky.py"


def day_bounds(day, zone):
    """The UTC datetimes at which a civil date begins and ends."""
    zone = ZoneInfo(zone)
    local = [datetime(d.year, d.month, d.day, tzinfo=zone) for d in (day, day + timedelta(days=1))]
    return [moment.astimezone(utc(2026, 1, 1).tzinfo) for moment in local]


def sun_crossings(track, start, span_s, place, limit_deg):
    """(seconds after start, rising, rate in degrees an hour) of each crossing."""
    lat, lon = place

    def above(seconds):
        return track.elevation_deg(seconds, np.full_like(seconds, lat), np.full_like(seconds, lon)) - limit_deg

    seconds = np.arange(0.0, span_s + STEP_S, STEP_S)
    seconds[-1] = span_s
    value = np.concatenate([above(part) for part in np.array_split(seconds, 1 + len(seconds) // 200000)])
    found = []
    for i in np.nonzero((value[:-1] >= 0) != (value[1:] >= 0))[0]:
        at = brentq(lambda s: float(above(np.array([s]))[0]), seconds[i], seconds[i + 1], xtol=1e-5)
        rate = float(above(np.array([at + 1.0]))[0] - above(np.array([at - 1.0]))[0]) * 1800.0
        found.append((at, value[i] < 0, rate))
    return found, bool(value[0] >= 0)


def polar_rows():
    """First and last dates of each polar day and night that has a date in 2026 or 2027."""
    first, last = date(2025, 6, 1), date(2028, 8, 1)
    start, span_s = utc(2025, 5, 31), ((last - first).days + 3) * DAY_S
    tracks = [SunTrack(start + timedelta(days=d), 40 * DAY_S) for d in range(0, int(span_s / DAY_S), 40)]
    rows = []
    for code, lat, lon, zone in POLAR:
        moments, up_first = [], None
        for k, track in enumerate(tracks):
            found, up = sun_crossings(track, start, 40 * DAY_S, (lat, lon), LIMITS["horizon"])
            up_first = up if up_first is None else up_first
            moments += [(k * 40 * DAY_S + at, rising) for at, rising, _ in found]
        kinds = []
        for n in range((last - first).days):
            day = first + timedelta(days=n)
            begin, end = ((m - start) / timedelta(seconds=1) for m in day_bounds(day, zone))
            inside = [m for m in moments if begin < m[0] < end]
            before = [m for m in moments if m[0] <= begin]
            up = before[-1][1] if before else up_first
            kinds.append("" if inside else ("day" if up else "night"))
        begin = 0
        for n in range(1, len(kinds) + 1):
            if n == len(kinds) or kinds[n] != kinds[begin]:
                edges = [first + timedelta(days=begin), first + timedelta(days=n - 1)]
                whole = begin > 0 and n < len(kinds)
                if kinds[begin] and whole and edges[1].year >= 2026 and edges[0].year <= 2027:
                    rows.append([code, repr(lat), repr(lon), zone, kinds[begin], *map(str, edges)])
                begin = n
    return rows


def hour_angle_deg(instant, seconds, lon):
    """The apparent Sun's local hour angle, -180 to 180."""
    t = times(instant.replace(hour=0, minute=0, second=0, microsecond=0), _of_day(instant) + seconds)
    ra, _, _ = geocentric(t).radec("date")
    return (t.gast * 15.0 - ra.hours * 15.0 + lon + 180.0) % 360.0 - 180.0


def _of_day(instant):
    return instant.hour * 3600.0 + instant.minute * 60.0 + instant.second


def transit_seconds(begin, span_s, lon):
    """Seconds after begin of each zero of the hour angle."""
    grid = np.linspace(0.0, span_s, 60)
    angle = np.array([hour_angle_deg(begin, s, lon) for s in grid])
    found = np.nonzero((angle[:-1] < 0) & (angle[1:] >= 0) & (angle[1:] - angle[:-1] < 90))[0]
    return [brentq(lambda s: hour_angle_deg(begin, s, lon), grid[i], grid[i + 1], xtol=1e-5) for i in found]


def place_dates(dice, places, chosen, count):
    """Places with dates: the chosen first, the others at random in 2026 and 2027."""
    known = {place[0]: place for place in places}
    picked = [(known[code], date.fromisoformat(day)) for code, day in chosen]
    while len(picked) < count:
        picked.append((dice.choice(places), date(2026, 1, 1) + timedelta(days=dice.randrange(730))))
    return picked


def stamp(begin, seconds):
    """An instant to the millisecond."""
    return iso(begin + timedelta(milliseconds=round(seconds * 1000.0)), "milliseconds")


def event_rows(dice):
    """One row for each crossing and each transit of the days; days without any have one row without event."""
    rows = []
    for (code, lat, lon, zone), day in place_dates(dice, POLAR + OTHERS, CHOSEN, 60):
        begin, end = day_bounds(day, zone)
        span_s = (end - begin) / timedelta(seconds=1)
        track = SunTrack(begin, span_s)
        found = [("transit", "", at, 15.0) for at in transit_seconds(begin, span_s, lon)]
        for limit, deg in LIMITS.items():
            crossings, _ = sun_crossings(track, begin, span_s, (lat, lon), deg)
            found += [(limit, "rising" if up else "setting", at, rate) for at, up, rate in crossings]
        head = [code, repr(lat), repr(lon), zone, str(day), iso(begin, "seconds"), f"{span_s:.0f}"]
        for event, direction, at, rate in sorted(found, key=lambda row: row[2]):
            rows.append([*head, event, direction, stamp(begin, at), f"{rate:.6f}"])
    return rows


def moon_rows(dice):
    """One row for each moonrise and moonset; a day without has one with the state instead."""
    rows = []
    for (code, lat, lon, zone), day in place_dates(dice, POLAR[:-1] + OTHERS, [], 36):
        begin, end = day_bounds(day, zone)
        span_s = (end - begin) / timedelta(seconds=1)
        midnight, offset = begin.replace(hour=0, minute=0, second=0), _of_day(begin)
        observer = EARTH + wgs84.latlon(lat, lon, elevation_m=0.0)

        def above(seconds):
            t = times(midnight, np.asarray(seconds) + offset)
            moon = observer.at(t).observe(MOON).apparent(deflectors=())
            distance = EARTH.at(t).observe(MOON).distance().km
            return moon.altaz()[0].degrees + REFRACTION_DEG + np.degrees(np.arcsin(MOON_RADIUS_KM / distance))

        grid = np.append(np.arange(0.0, span_s, MOON_STEP_S), span_s)
        value = above(grid)
        head = [code, repr(lat), repr(lon), zone, str(day)]
        found = np.nonzero((value[:-1] >= 0) != (value[1:] >= 0))[0]
        for i in found:
            at = brentq(lambda s: float(above(s)), grid[i], grid[i + 1], xtol=1e-4)
            rate = float(above(at + 1.0) - above(at - 1.0)) * 1800.0
            rows.append([*head, "moonrise" if value[i] < 0 else "moonset", stamp(begin, at), f"{rate:.6f}"])
        if len(found) == 0:
            rows.append([*head, "up" if value[0] >= 0 else "down", "", ""])
    return rows


def certificate(columns, settings, rounding):
    """A certificate of one of the tables."""
    return {"script": SCRIPT, "packages": PACKAGES, "settings": SETTINGS + settings, "columns": columns, "rounding": rounding, **COMMON}


def main():
    """Make the tables."""
    dice = random.Random(SEED)
    folder = Path(__file__).parent
    place = "code (the place, by its aerodrome); lat_deg and lon_deg (degrees, north and east positive); zone (IANA); "
    rate = "rate_deg_per_h (of elevation less limit, degrees an hour; 15 for a transit's hour angle)"
    write_table(
        folder / "place_events.csv",
        certificate(
            place + "date (civil); begin (utc); seconds (the day's length); event (limit or transit); direction; utc; " + rate,
            "limits -50 minutes, -6, -12, -18 degrees, looked for every 20 s; transit: apparent geocentric hour angle 0",
            "utc to the millisecond",
        ),
        ["code", "lat_deg", "lon_deg", "zone", "date", "begin", "seconds", "event", "direction", "utc", "rate_deg_per_h"],
        event_rows(dice),
    )
    write_table(
        folder / "moon_events.csv",
        certificate(
            place + "date (civil); event (moonrise, moonset, or up or down all day); utc; " + rate,
            "upper limb at -34 minutes: the centre at -(34 minutes + geocentric semidiameter), topocentric; every 60 s",
            "utc to the millisecond",
        ),
        ["code", "lat_deg", "lon_deg", "zone", "date", "event", "utc", "rate_deg_per_h"],
        moon_rows(dice),
    )
    write_table(
        folder / "polar_dates.csv",
        certificate(
            place + "kind (day or night); first and last (civil dates)",
            "dates on which the Sun's centre is above, or below, -50 minutes at every 20 s; runs with a date in 2026 or 2027",
            "whole dates",
        ),
        ["code", "lat_deg", "lon_deg", "zone", "kind", "first", "last"],
        polar_rows(),
    )


if __name__ == "__main__":
    main()
