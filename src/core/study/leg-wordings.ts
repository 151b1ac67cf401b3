import { caution, error, nearest, type Wording } from "./wording.ts";

/** What is wrong with a leg, or with a reading on one. */
export const legWordings = {
  "unknown-leg": (p) =>
    error(
      "a leg of legs.csv in this section",
      `Add two or more rows for the leg to legs.csv, or correct its name.${nearest(p)}`,
    ),
  "short-leg": (p) =>
    error(`two or more rows for leg ${p.found}`, "Add the leg's second reading to legs.csv."),
  "repeated-reading": () =>
    error("each reading of a leg once", "Correct the reading: one reading cannot stand at two positions."),
  "leg-turns-back": (p) =>
    caution(
      "positions that go one way along the leg",
      `Leg ${p.detail} turns back here: correct the reading, the position or the angles, or begin a new leg.`,
    ),
  "leg-left-out": (p) =>
    error("a leg that can be used", `Mend the rows of leg ${p.found} in legs.csv first.`),
  "leg-not-tied": (p) =>
    error(
      `a position in this row of leg ${p.detail}, or one that the angles of the rows lead to`,
      "Give the section's position at one reading of the leg, best at its first; the others may then be computed. The leg is left out until then.",
    ),
  "leg-row-lost": (p) =>
    error(
      `every row of leg ${p.detail}, whose positions are computed from row to row`,
      "Mend this row or take it out; until then the leg ends before it, or is left out where its reading is not known.",
    ),
  "strike-contradicted": (p) =>
    error(
      `a strike and a dip direction of the same beds (${p.detail})`,
      "Correct one of them, or leave one blank.",
    ),
  "tape-along-bedding": (p) =>
    caution(
      `a tape that crosses bedding at 5 degrees or more on leg ${p.detail}`,
      "Check the angles, or give the position: so nearly along the beds a slip of a degree or two changes the thickness by half.",
    ),
  "leg-misfit": (p) =>
    caution(
      `about ${p.detail}, as tape and dip say`,
      "The position stands as given: correct it, an angle or the reading, if it is not an independent tie.",
    ),
  "readings-out-of-order": (p) =>
    caution(
      `readings that grow from row to row on leg ${p.detail}`,
      "Positions are computed in the order of the readings, and the tape's bearing is where they grow: correct the reading, or put the rows in order.",
    ),
  "outside-leg": (p) =>
    error(
      `a reading from ${p.detail}`,
      "Correct the reading or the leg, or add a row to legs.csv that reaches it.",
    ),
} satisfies Record<string, Wording>;
