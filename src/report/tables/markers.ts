import type { Analysis } from "../../core/analysis-result.ts";
import { given } from "../wordings/rows.ts";
import { declare } from "./result-table.ts";

export const markersTable = declare({
  name: "markers",
  title: "Marker horizons, given and found",
  rows: (a) =>
    a.markers.horizons.map((h) => ({ h, section: a.study.sections.find((s) => s.name === h.section) })),
  columns: ({ text, number }) => [
    text("section", "section", ({ h }) => h.section),
    text("horizon", "its name in the section", ({ h }) => h.name),
    text("kind", "kind of horizon", ({ h }) => h.kind),
    text(
      "refers_to",
      "what the position dates: event-surface, base-of-smear, contact or level",
      ({ h }) => h.refersTo,
    ),
    text("source", "given, found or manual", ({ h }) => h.source),
    text("evidence", "what it rests on", ({ h }) => h.evidence),
    number("position_m", "stratigraphic height, m", ({ h }) => h.positionM),
    number("position_given", "the same in the section's own axis and unit", ({ h, section }) =>
      given(section, h.positionM),
    ),
    number("low_m", "lower end of the interval, m", ({ h }) => h.lowM),
    number("high_m", "upper end of the interval, m", ({ h }) => h.highM),
    number("level", "level of the interval", ({ h }) => h.level),
    text("shape", "shape of its uncertainty", ({ h }) => h.shape),
    number("enrichment", "peak over background", ({ h }) => h.enrichment),
    number("fluence_ng_cm2", "integrated excess, ng/cm2", ({ h }) => h.fluence?.value),
    number("fluence_low", "lower end, ng/cm2", ({ h }) => h.fluence?.low),
    number("fluence_high", "upper end, ng/cm2", ({ h }) => h.fluence?.high),
    number("mixing_length_m", "mixing length of the box model, m", ({ h }) => h.mixing?.lengthM),
    number("mixing_low_m", "lower end, m", ({ h }) => h.mixing?.lowM),
    number("mixing_high_m", "upper end, m", ({ h }) => h.mixing?.highM),
    text("outcome", "closed, or why not", ({ h }) => h.outcome),
    text("note", "note", ({ h }) => h.note),
  ],
});

export const flagsTable = declare({
  name: "flags",
  title: "Quality flags, facts with their numbers",
  rows: (a) => a.markers.flags,
  columns: ({ text }) => [
    text("section", "section", (f) => f.section),
    text("horizon", "horizon or analyte", (f) => f.horizon),
    text("flag", "flag", (f) => f.flag),
    text("numbers", "the quantities that raised it", (f) =>
      Object.entries(f.numbers)
        .map(([name, value]) => `${name}=${value}`)
        .join("; "),
    ),
    text("consequence", "what follows", (f) => f.consequence),
  ],
});

export const anomaliesTable = declare({
  name: "anomalies",
  title: "Every measured sample against its background",
  rows: profileRows,
  columns: ({ text, number, yesNo }) => [
    text("section", "section", (r) => r.section),
    text("sample", "sample", (r) => r.sample.sample),
    text("analyte", "analyte", (r) => r.analyte),
    text("normalised", "none: raw values", () => "none"),
    number("base_m", "base of the sample, m", (r) => r.sample.baseM),
    number("top_m", "top of the sample, m", (r) => r.sample.topM),
    number("value", "value, or the limit where censored", (r) => r.sample.value),
    text("censored", "none, left, right or interval", (r) => r.sample.censored),
    text("unit", "unit of value, background, threshold and excess", (r) => r.unit),
    number("background", "median background", (r) => r.background?.median),
    number(
      "threshold",
      "background median times 10 to three log standard deviations",
      (r) => r.background?.threshold,
    ),
    number("excess", "value less the mean background", (r) => r.sample.excess),
    number("p", "chance of so high a value in the background", (r) => r.sample.p),
    number("q", "the same after control of the false discovery rate", (r) => r.sample.q),
    yesNo("flagged", "anomalous at a false discovery rate of 0.05", (r) => r.sample.flagged),
  ],
});

function profileRows({ markers }: Analysis) {
  return markers.profiles.flatMap((profile) =>
    profile.samples.map((sample) => ({
      section: profile.section,
      analyte: profile.analyte,
      unit: profile.unit,
      background: profile.background,
      sample,
    })),
  );
}
