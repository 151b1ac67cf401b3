import { table } from "./declare.ts";

export const choices = table({
  name: "choices",
  title: "Choices",
  help: "Every choice made by hand, in order; the report prints them.",
  key: ["order"],
  columns: {
    order: {
      type: "integer",
      required: true,
      minimum: 1,
      help: "1, 2, 3 ... in the order made.",
      synonyms: ["number"],
      example: "1",
    },
    choice: { type: "text", required: true, help: "What was chosen.", example: "boundary.horizon" },
    old: { type: "text", help: "What stood there before." },
    new: { type: "text", help: "What stands there now.", example: "Veyra impact" },
    reason: { type: "text", help: "Why.", example: "the only shared marker" },
    by: { type: "text", help: "Who chose.", example: "E. Tarn" },
    after_results: { type: "boolean", help: "yes where results had been seen.", example: "no" },
  },
});
