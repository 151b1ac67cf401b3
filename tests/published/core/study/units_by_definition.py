"""Units as exact fractions of their definitions: python3 units_by_definition.py > units-by-definition.csv

Gram and its prefixes: BIPM, SI Brochure, 9th edition (2019), tables 2 and 7. ppm, ppb, ppt: 1e-6, 1e-9, 1e-12, percent
1e-2, per mil 1e-3 (SI Brochure, 5.4.7: ppb and ppt only where their meaning is fixed, as it is here). International
foot: 0.3048 m exactly (agreement of 1 July 1959; NIST Special Publication 811, 2008, B.6).
"""
import csv
import sys
from fractions import Fraction

prefix = {"f": -15, "p": -12, "n": -9, "u": -6, "m": -3, "": 0, "k": 3}
gram = {f"{name}g": Fraction(10) ** power for name, power in prefix.items()}
unit = gram["ng"] / gram["g"]
out = csv.writer(sys.stdout, lineterminator="\n")
out.writerow(["kind", "unit", "factor"])
for above in gram:
    for below in ("ug", "mg", "g", "kg"):
        out.writerow(["mass-fraction", f"{above}/{below}", float(gram[above] / gram[below] / unit)])
for name, share in {"ppm": -6, "ppb": -9, "ppt": -12, "%": -2, "wt%": -2}.items():
    out.writerow(["mass-fraction", name, float(Fraction(10) ** share / unit)])
for name, mass in {"g": 1, "kg": 1000}.items():
    for counted in ("grains", "counts", "spherules", "specimens"):
        out.writerow(["per-gram", f"{counted}/{name}", float(Fraction(1, mass))])
for name, metres in {
    "m": Fraction(1),
    "cm": Fraction(1, 100),
    "mm": Fraction(1, 1000),
    "ft": Fraction(3048, 10000),
    "in": Fraction(3048, 10000) / 12,
}.items():
    out.writerow(["length", name, float(metres)])
