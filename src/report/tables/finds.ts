import { given, roleReason } from "../wordings/rows.ts";
import { declare } from "./result-table.ts";

export const findsTable = declare({
  name: "finds",
  title: "Every find, and whether it counts",
  rows: (a) =>
    a.finds.map((find) => ({ find, section: a.study.sections.find((s) => s.name === find.section) })),
  columns: ({ text, number, integer }) => [
    text("file", "the table the find stands in", (r) => r.find.origin.file),
    integer("row", "its row, the header being row 1", (r) => r.find.origin.row),
    text("section", "section", (r) => r.find.section),
    text("taxon", "the name as written", (r) => r.find.verbatim),
    text("accepted", "the name it counts for", (r) => r.find.accepted),
    number("position_m", "stratigraphic height where it counts, m", (r) => r.find.heightM),
    number("position_given", "the same in the section's own axis and unit", (r) =>
      given(r.section, r.find.heightM),
    ),
    text("used", "yes, no, or merged into another find of the same horizon", (r) => r.find.used),
    text("reason", "the rule that decided", (r) => r.find.reason),
  ],
});

export const candidatesTable = declare({
  name: "candidates",
  title: "Which taxa count against the main horizon",
  rows: (a) => a.candidates,
  columns: ({ text, number, integer, yesNo }) => [
    text("section", "section", (c) => c.section),
    text("taxon", "accepted name", (c) => c.taxon),
    text("group", "group", (c) => c.group),
    text("role", "aftermath, survivor, late-start, too-few or candidate", (c) => c.role),
    yesNo("reaches_top", "highest find in the highest sample searched for its group", (c) => c.reachesTop),
    integer("horizons", "distinct levels with a find", (c) => c.horizons),
    number("first_m", "lowest find, m", (c) => c.firstM),
    number("last_m", "highest find, m", (c) => c.lastM),
    number("last_inclusive_m", "highest find with cf. and ? read inclusively, m", (c) => c.lastInclusiveM),
    number(
      "reworking_ceiling_m",
      "highest level at which a taxon ended at H may be found by mixing, m",
      (c) => c.reworkingCeilingM,
    ),
    text("reason", "the rule that gave the role", (c) => roleReason(c)),
  ],
});
