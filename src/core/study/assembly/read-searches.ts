import { valueAt } from "../coded.ts";
import type { Occurrences, Origin, Sample, Search, Taxon } from "../model.ts";
import { occurrenceColumns } from "../occurrence-list.ts";
import { settingPath } from "../setting-path.ts";
import type { RowOf } from "../tables/declare.ts";
import { searches } from "../tables/searches.ts";
import { type Assembly, type BySection, gather, type ReadSheet } from "./context.ts";
import { type Frames, frameFor } from "./frame-for.ts";
import type { SampleLists } from "./read-samples.ts";
import { firstAlike } from "./repeated-rows.ts";
import { readCells } from "./rows.ts";
import { searchesOfWide } from "./searches-of-wide.ts";
import { ungrouped } from "./taxa.ts";

export interface SearchContext {
  readonly samples: SampleLists;
  readonly taxa: ReadonlyMap<string, Taxon>;
  readonly occurrences: ReadonlyMap<string, Occurrences>;
}

/** Who looked for what where: the rows of searches.csv, or every sample for every group found in its section. */
export function readSearches(frames: Frames, context: SearchContext, assembly: Assembly): BySection<Search> {
  const read = assembly.sheets.get("searches");
  const looked = assembly.sheets.get("occurrences");
  if (!read && looked?.looked)
    return searchesOfWide(looked.looked, { ...context, file: looked.sheet.file }, assembly);
  if (!read) return deriveSearches(context, assembly);
  const lists = new Map<string, Search[]>();
  const cells = readCells(searches, assembly);
  if (!cells) return lists;
  const { columns, usable, rowNumbers, file } = cells;
  const firstLike = firstAlike(
    [columns.section.codes, columns.sample.codes, columns.group.codes],
    rowNumbers.length,
  );
  const unit = read.hints.get("effort")?.bracket;
  for (const index of usable) {
    const origin = { file, row: rowNumbers[index] };
    const frame = frameFor(valueAt(columns.section, index), origin, { frames, read, assembly });
    const known = frame && context.samples.bySection.get(frame.name);
    if (!frame || !known) continue;
    const group = valueAt(columns.group, index);
    const written = valueAt(columns.sample, index);
    const sample = known.get(written);
    if (!sample) {
      const meant = context.samples.meant(frame.name, written);
      assembly.problems.add("unknown-sample", { ...origin, column: "sample", found: written, ...meant });
      continue;
    }
    const first = firstLike(index);
    if (first !== undefined) {
      const detail = `the search of sample ${sample.name} for ${group} (first in row ${rowNumbers[first]})`;
      assembly.problems.add("redefined", { ...origin, column: "group", found: group, detail });
      continue;
    }
    const effort = valueAt(columns.effort, index);
    const effortUnit = valueAt(columns.effort_unit, index) ?? unit;
    const countedTo = valueAt(columns.counted_to, index);
    tellUnitless({ effort, effort_unit: effortUnit }, origin, { read, assembly });
    gather(lists, frame.name, {
      sample: sample.name,
      group,
      heightM: sample.heightM,
      ...(effort === undefined ? {} : { effort }),
      ...(effortUnit === undefined ? {} : { effortUnit }),
      ...(countedTo === undefined ? {} : { countedTo }),
      counting: valueAt(columns.counting, index) ?? "presence",
      derived: false,
      origin,
    });
  }
  tellUnsearched(lists, context, assembly);
  return lists;
}

/** An effort of no unit cannot be set beside another. */
function tellUnitless(
  { effort, effort_unit: unit }: Pick<RowOf<typeof searches>, "effort" | "effort_unit">,
  origin: Origin,
  { read, assembly }: { readonly read: ReadSheet; readonly assembly: Assembly },
): void {
  const header = read.hints.get("effort");
  if (effort === undefined || (unit ?? header?.bracket) !== undefined) return;
  const detail = settingPath(["tables", read.sheet.file, "columns", header?.header ?? "effort", "unit"]);
  assembly.problems.addOnce("effort", "effort-without-unit", {
    ...origin,
    column: "effort",
    found: String(effort),
    detail,
  });
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
  lists: BySection<Search>,
  { taxa, occurrences }: SearchContext,
  { problems }: Assembly,
): void {
  for (const [section, finds] of occurrences) {
    const searched = new Map<string, Set<string>>();
    for (const { sample, group } of lists.get(section) ?? [])
      searched.set(sample, (searched.get(sample) ?? new Set()).add(group));
    const { taxon, sample, count, file, rows } = occurrenceColumns(finds);
    const groups = taxon.values.map((name) => groupOf(taxa, name));
    const searchedIn = sample.values.map((name) => (name === undefined ? undefined : searched.get(name)));
    for (let find = 0; find < finds.length; find++) {
      const [name, group] = [valueAt(sample, find), groups[taxon.codes[find]]];
      if (name === undefined || valueAt(count, find) === 0) continue;
      if (searchedIn[sample.codes[find]]?.has(group)) continue;
      problems.addOnce(JSON.stringify([section, group]), "not-searched", {
        file,
        row: rows[find],
        column: "sample",
        found: `${valueAt(taxon, find)} in ${name}`,
        detail: group,
      });
    }
  }
}
