import { inSections, positionColumn, sectionColumn, table } from "./declare.ts";

export const recovery = table({
  name: "recovery",
  title: "Recovery",
  help: "Recovery potential of a group along a section: linear between rows, a repeated position is a jump.",
  references: inSections,
  columns: {
    section: sectionColumn,
    group: { type: "text", required: true, help: "The group.", example: "ammonites" },
    position: { ...positionColumn, required: true, help: "The position.", example: "0" },
    recovery: {
      type: "number",
      required: true,
      minimum: 0,
      help: "Recovery potential there, relative.",
      synonyms: ["recovery potential"],
      example: "1",
    },
  },
});
