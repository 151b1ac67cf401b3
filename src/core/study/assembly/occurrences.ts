import { type Coded, valueAt } from "../coded.ts";
import type { Occurrence, Occurrences, Origin, Taxon } from "../model.ts";
import { columnOccurrences } from "../occurrence-list.ts";
import { type ParsedName, parseName } from "../open-nomenclature.ts";
import { occurrences } from "../tables/occurrences.ts";
import { type Assembly, gather, type SectionFrame } from "./context.ts";
import { columnsOfFinds } from "./find-list.ts";
import { type FrameSearch, type Frames, frameFor } from "./frame-for.ts";
import { isQualifier, onlyQualifier } from "./one-mend.ts";
import { type Place, type PlaceSearch, placeOf } from "./place.ts";
import type { SampleLists } from "./read-samples.ts";
import { type ReadCells, readCells } from "./rows.ts";
import { genusGroup, tellUngrouped, ungrouped } from "./taxa.ts";

/** Every usable find by section, in the order of the file. Taxa met without a row are added to `taxa` as ungrouped. */
export function readOccurrences(
  frames: Frames,
  { samples, taxa }: { readonly samples: SampleLists; readonly taxa: Map<string, Taxon> },
  assembly: Assembly,
): ReadonlyMap<string, Occurrences> {
  const read = assembly.sheets.get("occurrences");
  const cells = readCells(occurrences, assembly);
  if (!read || !cells) return new Map();
  const { columns, file, rowNumbers, usable } = cells;
  const frameOf = frameReader({ frames, read, assembly, cells });
  const places = numbered<Place>(rowNumbers.length);
  const names = numbered<ParsedName>(rowNumbers.length);
  const placeAt = placeReader(cells, places, { samples, assembly });
  const nameAt = nameReader(cells, names);
  const bySection = new Map<SectionFrame, number[]>();
  for (const index of usable) {
    const row = rowNumbers[index];
    const frame = frameOf(columns.section.codes[index], { file, row });
    if (!frame || !placeAt(index, frame, { file, row })) continue;
    const name = nameAt(index);
    if (valueAt(columns.count, index) === 0)
      assembly.problems.addOnce("count", "count-zero", { file, row, column: "count", found: "0" });
    const qualifier = valueAt(columns.qualifier, index);
    if (qualifier !== undefined) tellQualifier(qualifier, { file, row }, assembly);
    if (!taxa.has(name.name))
      addTaxon(valueAt(columns.taxon, index), { name, origin: { file, row }, taxa, assembly });
    gather(bySection, frame, index);
  }
  const placed = { cells, place: places, name: names };
  return new Map(
    [...bySection].map(([frame, indices]) => [
      frame.name,
      columnOccurrences(columnsOfFinds(placed, frame, Int32Array.from(indices))),
    ]),
  );
}

/** Things given to rows as they are met. */
interface Numbered<T> extends Coded<T> {
  readonly values: T[];
  readonly codes: Int32Array;
}

const numbered = <T>(rows: number): Numbered<T> => ({ values: [], codes: new Int32Array(rows) });

type FindCells = ReadCells<typeof occurrences>;

/** The frame of a section that can be used is looked up once; what is wrong with another is told row by row. */
function frameReader(search: FrameSearch & { readonly cells: FindCells }) {
  const { section } = search.cells.columns;
  const known: (SectionFrame | undefined)[] = section.values.map(() => undefined);
  return (code: number, origin: Origin): SectionFrame | undefined => {
    known[code] ??= frameFor(section.values[code], origin, search);
    return known[code];
  };
}

/** Gives each row its name, each distinct one parsed once. */
function nameReader({ columns: { taxon, qualifier } }: FindCells, names: Numbered<ParsedName>) {
  const known = new Map<number, number>();
  return (index: number): ParsedName => {
    const key = taxon.codes[index] * qualifier.values.length + qualifier.codes[index];
    const code =
      known.get(key) ??
      names.values.push(parseName(valueAt(taxon, index), valueAt(qualifier, index) ?? "")) - 1;
    known.set(key, code);
    names.codes[index] = code;
    return names.values[code];
  };
}

/** Gives each row its place; rows that follow each other often name one sample, and so have one. */
function placeReader(
  { columns }: FindCells,
  places: Numbered<Place>,
  search: Omit<PlaceSearch, "origin">,
): (index: number, frame: SectionFrame, origin: Origin) => boolean {
  const { section, sample, position, leg } = columns;
  const placing = [section.codes, sample.codes, position.codes, leg.codes];
  let last: number | undefined;
  return (index, frame, origin) => {
    const before = last;
    if (before === undefined || placing.some((codes) => codes[index] !== codes[before])) {
      const own = {
        sample: valueAt(sample, index),
        position: valueAt(position, index),
        leg: valueAt(leg, index),
      };
      const place = placeOf(own, frame, { ...search, origin });
      last = place && index;
      if (place !== undefined) places.values.push(place);
    }
    places.codes[index] = places.values.length - 1;
    return last !== undefined;
  };
}

/** A qualifier that is no sign of open nomenclature says nothing of the name. */
function tellQualifier(written: string, origin: Origin, { problems }: Assembly): void {
  if (isQualifier(written)) return;
  const now = onlyQualifier(written);
  const subject = JSON.stringify([written, now && origin.row]);
  problems.addOnce(subject, "unknown-qualifier", { ...origin, column: "qualifier", found: written, now });
}

/** True for a find that is not identified to the species, and so never ends a range. */
export const isToGenus = ({ qualifier }: Pick<Occurrence, "qualifier">): boolean =>
  qualifier === "sp." || qualifier === "spp." || qualifier === "indet.";

/** A name without a row of its own takes the group of the row that spells it as the find does, or of its genus. */
function addTaxon(verbatim: string, { name: { name, qualifier }, origin, taxa, assembly }: Naming): void {
  const group = taxa.get(verbatim)?.group ?? (isToGenus({ qualifier }) ? genusGroup(name, taxa) : undefined);
  const taxon: Taxon = { name, group: group ?? ungrouped, traits: {}, notes: "", origin };
  taxa.set(name, taxon);
  if (group === undefined) tellUngrouped(taxon, assembly);
}

interface Naming {
  readonly name: ParsedName;
  readonly origin: Origin;
  readonly taxa: Map<string, Taxon>;
  readonly assembly: Assembly;
}
