import { notesColumn, table } from "./declare.ts";

export const taxa = table({
  name: "taxa",
  title: "Taxa",
  help: "One row a taxon; any further column is a trait.",
  key: ["taxon"],
  furtherColumns: true,
  columns: {
    taxon: {
      type: "text",
      required: true,
      help: "The clean name, as finds carry it without signs of open nomenclature.",
      dwc: "scientificName",
      synonyms: ["species", "name", "taxon name"],
      example: "Velorites orskelensis",
    },
    group: { type: "text", help: "The group it is searched and tested with.", example: "ammonites" },
    accepted: {
      type: "text",
      help: "The accepted name, where this one is a synonym or is lumped.",
      dwc: "acceptedNameUsage",
      synonyms: ["accepted name", "valid name"],
    },
    mixing_length_m: {
      type: "number",
      unit: "m",
      minimum: 0,
      help: "Length over which its remains are mixed, metres.",
      synonyms: ["mixing length"],
    },
    notes: notesColumn,
  },
});
