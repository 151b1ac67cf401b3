import { type Coded, encode, mapValues, type Numbered, numbered, takeRows, valueAt } from "../coded.ts";
import type { Occurrences, Origin, Sample, Search, Taxon } from "../model.ts";
import { occurrenceColumns, placeOfFind } from "../occurrence-list.ts";
import { settingPath } from "../setting-path.ts";
import { searches } from "../tables/searches.ts";
import type { Assembly, BySection, ReadSheet, SectionFrame } from "./context.ts";
import { type Frames, frameReader } from "./frame-for.ts";
import type { SampleLists } from "./read-samples.ts";
import { firstAlike } from "./repeated-rows.ts";
import { type ReadCells, readCells } from "./rows.ts";
import { eachSearched, type SearchColumns, type SearchList } from "./search-list.ts";
import { searchesOfWide } from "./searches-of-wide.ts";
import { ungrouped } from "./taxa.ts";

export interface SearchContext {
  readonly samples: SampleLists;
  readonly taxa: ReadonlyMap<string, Taxon>;
  readonly occurrences: ReadonlyMap<string, Occurrences>;
}

/** Who looked for what where: the rows of searches.csv, or every sample for every group found in its section. */
export function readSearches(
  frames: Frames,
  context: SearchContext,
  assembly: Assembly,
): ReadonlyMap<string, SearchList> {
  const read = assembly.sheets.get("searches");
  const looked = assembly.sheets.get("occurrences");
  if (!read && looked?.looked) return listed(searchesOfWide(looked.looked, context, assembly));
  if (!read) return listed(deriveSearches(context, assembly));
  const cells = readCells(searches, assembly);
  if (!cells) return new Map();
  const samples = numbered<Sample>(cells.rowNumbers.length);
  const lists = new Map<string, SearchList>();
  for (const [frame, indices] of usableSearches({ cells, samples, frames, read }, context, assembly)) {
    const columns = columnsOfSearches(cells, samples, { indices: Int32Array.from(indices), read });
    lists.set(frame.name, { kind: "columns", columns });
  }
  tellUnsearched(lists, context, assembly);
  return lists;
}

const listed = (lists: BySection<Search>): ReadonlyMap<string, SearchList> =>
  new Map(Array.from(lists, ([section, items]) => [section, { kind: "items", items }]));

type SearchCells = ReadCells<typeof searches>;

interface SearchTable {
  readonly cells: SearchCells;
  /** Takes the sample of each row that can be used. */
  readonly samples: Numbered<Sample>;
  readonly frames: Frames;
  readonly read: ReadSheet;
}

/** The places of the rows that can be used, by section. */
function usableSearches(
  { cells, samples, frames, read }: SearchTable,
  context: SearchContext,
  assembly: Assembly,
): ReadonlyMap<SectionFrame, readonly number[]> {
  const { columns, usable, rowNumbers, file } = cells;
  const { section, sample, group, effort } = columns;
  const firstLike = firstAlike([section.codes, sample.codes, group.codes], rowNumbers.length);
  const originAt = (index: number): Origin => ({ file, row: rowNumbers[index] });
  const frameOf = frameReader(section, originAt, { frames, read, assembly });
  const hasEffort = effort.values.some((value) => value !== undefined);
  const bySection = new Map<SectionFrame, number[]>();
  let last: { readonly index: number; readonly rows: number[] } | undefined;
  for (const index of usable) {
    const isLike =
      last !== undefined &&
      section.codes[last.index] === section.codes[index] &&
      sample.codes[last.index] === sample.codes[index];
    if (last === undefined || !isLike) {
      last = undefined;
      const frame = frameOf(index);
      const known = frame && context.samples.bySection.get(frame.name);
      if (!frame || !known) continue;
      const own = known.get(valueAt(sample, index));
      if (!own) {
        tellUnknownSample(
          valueAt(sample, index),
          { ...originAt(index), section: frame.name },
          { context, assembly },
        );
        continue;
      }
      samples.values.push(own);
      const rows = bySection.get(frame) ?? [];
      bySection.set(frame, rows);
      last = { index, rows };
    }
    const first = firstLike(index);
    if (first !== undefined) {
      tellTwice({ cells, index, first }, assembly);
      continue;
    }
    if (hasEffort)
      tellUnitless(valueAt(effort, index), valueAt(columns.effort_unit, index), {
        origin: originAt(index),
        read,
        assembly,
      });
    samples.codes[index] = samples.values.length - 1;
    last.rows.push(index);
  }
  return bySection;
}

function tellUnknownSample(
  found: string,
  { section, ...origin }: Origin & { readonly section: string },
  { context, assembly }: { readonly context: SearchContext; readonly assembly: Assembly },
): void {
  const meant = context.samples.meant(section, found);
  assembly.problems.add("unknown-sample", { ...origin, column: "sample", found, ...meant });
}

interface SearchTwice {
  readonly cells: SearchCells;
  readonly index: number;
  readonly first: number;
}

function tellTwice({ cells, index, first }: SearchTwice, { problems }: Assembly): void {
  const { columns, rowNumbers, file } = cells;
  const group = valueAt(columns.group, index);
  const sample = valueAt(columns.sample, index);
  const detail = `the search of sample ${sample} for ${group} (first in row ${rowNumbers[first]})`;
  problems.add("redefined", { file, row: rowNumbers[index], column: "group", found: group, detail });
}

function columnsOfSearches(
  { columns, rowNumbers, file }: SearchCells,
  samples: Coded<Sample>,
  { indices, read }: { readonly indices: Int32Array; readonly read: ReadSheet },
): SearchColumns {
  const unit = read.hints.get("effort")?.bracket;
  const sample = takeRows(samples, indices);
  const taken = <T>(column: Coded<T>): Coded<T> => takeRows(column, indices);
  return {
    file,
    rows: indices.map((index) => rowNumbers[index]),
    sample: mapValues(sample, ({ name }) => name),
    heightM: mapValues(sample, ({ heightM }) => heightM),
    group: taken(columns.group),
    effort: taken(columns.effort),
    effortUnit: mapValues(taken(columns.effort_unit), (own) => own ?? unit),
    countedTo: taken(columns.counted_to),
    counting: mapValues(taken(columns.counting), (counting) => counting ?? "presence"),
  };
}

interface EffortPlace {
  readonly origin: Origin;
  readonly read: ReadSheet;
  readonly assembly: Assembly;
}

/** An effort of no unit cannot be set beside another. */
function tellUnitless(
  effort: number | undefined,
  unit: string | undefined,
  { origin, read, assembly }: EffortPlace,
): void {
  const header = read.hints.get("effort");
  if (effort === undefined || (unit ?? header?.bracket) !== undefined) return;
  const detail = settingPath(["tables", read.sheet.file, "columns", header?.header ?? "effort", "unit"]);
  const found = String(effort);
  assembly.problems.addOnce("effort", "effort-without-unit", { ...origin, column: "effort", found, detail });
}

const groupOf = (taxa: ReadonlyMap<string, Taxon>, taxon: string): string =>
  taxa.get(taxon)?.group ?? ungrouped;

function deriveSearches(
  { samples, taxa, occurrences }: SearchContext,
  assembly: Assembly,
): BySection<Search> {
  const lists = new Map<string, Search[]>();
  for (const [section, finds] of occurrences) {
    const groups = [...new Set(Array.from(foundTaxa(finds), (taxon) => groupOf(taxa, taxon)))].toSorted();
    const list = [...(samples.bySection.get(section)?.values() ?? [])].toSorted(upward);
    lists.set(
      section,
      list.flatMap(({ name, heightM }) =>
        groups.map((group) => ({
          sample: name,
          group,
          heightM,
          counting: "presence" as const,
          derived: true,
        })),
      ),
    );
  }
  if ([...lists.values()].some(({ length }) => length > 0)) {
    assembly.problems.add("searches-derived", { file: "searches.csv", found: "no file" });
  }
  return lists;
}

const upward = (a: Sample, b: Sample): number => a.heightM - b.heightM;

/** The taxa of which something was found. */
function foundTaxa(finds: Occurrences): ReadonlySet<string> {
  const { taxon, count } = occurrenceColumns(finds);
  const found = new Set<number>();
  for (let find = 0; find < finds.length; find++)
    if (valueAt(count, find) !== 0) found.add(taxon.codes[find]);
  return new Set(Array.from(found, (code) => taxon.values[code]));
}

/** A find in a sample that nobody searched for its group. */
function tellUnsearched(
  lists: ReadonlyMap<string, SearchList>,
  { taxa, occurrences }: SearchContext,
  { problems }: Assembly,
): void {
  for (const [section, finds] of occurrences) {
    const columns = occurrenceColumns(finds);
    const { taxon, sample, count } = columns;
    const groups = encode(taxon.values.map((name) => groupOf(taxa, name)));
    const isSearched = searchedPairs(lists.get(section), sample.values, groups.values);
    const isFound = count.values.map((number) => number !== 0);
    for (let find = 0; find < finds.length; find++) {
      const at = sample.codes[find];
      if (sample.values[at] === undefined || !isFound[count.codes[find]]) continue;
      const of = groups.codes[taxon.codes[find]];
      if (isSearched[at * groups.values.length + of] === 1) continue;
      const detail = groups.values[of];
      problems.addOnce(JSON.stringify([section, detail]), "not-searched", {
        ...placeOfFind(columns, find, "sample"),
        found: `${valueAt(taxon, find)} in ${valueAt(sample, find)}`,
        detail,
      });
    }
  }
}

/** 1 for every sample and group of which the one was searched for the other, sample by sample. */
function searchedPairs(
  list: SearchList | undefined,
  samples: readonly (string | undefined)[],
  groups: readonly string[],
): Uint8Array {
  const pairs = new Uint8Array(samples.length * groups.length);
  const places = {
    samples: new Map(samples.flatMap((name, at) => (name === undefined ? [] : [[name, at] as const]))),
    groups: new Map(groups.map((name, at) => [name, at] as const)),
  };
  eachSearched(list, places, (sample, group) => {
    if (sample !== -1 && group !== -1) pairs[sample * groups.length + group] = 1;
  });
  return pairs;
}
