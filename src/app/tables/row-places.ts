import type { Section } from "../../core/study/model.ts";

/** What a row of a table says of a section, in metres of height. */
export interface RowPlace {
  readonly section: string;
  readonly baseM: number;
  readonly topM: number;
}

/** Where each row of a file lies that was read and placed, by the row as the study counts it. */
export function rowPlaces(sections: readonly Section[], file: string): ReadonlyMap<number, RowPlace> {
  const places = new Map<number, RowPlace>();
  for (const section of sections)
    for (const { row, baseM, topM } of placedRows(section, file)) {
      const known = places.get(row);
      const isSame = known?.section === section.name;
      places.set(row, {
        section: section.name,
        baseM: isSame ? Math.min(known.baseM, baseM) : baseM,
        topM: isSame ? Math.max(known.topM, topM) : topM,
      });
    }
  return places;
}

interface PlacedRow {
  readonly row: number;
  readonly baseM: number;
  readonly topM: number;
}

function placedRows(section: Section, file: string): readonly PlacedRow[] {
  const spans = [
    ...section.beds,
    ...section.intervals,
    ...section.samples,
    ...section.measurements,
    ...section.publishedRanges.map((range) => ({ ...range, baseM: range.firstM, topM: range.lastM })),
  ];
  const levels = [...section.occurrences, ...section.searches, ...section.horizons, ...section.recovery];
  return [
    ...spans.flatMap(({ origin, baseM, topM }) =>
      origin.file === file ? [{ row: origin.row, baseM, topM }] : [],
    ),
    ...levels.flatMap(({ origin, heightM }) =>
      origin?.file === file ? [{ row: origin.row, baseM: heightM, topM: heightM }] : [],
    ),
  ];
}

/** The row nearest to a height of a section; of several, the first. */
export function nearestRow(
  places: ReadonlyMap<number, RowPlace>,
  section: string,
  heightM: number,
): number | undefined {
  let nearest: { readonly row: number; readonly distance: number } | undefined;
  for (const [row, { section: own, baseM, topM }] of places) {
    if (own !== section) continue;
    const distance =
      Math.max(baseM - heightM, heightM - topM, 0) + 1e-9 * Math.abs((baseM + topM) / 2 - heightM);
    if (nearest === undefined || distance < nearest.distance) nearest = { row, distance };
  }
  return nearest?.row;
}
