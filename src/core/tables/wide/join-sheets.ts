import type { HeaderHint, ReadSheet } from "../../study/assembly/context.ts";
import { encode, valueAt } from "../../study/coded.ts";
import type { Stand } from "../../study/origin.ts";

/**
 * Two tables that wide sheets were made into, as one, each row where it stands in its own file. Rows of samples and taxa
 * that both sheets have alike count once; those that differ stay, and are told when they are read.
 */
export function joinSheets(first: ReadSheet, next: ReadSheet): ReadSheet {
  const known = new Set(Array.from(first.sheet.rows, (cells) => JSON.stringify(cells)));
  const isFinds = first.sheet.table === "occurrences";
  const added = Array.from(next.sheet.rows, (cells, index) => ({ cells, index })).filter(
    ({ cells }) => isFinds || !known.has(JSON.stringify(cells)),
  );
  const stands = new Map<string, Stand>();
  const standAt = (read: ReadSheet, index: number): Stand => {
    const own = read.stands === undefined ? { file: read.sheet.file } : valueAt(read.stands, index);
    const key = JSON.stringify([own.file, own.column]);
    const stand = stands.get(key) ?? own;
    stands.set(key, stand);
    return stand;
  };
  return {
    ...first,
    sheet: {
      ...first.sheet,
      rows: [...first.sheet.rows, ...added.map(({ cells }) => cells)],
      rowNumbers: [...first.sheet.rowNumbers, ...added.map(({ index }) => next.sheet.rowNumbers[index])],
    },
    stands: encode([
      ...Array.from(first.sheet.rows, (_, index) => standAt(first, index)),
      ...added.map(({ index }) => standAt(next, index)),
    ]),
    hintsBySection: joinedHints(first, next),
    looked: [...(first.looked ?? []), ...(next.looked ?? [])],
    alsoShown: [...(first.alsoShown ?? []), ...(next.shown ? [next.shown] : [])],
  };
}

function joinedHints(first: ReadSheet, next: ReadSheet): ReadonlyMap<string, readonly HeaderHint[]> {
  const bySection = new Map(first.hintsBySection ?? ownHints(first));
  for (const [section, hints] of ownHints(next))
    bySection.set(section, [...(bySection.get(section) ?? []), ...hints]);
  return bySection;
}

function ownHints({ sheet, hints }: ReadSheet): ReadonlyMap<string, readonly HeaderHint[]> {
  const at = sheet.columns.indexOf("section");
  const sections = new Set(Array.from(sheet.rows, (cells) => (cells[at] ?? "").trim().normalize("NFC")));
  return new Map(Array.from(sections, (section) => [section, [...hints.values()]]));
}
