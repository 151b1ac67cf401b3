import { type Coded, encode, valueAt } from "./coded.ts";
import type { Occurrence, OccurrenceColumns, Occurrences } from "./occurrence.ts";
import type { Stand } from "./origin.ts";

class ColumnOccurrences implements Occurrences {
  readonly columns: OccurrenceColumns;
  readonly length: number;

  constructor(columns: OccurrenceColumns) {
    this.columns = columns;
    this.length = columns.rows.length;
  }

  at(index: number): Occurrence | undefined {
    const place = index < 0 ? index + this.length : index;
    return place >= 0 && place < this.length ? occurrenceAt(this.columns, place) : undefined;
  }

  *[Symbol.iterator](): Generator<Occurrence> {
    for (let index = 0; index < this.length; index++) yield occurrenceAt(this.columns, index);
  }
}

/** Finds kept by column: a million of them in some ten bytes each. */
export const columnOccurrences = (columns: OccurrenceColumns): Occurrences => new ColumnOccurrences(columns);

function occurrenceAt(columns: OccurrenceColumns, index: number): Occurrence {
  const find: { -readonly [K in keyof Occurrence]: Occurrence[K] } = {
    verbatim: valueAt(columns.verbatim, index),
    taxon: valueAt(columns.taxon, index),
    heightM: valueAt(columns.heightM, index),
    reworked: valueAt(columns.reworked, index),
    doubtful: valueAt(columns.doubtful, index),
    origin: { file: fileOf(columns, index), row: columns.rows[index] },
  };
  const qualifier = valueAt(columns.qualifier, index);
  if (qualifier !== undefined) find.qualifier = qualifier;
  const sample = valueAt(columns.sample, index);
  if (sample !== undefined) find.sample = sample;
  const positionErrorM = valueAt(columns.positionErrorM, index);
  if (positionErrorM !== undefined) find.positionErrorM = positionErrorM;
  const leg = valueAt(columns.leg, index);
  if (leg !== undefined) find.leg = leg;
  const count = valueAt(columns.count, index);
  if (count !== undefined) find.count = count;
  const abundance = valueAt(columns.abundance, index);
  if (abundance !== undefined) find.abundance = abundance;
  return find;
}

const fileOf = ({ file, stands }: OccurrenceColumns, index: number): string =>
  stands === undefined ? file : valueAt(stands, index).file;

/** What a wide sheet says in the cell of a find, not beside it. */
const inCell: ReadonlySet<string> = new Set([
  "taxon",
  "count",
  "abundance",
  "qualifier",
  "reworked",
  "doubtful",
]);

/** The header of the column that says something of a find. */
export const columnOfFind = (stand: Stand | undefined, column: string): string =>
  inCell.has(column) ? (stand?.column ?? column) : column;

/** Where what a column says of a find stands. */
export const placeOfFind = (
  columns: Pick<OccurrenceColumns, "file" | "stands"> & { readonly rows: ArrayLike<number> },
  find: number,
  column: string,
) => ({
  file: columns.stands === undefined ? columns.file : valueAt(columns.stands, find).file,
  row: columns.rows[find],
  column: columnOfFind(columns.stands && valueAt(columns.stands, find), column),
});

/** The columns of finds. */
export function occurrenceColumns(finds: Occurrences): OccurrenceColumns {
  if (finds.columns !== undefined) return finds.columns;
  const all = [...finds];
  const column = <T>(valueOf: (find: Occurrence) => T): Coded<T> => encode(all.map(valueOf));
  return {
    file: all[0]?.origin.file ?? "",
    rows: Int32Array.from(all, ({ origin }) => origin.row),
    verbatim: column(({ verbatim }) => verbatim),
    taxon: column(({ taxon }) => taxon),
    qualifier: column(({ qualifier }) => qualifier),
    sample: column(({ sample }) => sample),
    heightM: column(({ heightM }) => heightM),
    positionErrorM: column(({ positionErrorM }) => positionErrorM),
    leg: column(({ leg }) => leg),
    count: column(({ count }) => count),
    abundance: column(({ abundance }) => abundance),
    reworked: column(({ reworked }) => reworked),
    doubtful: column(({ doubtful }) => doubtful),
  };
}
