"""Cuts the fallback faces out of DejaVu Sans: the letters and signs that B612 lacks, in its units.

Knows nothing of which character is drawn with which face. Usage, with fonttools 4:
python3 subset.py DejaVuSans.ttf Fallback-Regular.ttf
"""

import sys

from fontTools import subset
from fontTools.ttLib import TTFont
from fontTools.ttLib.scaleUpem import scale_upem

UNITS_PER_EM = 2000  # those of B612, so that one drawing scale serves all faces

RANGES = [
    (0x20, 0x7E), (0xA0, 0x24F),  # Latin, with the extensions A and B
    (0x300, 0x36F),  # combining marks, already placed over the letter before them
    (0x370, 0x3FF), (0x400, 0x4FF),  # Greek, Cyrillic
    (0x1E00, 0x1EFF),  # Latin of Vietnam and Wales
    (0x2010, 0x2027), (0x2030, 0x203A), (0x20A0, 0x20BF), (0x2070, 0x208E),
    (0x2190, 0x2199), (0x21D0, 0x21D5),  # arrows
    (0x2122, 0x2122), (0x2200, 0x2265),
    (0x25A0, 0x25CF),  # squares, triangles, diamonds, circles
    (0x2600, 0x2606), (0x263C, 0x263E), (0x2708, 0x2708), (0x2713, 0x2717),
    (0xFFFD, 0xFFFD),
]


def cut(source: str, target: str) -> None:
    """Writes the subset of one face."""
    options = subset.Options()
    options.hinting = False
    options.layout_features = ["kern"]
    options.drop_tables += ["kern", "FFTM", "GDEF", "GSUB", "MATH", "DSIG"]
    options.name_IDs = [0, 1, 2, 4, 5, 6, 13]
    options.notdef_outline = True
    options.glyph_names = False
    options.recalc_timestamp = False  # the same input gives the same bytes
    font = TTFont(source, recalcTimestamp=False)
    cutter = subset.Subsetter(options)
    cutter.populate(unicodes=[c for low, high in RANGES for c in range(low, high + 1)])
    cutter.subset(font)
    scale_upem(font, UNITS_PER_EM)
    rename(font)
    font.save(target)


def rename(font: TTFont) -> None:
    """Gives the changed face a name of its own, as its licence wishes."""
    for record in font["name"].names:
        if record.nameID in (1, 4, 6):
            record.string = str(record).replace("DejaVu Sans", "Gloamline Fallback").replace(
                "DejaVuSans", "GloamlineFallback")


if __name__ == "__main__":
    cut(sys.argv[1], sys.argv[2])
