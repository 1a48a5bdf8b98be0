"""Write sample.csv: published WGS84 geodesics, copied digit by digit from the tests of the package geographiclib.

It does not compute any geodesic for the table; it only refuses to write one that geographiclib and PROJ contradict.
"""

import re
from importlib.metadata import version
from pathlib import Path

import geographiclib.test
from geographiclib.geodesic import Geodesic
from pyproj import Geod

TESTS = Path(list(geographiclib.test.__path__)[0]) / "test_geodesic.py"
NUMBER = r"-?\d+(?:\.\d*)?"
# name, lat1, lon1, lat2, lon2, azi1, azi2, s12 as printed in the tests; an empty string where the test says nothing
SOLVED = [
    ("GeodSolve0", "40.6", "-73.8", "49.01666667", "2.55", "53.47022", "111.59367", "5853226"),
    ("GeodSolve4", "36.493349428792", "0", "36.49334942879201", "0.0000008", "", "", "0.072"),
    ("GeodSolve6", "88.202499451857", "0", "-88.202499451857", "179.981022032992859592", "", "", "20003898.214"),
    ("GeodSolve6", "89.262080389218", "0", "-89.262080389218", "179.992207982775375662", "", "", "20003925.854"),
    ("GeodSolve6", "89.333123580033", "0", "-89.333123580032997687", "179.99295812360148422", "", "", "20003926.881"),
    ("GeodSolve9", "56.320923501171", "0", "-56.320923501171", "179.664747671772880215", "", "", "19993558.287"),
    ("GeodSolve10", "52.784459512564", "0", "-52.784459512563990912", "179.634407464943777557", "", "", "19991596.095"),
    ("GeodSolve11", "48.522876735459", "0", "-48.52287673545898293", "179.599720456223079643", "", "", "19989144.774"),
    ("GeodSolve33", "0", "0", "0", "179", "90.00000", "90.00000", "19926189"),
    ("GeodSolve33", "0", "0", "0", "179.5", "55.96650", "124.03350", "19980862"),
    ("GeodSolve33", "0", "0", "1", "180", "0.00000", "180.00000", "19893357"),
]
# line 400001 of the full set, as quoted by geographiclib-rs 0.2.7 in a comment of its source
QUOTED = ("GeodTest line 400001", "4.199535552987", "0", "-4.199535552987", "179.398106343454992238", "90", "90", "19970505.608097404994")
COLUMNS = ["lat1_deg", "lon1_deg", "azi1_deg", "lat2_deg", "lon2_deg", "azi2_deg", "s12_m", "s12_half_unit_m", "origin"]


def testcases(text):
    """The test cases in full precision: as SOLVED, digits untouched."""
    block = text[text.index("testcases = [") : text.index("def test_inverse")]
    rows = re.findall(r"\[((?:\s*" + NUMBER + r",?){12})\]", block)
    cells = [re.findall(NUMBER, row) for row in rows]
    return [("testcases", c[0], c[1], c[3], c[4], c[2], c[5], c[6]) for c in cells]


def check_printed(text, row):
    """Stop unless each number of a row stands in the test of that name."""
    body = text[text.index(f"def test_{row[0]}(") :]
    body = body[: body.index("\n  def ", 5)]
    assert all(cell in body for cell in row[1:]), row


def half_unit(row):
    """Half a unit of the last digit of s12, at least a hundredth of a micrometre."""
    digits = len(row[7].partition(".")[2])
    return max(0.5 * 10.0**-digits, 1e-8)


def check_computed(row):
    """Stop if geographiclib or PROJ finds another distance."""
    lat1, lon1, lat2, lon2 = (float(cell) for cell in row[1:5])
    s12, allowed = float(row[7]), half_unit(row) + 1e-8
    assert abs(Geodesic.WGS84.Inverse(lat1, lon1, lat2, lon2)["s12"] - s12) < allowed, row
    assert abs(Geod(ellps="WGS84").inv(lon1, lat1, lon2, lat2)[2] - s12) < allowed, row


def main():
    """Make the table."""
    text = TESTS.read_text(encoding="utf-8")
    full = testcases(text)
    assert len(full) == 20
    for row in SOLVED:
        check_printed(text, row)
    rows = [*full, QUOTED, *SOLVED]
    for row in rows:
        check_computed(row)
    head = [
        f"# made by: extract.py from geographiclib {version('geographiclib')} and geographiclib-rs 0.2.7, checked with pyproj {version('pyproj')}",
        "# made on: 2026-12-01",
        "# settings: WGS84 ellipsoid; nothing computed here but the check; rows that ask for another ellipsoid left out",
        "# columns: lat1_deg lon1_deg lat2_deg lon2_deg (degrees, exact); azi1_deg azi2_deg (degrees, forward azimuths from north, empty "
        "where the source gives none); s12_m (metres); s12_half_unit_m (metres, half a unit of the last printed digit, at least 1e-8); "
        "origin (name of the test, or line of the test set)",
        "# rounding: digits as printed in the source; testcases are good to about 1e-13 degree and 1e-8 m",
        "# source: C. F. F. Karney, the author of the method (J. Geodesy 87, 2013, 43-55), tests of his Python package; these are NOT rows of "
        "his published set GeodTest (doi 10.5281/zenodo.32156), which no package at hand carries: only 'GeodTest line 400001' is, and that as "
        "quoted in a comment of geographiclib-rs",
        "# licence: MIT (geographiclib, copyright Charles Karney; geographiclib-rs)",
        "# mark: R1 for rows of the package's tests (read in the package itself); R2 for the quoted line",
    ]
    lines = [",".join([r[1], r[2], r[5], r[3], r[4], r[6], r[7], f"{half_unit(r):.1e}", r[0]]) for r in rows]
    out = Path(__file__).with_name("sample.csv")
    out.write_text("\n".join([*head, ",".join(COLUMNS), *lines]) + "\n", encoding="ascii")


if __name__ == "__main__":
    main()
