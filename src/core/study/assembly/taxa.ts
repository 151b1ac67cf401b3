import type { Taxon } from "../model.ts";
import { suggestName } from "../nearest.ts";
import { taxa } from "../tables/taxa.ts";
import { type Assembly, present, type ReadSheet } from "./context.ts";
import { rowsOf } from "./rows.ts";

export const ungrouped = "ungrouped";

/** The taxa of taxa.csv with their traits; a blank group is taken from the accepted name's row. */
export function readTaxa(assembly: Assembly): Map<string, Taxon> {
  const read = assembly.sheets.get("taxa");
  const list = new Map<string, Taxon>();
  if (!read) return list;
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
      traits: traitsOf(read, origin.row),
      notes: cells.notes ?? "",
      origin,
    });
  }
  return withGroups(list, assembly);
}

/** Every column of taxa.csv that is not declared is a trait. */
function traitsOf({ sheet }: ReadSheet, row: number): Readonly<Record<string, string>> {
  const cells = sheet.rows[sheet.rowNumbers.indexOf(row)] ?? [];
  const traits = sheet.headers
    .map((header, index) => [header.trim(), cells[index] ?? "", sheet.columns[index]] as const)
    .filter(([header, cell, column]) => column === undefined && header !== "" && cell.trim() !== "")
    .map(([header, cell]) => [header, cell.trim()] as const);
  return Object.fromEntries(traits);
}

function withGroups(list: Map<string, Taxon>, assembly: Assembly): Map<string, Taxon> {
  for (const [name, taxon] of list) {
    const accepted = taxon.accepted === undefined ? undefined : list.get(taxon.accepted);
    if (taxon.accepted !== undefined && !accepted) {
      const nearest = suggestName(taxon.accepted, list.keys());
      assembly.problems.add("accepted-unlisted", {
        ...taxon.origin,
        column: "accepted",
        found: taxon.accepted,
        nearest,
      });
    }
    if (taxon.group !== "") continue;
    const group = accepted !== undefined && accepted.group !== "" ? accepted.group : ungrouped;
    list.set(name, { ...taxon, group });
    if (group === ungrouped) tellUngrouped(taxon, assembly);
  }
  return list;
}

export function tellUngrouped({ name, origin }: Taxon, assembly: Assembly): void {
  assembly.problems.addOnce("group", "ungrouped", {
    ...origin,
    column: "taxon",
    found: name,
    detail: "no row in taxa.csv gives its group",
  });
}
