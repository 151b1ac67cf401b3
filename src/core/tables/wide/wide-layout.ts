import { plainName, type RecognisedColumn } from "../../study/columns.ts";
import type { Recognition } from "../../study/recognised.ts";
import { lengthUnit } from "../../study/units.ts";
import { columnCells, type Grid } from "./grid.ts";
import type { HeaderReader } from "./leading.ts";
import { isSum, isTaxonName } from "./taxon-name.ts";
import { areTaxonCells } from "./wide-cell.ts";

/** Rows looked at for the names of the taxa. */
const DEPTH = 50;

export interface TaxonColumn {
  readonly column: number;
  readonly name: string;
  /** Absent for a name as systematists write it. */
  readonly by?: Recognition["by"];
}

export interface LeadingColumn extends RecognisedColumn {
  readonly at: number;
  readonly isUsed: boolean;
}

/** Where everything stands in a wide sheet, read with its samples down. */
export interface WideLayout {
  /** The row of the taxa's names, that of their groups, and the first row of a sample. */
  readonly taxonRow: number;
  readonly groupRow?: number;
  readonly below: number;
  readonly taxa: readonly TaxonColumn[];
  readonly leading: readonly LeadingColumn[];
  /** Columns with the name of a taxon as systematists write it. */
  readonly sure: number;
}

/** Finds taxa, samples and positions in a grid; undefined where it is no wide sheet of this orientation. */
export function wideLayout(grid: Grid, reader: HeaderReader): WideLayout | undefined {
  const taxonRow = taxonRowOf(grid, reader);
  if (taxonRow === undefined) return undefined;
  const headers = Array.from({ length: grid.width }, (_, column) =>
    headerOf(grid, column, { taxonRow, reader }),
  );
  const groupRow = groupRowOf(grid, { taxonRow, headers, reader });
  const next = groupRow === taxonRow + 1 ? taxonRow + 2 : taxonRow + 1;
  const units = unitsIn(grid, next, { headers, reader });
  const below = units === undefined ? next : next + 1;
  const withUnits = headers.map((header, column) => {
    const unit = units?.get(column);
    return unit === undefined ? header : `${header} (${unit})`;
  });
  const parts = partColumns(grid, withUnits, { below, reader });
  const leading = withPlaces(parts.leading, grid, { below, taxa: parts.taxa });
  const hasPlace = leading.some(({ column }) => ["sample", "position", "base"].includes(column ?? ""));
  if (parts.taxa.length < 2 || !hasPlace) return undefined;
  const sure = parts.taxa.filter(({ name }) => isTaxonName(name)).length;
  return {
    taxonRow,
    ...(groupRow === undefined ? {} : { groupRow }),
    below,
    taxa: parts.taxa,
    leading,
    sure,
  };
}

/** The row with most names of taxa; else the first with a known header beside cells that can be those of taxa. */
function taxonRowOf(grid: Grid, reader: HeaderReader): number | undefined {
  let best: { readonly row: number; readonly names: number } | undefined;
  let named: number | undefined;
  for (let row = 0; row < Math.min(DEPTH, grid.height); row++) {
    let names = 0;
    let known = 0;
    for (let column = 0; column < grid.width; column++) {
      const text = grid.at(row, column);
      const leading = reader.leading(text);
      if (reader.isChosenTaxon(text) || (leading === undefined && isTaxonName(text))) names += 1;
      else if (leading?.column === "sample" || leading?.column === "position") known += 1;
    }
    if (names > (best?.names ?? 1)) best = { row, names };
    if (known > 0) named ??= row;
  }
  return best?.row ?? named;
}

interface Headed {
  readonly taxonRow: number;
  readonly reader: HeaderReader;
}

/** The header of a column: in the row of names, else a known one in the rows above. */
function headerOf(grid: Grid, column: number, { taxonRow, reader }: Headed): string {
  const own = grid.at(taxonRow, column);
  if (own !== "") return own;
  for (let row = taxonRow - 1; row >= 0; row--) {
    const text = grid.at(row, column);
    const leading = reader.leading(text);
    if (leading !== undefined && leading.column !== "group") return text;
  }
  return "";
}

interface Headers {
  readonly headers: readonly string[];
  readonly reader: HeaderReader;
}

const isTaxonLike = (header: string, reader: HeaderReader): boolean =>
  header !== "" && reader.leading(header)?.column === undefined;

/** A row that is labelled as that of groups, or one above the names with words over the taxa alone. */
function groupRowOf(grid: Grid, { taxonRow, headers, reader }: Headers & Headed): number | undefined {
  const taxa = headers.flatMap((header, column) => (isTaxonLike(header, reader) ? [column] : []));
  for (const row of [taxonRow - 1, taxonRow + 1, taxonRow - 2]) {
    if (row < 0 || row >= grid.height) continue;
    const label = headers.findIndex(
      (header, column) =>
        !isTaxonLike(header, reader) && reader.leading(grid.at(row, column))?.column === "group",
    );
    if (label >= 0) return row;
    const over = taxa.map((column) => grid.at(row, column)).filter((cell) => cell !== "");
    if (row < taxonRow && over.length > 0 && over.every((cell) => /^\p{L}[\p{L} -]{2,}$/u.test(cell)))
      return row;
  }
  return undefined;
}

/** Units in a row of their own below the headers of positions and lengths. */
function unitsIn(
  grid: Grid,
  row: number,
  { headers, reader }: Headers,
): ReadonlyMap<number, string> | undefined {
  const units = new Map<number, string>();
  for (const [column, header] of headers.entries()) {
    const cell = grid.at(row, column).replace(/^[([]|[)\]]$/g, "");
    if (cell === "") continue;
    const { unit } = reader.leading(header) ?? {};
    if (isTaxonLike(header, reader) || lengthUnit(cell) === undefined) return undefined;
    if (unit === undefined) units.set(column, cell);
  }
  return units.size > 0 ? units : undefined;
}

/** Columns of taxa and those beside them. */
function partColumns(
  grid: Grid,
  headers: readonly string[],
  { below, reader }: { below: number; reader: HeaderReader },
) {
  const taxa: TaxonColumn[] = [];
  const leading: LeadingColumn[] = [];
  for (const [column, header] of headers.entries()) {
    const known = reader.leading(header);
    const isChosen = reader.isChosenTaxon(header);
    const cells = columnCells(grid, column, below);
    if (isChosen) taxa.push({ column, name: header, by: "chosen" });
    else if (known !== undefined) leading.push({ ...known, at: column });
    else if (header !== "" && areTaxonCells(cells) && isTaxonName(header))
      taxa.push({ column, name: header });
    else if (isTaxonByContent(header, cells)) taxa.push({ column, name: header, by: "content" });
    else leading.push({ header, at: column, isUsed: false });
  }
  return { taxa, leading };
}

/** A name with letters and no unit over whole numbers and signs. */
function isTaxonByContent(header: string, cells: readonly string[]): boolean {
  if (!/^\p{L}.{2,}/u.test(header) || /[([]/.test(header) || isSum(plainName(header))) return false;
  const filled = cells.filter((cell) => cell !== "");
  return filled.length > 0 && areTaxonCells(filled) && !filled.some((cell) => /^\d+[.,]\d/.test(cell));
}

/**
 * Without a column of samples or positions, the first column before the taxa with a value of its own in every row is
 * taken for it by content: numbers in one direction are positions, anything else names of samples.
 */
function withPlaces(
  leading: readonly LeadingColumn[],
  grid: Grid,
  { below, taxa }: { readonly below: number; readonly taxa: readonly TaxonColumn[] },
): readonly LeadingColumn[] {
  const has = (name: string) => leading.some(({ column }) => column === name);
  if (has("sample")) return leading;
  const first = taxa.at(0)?.column ?? 0;
  const open = leading.find(({ at, column, by }) => {
    const cells = columnCells(grid, at, below).filter((cell) => cell !== "");
    const isOpen = (column === undefined && by === undefined) || column === "taxon";
    return isOpen && at < first && cells.length >= 2 && new Set(cells).size === cells.length;
  });
  if (open === undefined) return leading;
  const isPosition = isOneWay(columnCells(grid, open.at, below));
  if (isPosition && (has("position") || has("base"))) return leading;
  const column = isPosition ? "position" : "sample";
  return leading.map((one) =>
    one === open ? { header: open.header, at: open.at, column, by: "content" as const, isUsed: true } : one,
  );
}

/** True for numbers that only grow, or only fall. */
export function isOneWay(cells: readonly string[]): boolean {
  const filled = cells.map((cell) => cell.trim().replace(",", ".")).filter((cell) => cell !== "");
  if (filled.length < 2 || !filled.every((cell) => /^[+-]?(?:\d+\.?\d*|\.\d+)$/.test(cell))) return false;
  const steps = filled.slice(1).map((cell, at) => Math.sign(Number(cell) - Number(filled[at])));
  return steps.every((step) => step >= 0 && step !== 0) || steps.every((step) => step < 0);
}
