import { formatGiven, givenToHeight } from "../heights.ts";
import type { legs } from "../tables/legs.ts";
import { thicknessAlongTape } from "../thickness-along-tape.ts";
import { toMetres } from "../units.ts";
import type { Assembly, Row, SectionFrame } from "./context.ts";

export type LegRow = Row<typeof legs>;

/** Under this part of the tape (the sine of 5 degrees) a slip of a degree or two changes the thickness by half. */
const leastGain = 0.0872;

/** Share of a stretch's thickness, and length, by which a given and a computed position may differ unremarked. */
const misfitShare = 0.1;
const misfitM = 0.1;

/** Compass readings are whole degrees. */
const sameBearing = 0.5;

/** True where every angle that a stretch of tape needs stands in its row. */
const hasAngles = ({ cells }: LegRow): boolean =>
  [cells.tape_bearing_deg, cells.tape_slope_deg, cells.dip_deg].every((angle) => angle !== undefined) &&
  (cells.dip_direction_deg ?? cells.strike_right_hand_deg) !== undefined;

/** Thickness gained for each unit of tape on the stretch that ends at a row; undefined where an angle lacks. */
function gainOf({ cells }: LegRow): number | undefined {
  const { tape_bearing_deg: tapeBearing, tape_slope_deg: tapeSlope, dip_deg: dip } = cells;
  const dipDirection = cells.dip_direction_deg ?? rightOf(cells.strike_right_hand_deg);
  if (tapeBearing === undefined || tapeSlope === undefined || dip === undefined || dipDirection === undefined)
    return undefined;
  return thicknessAlongTape({
    tapeBearing,
    tapeSlope,
    dip,
    dipDirection,
    isOverturned: cells.overturned ?? false,
  });
}

const rightOf = (strike: number | undefined) => (strike === undefined ? undefined : (strike + 90) % 360);

/** False, and told, where a row gives a strike and a dip direction that belong to different beds. */
export function isBeddingSound({ cells, origin }: LegRow, assembly: Assembly): boolean {
  const { dip_direction_deg: direction, strike_right_hand_deg: strike } = cells;
  const fromStrike = rightOf(strike);
  if (direction === undefined || fromStrike === undefined) return true;
  const apart = Math.abs(direction - fromStrike) % 360;
  if (Math.min(apart, 360 - apart) <= sameBearing) return true;
  const detail = `strike ${strike} by the right-hand rule means dip direction ${fromStrike}`;
  assembly.problems.add("strike-contradicted", {
    ...origin,
    column: "dip_direction_deg",
    found: String(direction),
    detail,
  });
  return false;
}

/**
 * Heights of a leg's rows, in metres, `rows` in the order of their readings: as given, else from the row before by the
 * angles of the row itself; rows before the first given position from the row after. Undefined, and told, where no chain
 * reaches a row.
 */
export function legHeights(
  leg: string,
  rows: readonly LegRow[],
  { frame, assembly }: { readonly frame: SectionFrame; readonly assembly: Assembly },
): readonly number[] | undefined {
  const given = rows.map(({ cells }) =>
    cells.position === undefined ? undefined : givenToHeight(cells.position, frame),
  );
  const first = given.findIndex((height) => height !== undefined);
  const untied = firstUntied(rows, first);
  if (untied !== undefined) {
    assembly.problems.add("leg-not-tied", { ...untied.origin, column: "position", found: "", detail: leg });
    return undefined;
  }
  const gained = rows.map((row, i) => {
    const gain = i === 0 ? undefined : gainOf(row);
    return gain === undefined
      ? undefined
      : gain * toMetres(row.cells.reading - rows[i - 1].cells.reading, frame.unit);
  });
  const heights = given.map((height) => height ?? 0);
  for (let i = first - 1; i >= 0; i--) heights[i] = heights[i + 1] - (gained[i + 1] ?? 0);
  for (let i = first + 1; i < rows.length; i++) heights[i] = given[i] ?? heights[i - 1] + (gained[i] ?? 0);
  tellStretches(leg, rows, { gained, given, heights, frame, assembly });
  return heights;
}

/** The row that nothing ties to the section: no row has a position, or angles lack on the way down from the first that has. */
function firstUntied(rows: readonly LegRow[], first: number): LegRow | undefined {
  if (first < 0) return rows[0];
  const broken = rows.findIndex((row, i) => i > 0 && i <= first && !hasAngles(row));
  return broken < 0 ? undefined : rows[broken - 1];
}

interface Stretches {
  readonly gained: readonly (number | undefined)[];
  readonly given: readonly (number | undefined)[];
  readonly heights: readonly number[];
  readonly frame: SectionFrame;
  readonly assembly: Assembly;
}

/** Cautions on stretches of tape that give little or no thickness, or another one than the positions say. */
function tellStretches(leg: string, rows: readonly LegRow[], stretches: Stretches): void {
  const { gained, given, heights, frame, assembly } = stretches;
  for (const [i, row] of rows.entries()) {
    const gainM = gained[i];
    if (i === 0 || gainM === undefined) continue;
    const isBoth = given[i] !== undefined && given[i - 1] !== undefined;
    const tapeM = toMetres(row.cells.reading - rows[i - 1].cells.reading, frame.unit);
    if (!isBoth && Math.abs(gainM) < leastGain * tapeM) {
      const found = `${formatGiven(Math.abs(gainM), lengthScale(frame))} of rock on ${formatGiven(tapeM, lengthScale(frame))} of tape`;
      assembly.problems.add("tape-along-bedding", { ...row.origin, column: "dip_deg", found, detail: leg });
    }
    const missM = heights[i] - (heights[i - 1] + gainM);
    if (Math.abs(missM) <= Math.max(misfitM, misfitShare * Math.abs(gainM))) continue;
    const computed = formatGiven(heights[i - 1] + gainM, frame);
    assembly.problems.add("leg-misfit", {
      ...row.origin,
      column: "position",
      found: String(row.cells.position),
      detail: computed,
    });
  }
}

/** Lengths are written without their axis. */
const lengthScale = ({ unit }: SectionFrame) => ({ unit, axis: "height" as const });
