import type { Section } from "../../core/study/model.ts";
import type { MarkedRow } from "../../figures/plates/section-log.tsx";
import type { RowPlace } from "./row-places.ts";
import type { ShownTable } from "./shown-table.ts";

/** The row that the keys act on, as the section's log shows it. */
export interface RowInHand {
  readonly section: string;
  readonly marked?: MarkedRow;
  /** What is said of a row that has no place. */
  readonly words: string;
}

interface HandOptions {
  readonly sections: readonly Section[];
  /** Where the row lies; undefined where it has no place. */
  readonly at: RowPlace | undefined;
  /** The section to show where the row names none. */
  readonly otherwise: string | undefined;
}

/** The section of a row and its place there; undefined where the study has no section. */
export function rowInHand(
  table: ShownTable,
  place: number,
  { sections, at, otherwise }: HandOptions,
): RowInHand | undefined {
  const row = table.rowNumbers[place];
  const column = table.columns.findIndex(
    ({ meaning, header }) => meaning === "section" || header === "section",
  );
  const named = (table.rows[place]?.[column] ?? "").trim();
  const section =
    at?.section ?? sections.find(({ name }) => name === named)?.name ?? otherwise ?? sections[0]?.name;
  if (section === undefined) return undefined;
  if (row === undefined || at === undefined) return { section, words: "This row has no place in a section" };
  const { baseM, topM } = at;
  return { section, marked: { baseM, topM, label: `row ${row}` }, words: "" };
}
