import type { Section } from "../../core/study/model.ts";
import type { Occurrences } from "../../core/study/occurrence.ts";
import type { Origin } from "../../core/study/origin.ts";

/** What a row of a table says of a section, in metres of height. */
export interface RowPlace {
  readonly section: string;
  readonly baseM: number;
  readonly topM: number;
}

/** Where a row of a file lies, by the row as the study counts it; undefined where it was not read or not placed. */
export function rowPlace(sections: readonly Section[], file: string, row: number): RowPlace | undefined {
  for (const section of sections.toReversed()) {
    const own = [...placedItems(section, file)].filter((item) => item.row === row);
    const found = [...own, ...foundAt(section.occurrences, file, row)];
    if (found.length === 0) continue;
    return {
      section: section.name,
      baseM: Math.min(...found.map(({ baseM }) => baseM)),
      topM: Math.max(...found.map(({ topM }) => topM)),
    };
  }
  return undefined;
}

/** The row of a file nearest to a height of a section; of several, the first. */
export function nearestRow(section: Section, file: string, heightM: number): number | undefined {
  let nearest: { readonly row: number; readonly distance: number } | undefined;
  const look = ({ row, baseM, topM }: PlacedRow) => {
    const distance =
      Math.max(baseM - heightM, heightM - topM, 0) + 1e-9 * Math.abs((baseM + topM) / 2 - heightM);
    if (nearest === undefined || distance < nearest.distance) nearest = { row, distance };
  };
  for (const placed of placedItems(section, file)) look(placed);
  for (const placed of placedFinds(section.occurrences, file)) look(placed);
  return nearest?.row;
}

interface PlacedRow {
  readonly row: number;
  readonly baseM: number;
  readonly topM: number;
}

interface Placed {
  readonly origin?: Origin;
  readonly heightM?: number;
  readonly baseM?: number;
  readonly topM?: number;
  readonly firstM?: number;
  readonly lastM?: number;
}

/** All that a section holds from a file but its finds, which can be very many. */
function* placedItems(section: Section, file: string): Generator<PlacedRow> {
  const lists: readonly (readonly Placed[])[] = [
    section.beds,
    section.intervals,
    section.samples,
    section.measurements,
    section.publishedRanges,
    section.searches,
    section.horizons,
    section.recovery,
  ];
  for (const list of lists)
    for (const { origin, heightM = 0, baseM, topM, firstM, lastM } of list)
      if (origin?.file === file)
        yield { row: origin.row, baseM: baseM ?? firstM ?? heightM, topM: topM ?? lastM ?? heightM };
}

const placeOf = (heightM: number, row: number): PlacedRow => ({ row, baseM: heightM, topM: heightM });

function foundAt(finds: Occurrences, file: string, row: number): readonly PlacedRow[] {
  if (finds.columns === undefined) return [...placedFinds(finds, file)].filter((find) => find.row === row);
  const { file: own, rows, heightM } = finds.columns;
  const at = own === file ? rows.indexOf(row) : -1;
  if (at < 0) return [];
  // The finds of a row of a wide sheet stand one behind the other.
  const places: PlacedRow[] = [];
  for (let next = at; rows[next] === row; next++)
    places.push(placeOf(heightM.values[heightM.codes[next]], row));
  return places;
}

function* placedFinds(finds: Occurrences, file: string): Generator<PlacedRow> {
  if (finds.columns === undefined) {
    for (const { origin, heightM } of finds) if (origin.file === file) yield placeOf(heightM, origin.row);
    return;
  }
  const { file: own, rows, heightM } = finds.columns;
  if (own !== file) return;
  for (let at = 0; at < rows.length; at++) yield placeOf(heightM.values[heightM.codes[at]], rows[at]);
}
