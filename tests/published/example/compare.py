"""Prints where a run's tables and the recomputed values disagree, and the largest differences where they agree."""

import csv
from collections import defaultdict

KEYS = {
    "anomalies": ("section", "sample"),
    "alignment": ("section", "position_m"),
    "candidates": ("section", "taxon"),
    "range-ends": ("section", "taxon", "identification", "method"),
    "timing": ("section", "set", "taxon", "method", "horizon", "taxa"),
    "markers": ("section",),
}
NUMBERS = {
    "anomalies": ("p", "q", "background", "threshold"),
    "alignment": ("common", "low", "high"),
    "candidates": ("horizons", "first_m", "last_m", "reworking_ceiling_m"),
    "range-ends": ("point_m", "low_m", "high_m", "reach_level", "p", "evidence_ratio"),
    "timing": ("test_statistic", "df", "p", "estimate", "low", "high"),
    "markers": ("position_m", "low_m", "high_m", "mixing_length_m", "mixing_low_m", "mixing_high_m", "fluence_ng_cm2",
                "fluence_low", "fluence_high"),
}
WORDS = {"anomalies": ("flagged",), "candidates": ("role", "reaches_top"), "range-ends": ("outcome",), "timing": ("outcome",)}


def table(folder, name):
    with open(folder / f"{name}.csv", newline="") as file:
        return list(csv.DictReader(file))


def key_of(row, name):
    return tuple(f"{float(row[k]):.9f}" if k == "position_m" else str(row[k]) for k in KEYS[name])


def relevant(row, name):
    if name == "anomalies":
        return row["analyte"] == "iridium"
    if name == "range-ends":
        return row["end"] == "top" and row["method"] in ("uniform", "window", "sampled")
    return row["horizon"] == "iridium-1" if name == "markers" else True


def compare(values, folder):
    ours = {"range-ends": values["ranges"], **{k: values[k] for k in KEYS if k != "range-ends"}}
    finds = {int(r["row"]): r["reason"] for r in table(folder, "finds") if r["used"] != "yes"}
    print("finds set aside or merged:", len(finds), "differing:", set(finds.items()) ^ {tuple(f) for f in values["finds"]})
    for name, rows in ours.items():
        theirs = {key_of(r, name): r for r in table(folder, name) if relevant(r, name)}
        mine = {key_of(r, name): r for r in rows}
        assert len(mine) == len(rows)
        extra = [k for k in theirs if k not in mine]
        print(f"{name}: {len(mine)} rows, missing there {[k for k in mine if k not in theirs]}, more there {len(extra)} {extra[:8]}")
        compare_rows(name, mine, theirs)


def compare_rows(name, mine, theirs):
    worst = defaultdict(lambda: (0.0, ""))
    for key in mine.keys() & theirs.keys():
        for column in WORDS.get(name, ()):
            if str(mine[key][column]) != theirs[key][column]:
                print("WORD", name, column, key, mine[key][column], theirs[key][column])
        for column in NUMBERS[name]:
            a, b = mine[key].get(column), theirs[key][column]
            if (a is None) != (b == ""):
                print("PRESENCE", name, column, key, a, b)
            elif a is not None and (difference := gap(float(a), float(b))) > worst[column][0]:
                worst[column] = (difference, f"{key}: {a!r} against {b}")
    for column, (difference, where) in worst.items():
        print(f"  {column}: {difference:.3g} of {where}")


def gap(a, b):
    """Relative to the larger, but never to less than 1e-6."""
    return abs(a - b) / max(abs(a), abs(b), 1e-6)
