import { declare } from "./result-table.ts";

export const membershipTable = declare({
  name: "membership",
  title: "Which taxon ended in which pulse",
  rows: (a) => a.timing.membership,
  columns: ({ text, number, integer }) => [
    text("section", "section, or joint", (m) => m.section),
    text("set", "set of taxa", (m) => m.set),
    text("scenario", "scenario", (m) => m.scenario),
    text("taxon", "accepted name", (m) => m.taxon),
    integer("pulse", "rank of the pulse from below", (m) => m.pulse),
    number("probability", "posterior probability that the taxon ended in it", (m) => m.probability),
  ],
});
