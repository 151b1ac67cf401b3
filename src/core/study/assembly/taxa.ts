import type { Taxon } from "../model.ts";
import { taxa } from "../tables/taxa.ts";
import { type Assembly, present, type ReadSheet } from "./context.ts";
import { meantNames } from "./meant-name.ts";
import { rowsOf } from "./rows.ts";

export const ungrouped = "ungrouped";

/** The taxa of taxa.csv with their traits; a blank group is taken from the accepted name's row. */
export function readTaxa(assembly: Assembly): Map<string, Taxon> {
  const read = assembly.sheets.get("taxa");
  const list = new Map<string, Taxon>();
  if (!read) return list;
  const traits = traitReader(read);
  for (const { cells, origin } of rowsOf(taxa, assembly)) {
    const name = cells.taxon;
    if (list.has(name)) {
      assembly.problems.add("redefined", {
        ...origin,
        column: "taxon",
        found: name,
        detail: `taxon ${name}`,
      });
      continue;
    }
    list.set(name, {
      name,
      group: cells.group ?? "",
      ...present({ accepted: cells.accepted, mixingLengthM: cells.mixing_length_m }),
      traits: traits(origin.row),
      notes: cells.notes ?? "",
      origin,
    });
  }
  return withGroups(list, assembly);
}

/** Every column of taxa.csv that is not declared is a trait. */
function traitReader({ sheet }: ReadSheet): (row: number) => Readonly<Record<string, string>> {
  const byRow = new Map(Array.from(sheet.rowNumbers, (row, index) => [row, sheet.rows.at(index)] as const));
  const columns = sheet.headers
    .map((header, index) => ({ trait: header.trim(), index }))
    .filter(({ trait, index }) => sheet.columns[index] === undefined && trait !== "");
  return (row) => {
    const cells = byRow.get(row) ?? [];
    const traits = columns.map(({ trait, index }) => [trait, (cells[index] ?? "").trim()] as const);
    return Object.fromEntries(traits.filter(([, value]) => value !== ""));
  };
}

function withGroups(list: Map<string, Taxon>, assembly: Assembly): Map<string, Taxon> {
  const meant = meantNames(list.keys());
  for (const [name, taxon] of list) {
    const accepted = taxon.accepted === undefined ? undefined : list.get(taxon.accepted);
    if (taxon.accepted !== undefined && !accepted) {
      assembly.problems.add("accepted-unlisted", {
        ...taxon.origin,
        column: "accepted",
        found: taxon.accepted,
        ...meant(taxon.accepted),
      });
      if (taxon.group !== "") list.set(taxon.accepted, acceptedOf(taxon, taxon.accepted));
    }
    if (taxon.group !== "") continue;
    const group = accepted !== undefined && accepted.group !== "" ? accepted.group : ungrouped;
    list.set(name, { ...taxon, group });
    if (group === ungrouped) tellUngrouped(taxon, assembly);
  }
  return list;
}

/** An accepted name without a row of its own, in the group of its synonym. */
const acceptedOf = ({ group, origin }: Taxon, name: string): Taxon => ({
  name,
  group,
  traits: {},
  notes: "",
  origin,
});

/** The group that all listed taxa of a genus share, for finds that are known to the genus only. */
export function genusGroup(genus: string, taxa: ReadonlyMap<string, Taxon>): string | undefined {
  const groups = new Set<string>();
  for (const { name, group } of taxa.values()) {
    if (group !== ungrouped && name.startsWith(`${genus} `)) groups.add(group);
  }
  return groups.size === 1 ? [...groups][0] : undefined;
}

export function tellUngrouped({ name, origin }: Taxon, assembly: Assembly): void {
  assembly.problems.addOnce("group", "ungrouped", {
    ...origin,
    column: "taxon",
    found: name,
    detail: "no row in taxa.csv gives its group",
  });
}
