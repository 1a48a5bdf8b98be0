"""Write horizon.csv: the dip, the refraction and the Sun at the horizon, by rays traced in plane coordinates.

It does not know gloamline, whose numerics differ on purpose: here the ray equation is integrated step by step in Cartesian
coordinates, the pressure comes from integrating the hydrostatic equation, and the index from the 1994 revision of Edlen's formula.
It knows no weather, no water vapour and no ellipsoid.
"""

from importlib.metadata import version
from math import atan2, degrees, hypot, pi
from pathlib import Path

import numpy as np
from scipy.integrate import solve_ivp
from scipy.interpolate import CubicHermiteSpline

FOOT_M = 0.3048
MEAN_RADIUS_M = 6371008.8
MICROMETRES = 0.574
SEMIDIAMETER_DEG = 959.63 / 3600.0
TOP_M = 120000.0
# geopotential km of each break of the temperature and kelvin there; constant above the last
BREAKS_KM = np.array([-5.0, 0.0, 11.0, 20.0, 32.0, 47.0, 51.0, 71.0, 80.0])
KELVIN = np.array([320.65, 288.15, 216.65, 216.65, 228.65, 270.65, 270.65, 214.65, 196.65])
GRAVITY, GAS, GEOPOTENTIAL_RADIUS_M = 9.80665, 287.05287, 6356766.0

SEA_FT = [10, 30, 100, 300] + list(range(0, 60001, 1000))
RAISED_FT = [5000, 10000, 15000, 20000, 25000, 30000]
ABOVE_FT = [30, 500, 2000, 5000, 10000, 15000, 25000]
VARIED_FT = [0] + list(range(10000, 43001, 1000))
VARIED = [(15.0, MEAN_RADIUS_M), (-15.0, MEAN_RADIUS_M), (0.0, 6335000.0), (0.0, 6371000.0), (0.0, 6400000.0)]


class Air:
    """A dry atmosphere of the standard's temperatures, all shifted by one offset."""

    def __init__(self, offset_k):
        self.offset_k = offset_k
        self.breaks_m = [GEOPOTENTIAL_RADIUS_M * km / (GEOPOTENTIAL_RADIUS_M / 1e3 - km) for km in BREAKS_KM]
        heights = np.unique(np.concatenate([np.arange(-2000.0, TOP_M + 50.0, 50.0), [b for b in self.breaks_m if b > -2000.0]]))
        self.first = int(np.searchsorted(heights, 0.0))
        assert heights[self.first] == 0.0
        self.log_pressure = self._integrated(heights)

    def kelvin(self, height_m):
        """Temperature at a geometric height."""
        geopotential_km = GEOPOTENTIAL_RADIUS_M * height_m / (GEOPOTENTIAL_RADIUS_M + height_m) / 1e3
        return np.interp(geopotential_km, BREAKS_KM, KELVIN) + self.offset_k

    def _slope(self, height_m):
        """d(ln p)/dh: gravity falls with the square of the distance."""
        shrink = GEOPOTENTIAL_RADIUS_M / (GEOPOTENTIAL_RADIUS_M + height_m)
        return -GRAVITY * shrink**2 / (GAS * self.kelvin(height_m))

    def _integrated(self, heights):
        """Simpson's rule from sea level up and down, then a spline with the known slopes."""
        mids = (heights[1:] + heights[:-1]) / 2.0
        steps = np.diff(heights) / 6.0 * (self._slope(heights[1:]) + 4.0 * self._slope(mids) + self._slope(heights[:-1]))
        sums = np.concatenate([[0.0], np.cumsum(steps)])
        return CubicHermiteSpline(heights, np.log(101325.0) + sums - sums[self.first], self._slope(heights))

    def refractivity(self, height_m):
        """n - 1 of dry air: Birch and Downs 1994 (Metrologia 31:315), Edlen's dispersion with new constants."""
        sigma2 = 1.0 / MICROMETRES**2
        standard = 1e-8 * (8342.54 + 2406147.0 / (130.0 - sigma2) + 15998.0 / (38.9 - sigma2))
        celsius = self.kelvin(height_m) - 273.15
        pascal = np.exp(self.log_pressure(height_m))
        return pascal * standard / 96095.43 * (1.0 + 1e-8 * (0.601 - 0.00972 * celsius) * pascal) / (1.0 + 0.003661 * celsius)


def traced(air, radius_m, graze_m, stops_m):
    """The ray level at graze_m, followed up: (angle to the horizontal, angle turned) at each height of stops_m."""
    ends = sorted({*stops_m, *(b for b in air.breaks_m if graze_m < b < TOP_M), TOP_M})
    # x along, y up, and n times the direction; metres
    state = np.array([0.0, radius_m + graze_m, 1.0 + float(air.refractivity(graze_m)), 0.0])
    seen = {}
    for end_m in ends:
        if end_m > graze_m:
            state = leg(air, radius_m, state, end_m)
        x, y, p, q = state
        turned = -atan2(q, p)
        seen[end_m] = (pi / 2.0 - angle_between((x, y), (p, q)), turned)
    return seen


def angle_between(a, b):
    """The angle between two plane vectors."""
    return abs(atan2(a[0] * b[1] - a[1] * b[0], a[0] * b[0] + a[1] * b[1]))


def leg(air, radius_m, state, end_m):
    """Follow the ray equation d(n t)/ds = grad n until a height is reached."""

    def rates(_, state):
        x, y, p, q = state
        r = hypot(x, y)
        height = r - radius_m
        n = 1.0 + float(air.refractivity(height))
        pull = float(air.refractivity(height + 0.5) - air.refractivity(height - 0.5))
        return [p / n, q / n, pull * x / r, pull * y / r]

    def reached(_, state):
        return hypot(state[0], state[1]) - radius_m - end_m

    reached.terminal, reached.direction = True, 1.0
    got = solve_ivp(rates, (0.0, 3e6), state, method="DOP853", rtol=1e-12, atol=1e-12, max_step=5000.0, events=reached)
    assert got.status == 1, "the ray does not reach the height"
    return got.y_events[0][0]


def rows_for(air, radius_m, graze_ft, heights_ft):
    """Lines for observers at or above a horizon's height, all on one ray."""
    graze_m = graze_ft * FOOT_M
    heights_m = [ft * FOOT_M for ft in heights_ft]
    seen = traced(air, radius_m, graze_m, heights_m)
    whole = seen[TOP_M][1]
    for ft, height_m in zip(heights_ft, heights_m):
        slant, turned = seen[height_m] if height_m > graze_m else (0.0, 0.0)
        dip, refraction = degrees(slant), degrees(whole + turned)
        yield [
            str(ft), str(graze_ft), f"{air.offset_k:.0f}", f"{radius_m / 1e3:.4f}", f"{dip:.6f}", f"{refraction:.6f}",
            f"{-(dip + refraction + SEMIDIAMETER_DEG):.6f}",
        ]


def below_rows(air, horizon_ft):
    """Lines for observers below a raised horizon, to whom it is level."""
    for ft in (0, horizon_ft // 2):
        row = next(rows_for(air, MEAN_RADIUS_M, ft, [ft]))
        yield [row[0], str(horizon_ft), *row[2:]]


def table():
    """Every line."""
    standard = Air(0.0)
    rows = list(rows_for(standard, MEAN_RADIUS_M, 0, sorted(SEA_FT)))
    for horizon_ft in RAISED_FT:
        rows += below_rows(standard, horizon_ft)
        heights = [horizon_ft] + [horizon_ft + above for above in ABOVE_FT]
        rows += rows_for(standard, MEAN_RADIUS_M, horizon_ft, heights)
    for offset_k, radius_m in VARIED:
        air = standard if offset_k == 0.0 else Air(offset_k)
        rows += rows_for(air, radius_m, 0, VARIED_FT)
    return rows


CERTIFICATE = [
    f"made by: trace.py with numpy {version('numpy')}, scipy {version('scipy')}",
    "made on: 2026-12-01",
    "settings: ray equation in plane Cartesian coordinates, DOP853, rtol 1e-12, steps of at most 5 km, stopped at each break of the "
    "temperature, followed to 120 km; round Earth; temperatures of the ICAO standard atmosphere by geopotential height (constant above "
    "80 km), all shifted by offset_k, sea-level pressure 1013.25 hPa; dry air, Birch and Downs 1994, at 0.574 micrometre; semidiameter 959.63 arcsec",
    "columns: height_ft (observer, feet of 0.3048 m, geometric); horizon_ft (height of what the ray grazes; an observer below it sees a level "
    "horizon); offset_k (kelvin); radius_km; dip_deg (apparent, below level); refraction_deg (whole turn of the grazing ray from space to the "
    "observer); limit_deg (geometric elevation of the Sun's centre, upper limb on the horizon)",
    "rounding: 6 decimals of a degree; the index's gradient by central difference of 1 m, which is good to 1e-7 of it",
    "source: computed here; ICAO Doc 7488/3 (1993); Birch and Downs 1994, Metrologia 31:315",
    "licence: figures computed here, same licence as gloamline",
    "mark: C",
]
HEADER = "height_ft,horizon_ft,offset_k,radius_km,dip_deg,refraction_deg,limit_deg"


def main():
    """Make the table."""
    lines = [f"# {line}" for line in CERTIFICATE] + [HEADER] + [",".join(row) for row in table()]
    Path(__file__).with_name("horizon.csv").write_text("\n".join(lines) + "\n", encoding="ascii")


if __name__ == "__main__":
    main()
