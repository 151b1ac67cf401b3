import { columnReader, type RecognisedColumn } from "../../study/columns.ts";
import { beds } from "../../study/tables/beds.ts";
import type { ColumnChoice, TableDeclaration } from "../../study/tables/declare.ts";
import { occurrences } from "../../study/tables/occurrences.ts";
import { samples } from "../../study/tables/samples.ts";
import { searches } from "../../study/tables/searches.ts";
import { sections } from "../../study/tables/sections.ts";
import { taxa } from "../../study/tables/taxa.ts";

/** Tables whose columns can stand beside the taxa of a wide sheet; the first that knows a header has it. */
const beside: readonly TableDeclaration[] = [samples, searches, taxa, occurrences, beds, sections];

/** Columns that say something of a sample. */
export const sampleColumns: ReadonlySet<string> = new Set(Object.keys(samples.columns));
const used: ReadonlySet<string> = new Set([...sampleColumns, "effort", "effort_unit", "group", "taxon"]);

export type LeadingHeader = RecognisedColumn & { readonly isUsed: boolean };

/** What the headers of a wide sheet mean. */
export interface HeaderReader {
  /** Undefined where no table knows it. `isUsed`: it says something of the samples. */
  readonly leading: (header: string) => LeadingHeader | undefined;
  /** True where a person said that it is a taxon. */
  readonly isChosenTaxon: (header: string) => boolean;
}

/** Reads the headers of one file, each once. */
export function headerReader(chosen: ReadonlyMap<string, ColumnChoice>): HeaderReader {
  const readers = beside.map((table) => columnReader({ ...table, chosen }));
  const known = new Map<string, LeadingHeader | undefined>();
  const read = (header: string): LeadingHeader | undefined => {
    if (header.trim() === "" || header.length > 200) return undefined;
    for (const reader of readers) {
      const one = reader(header);
      if (one.by === "chosen" && one.column === undefined) return { ...one, isUsed: false };
      if (one.column !== undefined) return { ...one, isUsed: used.has(one.column) };
    }
    return undefined;
  };
  return {
    leading: (header) => {
      if (!known.has(header)) known.set(header, read(header));
      return known.get(header);
    },
    isChosenTaxon: (header) => chosen.get(header.trim())?.is === "taxon",
  };
}
