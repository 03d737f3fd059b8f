#!/usr/bin/python3
"""Makes the fonts the shell carries: subsets without hinting and layout tables, and one C++ source that holds their bytes.

usage: embed.py ROBOTO_REGULAR ROBOTO_MEDIUM DEJAVU_SANS FOLDER

Roboto (Apache License 2.0) draws text; what it lacks of the symbols below comes from DejaVu Sans. Both licences ask that
their notice travels with the font, so the name table keeps copyright, licence and its address.
"""

import os
import sys

from fontTools import subset
from fontTools.ttLib import TTFont

# Text of every language written in these letters: Latin with its European extensions, Greek, Cyrillic; and punctuation,
# currencies, raised and lowered digits, fractions. Zero-width and direction marks stay out: they shall show as unknown.
TEXT = """
0020-007E 00A0-017F 0192 01CD-01DC 0218-021B 02C6 02C7 02D8-02DD 0384-0386 0388-038A 038C 038E-03A1 03A3-03CE 0400-045F
0490-0493 049A 049B 04A2 04A3 04AE-04B3 04BA 04BB 04D8 04D9 04E8 04E9 1E80-1E85 1E9E 1EF2 1EF3
2002 2003 2007 2009 200A 2010-2015 2018-201E 2020-2022 2026 202F 2030 2032 2033 2039 203A 2044 2070 2074-208E
20A1 20A4 20A6 20A9-20AC 20B1 20B4 20B9 20BA 20BC 20BD 2103 2109 2113 2116 2122 2126 212B 2150-215E
2202 2206 220F 2211 2212 221A 221E 222B 2248 2260 2264 2265 2423 25CA FFFD
"""

# Arrows, keys, marks, shapes, mathematics; also the diameter sign of drawings.
SYMBOLS = """
2190-2199 21A9 21AA 21B5-21B7 21BA 21BB 21C4 21C5 21D0-21D4 21E4 21E5 21E7
2205 2208 2213 2215 2217 221D 2220 2225 2227-222A 2234 223C 2243 2245 2261 226A 226B 2282-2287 22A5 22C5
2300 2318 2325 232B 23CE 25A0 25A1 25AA 25AB 25B2-25C7 25CB 25CF 25D0-25D3 25E6
2605 2606 2610-2612 26A0 2713-2718 2794 27F5-27F8
"""


def characters(text):
    found = set()
    for word in text.split():
        first, _, last = word.partition("-")
        found.update(range(int(first, 16), int(last or first, 16) + 1))
    return found


def covered(path):
    return set(TTFont(path, lazy=True).getBestCmap())


def make_subset(source, target, wanted):
    """Writes a subset; the same input gives the same bytes. Fails where the source lacks a character."""
    missing = wanted - covered(source)
    if missing:
        sys.exit(f"{source} lacks " + " ".join(f"U+{code:04X}" for code in sorted(missing)))
    options = subset.Options()
    options.hinting = False
    options.layout_features = []
    options.drop_tables += ["GSUB", "GPOS", "GDEF", "kern", "MATH", "gasp", "FFTM"]
    options.name_IDs = [0, 1, 2, 13, 14]
    options.name_languages = [0x409]
    options.notdef_outline = True
    options.recalc_timestamp = False
    font = subset.load_font(source, options)
    subsetter = subset.Subsetter(options)
    subsetter.populate(unicodes=wanted)
    subsetter.subset(font)
    subset.save_font(font, target, options)


def ranges(codes):
    """[first, last] pairs of the characters."""
    pairs = []
    for code in sorted(codes):
        if pairs and pairs[-1][1] == code - 1:
            pairs[-1][1] = code
        else:
            pairs.append([code, code])
    return pairs


def source_text(fonts):
    lines = ['#include "shell/fonts/embedded.hpp"', "", "// Made by shell/fonts/embed.py.", "namespace steelyard {", "namespace {"]
    for name, path, codes in fonts:
        with open(path, "rb") as file:
            data = file.read()
        lines.append(f"constexpr unsigned char {name}_bytes[] = {{")
        lines += [",".join(map(str, data[at : at + 32])) + "," for at in range(0, len(data), 32)]
        lines.append("};")
        pairs = ",".join(f"0x{first:X},0x{last:X}" for first, last in ranges(codes))
        lines.append(f"constexpr ImWchar {name}_ranges[] = {{{pairs},0}};")
    lines.append("}")
    for name, _, _ in fonts:
        lines.append(f"const EmbeddedFont {name}{{{name}_bytes, {name}_ranges}};")
    lines.append("}")
    return "\n".join(lines) + "\n"


def main():
    regular, medium, symbols, folder = sys.argv[1:]
    os.makedirs(folder, exist_ok=True)
    text = characters(TEXT)
    extra = characters(SYMBOLS)
    assert not text & extra
    fonts = [
        ("text_regular", regular, text),
        ("text_medium", medium, text),
        ("symbols", symbols, extra),
    ]
    made = []
    for name, source, codes in fonts:
        target = os.path.join(folder, name + ".ttf")
        make_subset(source, target, codes)
        made.append((name, target, codes))
    with open(os.path.join(folder, "embedded.cpp"), "w", encoding="ascii") as file:
        file.write(source_text(made))


if __name__ == "__main__":
    main()
