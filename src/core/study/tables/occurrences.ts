import {
  inSections,
  legColumn,
  notesColumn,
  positionColumn,
  positionErrorColumn,
  sectionColumn,
  table,
} from "./declare.ts";

export const occurrences = table({
  name: "occurrences",
  title: "Occurrences",
  help: "Every find: what, and in which sample or at which position.",
  references: inSections,
  secondRow: { taxon: "Velorites orskelensis", sample: "OL-032", count: "1" },
  oneOf: [["sample"], ["position"]],
  columns: {
    section: sectionColumn,
    taxon: {
      type: "text",
      required: true,
      help: "The name as written, with its signs of open nomenclature.",
      dwc: "scientificName",
      synonyms: ["species", "name", "taxon name", "verbatimIdentification", "fossil"],
      example: "Velorites cf. orskelensis",
    },
    sample: {
      type: "text",
      help: "The sample it was found in.",
      dwc: "eventID",
      synonyms: ["sample id", "sample number", "sample no", "sample name", "fieldNumber"],
      example: "OL-031",
    },
    position: {
      ...positionColumn,
      help: "Its position, where no sample is named; with a leg, that leg's reading.",
      example: undefined,
    },
    leg: legColumn,
    position_error: positionErrorColumn,
    count: {
      type: "integer",
      minimum: 0,
      help: "Number of specimens; 0 is looked for and not found.",
      dwc: "individualCount",
      synonyms: ["specimens", "number", "abundance count"],
      example: "3",
    },
    abundance: {
      type: "text",
      help: "Abundance in the words or codes of the source.",
      dwc: "organismQuantity",
    },
    qualifier: {
      type: "text",
      help: "Sign of open nomenclature (cf., aff., ? ...) where it is not in the name.",
      dwc: "identificationQualifier",
    },
    reworked: {
      type: "enum",
      values: ["no", "suspected", "yes"],
      help: "Whether the specimen was reworked from older rock.",
      example: "no",
    },
    doubtful: { type: "boolean", help: "yes where the identification or the level is doubted." },
    notes: { ...notesColumn, dwc: "occurrenceRemarks" },
  },
});
