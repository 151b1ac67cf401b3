import { type Coded, encode, mapValues, takeRows, valueAt } from "../coded.ts";
import type { OccurrenceColumns } from "../occurrence.ts";
import type { ParsedName } from "../open-nomenclature.ts";
import type { occurrences } from "../tables/occurrences.ts";
import type { SectionFrame } from "./context.ts";
import type { Place } from "./place.ts";
import { lengthOf } from "./position.ts";
import type { ReadCells } from "./rows.ts";

/** What the rows of finds come to: by the row's place, its name and its place in the rock. */
export interface PlacedFinds {
  readonly cells: ReadCells<typeof occurrences>;
  readonly name: Coded<ParsedName>;
  readonly place: Coded<Place>;
}

/** The finds of a section, given by the places of their rows, as columns; cells that say nothing take the error and the leg of their sample. */
export function columnsOfFinds(
  { cells: { file, rowNumbers, columns, stands }, ...all }: PlacedFinds,
  frame: SectionFrame,
  indices: Int32Array,
): OccurrenceColumns {
  const taken = <T>(column: Coded<T>): Coded<T> => takeRows(column, indices);
  const name = taken(all.name);
  const place = taken(all.place);
  return {
    file,
    rows: indices.map((index) => rowNumbers[index]),
    ...(stands && { stands: taken(stands) }),
    verbatim: taken(columns.taxon),
    taxon: mapValues(name, ({ name }) => name),
    qualifier: mapValues(name, ({ qualifier }) => qualifier),
    sample: mapValues(place, ({ sample }) => sample?.name),
    heightM: mapValues(place, ({ heightM }) => heightM),
    positionErrorM: overSample(
      mapValues(taken(columns.position_error), (error) => lengthOf(error, frame)),
      mapValues(place, ({ sample }) => sample?.positionErrorM),
    ),
    leg: overSample(
      taken(columns.leg),
      mapValues(place, ({ sample }) => sample?.leg),
    ),
    count: taken(columns.count),
    abundance: taken(columns.abundance),
    reworked: mapValues(taken(columns.reworked), (reworked) => reworked ?? "no"),
    doubtful: mapValues(taken(columns.doubtful), (doubtful) => doubtful ?? false),
  };
}

/** A find's own value, else its sample's. */
function overSample<T>(own: Coded<T | undefined>, ofSample: Coded<T | undefined>): Coded<T | undefined> {
  if (own.values.every((value) => value === undefined)) return ofSample;
  return encode(Array.from(own.codes, (_, find) => valueAt(own, find) ?? valueAt(ofSample, find)));
}
