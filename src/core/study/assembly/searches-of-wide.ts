import type { Occurrences, Search, Taxon } from "../model.ts";
import { parseName } from "../open-nomenclature.ts";
import { settingPath } from "../setting-path.ts";
import { type Assembly, type BySection, gather, type Looked, present } from "./context.ts";
import type { SampleLists } from "./read-samples.ts";
import { genusGroup, ungrouped } from "./taxa.ts";

interface WideSearch {
  readonly samples: SampleLists;
  readonly taxa: ReadonlyMap<string, Taxon>;
  readonly occurrences: ReadonlyMap<string, Occurrences>;
}

type Marks = Looked["rows"][number]["marks"];

/**
 * Who looked for what by a wide sheet. A group was looked for in a sample where any of its cells is a find or says
 * looked for and not found; blanks beside such a cell are taxa not found. Where all its cells are blank the sheet does
 * not say, and the setting `blank` does: by default it was not looked for.
 */
export function searchesOfWide(
  sheets: readonly Looked[],
  context: WideSearch,
  assembly: Assembly,
): BySection<Search> {
  const lists = new Map<string, Search[]>();
  const seen = new Set<string>();
  for (const looked of sheets) addSearches(lists, looked, { ...context, seen, assembly });
  return lists;
}

interface Adding extends WideSearch {
  /** Samples and groups that an earlier sheet speaks of. */
  readonly seen: Set<string>;
  readonly assembly: Assembly;
}

function addSearches(
  lists: Map<string, Search[]>,
  looked: Looked,
  { samples, taxa, seen, assembly }: Adding,
): void {
  const { file } = looked;
  const groups = groupsOf(looked.taxa, taxa);
  for (const { section, sample, row, effort, marks } of looked.rows) {
    const known = samples.bySection.get(section)?.get(sample);
    if (known === undefined) continue;
    for (const [group, members] of groups) {
      const said = saysOf(members, marks);
      if (said === "blank" && !looked.isBlankChosen) tellBlank(file, { row, sample, group }, assembly);
      if (said === "not-searched" || (said === "blank" && looked.blank === "not-searched")) continue;
      const key = JSON.stringify([section, sample, group]);
      if (seen.has(key)) continue;
      seen.add(key);
      gather(lists, section, {
        sample,
        group,
        heightM: known.heightM,
        ...present({ effort, effortUnit: effort === undefined ? undefined : looked.effortUnit }),
        counting: looked.counting,
        derived: false,
        origin: { file, row },
      });
    }
  }
  tellUnitless(looked, file, assembly);
}

/** The taxa of each group, by their places in a row. */
function groupsOf(
  names: readonly string[],
  taxa: ReadonlyMap<string, Taxon>,
): ReadonlyMap<string, readonly number[]> {
  const groups = new Map<string, number[]>();
  for (const [place, written] of names.entries()) {
    const { name } = parseName(written);
    const known = (taxa.get(name) ?? taxa.get(written))?.group ?? genusGroup(name, taxa) ?? ungrouped;
    gather(groups, known, place);
  }
  return groups;
}

function saysOf(members: readonly number[], marks: Marks): Marks[number] {
  const own = members.map((place) => marks[place]);
  if (own.includes("searched")) return "searched";
  return own.includes("not-searched") ? "not-searched" : "blank";
}

interface BlankPlace {
  readonly row: number;
  readonly sample: string;
  readonly group: string;
}

function tellBlank(file: string, { row, sample, group }: BlankPlace, { problems }: Assembly): void {
  const found = `${sample}, ${group}: all blank`;
  problems.addOnce("blank", "blank-samples", { file, row, found, detail: pathOf(file, "blank") });
}

const pathOf = (file: string, ...names: readonly string[]): string => settingPath(["tables", file, ...names]);

function tellUnitless({ rows, effortUnit }: Looked, file: string, { problems }: Assembly): void {
  const first = rows.find(({ effort }) => effort !== undefined);
  if (first?.effort === undefined || effortUnit !== undefined) return;
  const detail = pathOf(file, "columns", "effort", "unit");
  problems.add("effort-without-unit", { file, row: first.row, found: String(first.effort), detail });
}
