import { baseColumn, inSections, notesColumn, sectionColumn, table, topColumn } from "./declare.ts";

export const intervals = table({
  name: "intervals",
  title: "Intervals",
  help: "Rock that could not be searched, or that is missing, repeated or moved.",
  references: inSections,
  columns: {
    section: sectionColumn,
    kind: {
      type: "enum",
      required: true,
      values: ["covered", "core-loss", "not-searched", "fault-cut", "fault-repeat", "slump"],
      help: "covered, core-loss and not-searched hide rock; fault-cut hides missing thickness; fault-repeat shows rock twice; slump is moved rock.",
      synonyms: ["type"],
      example: "covered",
    },
    base: { ...baseColumn, required: true, example: "20.1" },
    top: { ...topColumn, required: true, example: "21.6" },
    thickness_low: {
      type: "number",
      unit: "section",
      measures: "length",
      minimum: 0,
      help: "Least thickness of what is missing at a cut.",
    },
    thickness_high: {
      type: "number",
      unit: "section",
      measures: "length",
      minimum: 0,
      help: "Greatest thickness of what is missing at a cut.",
    },
    notes: { ...notesColumn, example: "scree" },
  },
});
