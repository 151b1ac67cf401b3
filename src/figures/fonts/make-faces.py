#!/usr/bin/env python3
"""Makes the three faces of the plates, and the table that layout measures text with.

Run once, by hand, when a face changes; its output is committed. In an empty folder:

    npm install inter-ui@4.1.1 source-serif@4.5.1
    apt-get install -y python3-fonttools python3-brotli libharfbuzz-bin
    python3 make-faces.py <that folder>/node_modules

The SIL Open Font License asks a changed face to carry another name than a reserved one: the families are
"Lastbed Sans" (after Inter) and "Lastbed Serif" (after Source Serif 4). Sans digits are tabular by default.
"""
import json
import subprocess
import sys
from collections import defaultdict
from pathlib import Path

from fontTools.feaLib.builder import addOpenTypeFeaturesFromString
from fontTools.subset import Options, Subsetter
from fontTools.ttLib import TTFont
from fontTools.varLib.instancer import instantiateVariableFont

HERE = Path(__file__).resolve().parent
MEASURED = HERE.parents[2] / "tests" / "figures" / "fixtures" / "measured-text.json"

INTER = "inter-ui/variable/InterVariable.woff2"
SERIF = "source-serif/VAR/SourceSerif4Variable-Italic.ttf"
FACES = [
    {"id": "sans", "file": "lastbed-sans-regular", "source": INTER, "family": "Lastbed Sans", "style": "Regular",
     "weight": 400, "axes": {"wght": 400, "opsz": 14}},
    {"id": "sansSemibold", "file": "lastbed-sans-semibold", "source": INTER, "family": "Lastbed Sans",
     "style": "SemiBold", "weight": 600, "axes": {"wght": 600, "opsz": 14}},
    {"id": "serifItalic", "file": "lastbed-serif-italic", "source": SERIF, "family": "Lastbed Serif",
     "style": "Italic", "weight": 400, "axes": {"wght": 400, "opsz": 10}},
]

SIGNS = ("−–—‐‑‘’‚“”„…·•‰†‡§ʹʺ′″±×÷≤≥≈≠∞√∑∆∂½¼¾⅓⅔¹²³⁰⁴⁵⁶⁷⁸⁹⁺⁻⁽⁾ⁿ₀₁₂₃₄₅₆₇₈₉₊₋₍₎"
         "←↑→↓↔↗↘▲△▶▼▽◆◇○●■□✓ΩµȘșȚțẞ\u00a0\u2009\u202f")
CHARACTERS = sorted(
    set(range(0x20, 0x7F)) | set(range(0xA0, 0x180)) | set(range(0x391, 0x3CA)) | set(map(ord, SIGNS))
)
KERNED = [chr(c) for c in range(0x20, 0x7F)]
SAMPLES = ["True ranges", "AVATAR To Wo", "0123456789", "δ¹³C ‰ VPDB", "−0.1 to +0.6 m", "Palmidium arx",
           "C. cf. alta", "impact surface, given and found", "Iridium, ng/g (log)", "½ ± 3 ≤ 4", "Ørsk Łedge, fäll"]


def single_substitutions(font, tag):
    table = font["GSUB"].table
    found = {}
    for record in table.FeatureList.FeatureRecord:
        if record.FeatureTag != tag:
            continue
        for index in record.Feature.LookupListIndex:
            for subtable in table.LookupList.Lookup[index].SubTable:
                found.update(getattr(getattr(subtable, "ExtSubTable", subtable), "mapping", {}))
    return found


def make_digits_tabular(font):
    tabular = single_substitutions(font, "tnum")
    for table in font["cmap"].tables:
        for code in range(0x30, 0x3A):
            if code in table.cmap:
                table.cmap[code] = tabular.get(table.cmap[code], table.cmap[code])


def subset(font):
    options = Options()
    options.layout_features = ["kern"]
    options.hinting = False
    options.name_IDs = [0, 1, 2, 3, 4, 5, 6, 13, 14, 16, 17]
    options.name_languages = [0x409]
    options.notdef_outline = True
    options.glyph_names = False
    options.drop_tables += ["STAT", "DSIG", "meta", "gasp"]
    subsetter = Subsetter(options)
    subsetter.populate(unicodes=CHARACTERS)
    subsetter.subset(font)


def rename(font, face):
    plain = face["style"] in ("Regular", "Italic")
    full = f"{face['family']} {face['style']}"
    names = {1: face["family"] if plain else full, 2: face["style"] if plain else "Regular",
             3: f"{full}; {Path(face['source']).stem}", 4: full, 6: full.replace(" ", "-"),
             13: "This Font Software is licensed under the SIL Open Font License, Version 1.1.",
             14: "https://openfontlicense.org", 16: face["family"], 17: face["style"]}
    table = font["name"]
    table.names = [n for n in table.names if n.nameID in (0, 5) and n.platformID == 3]
    for name_id, text in names.items():
        table.setName(text, name_id, 3, 1, 0x409)
    font["OS/2"].usWeightClass = face["weight"]


def pair_subtables(font):
    if "GPOS" not in font:
        return []
    lookups = font["GPOS"].table.LookupList.Lookup
    return [[getattr(s, "ExtSubTable", s) for s in lookup.SubTable] for lookup in lookups]


def kern_in(subtable, first, second):
    """The advance change of one subtable, or None where it does not speak of the pair."""
    if first not in subtable.Coverage.glyphs:
        return None
    if subtable.Format == 1:
        pairs = subtable.PairSet[subtable.Coverage.glyphs.index(first)].PairValueRecord
        return next((p.Value1.XAdvance or 0 for p in pairs if p.SecondGlyph == second and p.Value1), None)
    row = subtable.Class1Record[subtable.ClassDef1.classDefs.get(first, 0)]
    value = row.Class2Record[subtable.ClassDef2.classDefs.get(second, 0)].Value1
    return getattr(value, "XAdvance", 0) or 0 if value else 0


def kern(lookups, first, second):
    total = 0
    for lookup in lookups:
        values = (kern_in(subtable, first, second) for subtable in lookup)
        total += next((value for value in values if value is not None), 0)
    return total


def kerning_pairs(font):
    """The kerning of every pair of ASCII characters, in font units."""
    glyphs = font.getBestCmap()
    lookups = pair_subtables(font)
    names = {character: glyphs[ord(character)] for character in KERNED}
    pairs = {a + b: kern(lookups, names[a], names[b]) for a in KERNED for b in KERNED}
    return {pair: value for pair, value in pairs.items() if value}


def keep_only(pairs, font):
    """Leaves the face no other kerning than the table of widths knows."""
    glyphs = font.getBestCmap()
    rules = [f"pos {glyphs[ord(a)]} {glyphs[ord(b)]} {value};" for (a, b), value in sorted(pairs.items())]
    del font["GPOS"]
    addOpenTypeFeaturesFromString(font, "feature kern {\n" + "\n".join(rules) + "\n} kern;", tables=["GPOS"])


def instance(face, modules):
    font = TTFont(modules / face["source"], recalcTimestamp=False)
    font = instantiateVariableFont(font, face["axes"], inplace=True)
    if face["family"] == "Lastbed Sans":
        make_digits_tabular(font)
    subset(font)
    pairs = kerning_pairs(font)
    keep_only(pairs, font)
    rename(font, face)
    font["head"].modified = font["head"].created
    font.flavor = None
    font.save(HERE / f"{face['file']}.ttf")
    return TTFont(HERE / f"{face['file']}.ttf"), pairs


def metrics(font, pairs):
    glyphs = {chr(code): name for code, name in font.getBestCmap().items()}
    advances, kerning = defaultdict(str), defaultdict(str)
    for character, name in sorted(glyphs.items()):
        advances[font["hmtx"][name][0]] += character
    for pair, value in sorted(pairs.items()):
        kerning[value] += pair
    return {"unitsPerEm": font["head"].unitsPerEm, "ascender": font["hhea"].ascent, "descender": font["hhea"].descent,
            "capHeight": font["OS/2"].sCapHeight, "xHeight": font["OS/2"].sxHeight,
            "unknownAdvance": font["hmtx"][".notdef"][0],
            "advances": dict(sorted(advances.items())), "kerning": dict(sorted(kerning.items()))}


def write_metrics(table):
    text = "".join(f"  {face}: {json.dumps(m, ensure_ascii=False, indent=2)},\n" for face, m in table.items())
    note = "/** Made by make-faces.py. Font units; `advances` and `kerning` list the characters and pairs of each value. */"
    (HERE / "generated" / "face-metrics.ts").write_text(f"{note}\nexport const FACE_METRICS = {{\n{text}}} as const;\n")


def measure(path, units_per_em, text):
    """The width in em that a shaping engine gives: the outside value for the tests of the table."""
    command = ["hb-shape", "--output-format=json", str(path), "--text", text]
    glyphs = json.loads(subprocess.run(command, check=True, capture_output=True, text=True).stdout)
    return sum(glyph["ax"] for glyph in glyphs) / units_per_em


def main(modules):
    table, measured = {}, {}
    for face in FACES:
        font, pairs = instance(face, modules)
        table[face["id"]] = metrics(font, pairs)
        path = HERE / f"{face['file']}.ttf"
        measured[face["id"]] = {text: measure(path, table[face["id"]]["unitsPerEm"], text) for text in SAMPLES}
        missing = [chr(c) for c in CHARACTERS if c not in font.getBestCmap()]
        print(face["file"], path.stat().st_size, "bytes; not in the source:", " ".join(missing))
    write_metrics(table)
    MEASURED.parent.mkdir(parents=True, exist_ok=True)
    MEASURED.write_text(json.dumps(measured, ensure_ascii=False, indent=2) + "\n")


if __name__ == "__main__":
    main(Path(sys.argv[1]))
