import { mapValues, type Numbered, numbered, rowsByValue, valueAt } from "../coded.ts";
import type { Occurrence, Occurrences, Origin, Taxon } from "../model.ts";
import { columnOccurrences, placeOfFind } from "../occurrence-list.ts";
import { type ParsedName, parseName } from "../open-nomenclature.ts";
import { occurrences } from "../tables/occurrences.ts";
import { type Assembly, originOf, type SectionFrame } from "./context.ts";
import { columnsOfFinds } from "./find-list.ts";
import { type Frames, frameReader } from "./frame-for.ts";
import { isQualifier, onlyQualifier } from "./one-mend.ts";
import { type Place, type PlaceSearch, placeOf } from "./place.ts";
import type { SampleLists } from "./read-samples.ts";
import { areAlike } from "./repeated-rows.ts";
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
  const { columns, rowNumbers, usable } = cells;
  const originAt = (index: number): Origin => originOf(read, index);
  const frameOf = frameReader(columns.section, originAt, { frames, read, assembly });
  const places = numbered<Place>(rowNumbers.length);
  const names = numbered<ParsedName>(rowNumbers.length);
  const placeAt = placeReader(cells, places, { samples, assembly, originAt });
  const nameAt = nameReader(cells, names, { taxa, assembly, originAt });
  const hasOdd = columns.count.values.includes(0) || columns.qualifier.values.some(isOddQualifier);
  const kept = new Int32Array(usable.length);
  let count = 0;
  for (let at = 0; at < usable.length; at++) {
    const index = usable[at];
    const frame = frameOf(index);
    if (!frame || !placeAt(index, frame)) continue;
    if (hasOdd) tellOdd(cells, index, assembly);
    nameAt(index);
    kept[count] = index;
    count += 1;
  }
  const placed = { cells, place: places, name: names };
  const sections = mapValues(columns.section, (name) => name);
  const bySection = new Map<string, Occurrences>();
  for (const indices of rowsByValue(sections, kept.subarray(0, count))) {
    const frame = frameOf(indices[0]);
    if (frame) bySection.set(frame.name, columnOccurrences(columnsOfFinds(placed, frame, indices)));
  }
  return bySection;
}

interface RowOrigins {
  readonly originAt: (index: number) => Origin;
}

type FindCells = ReadCells<typeof occurrences>;

/** Gives each row its name, each distinct one parsed once, and its taxon a row where it has none. */
function nameReader(
  { columns: { taxon, qualifier } }: FindCells,
  names: Numbered<ParsedName>,
  { taxa, assembly, originAt }: Pick<Naming, "taxa" | "assembly"> & RowOrigins,
) {
  const parsed = (index: number): number => {
    const name = parseName(valueAt(taxon, index), valueAt(qualifier, index) ?? "");
    if (!taxa.has(name.name))
      addTaxon(valueAt(taxon, index), { name, origin: originAt(index), taxa, assembly });
    return names.values.push(name);
  };
  // Most finds have one qualifier, or none.
  const usual = new Int32Array(taxon.values.length);
  const known = new Map<number, number>();
  return (index: number): void => {
    const of = taxon.codes[index];
    const sign = qualifier.codes[index];
    const key = of * qualifier.values.length + sign;
    let number = sign === 0 ? usual[of] : (known.get(key) ?? 0);
    if (number === 0) {
      number = parsed(index);
      if (sign === 0) usual[of] = number;
      else known.set(key, number);
    }
    names.codes[index] = number - 1;
  };
}

/** Gives each row its place; rows that follow each other often name one sample, and so have one. */
function placeReader(
  { columns }: FindCells,
  places: Numbered<Place>,
  { samples, assembly, originAt }: Omit<PlaceSearch, "origin"> & RowOrigins,
): (index: number, frame: SectionFrame) => boolean {
  const { section, sample, position, leg } = columns;
  const placing = [section.codes, sample.codes, position.codes, leg.codes];
  let last: number | undefined;
  return (index, frame) => {
    if (last === undefined || !areAlike(placing, last, index)) {
      const own = {
        sample: valueAt(sample, index),
        position: valueAt(position, index),
        leg: valueAt(leg, index),
      };
      const place = placeOf(own, frame, { samples, assembly, origin: originAt(index) });
      last = place && index;
      if (place !== undefined) places.values.push(place);
    }
    places.codes[index] = places.values.length - 1;
    return last !== undefined;
  };
}

const isOddQualifier = (written: string | undefined): boolean =>
  written !== undefined && !isQualifier(written);

/** A count of nothing, and a qualifier that is no sign of open nomenclature and says nothing of the name. */
function tellOdd(cells: FindCells, index: number, { problems }: Assembly): void {
  const { columns } = cells;
  const placeIn = (column: string) => placeOfFind({ ...cells, rows: cells.rowNumbers }, index, column);
  if (valueAt(columns.count, index) === 0)
    problems.addOnce("count", "count-zero", { ...placeIn("count"), found: "0" });
  const written = valueAt(columns.qualifier, index);
  if (written === undefined || isQualifier(written)) return;
  const now = onlyQualifier(written);
  const place = placeIn("qualifier");
  const subject = JSON.stringify([written, now && place.row]);
  problems.addOnce(subject, "unknown-qualifier", { ...place, found: written, now });
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
