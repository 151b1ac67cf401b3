import { table } from "./declare.ts";

export const claims = table({
  name: "claims",
  title: "Claims",
  help: "What a publication says, to be compared with the results.",
  columns: {
    question: {
      type: "text",
      required: true,
      help: "The question of timing.csv it answers.",
      example: "one-level",
    },
    value: { type: "text", required: true, help: "The published answer.", example: "0.21" },
    section: { type: "text", help: "The section meant.", example: "Orskel Ledge" },
    taxon: { type: "text", help: "The taxon meant.", synonyms: ["species"] },
    method: { type: "text", help: "The method used." },
    horizon: { type: "text", help: "The horizon meant." },
    level: {
      type: "number",
      minimum: 0,
      maximum: 1,
      help: "Confidence level of low and high.",
      example: "0.95",
    },
    low: { type: "number", help: "Lower end." },
    high: { type: "number", help: "Upper end." },
    unit: { type: "text", help: "Unit of value, low and high." },
    source: {
      type: "text",
      help: "Where it is published.",
      synonyms: ["reference", "citation"],
      example: "Tarn 2021, table 2",
    },
  },
});
