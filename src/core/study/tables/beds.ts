import { baseColumn, inSections, notesColumn, sectionColumn, table, topColumn } from "./declare.ts";

export const beds = table({
  name: "beds",
  title: "Beds",
  help: "The lithological log, one row a bed.",
  references: inSections,
  columns: {
    section: sectionColumn,
    base: { ...baseColumn, required: true, example: "0" },
    top: { ...topColumn, required: true, example: "1.8" },
    lithology: {
      type: "text",
      required: true,
      help: "Rock name.",
      synonyms: ["rock", "rock type", "lith"],
      example: "marl",
    },
    base_contact: {
      type: "enum",
      values: ["sharp", "gradational", "erosive", "hardground", "burrowed", "karst", "faulted"],
      help: "What the lower contact looks like.",
      synonyms: ["contact", "lower contact"],
      example: "sharp",
    },
    facies: { type: "text", help: "Facies name or code.", example: "outer shelf" },
    water_depth_m: {
      type: "number",
      unit: "m",
      help: "Estimated water depth, metres.",
      synonyms: ["water depth"],
    },
    bioturbation: {
      type: "number",
      minimum: 0,
      maximum: 6,
      help: "Bioturbation index, 0 to 6.",
      synonyms: ["bioturbation index", "ichnofabric index"],
      example: "3",
    },
    carbonate_percent: {
      type: "number",
      unit: "%",
      minimum: 0,
      maximum: 100,
      help: "Carbonate content, percent.",
      synonyms: ["carbonate", "caco3", "caco3 percent"],
    },
    formation: { type: "text", help: "Formation.", dwc: "formation" },
    member: { type: "text", help: "Member.", dwc: "member" },
    notes: notesColumn,
  },
});
