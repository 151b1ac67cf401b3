import type { Looked } from "../../study/assembly/context.ts";
import { plainName } from "../../study/columns.ts";
import type { CodeMeaning } from "../../study/recognised.ts";
import type { Grid } from "./grid.ts";
import { sampleColumns } from "./leading.ts";
import { isSum } from "./taxon-name.ts";
import { type WideCell, wideCell } from "./wide-cell.ts";
import type { WideLayout } from "./wide-layout.ts";

/** The rows of long tables that a wide sheet stands for, each with its row in the file. */
export interface WideRows {
  readonly occurrences: readonly LongRow[];
  readonly samples: readonly LongRow[];
  readonly looked: Looked["rows"];
  readonly counting: Looked["counting"];
  /** Codes that nothing explains, and cells that are none, with where they stand. */
  readonly unknown: readonly { readonly code: string; readonly row: number; readonly taxon: string }[];
  readonly odd: readonly { readonly text: string; readonly row: number; readonly taxon: string }[];
  /** How often each code stands in a cell. */
  readonly codes: ReadonlyMap<string, number>;
}

export interface LongRow {
  readonly cells: Readonly<Record<string, string>>;
  readonly row: number;
  /** The column of the file, of a find. */
  readonly column?: number;
}

interface Making {
  readonly codes: ReadonlyMap<string, CodeMeaning>;
  /** The section of a sheet without a column for it. */
  readonly section: string | undefined;
  /** Turns a written number into one with a decimal point. */
  readonly numberOf: (text: string) => number | undefined;
}

interface ReadRow {
  readonly at: number;
  readonly place: Readonly<Record<string, string>>;
  readonly cells: readonly WideCell[];
}

/** Parts a wide sheet into the rows that long tables would have. */
export function wideRows(grid: Grid, layout: WideLayout, making: Making): WideRows {
  const rows = readRows(grid, layout, making);
  const found = rows.flatMap(({ cells }) => cells.filter((cell) => cell.kind === "found"));
  const numbers = found.flatMap(({ number }) => number ?? []);
  const isShare = numbers.some((number) => !/^\d+$/.test(number));
  const isCounted = !isShare && numbers.some((number) => number !== "1");
  const numbersAre = isShare ? "shares" : isCounted ? "counts" : "presence";
  const isScaled = isShare || found.some(({ code }) => code !== undefined);
  const each = <T>(take: (cell: WideCell, row: ReadRow, taxon: number) => T | undefined): readonly T[] =>
    rows.flatMap((row) => row.cells.flatMap((cell, taxon) => take(cell, row, taxon) ?? []));
  const where = (row: ReadRow, taxon: number) => ({
    row: grid.rowOf(row.at, layout.taxa[taxon].column),
    taxon: layout.taxa[taxon].name,
  });
  return {
    occurrences: each((cell, row, taxon) =>
      cell.kind === "found"
        ? {
            row: where(row, taxon).row,
            column: grid.columnOf(row.at, layout.taxa[taxon].column),
            cells: {
              section: row.place.section,
              sample: row.place.sample,
              taxon: layout.taxa[taxon].name,
              ...findCells(cell, numbersAre),
            },
          }
        : undefined,
    ),
    samples: rows.map(({ at, place }) => ({ row: rowOfSample(grid, at, layout), cells: place })),
    looked: rows.map(({ at, place, cells }) => {
      const effort = making.numberOf(place.effort ?? "");
      return {
        section: place.section,
        sample: place.sample,
        row: rowOfSample(grid, at, layout),
        ...(effort === undefined ? {} : { effort }),
        marks: cells.map(markOf),
      };
    }),
    counting: isScaled ? "scale" : isCounted ? "count" : "presence",
    unknown: each((cell, row, taxon) =>
      cell.kind === "unknown" ? { code: cell.code, ...where(row, taxon) } : undefined,
    ),
    odd: each((cell, row, taxon) =>
      cell.kind === "text"
        ? { text: grid.at(row.at, layout.taxa[taxon].column), ...where(row, taxon) }
        : undefined,
    ),
    codes: codesIn(grid, layout, rows),
  };
}

const rowOfSample = (grid: Grid, at: number, { leading }: WideLayout): number =>
  grid.rowOf(at, leading.find(({ column }) => column === "sample" || column === "position")?.at ?? 0);

function readRows(grid: Grid, layout: WideLayout, { codes, section }: Making): readonly ReadRow[] {
  const { below, taxa, leading } = layout;
  const rows: ReadRow[] = [];
  for (let at = below; at < grid.height; at++) {
    const place = placeOf(grid, at, leading);
    const cells = taxa.map(({ column }) => wideCell(grid.at(at, column), codes));
    const filled = cells.filter(({ kind }) => kind !== "blank");
    const isWords = filled.length > 0 && filled.every(({ kind }) => kind === "text");
    const hasPlace = place.sample !== undefined || place.position !== undefined || place.base !== undefined;
    if (isWords || !hasPlace || isSum(plainName(place.sample ?? ""))) continue;
    const own = place.section ?? section;
    rows.push({
      at,
      place: {
        ...place,
        section: own ?? "",
        sample: place.sample ?? place.position ?? `${place.base}-${place.top}`,
      },
      cells,
    });
  }
  return rows;
}

function placeOf(grid: Grid, at: number, leading: WideLayout["leading"]): Record<string, string> {
  const place: Record<string, string> = {};
  for (const { column, isUsed, at: index } of leading) {
    const text = grid.at(at, index);
    const isOfSample = column !== undefined && (sampleColumns.has(column) || column.startsWith("effort"));
    if (isUsed && isOfSample && text !== "") place[column] = text;
  }
  return place;
}

/** Whole numbers are counts, 1 alone is presence, and where one number is broken all are shares. */
function findCells(
  cell: Extract<WideCell, { kind: "found" }>,
  numbersAre: "counts" | "shares" | "presence",
): Record<string, string> {
  const abundance = cell.code ?? (numbersAre === "shares" ? cell.number : undefined);
  return {
    ...(cell.number !== undefined && numbersAre === "counts" ? { count: cell.number } : {}),
    ...(abundance === undefined ? {} : { abundance }),
    ...(cell.qualifier === undefined ? {} : { qualifier: cell.qualifier }),
    ...(cell.isDoubtful ? { doubtful: "yes" } : {}),
    ...(cell.isReworked ? { reworked: "yes" } : {}),
  };
}

function markOf({ kind }: WideCell): Looked["rows"][number]["marks"][number] {
  if (kind === "found" || kind === "not-found") return "searched";
  return kind === "not-searched" ? "not-searched" : "blank";
}

const letters = /^[\p{L}]{1,4}\.?$/u;
const usualSigns = /^(?:x|cf\.?|aff\.?|na|ns)$/i;

/** Letters in cells that are none of the usual signs. */
function codesIn(grid: Grid, { taxa }: WideLayout, rows: readonly ReadRow[]): ReadonlyMap<string, number> {
  const codes = new Map<string, number>();
  for (const { at } of rows) {
    for (const { column } of taxa) {
      const code = grid.at(at, column).replaceAll("?", "").trim();
      if (letters.test(code) && !usualSigns.test(code)) codes.set(code, (codes.get(code) ?? 0) + 1);
    }
  }
  return codes;
}
