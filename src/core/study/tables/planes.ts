import { inSections, sectionColumn, table } from "./declare.ts";

export const planes = table({
  name: "planes",
  title: "Planes",
  help: "Planar features measured in quartz grains, one row a set of planes.",
  references: inSections,
  columns: {
    section: sectionColumn,
    sample: {
      type: "text",
      required: true,
      help: "The sample.",
      dwc: "eventID",
      synonyms: ["sample id"],
      example: "OL-031",
    },
    grain: {
      type: "text",
      required: true,
      help: "The grain's number.",
      synonyms: ["grain id"],
      example: "1",
    },
    set: { type: "text", required: true, help: "The set of planes in the grain.", example: "1" },
    polar_angle_deg: {
      type: "number",
      required: true,
      unit: "degrees",
      minimum: 0,
      maximum: 90,
      help: "Angle between the pole of the planes and the c axis.",
      synonyms: ["polar angle"],
      example: "23.5",
    },
    error_deg: {
      type: "number",
      unit: "degrees",
      minimum: 0,
      help: "One standard deviation of the angle.",
      synonyms: ["error"],
    },
    other_set: { type: "text", help: "Another set of the grain." },
    angle_between_deg: {
      type: "number",
      unit: "degrees",
      minimum: 0,
      maximum: 180,
      help: "Angle between the two sets.",
      synonyms: ["angle between"],
    },
  },
});
