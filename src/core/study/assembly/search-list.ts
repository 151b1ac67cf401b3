import { type Coded, valueAt } from "../coded.ts";
import type { Search } from "../model.ts";

/** Searches of a section column by column; what one lacks is undefined there. All stand in one file. */
export interface SearchColumns {
  readonly file: string;
  readonly rows: Int32Array;
  readonly sample: Coded<string>;
  readonly heightM: Coded<number>;
  readonly group: Coded<string>;
  readonly effort: Coded<number | undefined>;
  readonly effortUnit: Coded<string | undefined>;
  readonly countedTo: Coded<number | undefined>;
  readonly counting: Coded<Search["counting"]>;
}

/** The searches of a section: one by one, or by column where there may be very many. */
export type SearchList =
  | { readonly kind: "items"; readonly items: readonly Search[] }
  | { readonly kind: "columns"; readonly columns: SearchColumns };

/** The searches one by one. */
export function searchItems(list: SearchList | undefined): readonly Search[] {
  if (list === undefined) return [];
  if (list.kind === "items") return list.items;
  return Array.from(list.columns.rows, (_, index) => searchAt(list.columns, index));
}

function searchAt(columns: SearchColumns, index: number): Search {
  const effort = valueAt(columns.effort, index);
  const effortUnit = valueAt(columns.effortUnit, index);
  const countedTo = valueAt(columns.countedTo, index);
  return {
    sample: valueAt(columns.sample, index),
    group: valueAt(columns.group, index),
    heightM: valueAt(columns.heightM, index),
    ...(effort === undefined ? {} : { effort }),
    ...(effortUnit === undefined ? {} : { effortUnit }),
    ...(countedTo === undefined ? {} : { countedTo }),
    counting: valueAt(columns.counting, index),
    derived: false,
    origin: { file: columns.file, row: columns.rows[index] },
  };
}

/** Calls for each search with the places of its sample and group among names; -1 for a name that is none of them. */
export function eachSearched(
  list: SearchList | undefined,
  {
    samples,
    groups,
  }: { readonly samples: ReadonlyMap<string, number>; readonly groups: ReadonlyMap<string, number> },
  take: (sample: number, group: number) => void,
): void {
  if (list?.kind === "items") {
    for (const { sample, group } of list.items) take(samples.get(sample) ?? -1, groups.get(group) ?? -1);
  } else if (list !== undefined) {
    const { sample, group, rows } = list.columns;
    const sampleOf = sample.values.map((name) => samples.get(name) ?? -1);
    const groupOf = group.values.map((name) => groups.get(name) ?? -1);
    for (let index = 0; index < rows.length; index++)
      take(sampleOf[sample.codes[index]], groupOf[group.codes[index]]);
  }
}
