import type { Fix } from "../../../../src/core/study/problem.ts";

/** Tables as rows of cells by file name, the header first. */
export type Tables = Readonly<Record<string, readonly (readonly string[])[]>>;

/** The tables with one cell written anew. */
export function withCell(tables: Tables, { file, row, column, now }: Fix): Tables {
  const at = tables[file][0].indexOf(column);
  if (at === -1 || tables[file][row - 1] === undefined) throw new Error(`no cell ${file} ${row} ${column}`);
  const rows = tables[file].map((cells, index) => (index === row - 1 ? cells.with(at, now) : cells));
  return { ...tables, [file]: rows };
}

const cell = (text: string) => (/[,"\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text);

/** The tables as texts, cells that hold a comma in quotes. */
export function texts(tables: Tables): Record<string, string> {
  return Object.fromEntries(
    Object.entries(tables).map(([file, rows]) => [
      file,
      `${rows.map((cells) => cells.map(cell).join(",")).join("\n")}\n`,
    ]),
  );
}

const cells = (...rows: readonly string[]) => rows.map((row) => row.split("|"));

/** A study without a problem, with a column of every kind that can be mended by one key. */
export const soundTables: Tables = {
  "sections.csv": cells(
    "section|axis|unit|bottom|top",
    "Orskel Ledge|height|m|0|40.5",
    "Tamber Quarry|depth|cm|900.5|0",
  ),
  "legs.csv": cells(
    "section|leg|reading|position",
    "Orskel Ledge|east wall|0|0",
    "Orskel Ledge|east wall|40.25|40.25",
  ),
  "samples.csv": cells(
    "section|sample|leg|position|thickness|density_g_cm3",
    "Orskel Ledge|OL-1|east wall|1.25|0.04|2.35",
    "Orskel Ledge|OL-2|east wall|3.75|0.04|2.35",
    "Tamber Quarry|TQ-1||20.5|1.5|2.4",
  ),
  "taxa.csv": cells("taxon|group", "Velorites alta|ammonoids", "Selvites dorsatus|ammonoids"),
  "searches.csv": cells(
    "section|sample|group|counting",
    "Orskel Ledge|OL-1|ammonoids|presence",
    "Orskel Ledge|OL-2|ammonoids|presence",
    "Tamber Quarry|TQ-1|ammonoids|presence",
  ),
  "occurrences.csv": cells(
    "section|sample|taxon|qualifier|reworked",
    "Orskel Ledge|OL-1|Velorites alta||no",
    "Orskel Ledge|OL-2|Velorites alta|cf.|suspected",
    "Orskel Ledge|OL-1|Selvites dorsatus|aff.|no",
    "Orskel Ledge|OL-2|Selvites dorsatus|ex gr.|no",
    "Tamber Quarry|TQ-1|Selvites dorsatus|sp.|no",
  ),
  "measurements.csv": cells(
    "section|sample|analyte|value|unit",
    "Orskel Ledge|OL-1|iridium|0.35|ng/g",
    "Orskel Ledge|OL-2|iridium|1.25|ng/g",
  ),
  "horizons.csv": cells(
    "section|horizon|kind|position|age_ma",
    "Orskel Ledge|Rim|impact|5.5|83.4",
    "Orskel Ledge|lower surface|sequence-boundary|2.5|",
  ),
};
