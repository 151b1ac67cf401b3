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
      help: "covered, core-loss and not-searched hide rock; fault-cut hides missing thickness; fault-repeat is the stretch that a fault shows a second time; slump is moved rock.",
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
      help: "Least thickness of what is missing at a cut. At a fault-repeat: how far below the same rock is passed first, at least; both blank: the stretch of equal length directly below. Finds are mapped (taxa.faultRepeat) where least and greatest are equal or both blank.",
    },
    thickness_high: {
      type: "number",
      unit: "section",
      measures: "length",
      minimum: 0,
      help: "Greatest thickness of what is missing at a cut, or distance to the first passage at a fault-repeat.",
    },
    notes: { ...notesColumn, example: "scree" },
  },
});
