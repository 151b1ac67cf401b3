import { declare } from "./result-table.ts";

export const rangeEndsTable = declare({
  name: "range-ends",
  title: "True end of each taxon's range",
  rows: (a) => a.ranges.ends,
  columns: ({ text, number, integer }) => [
    text("section", "section", (e) => e.section),
    text("taxon", "accepted name", (e) => e.taxon),
    text("group", "group", (e) => e.group),
    text("identification", "strict or inclusive reading of names", (e) => e.identification),
    text("end", "top, base, or both in one interval", (e) => e.end),
    text("method", "method", (e) => e.method),
    integer("horizons", "horizons used", (e) => e.horizons),
    number("exponent", "horizons that carry information on the end", (e) => e.exponent),
    number("first_m", "lowest find, m", (e) => e.firstM),
    number("last_m", "highest find, m", (e) => e.lastM),
    number("point_m", "point estimate of the end, m", (e) => e.pointM),
    number("level", "level of the interval", (e) => e.level),
    number("low_m", "lower end of the interval, m", (e) => e.lowM),
    number("high_m", "upper end of the interval, m", (e) => e.highM),
    text(
      "outcome",
      "closed, open, leaves-section, in-hiatus, empty, undefined or not-applicable",
      (e) => e.outcome,
    ),
    text("horizon", "the marker the end is compared with", (e) => e.horizon),
    number("reach_level", "confidence at which the interval just reaches the horizon", (e) => e.reachLevel),
    number("p", "chance of so early a last find had the taxon lived to the horizon", (e) => e.p),
    number(
      "evidence_ratio",
      "evidence for living to the horizon over ending before it",
      (e) => e.evidenceRatio,
    ),
    text("note", "note", (e) => e.note),
  ],
});
