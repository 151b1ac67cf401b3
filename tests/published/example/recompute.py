"""Recomputes the Veyra Shelf example from its raw tables, sharing no line with the program, and records the values.

    python3 recompute.py [run folder]     writes example.json; with a run folder also prints every disagreement

Formulas: Strauss & Sadler 1989 (uniform), Solow 1993 (window), Weiss & Marshall 1999 (sampled, the odds of a find in
proportion to effort; exact rationals here),
Solow 1996 (common end), exact Kolmogorov-Smirnov (SciPy kstwo), Fisher (combined), Berger & Heath 1968 (box mixing, SciPy optimisers).
"""

import json
import platform
import sys
from pathlib import Path

import numpy as np
import scipy

import iridium
from assemblage import Set, centroid
from compare import compare
from range_ends import C, Coordinate, ends, reworking_ceiling, role_of
from study_tables import Study

HERE = Path(__file__).parent
STUDY = HERE.parents[2] / "datasets" / "veyra-shelf"
Z = 1.959963984540054


def horizons_of(study, section, found):
    """Name -> (position, low, high); H as the settings declare it, placed in the field or else found."""
    scale, out = study.sections[section], {}
    for r in study.horizons:
        if r["section"] != section:
            continue
        at, below, above = scale.height(r["position"]), float(r["below"]) * scale.factor, float(r["above"]) * scale.factor
        z = Z if r["shape"] == "normal" else 1
        out[r["horizon"]] = (at, at - z * below, at + z * above, (below + above) / 2)
    own = "iridium-1" if "veyra-impact" in out else "veyra-impact"
    out[own] = (found["h0"], found["low"], found["high"], found["sigma"])
    return out


def markers_of(study, section):
    p = iridium.profile(study, section)
    bg = iridium.background(p, by_likelihood=False)
    pv, q = iridium.tests(p, bg)
    found = iridium.runs(q <= 0.05, p, pv, bg["threshold"])
    assert len(found) == 1, (section, found)
    likelihood = iridium.background(p, by_likelihood=True)
    tested = [[s, pv[i], q[i], "yes" if q[i] <= 0.05 else "no"] for i, s in enumerate(p["sample"])]
    return {"background": {k: bg[k] for k in ("median", "mean", "threshold", "n", "detects", "s")},
            "backgroundClippedByLikelihood": {k: likelihood[k] for k in ("median", "threshold", "n")},
            "tests": tested, "run": found[0], "fluence": iridium.fluence(p, bg, found[0]),
            "mixing": iridium.mixing(p, bg, found[0])}


def taxa_of(study, section, mixing, horizon):
    out = []
    for (place, name), local in study.local_taxa().items():
        if place != section:
            continue
        heights = [f["height"] for f in local["finds"]]
        length = float(study.taxa[name]["mixing_length_m"] or mixing["L"])
        ceiling = reworking_ceiling(heights, mixing["h0"], length)
        role = role_of(heights, heights, (horizon[0], horizon[2], mixing["hb"]), ceiling)
        kept = [f for f in local["finds"] if role != "candidate" or ceiling is None or f["height"] <= horizon[0]]
        searched = sorted(study.searches[section, study.group(name)])
        names_searched = {s for _, s, _ in searched}
        out.append({"taxon": name, "group": study.group(name), "role": role, "ceiling": ceiling,
                    "heights": [f["height"] for f in kept], "aside": [f["row"] for f in local["finds"] if f not in kept],
                    "samples": {f["sample"] for f in kept} & names_searched,
                    "reaches_top": kept[-1]["height"] >= searched[-1][0] - 1e-9, "inclusive": max([h for h in local["inclusive"] if len(kept) == len(local["finds"]) or h <= horizon[0]])})
    return out


def levels_searched(study, section, group):
    levels = []
    for height, sample, effort in sorted(study.searches[section, group]):
        if any(low < height < high for low, high in study.gaps[section]):
            continue
        if levels and height - levels[-1][0] <= 1e-9:
            levels[-1][1].add(sample)
            levels[-1][2] += effort
        else:
            levels.append([height, {sample}, effort])
    return levels


def sets_of(study, taxa):
    candidates = [t for t in taxa if t["role"] == "candidate"]
    sets = {"candidates": candidates}
    closed = [t for t in candidates if not t["reaches_top"]]
    if len(closed) < len(candidates):
        sets["candidates-closed"] = closed
    for t in candidates:
        sets.setdefault(f"group:{t['group']}", []).append(t)
    for name, members in study.settings["timing"]["sets"].items():
        sets[name] = [t for t in candidates if t["taxon"] in members]
    return sets


def timing_of(taxa, coordinate, horizons, top):
    s, out = Set(taxa, coordinate), []
    k = len(s.m)
    row = lambda method, values, **key: out.append({"method": method, "horizon": "", "taxa": k, **key, **values})
    t, df, p = s.one_level()
    row("common-end", {"test_statistic": t, "df": df, "p": p, "outcome": "closed"})
    outcome = lambda high: "leaves-section" if high > top else "closed"
    high = s.given(C)
    row("common-end-given", {"estimate": s.given(0.5), "low": s.top_m, "high": high, "outcome": outcome(high)})
    high = s.joint()
    row("common-end-joint", {"low": s.top_m, "high": high, "outcome": outcome(high)} if high else {"outcome": "empty"})
    for name, (_, low, up, _) in horizons.items():
        p, at = s.at_horizon(low, up)
        row("confidence-levels", {"p": p, "estimate": at, "outcome": "closed"}, horizon=name)
        p, at = s.combined(low, up)
        row("combined", {"p": p, "estimate": at, "outcome": "closed"}, horizon=name)
    row("duration-lower", {"low": s.shortest(), "outcome": "closed"})
    rich = [t for t in taxa if len(t["heights"]) >= 10]
    for part in ([rich] if len(rich) >= 2 else []) + ([taxa] if len(rich) < len(taxa) else []):
        low, high = Set(part, coordinate).box()
        row("duration-box", {"low": low, "high": high, "outcome": "closed"}, taxa=len(part))
    z, p, n = centroid(taxa, coordinate)
    with_inner = sum(len(t["heights"]) > 2 for t in taxa)
    row("centroid", {"test_statistic": z, "p": p, "outcome": "closed"}, taxa=with_inner)
    return out


def marker_row(section, found):
    x, f = found["mixing"], found["fluence"]
    return {"section": section, "position_m": x["h0"], "low_m": x["low"], "high_m": x["high"], "mixing_length_m": x["L"],
            "mixing_low_m": x["Llow"], "mixing_high_m": x["Lhigh"], "base_of_smear_m": x["hb"], "box_fluence": x["F"],
            "box_background": x["B"], "aicc": x["aicc"], "inflation": x["inflation"], "fluence_ng_cm2": f["value"],
            "fluence_sigma": f["sigma"], "variance_analytic": f["analytic"], "variance_background": f["background"],
            "fluence_low": f["low"], "fluence_high": f["high"]}


def sample_heights(study, section):
    """Every tenth level sampled."""
    levels = {round(slab["height"], 9): slab["height"] for (place, _), slab in study.samples.items() if place == section}
    return [levels[k] for k in sorted(levels)][::10]


def range_row(section, taxon, identification, row):
    names = {"point": "point_m", "low": "low_m", "high": "high_m", "reach": "reach_level", "ratio": "evidence_ratio"}
    key = {"section": section, "taxon": taxon["taxon"], "identification": identification}
    return {**key, **{names.get(name, name): value for name, value in row.items()}}


def recompute():
    study = Study(STUDY)
    out = {"finds": [[f["row"], f["reason"]] for f in study.finds if f["reason"]],
           "backgrounds": [], "markers": [], "anomalies": [], "alignment": [], "candidates": [], "ranges": [], "timing": []}
    for section, scale in study.sections.items():
        found = markers_of(study, section)
        mixing = found["mixing"]
        horizons = horizons_of(study, section, mixing)
        main = horizons["veyra-impact"]
        found["H"], found["Hsigma"] = main[0], main[3]
        out["backgrounds"].append({"section": section, **found["background"],
                                   "clippedByLikelihood": found["backgroundClippedByLikelihood"]})
        out["markers"].append(marker_row(section, found))
        out["anomalies"] += [
            {"section": section, "sample": s, "p": p, "q": q, "flagged": f, "background": found["background"]["median"],
             "threshold": found["background"]["threshold"]} for s, p, q, f in found["tests"]]
        out["alignment"] += [
            {"section": section, "position_m": h, "common": h - main[0], "low": h - main[0] - Z * main[3],
             "high": h - main[0] + Z * main[3]} for h in sample_heights(study, section)]
        coordinate = Coordinate(study.gaps[section])
        taxa = taxa_of(study, section, mixing, main)
        for t in taxa:
            out["finds"] += [[row, "below-reworking-ceiling"] for row in t["aside"]]
            out["candidates"].append({
                "section": section, "taxon": t["taxon"], "role": t["role"], "reaches_top": "yes" if t["reaches_top"] else "no",
                "horizons": len(t["heights"]), "first_m": t["heights"][0], "last_m": t["heights"][-1],
                "reworking_ceiling_m": t["ceiling"]})
            case = {"H": main[0], "top": study.top[section], "levels": levels_searched(study, section, t["group"])}
            for method, row in ends(t, coordinate, case).items():
                out["ranges"].append(range_row(section, t, "strict", {"method": method, **row}))
            if t["inclusive"] > t["heights"][-1]:
                wide = {**t, "heights": [*t["heights"], t["inclusive"]]}
                row = ends(wide, coordinate, case)["uniform"]
                out["ranges"].append(range_row(section, t, "inclusive", {"method": "uniform", **row}))
        for name, members in sets_of(study, taxa).items():
            for row in timing_of(members, coordinate, horizons, study.top[section]):
                out["timing"].append({"section": section, "set": name, "taxon": "", **row})
            if name == "candidates":
                for t in members:
                    z, p, _ = centroid([t], coordinate)
                    out["timing"].append({"section": section, "set": name, "taxon": t["taxon"], "method": "centroid",
                                          "horizon": "", "taxa": 1, "test_statistic": z, "p": p, "outcome": "closed"})
    out["finds"].sort()
    return out


def plain(value):
    if isinstance(value, dict):
        return {k: plain(v) for k, v in value.items() if v is not None}
    if isinstance(value, (list, tuple)):
        return [plain(v) for v in value]
    return value.item() if isinstance(value, np.generic) else value


def written(values):
    """One line a record, so that a difference is read line by line."""
    parts = []
    for key, value in values.items():
        if isinstance(value, list):
            body = ",\n".join("    " + json.dumps(v) for v in value)
            parts.append(f'  "{key}": [\n{body}\n  ]')
        else:
            parts.append(f'  "{key}": {json.dumps(value)}')
    return "{\n" + ",\n".join(parts) + "\n}\n"


if __name__ == "__main__":
    made = f"recompute.py, Python {platform.python_version()}, NumPy {np.__version__}, SciPy {scipy.__version__}"
    values = plain({"madeBy": made, **recompute()})
    (HERE / "example.json").write_text(written(values))
    if len(sys.argv) > 1:
        compare(values, Path(sys.argv[1]))
