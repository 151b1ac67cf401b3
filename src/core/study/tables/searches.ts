import { notesColumn, sectionColumn, table } from "./declare.ts";

export const searches = table({
  name: "searches",
  title: "Searches",
  help: "A row says: this group was looked for in this sample. A sample without a row for a group was not searched for it.",
  key: ["section", "sample", "group"],
  references: [{ columns: ["section", "sample"], table: "samples", to: ["section", "sample"] }],
  secondRow: { sample: "OL-032" },
  columns: {
    section: sectionColumn,
    sample: {
      type: "text",
      required: true,
      help: "A sample of samples.csv.",
      dwc: "eventID",
      synonyms: ["sample id", "sample number", "sample no", "sample name", "fieldNumber"],
      example: "OL-031",
    },
    group: {
      type: "text",
      required: true,
      help: "The group looked for, as in taxa.csv.",
      example: "ammonites",
    },
    effort: {
      type: "number",
      minimum: 0,
      help: "How much was searched.",
      dwc: "sampleSizeValue",
      synonyms: ["samplingEffort"],
      example: "0.5",
    },
    effort_unit: { type: "text", help: "Unit of effort.", dwc: "sampleSizeUnit", example: "h" },
    counting: {
      type: "enum",
      values: ["presence", "count", "scale"],
      help: "Whether finds were noted, counted, or put on a scale.",
      example: "presence",
    },
    counted_to: { type: "number", minimum: 0, help: "The number of specimens at which counting stopped." },
    notes: notesColumn,
  },
});
