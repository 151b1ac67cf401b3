import type { PublishedRange, RecoveryPoint } from "../model.ts";
import { publishedRanges } from "../tables/published-ranges.ts";
import { recovery } from "../tables/recovery.ts";
import { type Assembly, type BySection, gather, present } from "./context.ts";
import { type Frames, frameFor } from "./frame-for.ts";
import { heightOf, lengthOf } from "./position.ts";
import { rowsOf } from "./rows.ts";

/** Published ranges by section, in the order of the file. */
export function readPublishedRanges(frames: Frames, assembly: Assembly): BySection<PublishedRange> {
  const read = assembly.sheets.get("published-ranges");
  const lists = new Map<string, PublishedRange[]>();
  if (!read) return lists;
  for (const { cells, origin } of rowsOf(publishedRanges, assembly)) {
    const frame = frameFor(cells.section, origin, { frames, read, assembly });
    const firstM = frame && heightOf(cells.first, frame, { origin, column: "first", assembly });
    const lastM = frame && heightOf(cells.last, frame, { origin, column: "last", assembly });
    if (!frame || firstM === undefined || lastM === undefined) continue;
    if (lastM < firstM) {
      const found = `first ${cells.first}, last ${cells.last}`;
      assembly.problems.add("last-below-first", { ...origin, column: "last", found });
      continue;
    }
    if (lists.get(frame.name)?.some(({ taxon }) => taxon === cells.taxon)) {
      const detail = `the range of ${cells.taxon} in ${frame.name}`;
      assembly.problems.add("redefined", { ...origin, column: "taxon", found: cells.taxon, detail });
      continue;
    }
    const errors = {
      firstErrorM: lengthOf(cells.first_error, frame),
      lastErrorM: lengthOf(cells.last_error, frame),
    };
    gather(lists, frame.name, {
      taxon: cells.taxon,
      firstM,
      lastM,
      horizons: cells.horizons,
      ...present(errors),
      counted: cells.counted ?? "horizons",
      origin,
    });
  }
  return lists;
}

/** Recovery potential by section, in the order of the file: a repeated position is a jump. */
export function readRecovery(frames: Frames, assembly: Assembly): BySection<RecoveryPoint> {
  const read = assembly.sheets.get("recovery");
  const lists = new Map<string, RecoveryPoint[]>();
  if (!read) return lists;
  for (const { cells, origin } of rowsOf(recovery, assembly)) {
    const frame = frameFor(cells.section, origin, { frames, read, assembly });
    const heightM = frame && heightOf(cells.position, frame, { origin, column: "position", assembly });
    if (!frame || heightM === undefined) continue;
    gather(lists, frame.name, { group: cells.group, heightM, recovery: cells.recovery, origin });
  }
  return lists;
}
