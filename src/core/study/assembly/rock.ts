import type { Bed, RockInterval } from "../model.ts";
import { beds } from "../tables/beds.ts";
import { intervals } from "../tables/intervals.ts";
import { type Assembly, type BySection, gather, present } from "./context.ts";
import { type Frames, frameFor } from "./frame-for.ts";
import { endsOf, lengthOf } from "./position.ts";
import { rowsOf } from "./rows.ts";

/** Intervals of hidden, missing, repeated or moved rock, by section, from below upward. */
export function readIntervals(frames: Frames, assembly: Assembly): BySection<RockInterval> {
  const read = assembly.sheets.get("intervals");
  const lists = new Map<string, RockInterval[]>();
  if (!read) return lists;
  for (const { cells, origin } of rowsOf(intervals, assembly)) {
    const frame = frameFor(cells.section, origin, { frames, read, assembly });
    const ends =
      frame &&
      endsOf(cells.base, cells.top, { origin, assembly, frame, isPointAllowed: cells.kind === "fault-cut" });
    if (!frame || !ends) continue;
    const thicknessLowM = lengthOf(cells.thickness_low, frame);
    const thicknessHighM = lengthOf(cells.thickness_high, frame);
    const { baseM, topM } = ends;
    gather(lists, frame.name, {
      kind: cells.kind,
      baseM,
      topM,
      ...present({ thicknessLowM, thicknessHighM }),
      notes: cells.notes ?? "",
      origin,
    });
  }
  return upward(lists);
}

/** The lithological log, by section, from below upward. */
export function readBeds(frames: Frames, assembly: Assembly): BySection<Bed> {
  const read = assembly.sheets.get("beds");
  const lists = new Map<string, Bed[]>();
  if (!read) return lists;
  for (const { cells, origin } of rowsOf(beds, assembly)) {
    const frame = frameFor(cells.section, origin, { frames, read, assembly });
    const ends = frame && endsOf(cells.base, cells.top, { origin, assembly, frame, isPointAllowed: false });
    if (!frame || !ends) continue;
    const { lithology, facies, bioturbation, formation, member } = cells;
    gather(lists, frame.name, {
      baseM: ends.baseM,
      topM: ends.topM,
      lithology,
      ...present({ facies, bioturbation, formation, member, baseContact: cells.base_contact }),
      ...present({ waterDepthM: cells.water_depth_m, carbonatePercent: cells.carbonate_percent }),
      notes: cells.notes ?? "",
      origin,
    });
  }
  return upward(lists);
}

function upward<T extends { readonly baseM: number; readonly topM: number }>(
  lists: Map<string, T[]>,
): BySection<T> {
  for (const list of lists.values()) list.sort((a, b) => a.baseM - b.baseM || a.topM - b.topM);
  return lists;
}
