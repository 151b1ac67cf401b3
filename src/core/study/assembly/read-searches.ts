import type { Occurrence, Sample, Search, Taxon } from "../model.ts";
import { searches } from "../tables/searches.ts";
import { type Assembly, type BySection, gather, present } from "./context.ts";
import { type Frames, frameFor } from "./frame-for.ts";
import type { SampleLists } from "./read-samples.ts";
import { rowsOf } from "./rows.ts";
import { ungrouped } from "./taxa.ts";

export interface SearchContext {
  readonly samples: SampleLists;
  readonly taxa: ReadonlyMap<string, Taxon>;
  readonly occurrences: BySection<Occurrence>;
}

/** Who looked for what where: the rows of searches.csv, or every sample for every group found in its section. */
export function readSearches(frames: Frames, context: SearchContext, assembly: Assembly): BySection<Search> {
  const read = assembly.sheets.get("searches");
  if (!read) return deriveSearches(context, assembly);
  const lists = new Map<string, Search[]>();
  const first = new Map<string, number>();
  for (const { cells, origin } of rowsOf(searches, assembly)) {
    const frame = frameFor(cells.section, origin, { frames, read, assembly });
    const known = frame && context.samples.bySection.get(frame.name);
    if (!frame || !known) continue;
    const sample = known.get(cells.sample);
    if (!sample) {
      const meant = context.samples.meant(frame.name, cells.sample);
      assembly.problems.add("unknown-sample", { ...origin, column: "sample", found: cells.sample, ...meant });
      continue;
    }
    const key = JSON.stringify([frame.name, sample.name, cells.group]);
    const earlier = first.get(key);
    if (earlier !== undefined) {
      const detail = `the search of sample ${sample.name} for ${cells.group} (first in row ${earlier})`;
      assembly.problems.add("redefined", { ...origin, column: "group", found: cells.group, detail });
      continue;
    }
    first.set(key, origin.row);
    const { effort, effort_unit: effortUnit, counted_to: countedTo } = cells;
    gather(lists, frame.name, {
      sample: sample.name,
      group: cells.group,
      heightM: sample.heightM,
      ...present({ effort, effortUnit, countedTo }),
      counting: cells.counting ?? "presence",
      derived: false,
      origin,
    });
  }
  tellUnsearched(lists, context, assembly);
  return lists;
}

const isFind = ({ count }: Occurrence): boolean => count !== 0;
const groupOf = (taxa: ReadonlyMap<string, Taxon>, taxon: string): string =>
  taxa.get(taxon)?.group ?? ungrouped;

function deriveSearches(
  { samples, taxa, occurrences }: SearchContext,
  assembly: Assembly,
): BySection<Search> {
  const lists = new Map<string, Search[]>();
  for (const [section, finds] of occurrences) {
    const used = finds.filter(isFind);
    const groups = [...new Set(used.map(({ taxon }) => groupOf(taxa, taxon)))].toSorted();
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

/** A find in a sample that nobody searched for its group. */
function tellUnsearched(
  lists: BySection<Search>,
  { taxa, occurrences }: SearchContext,
  assembly: Assembly,
): void {
  for (const [section, finds] of occurrences) {
    const searched = new Set(
      (lists.get(section) ?? []).map(({ sample, group }) => JSON.stringify([sample, group])),
    );
    for (const { sample, taxon, count, origin } of finds) {
      const group = groupOf(taxa, taxon);
      if (sample === undefined || count === 0 || searched.has(JSON.stringify([sample, group]))) continue;
      const subject = JSON.stringify([section, group]);
      assembly.problems.addOnce(subject, "not-searched", {
        ...origin,
        column: "sample",
        found: `${taxon} in ${sample}`,
        detail: group,
      });
    }
  }
}
