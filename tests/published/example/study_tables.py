"""Reads the example's raw tables again: heights, finds by the declared rules, searches, unsearchable rock."""

import csv
import json
import re
from collections import defaultdict
from fractions import Fraction
from pathlib import Path

METRES = {"m": 1.0, "cm": 0.01, "mm": 0.001, "ft": 0.3048}
UNSEARCHABLE = {"covered", "core-loss", "not-searched"}


def rows(folder, table):
    with open(Path(folder) / f"{table}.csv", encoding="utf-8-sig", newline="") as file:
        return [dict(row, row=number) for number, row in enumerate(csv.DictReader(file), start=2)]


class Scale:
    """Own axis and unit of a section, with its legs."""

    def __init__(self, row, legs):
        self.name, self.axis, self.unit = row["section"], row["axis"], row["unit"]
        self.factor = METRES[self.unit]
        self.legs = defaultdict(list)
        for leg in legs:
            if leg["section"] == self.name:
                self.legs[leg["leg"]].append((float(leg["reading"]), float(leg["position"])))
        for tie_points in self.legs.values():
            tie_points.sort()

    def height(self, text, leg=""):
        position = float(text)
        if leg:
            ties = self.legs[leg]
            for (r0, p0), (r1, p1) in zip(ties, ties[1:]):
                if r0 <= position <= r1:
                    position = p0 + (p1 - p0) * (position - r0) / (r1 - r0)
                    break
            else:
                raise ValueError(f"{self.name}: reading {position} outside leg {leg}")
        return (-1.0 if self.axis == "depth" else 1.0) * position * self.factor


def open_name(text, qualifier):
    """(name, reason the strict reading sets it aside, reason the inclusive one does)."""
    if text.startswith("?"):
        return text[1:].strip(), "genus-doubtful", "genus-doubtful"
    words = text.split()
    signs = [w for w in words if w.lower() in {"cf.", "aff.", "sp.", "spp.", "indet."}]
    name = " ".join(w for w in words if w not in signs)
    sign = signs[0] if signs else qualifier.strip()
    strict = {"cf.": "qualifier", "?": "qualifier", "aff.": "affinity"}.get(sign)
    if sign in {"sp.", "spp.", "indet."}:
        strict = "not-to-species"
    assert sign == "" or strict, f"unknown sign {sign!r} in {text!r}"
    return name, strict, None if sign in {"cf.", "?"} else strict


class Study:
    def __init__(self, folder):
        self.settings = json.loads((Path(folder) / "settings.json").read_text())
        legs = rows(folder, "legs")
        self.sections = {r["section"]: Scale(r, legs) for r in rows(folder, "sections")}
        self.meta = {r["section"]: r for r in rows(folder, "sections")}
        self.top = {s: self.sections[s].height(self.meta[s]["top"]) for s in self.sections}
        self.taxa = {r["taxon"]: r for r in rows(folder, "taxa")}
        self.gaps = {s: [] for s in self.sections}
        for r in rows(folder, "intervals"):
            assert r["kind"] in UNSEARCHABLE, "the example has no other kind"
            scale = self.sections[r["section"]]
            self.gaps[r["section"]].append((scale.height(r["base"]), scale.height(r["top"])))
        self.samples = {}
        for r in rows(folder, "samples"):
            self.samples[r["section"], r["sample"]] = self._slab(r)
        self.searches = defaultdict(list)
        for r in rows(folder, "searches"):
            height = self.samples[r["section"], r["sample"]]["height"]
            self.searches[r["section"], r["group"]].append((height, r["sample"], Fraction(r["effort"])))
        self.horizons = rows(folder, "horizons")
        self.measurements = rows(folder, "measurements")
        self.finds = [self._find(r) for r in rows(folder, "occurrences")]
        self._merge()

    def _slab(self, r):
        scale = self.sections[r["section"]]
        if r["base"] and r["top"]:
            base, top = scale.height(r["base"], r["leg"]), scale.height(r["top"], r["leg"])
            middle = (base + top) / 2
        else:
            middle = scale.height(r["position"], r["leg"])
            half = float(r["thickness"] or 0) * scale.factor / 2
            base, top = middle - half, middle + half
        assert top >= base, r
        return {"base": base, "top": top, "height": middle, "density": r["density_g_cm3"]}

    def accepted(self, name):
        while self.taxa.get(name, {}).get("accepted"):
            name = self.taxa[name]["accepted"]
        return name

    def group(self, name):
        return self.taxa[name]["group"]

    def _find(self, r):
        name, strict, inclusive = open_name(r["taxon"], r["qualifier"])
        height = self.samples[r["section"], r["sample"]]["height"]
        out = None
        if r["count"] != "" and float(r["count"]) == 0:
            out = "zero-count"
        place = {"yes": "reworked", "suspected": "reworking-suspected"}.get(r["reworked"])
        place = place or ("doubtful" if r["doubtful"] == "yes" else None)
        if any(low < height < high for low, high in self.gaps[r["section"]]):
            place = place or "no-recovery"
        return {
            "row": r["row"], "section": r["section"], "sample": r["sample"], "height": height,
            "taxon": self.accepted(name),
            "strict": out or strict or place, "inclusive": out or inclusive or place,
        }

    def _merge(self):
        """Finds of one taxon in one sample, or within 1e-9 m, are one horizon: the first row stands for it."""
        seen = defaultdict(list)
        for find in self.finds:
            find["reason"] = find["strict"]
            if find["reason"]:
                continue
            known = seen[find["section"], find["taxon"]]
            if any(s == find["sample"] or abs(h - find["height"]) <= 1e-9 for s, h in known):
                find["reason"] = "same-horizon"
            else:
                known.append((find["sample"], find["height"]))

    def local_taxa(self):
        """(section, taxon) -> used finds from below upward, and its heights under inclusive names."""
        used, wide = defaultdict(list), defaultdict(list)
        for find in self.finds:
            key = find["section"], find["taxon"]
            if find["reason"] is None:
                used[key].append(find)
            if find["inclusive"] is None:
                wide[key].append(find["height"])
        return {
            key: {"finds": sorted(finds, key=lambda f: f["height"]), "inclusive": wide[key]}
            for key, finds in used.items()
        }


def number_and_limit(text):
    """(value, is censored)."""
    match = re.fullmatch(r"<\s*([0-9.]+)", text.strip())
    return (float(match.group(1)), True) if match else (float(text), False)
