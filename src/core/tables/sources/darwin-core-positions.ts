import type { Axis } from "../../study/model.ts";
import { lengthUnit } from "../../study/units.ts";
import type { DarwinRow } from "./darwin-core-rows.ts";

/** A position that stands as a measurement of an event or occurrence, as written. */
export interface StatedPosition {
  readonly value: string;
  readonly axis: Axis;
  readonly unit: string;
}

/** Types of measurement that are positions in a section, in plain words; anything else is a measurement. */
const kinds: readonly (readonly [RegExp, Axis])[] = [
  [/^(?:stratigraphic|section|measured|stratigraphical) height(?: (?:in|above|of) .+)?$/, "height"],
  [/^height(?: (?:in|above) (?:the )?(?:section|base|datum).*)?$/, "height"],
  [/^(?:stratigraphic|core|section|sediment|well|borehole|burial) depth$/, "depth"],
  [
    /^depth(?: (?:in|below) (?:the )?(?:core|section|surface|sea ?floor|sediment|ground|rig floor|sea ?bed).*)?$/,
    "depth",
  ],
];

const axisOf = (type: string): Axis | undefined => {
  const plain = type
    .trim()
    .toLowerCase()
    .replace(/[\s_-]+/g, " ");
  return kinds.find(([form]) => form.test(plain))?.[1];
};

/** Positions by the event or occurrence that they were measured on, and the rows that are true measurements. */
export function partPositions(rows: readonly DarwinRow[]): {
  readonly positions: ReadonlyMap<string, StatedPosition>;
  readonly rest: readonly DarwinRow[];
} {
  const positions = new Map<string, StatedPosition>();
  const rest = rows.filter((row) => {
    const value = (term: string) => (row.values.get(term) ?? "").trim();
    const axis = axisOf(value("measurementType"));
    const of = value("occurrenceID") || value("eventID") || row.id;
    if (axis === undefined || value("measurementValue") === "" || positions.has(of)) return true;
    const unit = value("measurementUnit");
    positions.set(of, { value: value("measurementValue"), axis, unit: lengthUnit(unit) ?? unit });
    return false;
  });
  return { positions, rest };
}
