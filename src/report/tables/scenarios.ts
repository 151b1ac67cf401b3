import { declare } from "./result-table.ts";

export const scenariosTable = declare({
  name: "scenarios",
  title: "Scenarios of disappearance compared",
  rows: (a) => a.timing.scenarios,
  columns: ({ text, number }) => [
    text("section", "section, or joint", (s) => s.section),
    text("set", "set of taxa", (s) => s.set),
    text(
      "scenario",
      "single, pulses-2 to pulses-4, gradual, at-horizon, among-horizons or independent",
      (s) => s.scenario,
    ),
    text("horizon", "marker horizon", (s) => s.horizon),
    text("variant", "changed prior or form; blank: as declared", (s) => s.variant),
    number("prior", "prior probability among the scenarios compared", (s) => s.prior),
    number("log_evidence", "natural logarithm of the evidence", (s) => s.logEvidence),
    number("error", "Monte Carlo standard error of log_evidence", (s) => s.error),
    number(
      "probability",
      "posterior probability among the scenarios of the same variant",
      (s) => s.probability,
    ),
    text("note", "note", (s) => s.note),
  ],
});
