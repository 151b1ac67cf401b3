import { declare } from "./result-table.ts";

export const timingTable = declare({
  name: "timing",
  title: "Answers about the assemblage",
  rows: (a) => a.timing.answers,
  columns: ({ text, number, integer }) => [
    text("section", "section, or joint", (t) => t.section),
    text("set", "set of taxa", (t) => t.set),
    text("group", "group, where the set is one", (t) => t.group),
    text("taxon", "taxon, where the row is about one", (t) => t.taxon),
    text("question", "question", (t) => t.question),
    text("method", "method", (t) => t.method),
    text("horizon", "marker horizon", (t) => t.horizon),
    integer("part", "piece of a set in pieces", (t) => t.part),
    integer("taxa", "taxa used", (t) => t.taxa),
    number("test_statistic", "test statistic", (t) => t.testStatistic),
    number("df", "degrees of freedom", (t) => t.df),
    number("p", "p", (t) => t.p),
    number("estimate", "estimate", (t) => t.estimate),
    number("level", "level of the interval", (t) => t.level),
    number("low", "lower end", (t) => t.low),
    number("high", "upper end", (t) => t.high),
    text(
      "unit",
      "unit of estimate, low and high; levels are stratigraphic heights, of joint rows counted from the horizon",
      (t) => t.unit,
    ),
    number("mc_error", "Monte Carlo standard error", (t) => t.mcError),
    text("outcome", "closed, open, empty, undefined or not-applicable", (t) => t.outcome),
    text("note", "note", (t) => t.note),
  ],
});
