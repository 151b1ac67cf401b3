import { declare } from "./result-table.ts";

export const offsetsTable = declare({
  name: "offsets",
  title: "Disappearance minus marker horizon",
  rows: (a) => a.timing.offsets,
  columns: ({ text, number, integer }) => [
    text("section", "section, or joint", (o) => o.section),
    text("set", "set of taxa", (o) => o.set),
    text("scenario", "scenario whose level it is", (o) => o.scenario),
    integer("pulse", "rank of the pulse from below", (o) => o.pulse),
    text("horizon", "marker horizon", (o) => o.horizon),
    number("median", "median offset, positive when the disappearance is younger", (o) => o.median),
    number("low", "lower end of the interval", (o) => o.low),
    number("high", "upper end of the interval", (o) => o.high),
    number("level", "level of the interval", (o) => o.level),
    text("unit", "m, ka or Ma", (o) => o.unit),
    number(
      "probability_after",
      "probability that the disappearance is younger than the horizon",
      (o) => o.probabilityAfter,
    ),
  ],
});
