import { declare } from "./result-table.ts";

export const lastFindsTable = declare({
  name: "last-finds",
  title: "Last finds above a level, against one common end",
  rows: (a) => a.timing.lastFinds,
  columns: ({ text, number, integer }) => [
    text("section", "section", (p) => p.section),
    text("set", "set of taxa", (p) => p.set),
    number("position_m", "stratigraphic height, m", (p) => p.positionM),
    integer("observed", "last finds above it", (p) => p.observed),
    number("expected", "expected if all ended together at the estimated common level", (p) => p.expected),
    number("low", "lower end of the pointwise band", (p) => p.low),
    number("high", "upper end of the pointwise band", (p) => p.high),
    number("low_all", "lower end of the band that holds the whole curve", (p) => p.lowAll),
    number("high_all", "upper end of the band that holds the whole curve", (p) => p.highAll),
    number("level", "level of both bands", (p) => p.level),
  ],
});
