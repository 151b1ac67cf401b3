import type { SettingChange } from "../../core/study/changed-settings.ts";
import { settingPath } from "../../core/study/setting-path.ts";
import type { Settings } from "../../core/study/settings.ts";
import { choices as choicesTable } from "../../core/study/tables/choices.ts";
import { type Edit, editsByFile, settingEdit } from "../tables/edits.ts";
import type { GivenTable } from "../tables/given-table.ts";
import { type EditStep, type History, heldEdits } from "../tables/history.ts";
import { PICKS, settingAt } from "./trial.ts";

const FILE = "choices.csv";
const COLUMNS = Object.keys(choicesTable.columns);

/** The table of choices as a study without one gets it. */
export const NEW_CHOICES = { file: FILE, text: `${COLUMNS.join(",")}\n` };

export interface Keeping {
  readonly changes: readonly SettingChange[];
  /** The settings before. */
  readonly settings: Settings;
  readonly tables: readonly GivenTable[];
  readonly history: History;
  readonly reason: string;
}

/** What is tried made a choice: the settings, and for each of them a row of choices.csv that says why. */
export function keptStep({ changes, settings, tables, history, reason }: Keeping): EditStep {
  const table = tables.find((one) => one.table === "choices");
  const place = nextPlace(table, heldEdits(history));
  const rows = changes.flatMap((change, at) =>
    choiceRow(change, { place, at, settings, reason, columns: table?.columns ?? COLUMNS }),
  );
  return {
    label: `keeping ${changes.map(({ path }) => settingPath(path)).join(", ")}`,
    edits: [...changes.map(settingEdit), ...rows],
  };
}

interface Place {
  readonly file: string;
  readonly row: number;
  readonly order: number;
}

/** Where the next choice is written, behind those that the table and its edits hold. */
function nextPlace(table: GivenTable | undefined, edits: readonly Edit[]): Place {
  const file = table?.file ?? FILE;
  const own = editsByFile(edits).get(file);
  const column = Math.max(0, (table?.columns ?? COLUMNS).indexOf("order"));
  const last = Math.max(table?.rowNumbers.at(-1) ?? 1, ...(table?.dialect.headerRows ?? [1]));
  const written = [...(own?.cells.values() ?? [])].map((cells) => cells.get(column));
  const orders = [...(table?.rows ?? []).map((row) => row[column]), ...written].map(Number);
  return {
    file,
    row: Math.max(last, ...(own?.added ?? []).map(({ row }) => row)) + 1,
    order: Math.max(0, ...orders.filter(Number.isFinite)) + 1,
  };
}

interface Row {
  readonly place: Place;
  readonly at: number;
  readonly settings: Settings;
  readonly reason: string;
  readonly columns: readonly (string | undefined)[];
}

function choiceRow(change: SettingChange, { place, at, settings, reason, columns }: Row): readonly Edit[] {
  const { file } = place;
  const row = place.row + at;
  const cells: Readonly<Record<string, string>> = {
    order: String(place.order + at),
    choice: settingPath(change.path),
    ...oldAndNew(change, settingAt(settings, change.path)),
    reason,
    after_results: "yes",
  };
  return [
    { kind: "row-added", file, row },
    ...columns.flatMap((name, column): Edit[] => {
      const now = name === undefined ? undefined : cells[name];
      return now === undefined || now === "" ? [] : [{ kind: "cell", file, row, column, was: "", now }];
    }),
  ];
}

/** Of a list of picks, the ones that differ: the list itself may be long. */
function oldAndNew({ path, value }: SettingChange, was: unknown) {
  if (path.join(".") !== PICKS.join(".") || !Array.isArray(was) || !Array.isArray(value))
    return { old: valueWords(was), new: valueWords(value) };
  const [before, after] = [was, value].map((list: readonly unknown[]) => list.map(valueWords));
  return {
    old: before.filter((pick) => !after.includes(pick)).join("; "),
    new: after.filter((pick) => !before.includes(pick)).join("; "),
  };
}

/** A setting's value as a person writes it. */
export const valueWords = (value: unknown): string =>
  value === undefined ? "" : typeof value === "string" ? value : JSON.stringify(value);
