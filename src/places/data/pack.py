"""Packs settled aerodromes into the fixed records that table.rs reads, and the zones into a Rust table.

Does not judge what it packs. All numbers are little-endian; the layout is written once more in table.rs.
"""

import struct

# icao[4] iata[3] country[2], lengths of name and city, number of runway ends,
# latitude and longitude (1e-6 degree), where the name begins, first runway end, elevation (ft), zone
AERODROME = struct.Struct("<4s3s2sBBBiiIHhH")
# designator[4], latitude, longitude (1e-6 degree), true bearing (0.01 degree), displaced threshold (ft)
RUNWAY_END = struct.Struct("<4siiHH")
IATA = struct.Struct("<3sH")

ZONES_HEAD = '''//! The time zones that aerodromes keep, in the order the aerodrome records count them.
//!
//! Made by `data/make_aerodromes.py`; knows nothing of where they apply.

use chrono_tz::Tz;

/// Every zone of the aerodrome table.
pub(super) static ZONES: [Tz; {count}] = [
'''


def micro(deg):
    """Degrees as a count of millionths."""
    return round(deg * 1e6)


def zone_variant(name):
    """The name that chrono-tz gives a zone in its enumeration."""
    return name.replace("/", "__").replace("-", "")


def zones_rs(zones):
    """The Rust table of zones: a name that chrono-tz does not have fails to compile."""
    lines = "".join(f"    Tz::{zone_variant(zone)},\n" for zone in zones)
    return ZONES_HEAD.format(count=len(zones)) + lines + "];\n"


def runway_end(end):
    """One runway end's record."""
    name, (lat, lon), bearing, displaced = end
    return RUNWAY_END.pack(name.encode(), micro(lat), micro(lon), round(bearing * 100) % 36000, displaced)


def tables(fields):
    """All tables as a dictionary of file name to bytes; `fields` are sorted by ICAO code, those without one first."""
    zones = sorted({field["zone"] for field in fields})
    zone_index = {zone: i for i, zone in enumerate(zones)}
    records, names, ends, codes = bytearray(), bytearray(), bytearray(), {}
    for index, field in enumerate(fields):
        name, city = field["name"].encode(), field["city"].encode()
        lat, lon = field["at"]
        records += AERODROME.pack(
            field["icao"].encode(), field["iata"].encode(), field["country"].encode(),
            len(name), len(city), len(field["ends"]), micro(lat), micro(lon),
            len(names), len(ends) // RUNWAY_END.size, round(field["feet"]), zone_index[field["zone"]],
        )
        names += name + b"\t" + city + b"\n"
        ends += b"".join(runway_end(end) for end in field["ends"])
        if field["iata"]:
            codes.setdefault(field["iata"], index)
    index = b"".join(IATA.pack(code.encode(), codes[code]) for code in sorted(codes))
    return {
        "data/aerodromes.bin": bytes(records),
        "data/iata.bin": index,
        "data/names.txt": bytes(names),
        "data/runway_ends.bin": bytes(ends),
        "zone.rs": zones_rs(zones).encode(),
    }
