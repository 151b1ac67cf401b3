import { inSections, legColumn, positionColumn, sectionColumn, table } from "./declare.ts";

export const legs = table({
  name: "legs",
  title: "Legs",
  help: "Two or more rows a leg tie its own readings to positions of the section; linear between. For traverses, dip-corrected and overlapping legs, driller's and spliced depth.",
  key: ["section", "leg", "reading"],
  references: inSections,
  secondRow: { reading: "10", position: "9.4" },
  columns: {
    section: sectionColumn,
    leg: { ...legColumn, required: true, example: "A" },
    reading: {
      type: "number",
      required: true,
      unit: "section",
      measures: "length",
      help: "What the tape, staff or driller read, in the section's own unit.",
      synonyms: ["leg reading", "tape", "measured"],
      example: "0",
    },
    position: {
      ...positionColumn,
      required: true,
      help: "The section's position at that reading.",
      example: "0",
    },
  },
});
