import { givenToHeight } from "../heights.ts";
import type { HeightInterval } from "../intervals.ts";
import { legHeight } from "../legs.ts";
import type { Origin } from "../model.ts";
import { suggestName } from "../nearest.ts";
import { toMetres } from "../units.ts";
import type { Assembly, SectionFrame } from "./context.ts";
import { sameButForForm } from "./one-mend.ts";

export interface PositionCell {
  readonly origin: Origin;
  readonly column: string;
  readonly leg?: string;
}

/** The height of a position cell: the section's own scale, or the reading of its leg; undefined with the problem told. */
export function heightOf(
  position: number,
  frame: SectionFrame,
  { origin, column, leg: name, assembly }: PositionCell & { readonly assembly: Assembly },
): number | undefined {
  if (name === undefined) return frame.level(givenToHeight(position, frame));
  const leg = frame.legs.get(name);
  if (!leg) {
    if (frame.legsLeftOut?.has(name)) {
      const subject = JSON.stringify([frame.name, name]);
      assembly.problems.addOnce(subject, "leg-left-out", { ...origin, column: "leg", found: name });
      return undefined;
    }
    const nearest = suggestName(name, frame.legs.keys());
    const now = sameButForForm(name, frame.legs.keys());
    const place = { ...origin, column: "leg", found: name, nearest, now };
    // Without any leg of the section it is one omission, not a mistake of each row.
    if (frame.legs.size === 0)
      assembly.problems.addOnce(JSON.stringify([frame.name, name]), "unknown-leg", place);
    else assembly.problems.add("unknown-leg", place);
    return undefined;
  }
  const height = legHeight(leg, position);
  if (height !== undefined) return frame.level(height);
  const detail = `${leg.readings[0]} to ${leg.readings.at(-1)} ${frame.unit} on leg ${name}`;
  assembly.problems.add("outside-leg", { ...origin, column, found: String(position), detail });
  return undefined;
}

/** Metres of a length in the section's own unit. */
export const lengthOf = (length: number | undefined, frame: SectionFrame): number | undefined =>
  length === undefined ? undefined : toMetres(length, frame.unit);

export interface Slab {
  readonly baseM: number;
  readonly topM: number;
  readonly heightM: number;
}

export interface SlabCells {
  readonly position?: number;
  readonly base?: number;
  readonly top?: number;
  readonly thickness?: number;
  readonly leg?: string;
}

/** Base, top and middle of a slab given by its ends, by middle and thickness, or as a point. */
export function slabOf(
  cells: SlabCells,
  frame: SectionFrame,
  place: { readonly origin: Origin; readonly assembly: Assembly },
): Slab | undefined {
  const { position, base, top, leg } = cells;
  if (isHalfSlab(cells, place)) return undefined;
  if (base !== undefined && top !== undefined) {
    if (position !== undefined && (position - base) * (position - top) > 0) {
      const found = `position ${position}, base ${base}, top ${top}`;
      place.assembly.problems.add("position-outside-slab", { ...place.origin, column: "position", found });
      return undefined;
    }
    const ends = endsOf(base, top, { ...place, frame, leg });
    return ends && { ...ends, heightM: frame.level((ends.baseM + ends.topM) / 2) };
  }
  if (position === undefined) return undefined;
  const heightM = heightOf(position, frame, { ...place, column: "position", leg });
  if (heightM === undefined) return undefined;
  const half = (lengthOf(cells.thickness, frame) ?? 0) / 2;
  if (half === 0) return { baseM: heightM, topM: heightM, heightM };
  return { baseM: frame.level(heightM - half), topM: frame.level(heightM + half), heightM };
}

/** True, and told, where one of base and top stands alone. */
export function isHalfSlab(
  { base, top }: SlabCells,
  { origin, assembly }: { readonly origin: Origin; readonly assembly: Assembly },
): boolean {
  if ((base === undefined) === (top === undefined)) return false;
  const [column, found] = base === undefined ? ["base", `top ${top}`] : ["top", `base ${base}`];
  assembly.problems.add("half-slab", { ...origin, column, found });
  return true;
}

interface Ends {
  readonly origin: Origin;
  readonly assembly: Assembly;
  readonly frame: SectionFrame;
  readonly leg?: string;
  /** False where base and top must differ. */
  readonly isPointAllowed?: boolean;
}

/** Heights of base and top; top below base is told. */
export function endsOf(base: number, top: number, ends: Ends): HeightInterval | undefined {
  const { origin, assembly, frame, leg, isPointAllowed = true } = ends;
  const baseM = heightOf(base, frame, { origin, column: "base", leg, assembly });
  const topM = heightOf(top, frame, { origin, column: "top", leg, assembly });
  if (baseM === undefined || topM === undefined) return undefined;
  if (topM < baseM || (topM === baseM && !isPointAllowed)) {
    const detail =
      frame.axis === "depth"
        ? "In a depth section base is the larger number: exchange base and top, or correct them."
        : undefined;
    assembly.problems.add("top-below-base", {
      ...origin,
      column: "top",
      found: `base ${base}, top ${top}`,
      detail,
    });
    return undefined;
  }
  return { baseM, topM };
}
