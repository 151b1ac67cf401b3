import { inSections, positionErrorColumn, sectionColumn, table } from "./declare.ts";

export const publishedRanges = table({
  name: "published-ranges",
  title: "Published ranges",
  help: "First and last occurrence and the number of horizons, where the finds themselves were not published.",
  key: ["section", "taxon"],
  references: inSections,
  columns: {
    section: sectionColumn,
    taxon: {
      type: "text",
      required: true,
      help: "The taxon.",
      dwc: "scientificName",
      synonyms: ["species", "name", "taxon name"],
      example: "Velorites orskelensis",
    },
    first: {
      type: "number",
      required: true,
      unit: "section",
      measures: "position",
      help: "The lowest find.",
      synonyms: ["first occurrence", "fo", "fad", "lowest", "lowest occurrence"],
      example: "3.2",
    },
    last: {
      type: "number",
      required: true,
      unit: "section",
      measures: "position",
      help: "The highest find.",
      synonyms: ["last occurrence", "lo", "lad", "highest", "highest occurrence"],
      example: "18.9",
    },
    horizons: {
      type: "integer",
      required: true,
      minimum: 1,
      help: "The number of finds, counted as the column counted says.",
      synonyms: ["n", "number of horizons", "finds"],
      example: "11",
    },
    first_error: {
      ...positionErrorColumn,
      help: "One standard deviation of the lowest find's position.",
      synonyms: [],
    },
    last_error: {
      ...positionErrorColumn,
      help: "One standard deviation of the highest find's position.",
      synonyms: [],
    },
    counted: {
      type: "enum",
      values: ["horizons", "finds", "specimens"],
      help: "What was counted: horizons, finds or specimens.",
      example: "horizons",
    },
  },
});
