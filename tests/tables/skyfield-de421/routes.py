"""The flights to fly: where, when, how fast and why each is in the table.

It knows neither geodesics nor the Sun; take-off times that need a search are only bounded here.
"""

from dataclasses import dataclass

from sky import utc


@dataclass(frozen=True)
class Plan:
    """A flight: one ground speed in knots for each leg, flown at a steady pace."""

    name: str
    reason: str
    takeoff: object
    points: list
    knots: list


@dataclass(frozen=True)
class Graze:
    """A flight whose take-off is sought so that a lowest or highest Sun stands margin_deg from a limit."""

    plan: Plan
    limit: str
    kind: str
    margin_deg: float


def _parallel(lat_deg, first_lon_deg, last_lon_deg, step_deg):
    """Points along a parallel, longitudes brought into the half-open turn from -180."""
    count = round(abs(last_lon_deg - first_lon_deg) / abs(step_deg))
    lons = [first_lon_deg + step_deg * index for index in range(count + 1)]
    return [(lat_deg, (lon + 180.0) % 360.0 - 180.0) for lon in lons]


JFK, HKG, SIN = (40.64, -73.78), (22.31, 113.91), (1.36, 103.99)
KEF, ANC, NRT, LAX = (63.99, -22.61), (61.17, -149.99), (35.76, 140.39), (33.94, -118.41)
LHR, AMS, YVR, HEL = (51.47, -0.45), (52.31, 4.76), (49.19, -123.18), (60.32, 24.96)
TOS, LYR, CHC, NZIR = (69.68, 18.92), (78.25, 15.47), (-43.49, 172.53), (-77.85, 166.47)
MAD, WLG, SYD, SCL, JNB, SEA = (40.47, -3.56), (-41.33, 174.81), (-33.95, 151.18), (-33.39, -70.79), (-26.14, 28.25), (47.45, -122.31)

PLANS = [
    Plan("pole-north-march", "exactly over the North Pole at the equinox", utc(2025, 3, 20, 4, 0), [(40.0, -73.0), (30.0, 107.0)], [485]),
    Plan("pole-north-december", "exactly over the North Pole in polar night", utc(2033, 12, 21, 15, 40), [(55.0, -100.0), (35.0, 80.0)], [470]),
    Plan("pole-north-june", "exactly over the North Pole in June: from one night over the midnight sun into the next", utc(1999, 6, 21, 22, 15), [(48.0, 11.0), (21.0, -169.0)], [480]),
    Plan("pole-south-june", "exactly over the South Pole in polar night", utc(2031, 6, 21, 2, 0), [(-45.0, 170.0), (-40.0, -10.0)], [460]),
    Plan("pole-south-september", "exactly over the South Pole at the equinox", utc(2018, 9, 23, 7, 40), [(-34.0, -58.5), (-32.0, 121.5)], [490]),
    Plan("near-pole-jfk-hkg", "transpolar past the North Pole in December", utc(2024, 12, 15, 15, 20), [JFK, HKG], [478]),
    Plan("near-pole-hkg-jfk", "transpolar back past the North Pole in February", utc(2027, 2, 18, 10, 5), [HKG, JFK], [492]),
    Plan("near-pole-south", "past the South Pole from Sydney to Buenos Aires", utc(2029, 4, 2, 1, 30), [SYD, (-34.82, -58.54)], [470]),
    Plan("west-55-january", "westbound from 55 N in January: a short night only", utc(1988, 1, 14, 14, 40), [(55.0, 12.0), (55.0, -98.0)], [450]),
    Plan("west-60-march", "westbound from 60 N at 480 kt in March: dusk then the Sun rises in the west", utc(2012, 3, 12, 16, 30), [HEL, (58.3, -134.6)], [480]),
    Plan("west-60-september", "westbound from 60 N in September: sunrise in the west", utc(2021, 9, 25, 16, 40), [(60.2, 11.1), ANC], [495]),
    Plan("west-64-november", "westbound from Iceland in November: sunset; civil night; then the Sun rises in the west", utc(2036, 11, 6, 16, 50), [KEF, ANC], [500]),
    Plan("west-64-february", "westbound from Iceland in February", utc(1979, 2, 9, 17, 25), [KEF, ANC], [470]),
    Plan("west-70-october", "westbound at 70 N in October; faster than the Sun", utc(2043, 10, 18, 14, 45), [TOS, (70.2, -148.5)], [465]),
    Plan("west-70-april", "westbound at 70 N in April", utc(1993, 4, 6, 1, 40), [TOS, (70.2, -148.5)], [455]),
    Plan("west-75-march", "westbound at 75 N in March: a few minutes below the horizon limit at noon", utc(2006, 3, 3, 12, 38), [(75.0, 60.0), (75.0, -40.0)], [450]),
    Plan("west-80-september", "westbound at 80 N in late September", utc(2023, 9, 28, 5, 10), [(80.0, 20.0), (80.0, -75.0)], [455]),
    Plan("west-65-july", "westbound from 65 N in July: takes off just before sunrise and crosses high latitudes by day", utc(2017, 7, 18, 20, 30), [(65.0, 25.0), (64.0, -147.0)], [480]),
    Plan("midnight-sun", "no night at all", utc(2026, 6, 24, 21, 30), [TOS, LYR], [420]),
    Plan("polar-night", "no Sun at all", utc(2026, 12, 20, 8, 45), [TOS, LYR], [420]),
    Plan("antarctic-october", "Christchurch to McMurdo in October", utc(2014, 10, 5, 5, 50), [CHC, NZIR], [430]),
    Plan("antarctic-august", "McMurdo to Christchurch in late August", utc(2028, 8, 24, 3, 20), [NZIR, CHC], [440]),
    Plan("antarctic-january", "Punta Arenas to the interior in January", utc(2004, 1, 9, 7, 10), [(-53.0, -70.85), (-79.77, -83.32)], [410]),
    Plan("date-line-east", "eastbound over the antimeridian by night", utc(2026, 5, 2, 8, 10), [NRT, LAX], [500]),
    Plan("date-line-west", "westbound over the antimeridian by day", utc(2026, 5, 3, 19, 30), [LAX, NRT], [460]),
    Plan("date-line-from-180", "takes off on 180 E at dusk", utc(1996, 8, 11, 5, 40), [(-17.0, 180.0), (-14.3, -170.7)], [400]),
    Plan("date-line-to-minus-180", "lands on 180 W at dawn", utc(2049, 8, 11, 15, 10), [(-27.5, 153.1), (-18.0, -180.0)], [445]),
    Plan("meridian-south", "due south along a meridian through dusk", utc(2002, 10, 30, 14, 0), [(66.0, 20.0), (-34.0, 20.0)], [480]),
    Plan("meridian-180", "due north along the antimeridian", utc(2035, 2, 1, 15, 0), [(-40.0, 180.0), (52.0, 180.0)], [470]),
    Plan("equator-east", "due east along the equator", utc(2020, 3, 20, 5, 0), [(0.0, 10.0), (0.0, 100.0)], [510]),
    Plan("equator-west", "due west along the equator over the antimeridian", utc(2009, 9, 22, 4, 0), [(0.0, -160.0), (0.0, 115.0)], [465]),
    Plan("near-antipodal", "19900 km between near-antipodal points", utc(2030, 11, 15, 3, 0), [MAD, WLG], [560]),
    Plan("antipodal-skirt", "points 0.3 degree off antipodal; where the course is hardest to find", utc(2019, 5, 5, 12, 0), [(10.0, 20.0), (-9.8, -160.2)], [555]),
    Plan("hop-sunset", "25 minutes eastward through sunset", utc(2022, 12, 1, 15, 40), [LHR, AMS], [480]),
    Plan("hop-noon", "a short hop at noon that meets nothing", utc(1974, 6, 1, 11, 30), [LHR, AMS], [470]),
    Plan("ultra-long-jfk-sin", "19 hours from New York to Singapore", utc(2025, 10, 9, 2, 50), [JFK, SIN], [436]),
    Plan("ultra-long-lhr-syd", "19 hours from London to Sydney", utc(2027, 11, 20, 12, 0), [LHR, SYD], [483]),
    Plan("pacific-south", "Santiago to Sydney over the far south in June", utc(1985, 6, 10, 18, 25), [SCL, SYD], [455]),
    Plan("indian-ocean", "Johannesburg to Sydney eastbound by night", utc(2050, 6, 30, 16, 30), [JNB, SYD], [515]),
    Plan("seattle-london", "eastbound overnight in June: dusk and dawn without darkness", utc(2026, 6, 12, 2, 0), [SEA, LHR], [505]),
    Plan("legs-atlantic", "oceanic track with a speed of its own on each leg", utc(2024, 1, 28, 22, 30),
         [JFK, (46.0, -60.0), (50.0, -50.0), (52.0, -40.0), (53.0, -30.0), (53.0, -20.0), (52.0, -10.0), LHR], [470, 530, 555, 560, 548, 520, 440]),
    Plan("legs-pole", "the North Pole as a waypoint; turning there from one meridian to another", utc(2026, 9, 22, 6, 0),
         [(60.0, -150.0), (90.0, 0.0), (50.0, 40.0)], [450, 500]),
    Plan("legs-pole-to-pole", "from one pole to the other along 30 E", utc(2026, 3, 22, 0, 0),
         [(90.0, 30.0), (0.0, 30.0), (-90.0, 30.0)], [590, 560]),
    Plan("legs-parallel-63", "due west along 63 N at nearly the pace of the Sun; which stands still on the horizon limit", utc(2026, 11, 1, 16, 29, 24),
         _parallel(63.0, -10.0, -110.0, -5.0), [411, 412, 410, 411, 413, 411, 410, 412, 411, 410, 413, 412, 410, 411, 413, 410, 412, 411, 410, 412]),
    Plan("legs-parallel-72", "due west along 72 N; now faster and now slower than the Sun", utc(2032, 2, 20, 14, 50),
         _parallel(72.0, 30.0, -130.0, -20.0), [450, 240, 500, 230, 480, 250, 510, 300]),
    Plan("legs-date-line", "zigzag over the antimeridian", utc(2040, 8, 3, 4, 0),
         [(-9.4, 160.0), (-12.0, 179.0), (-10.0, -178.0), (-14.0, 178.0), (-8.5, 179.2), (-13.8, -172.0)], [400, 330, 360, 290, 420]),
    Plan("legs-turn-back", "out and back: an air turn-back at dusk", utc(2013, 1, 3, 7, 10), [(-36.85, 174.8), (-30.0, -175.0), (-36.85, 174.8)], [440, 490]),
    Plan("legs-pole-circle", "round the North Pole at 88.5 N about the equinox; the Sun about the horizon", utc(2027, 3, 18, 3, 0),
         [(78.25, 15.47)] + _parallel(88.5, 15.0, 375.0, 45.0) + [(78.25, 15.47)], [430, 300, 320, 340, 360, 340, 320, 300, 310, 450]),
    Plan("legs-antarctic", "round trip over the South Pole from McMurdo at the end of summer", utc(2011, 3, 19, 22, 20),
         [NZIR, (-85.0, 170.0), (-90.0, 0.0), (-82.0, -60.0), (-78.0, -140.0), NZIR], [260, 250, 280, 300, 290]),
    Plan("legs-equator", "over the equator and back; slow and fast", utc(1978, 12, 22, 8, 0),
         [(12.0, 100.0), (-2.0, 104.0), (3.0, 90.0), (-6.0, 72.0), (4.2, 73.5)], [380, 520, 300, 450]),
    Plan("legs-survey", "survey lines at 250 kt north of Iceland in May: set; up and set again between turns", utc(2026, 5, 16, 21, 40),
         [(66.0, -18.0), (68.5, -18.0), (68.5, -20.0), (66.0, -20.0), (66.0, -22.0), (68.5, -22.0), (66.0, -18.0)], [260, 250, 240, 250, 255, 300]),
]

GRAZES = [
    Graze(Plan("graze-horizon-clears", "the lowest Sun stays just above the horizon limit", utc(2026, 4, 10, 12, 0), [TOS, (70.2, -148.5)], [470]), "horizon", "lowest", 0.004),
    Graze(Plan("graze-horizon-dips", "the lowest Sun dips just below the horizon limit", utc(2021, 9, 3, 12, 0), [(60.2, 11.1), ANC], [480]), "horizon", "lowest", -0.003),
    Graze(Plan("graze-horizon-peeps", "the highest Sun peeps just above the horizon limit", utc(2034, 9, 25, 12, 0), [(60.2, 11.1), ANC], [495]), "horizon", "highest", 0.006),
    Graze(Plan("graze-horizon-fails", "the highest Sun stays just below the horizon limit", utc(1995, 3, 12, 12, 0), [HEL, (58.3, -134.6)], [480]), "horizon", "highest", -0.0025),
    Graze(Plan("graze-civil-clears", "the lowest Sun stays just above the civil limit", utc(2028, 5, 9, 12, 0), [SEA, LHR], [500]), "civil", "lowest", 0.002),
    Graze(Plan("graze-civil-dips", "the lowest Sun dips just below the civil limit", utc(2016, 10, 2, 12, 0), [KEF, ANC], [490]), "civil", "lowest", -0.005),
    Graze(Plan("graze-nautical-clears", "the lowest Sun stays just above the nautical limit", utc(2041, 5, 20, 12, 0), [YVR, LHR], [510]), "nautical", "lowest", 0.0015),
    Graze(Plan("graze-nautical-peeps", "the highest Sun peeps just above the nautical limit", utc(2026, 7, 1, 12, 0), [CHC, (-77.0, 168.0), (-60.0, -150.0)], [430, 470]), "nautical", "highest", 0.007),
    Graze(Plan("graze-astronomical-dips", "the lowest Sun dips just below the astronomical limit", utc(2025, 7, 25, 12, 0), [JFK, AMS], [505]), "astronomical", "lowest", -0.008),
    Graze(Plan("graze-astronomical-clears", "the lowest Sun stays just above the astronomical limit", utc(1983, 11, 28, 12, 0), [(-41.33, 174.81), SCL], [495]), "astronomical", "lowest", 0.0035),
]
