import { givenToHeight } from "../heights.ts";
import { legs } from "../tables/legs.ts";
import { type Assembly, gather, type Row, type SectionFrame } from "./context.ts";
import { type Frames, frameFor } from "./frame-for.ts";
import { rowsOf } from "./rows.ts";

type LegRow = Row<typeof legs>;

/** The frames with their legs. A leg with a single row, or with one reading at two positions, is told. */
export function readLegs(frames: Frames, assembly: Assembly): Frames {
  const read = assembly.sheets.get("legs");
  if (!read) return frames;
  const bySection = new Map<string, Map<string, LegRow[]>>();
  for (const row of rowsOf(legs, assembly)) {
    const { section, leg } = row.cells;
    if (!frameFor(section, row.origin, { frames, read, assembly })) continue;
    const rows = bySection.get(section) ?? new Map<string, LegRow[]>();
    bySection.set(section, rows);
    gather(rows, leg, row);
  }
  const usable = new Map<string, SectionFrame>();
  for (const [name, frame] of frames.usable) usable.set(name, legsOf(frame, bySection.get(name), assembly));
  return { ...frames, usable };
}

function legsOf(frame: SectionFrame, rows: ReadonlyMap<string, LegRow[]> | undefined, assembly: Assembly) {
  const read = new Map(frame.legs);
  for (const [name, legRows] of rows ?? []) {
    const sorted = distinctReadings(legRows, assembly);
    if (sorted.length < 2) {
      assembly.problems.add("short-leg", { ...sorted[0].origin, column: "leg", found: name });
      continue;
    }
    tellTurns(name, sorted, assembly);
    read.set(name, {
      name,
      readings: sorted.map(({ cells }) => cells.reading),
      heightsM: sorted.map(({ cells }) => givenToHeight(cells.position, frame)),
    });
  }
  return { ...frame, legs: read };
}

function distinctReadings(rows: readonly LegRow[], assembly: Assembly): readonly LegRow[] {
  const byReading = new Map<number, LegRow>();
  for (const row of rows) {
    const { reading } = row.cells;
    if (byReading.has(reading)) {
      assembly.problems.add("repeated-reading", { ...row.origin, column: "reading", found: String(reading) });
    } else byReading.set(reading, row);
  }
  return [...byReading.values()].toSorted((a, b) => a.cells.reading - b.cells.reading);
}

/** A leg whose positions go up and then down: one of its readings is likely to be a slip. */
function tellTurns(leg: string, rows: readonly LegRow[], assembly: Assembly): void {
  const positions = rows.map(({ cells }) => cells.position);
  const way = Math.sign(positions[positions.length - 1] - positions[0]);
  const turn = positions.findIndex((position, i) => i > 0 && (position - positions[i - 1]) * (way || 1) < 0);
  if (turn > 0)
    assembly.problems.add("leg-turns-back", {
      ...rows[turn].origin,
      column: "position",
      found: String(positions[turn]),
      detail: leg,
    });
}
