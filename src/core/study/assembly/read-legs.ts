import { parseNumber, withDecimalPoint } from "../cells.ts";
import { formatGiven } from "../heights.ts";
import { legs } from "../tables/legs.ts";
import { type Assembly, gather, type ReadSheet, type SectionFrame } from "./context.ts";
import { type Frames, frameFor } from "./frame-for.ts";
import { isBeddingSound, type LegRow, legHeights } from "./leg-heights.ts";
import { rowsOf } from "./rows.ts";

/** The frames with their legs. A leg that cannot be used is told, and known to be left out. */
export function readLegs(frames: Frames, assembly: Assembly): Frames {
  const read = assembly.sheets.get("legs");
  if (!read) return frames;
  const bySection = new Map<string, Map<string, LegRow[]>>();
  for (const row of rowsOf(legs, assembly)) {
    const { section, leg } = row.cells;
    if (!frameFor(section, row.origin, { frames, read, assembly }) || !isBeddingSound(row, assembly))
      continue;
    const rows = bySection.get(section) ?? new Map<string, LegRow[]>();
    bySection.set(section, rows);
    gather(rows, leg, row);
  }
  tellLostRows(bySection, read, assembly);
  const usable = new Map<string, SectionFrame>();
  for (const [name, frame] of frames.usable) usable.set(name, legsOf(frame, bySection.get(name), assembly));
  return { ...frames, usable };
}

const isComputed = (rows: readonly LegRow[]): boolean =>
  rows.some(({ cells }) => cells.position === undefined);

/** A position computed over a row that could not be read would be wrong: its leg ends before it until it is mended. */
function tellLostRows(
  bySection: ReadonlyMap<string, Map<string, LegRow[]>>,
  { sheet }: ReadSheet,
  assembly: Assembly,
): void {
  const lost = new Set(
    assembly.problems
      .problems()
      .flatMap(({ severity, file, row }) => (severity === "error" && file === sheet.file ? (row ?? []) : [])),
  );
  for (const ofSection of bySection.values())
    for (const rows of ofSection.values()) if (rows.length === 1) lost.add(rows[0].origin.row);
  for (const row of lost) {
    const index = sheet.rowNumbers.indexOf(row);
    const cells = index < 0 ? [] : (sheet.rows.at(index) ?? []);
    const at = (column: string) => (cells[sheet.columns.indexOf(column)] ?? "").trim().normalize("NFC");
    for (const [section, ofSection] of bySection)
      for (const [leg, rows] of ofSection) {
        const isOwn = ["", section].includes(at("section")) && ["", leg].includes(at("leg"));
        // A row of another name among the leg's own is likely to be one of them.
        const isAmong = rows[0]?.origin.row < row && row < (rows.at(-1)?.origin.row ?? 0);
        if (!(isOwn || isAmong) || rows.length < 2 || !isComputed(rows)) continue;
        const found = at("reading");
        assembly.problems.add("leg-row-lost", {
          file: sheet.file,
          row,
          column: "reading",
          found,
          detail: leg,
        });
        const end = parseNumber(sheet.dialect.decimal === "comma" ? (withDecimalPoint(found) ?? "") : found);
        ofSection.set(leg, typeof end === "string" ? [] : rows.filter(({ cells }) => cells.reading < end));
      }
  }
}

function legsOf(
  frame: SectionFrame,
  rows: ReadonlyMap<string, readonly LegRow[]> | undefined,
  assembly: Assembly,
): SectionFrame {
  const read = new Map(frame.legs);
  for (const [name, legRows] of rows ?? []) {
    const sorted = distinctReadings(legRows, assembly);
    if (sorted.length < 2) {
      if (sorted.length === 1)
        assembly.problems.add("short-leg", { ...sorted[0].origin, column: "leg", found: name });
      continue;
    }
    if (isComputed(legRows)) tellOrder(name, legRows, assembly);
    const heightsM = legHeights(name, sorted, { frame, assembly });
    if (heightsM === undefined) continue;
    tellTurns(name, sorted, { heightsM, frame, assembly });
    read.set(name, { name, readings: sorted.map(({ cells }) => cells.reading), heightsM });
  }
  const legsLeftOut = new Set([...(rows?.keys() ?? [])].filter((name) => !read.has(name)));
  return { ...frame, legs: read, legsLeftOut };
}

function distinctReadings(rows: readonly LegRow[], assembly: Assembly): readonly LegRow[] {
  const byReading = new Map<number, LegRow>();
  for (const row of rows) {
    const { reading } = row.cells;
    if (byReading.has(reading)) {
      assembly.problems.add("repeated-reading", { ...row.origin, column: "reading", found: String(reading) });
    } else byReading.set(reading, row);
  }
  return [...byReading.values()].toSorted((a, b) => a.cells.reading - b.cells.reading);
}

/** Computed positions hang on the order of the readings: one that goes back in the file is likely to be a slip. */
function tellOrder(leg: string, rows: readonly LegRow[], assembly: Assembly): void {
  const back = rows.find((row, i) => i > 0 && row.cells.reading < rows[i - 1].cells.reading);
  if (back === undefined) return;
  const found = String(back.cells.reading);
  assembly.problems.add("readings-out-of-order", { ...back.origin, column: "reading", found, detail: leg });
}

interface Turning {
  readonly heightsM: readonly number[];
  readonly frame: SectionFrame;
  readonly assembly: Assembly;
}

/** A leg whose positions go up and then down: one of its readings or angles is likely to be a slip. */
function tellTurns(leg: string, rows: readonly LegRow[], { heightsM, frame, assembly }: Turning): void {
  const way = Math.sign(heightsM[heightsM.length - 1] - heightsM[0]) || 1;
  const turn = heightsM.findIndex((height, i) => i > 0 && (height - heightsM[i - 1]) * way < 0);
  if (turn < 0) return;
  const { cells, origin } = rows[turn];
  const found =
    cells.position === undefined ? `computed: ${formatGiven(heightsM[turn], frame)}` : String(cells.position);
  assembly.problems.add("leg-turns-back", { ...origin, column: "position", found, detail: leg });
}
