import { inSections, legColumn, positionColumn, sectionColumn, table } from "./declare.ts";

const bearing = { type: "number", unit: "degrees", minimum: 0, maximum: 360 } as const;

export const legs = table({
  name: "legs",
  title: "Legs",
  help: "Two or more rows a leg tie its own readings to positions of the section; linear between. For traverses, overlapping legs, driller's and spliced depth. A row that leaves the position blank has it computed from the row before (in the order of readings): the stretch of tape between the two, corrected for the slope of the tape and the dip of the beds by the angles of the row where the stretch ends. One row of the leg must give its position.",
  key: ["section", "leg", "reading"],
  references: inSections,
  secondRow: {
    reading: "20",
    position: "",
    tape_bearing_deg: "95",
    tape_slope_deg: "0",
    dip_deg: "30",
    dip_direction_deg: "95",
  },
  oneOf: [
    ["position"],
    ["tape_bearing_deg", "tape_slope_deg", "dip_deg", "dip_direction_deg"],
    ["tape_bearing_deg", "tape_slope_deg", "dip_deg", "strike_right_hand_deg"],
  ],
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
      help: "The section's position at that reading; blank: computed from the angles of this row.",
      example: "0",
    },
    tape_bearing_deg: {
      ...bearing,
      help: "Direction in which the tape's readings grow over the stretch that ends here, clockwise from north (the same north as the beds').",
      synonyms: ["tape bearing", "bearing", "tape azimuth", "traverse bearing", "traverse azimuth"],
    },
    tape_slope_deg: {
      type: "number",
      unit: "degrees",
      minimum: -90,
      maximum: 90,
      help: "Slope of the tape in that direction: up positive, down negative, level 0.",
      synonyms: ["tape slope", "slope", "slope angle", "ground slope"],
    },
    dip_deg: {
      type: "number",
      unit: "degrees",
      minimum: 0,
      maximum: 90,
      help: "Dip of the beds over the stretch that ends here.",
      synonyms: ["dip", "dip angle", "bedding dip", "true dip"],
    },
    dip_direction_deg: {
      ...bearing,
      help: "Direction in which the beds dip, clockwise from north.",
      synonyms: ["dip direction", "dip azimuth", "dipdir"],
    },
    strike_right_hand_deg: {
      ...bearing,
      help: "Instead of the dip direction: the strike by the right-hand rule, which has the beds dip to its right (dip direction = strike + 90).",
      synonyms: ["right-hand strike", "strike right-hand rule", "strike rhr"],
    },
    overturned: {
      type: "boolean",
      help: "yes where the beds' younger side faces down.",
      synonyms: ["inverted"],
    },
  },
});
