import type { ReactElement } from "react";
import type { Sheet, Study } from "../../../core/study/model.ts";
import type { Recognition } from "../../../core/study/recognised.ts";
import { plural } from "../../../report/wordings/words.ts";
import { usePage } from "../../state/page-context.ts";
import { columnChoices, pathOf } from "./choices-of-sheet.ts";
import styles from "./confirm.module.css";
import { unitWayOf, wayOf } from "./confirm-words.ts";
import { UnitChoice } from "./unit-choice.tsx";

/** Taxa of a wide sheet that are shown one by one; the others are counted. */
const SHOWN_TAXA = 4;

/** What each column of a file was taken to be, with some of its values, and what it can be instead. */
export function ColumnTable({ sheet, read }: { readonly sheet: Sheet; readonly read: Study }): ReactElement {
  const taxa = sheet.wide === undefined ? [] : sheet.recognised.filter(({ is }) => is === "taxon");
  const hidden = new Set(taxa.filter(({ by }) => by === "name").slice(SHOWN_TAXA));
  return (
    // oxlint-disable-next-line jsx-a11y/no-noninteractive-tabindex -- the keyboard scrolls it
    <section className={styles.scroll} tabIndex={0} aria-label={`Columns of ${sheet.file}`}>
      <table className={styles.columns}>
        <caption>
          {sheet.file} <small>{titleOf(sheet)}</small>
        </caption>
        <thead>
          <tr>
            <th scope="col">Header</th>
            <th scope="col">Values</th>
            <th scope="col">Taken to be</th>
            <th scope="col">Unit</th>
            <th scope="col">Told by</th>
          </tr>
        </thead>
        <tbody>
          {sheet.recognised.map((column, at) =>
            hidden.has(column) ? null : (
              <ColumnRow key={`${at} ${column.header}`} {...{ sheet, column, read }} />
            ),
          )}
          {hidden.size > 0 && (
            <tr>
              <th scope="row">{plural(hidden.size, "further taxon", "further taxa")}</th>
              <td colSpan={4} className={styles.soft}>
                recognised as names of taxa
              </td>
            </tr>
          )}
        </tbody>
      </table>
    </section>
  );
}

function titleOf({ table, wide, section }: Sheet): string {
  const what =
    wide === undefined
      ? table
      : `a wide sheet, ${wide.shape === "samples-down" ? "samples down" : "taxa down"}`;
  return section === undefined ? what : `${what} · section ${section.name}`;
}

interface ColumnRowProps {
  readonly sheet: Sheet;
  readonly column: Recognition;
  readonly read: Study;
}

function ColumnRow({ sheet, column, read }: ColumnRowProps): ReactElement {
  const { study } = usePage();
  const { header, is, by, values, asks, unit, unitBy } = column;
  const name = header === "" ? "the column without a header" : header;
  const choices = columnChoices(sheet);
  const path = pathOf(sheet.file, read.settings, "columns", header.trim(), "is");
  const isChangeable = unitBy === "header" || unitBy === "chosen" || asks !== undefined;
  const hasLength = ["m", "cm", "mm", "ft"].includes(unit ?? "") || asks !== undefined;
  return (
    <tr className={asks !== undefined || by === "content" ? styles.open : undefined}>
      <th scope="row">{header || "(blank)"}</th>
      <td className={styles.values}>{values.join(" · ")}</td>
      <td>
        <select
          aria-label={`${name} is`}
          value={is}
          disabled={header.trim() === ""}
          onChange={(event) => study.settle({ path, value: event.currentTarget.value })}
        >
          {!choices.includes(is) && <option value={is}>{is}</option>}
          {choices.map((choice) => (
            <option key={choice}>{choice}</option>
          ))}
        </select>
        {by === "content" && (
          <button type="button" onClick={() => study.settle({ path, value: is })}>
            It is
          </button>
        )}
      </td>
      <td>
        {isChangeable && hasLength ? (
          <UnitChoice sheet={sheet} column={column} settings={read.settings} />
        ) : (
          <span>{unit}</span>
        )}{" "}
        <small className={styles.soft}>{unitWayOf(column)}</small>
      </td>
      <td className={styles.soft}>{wayOf(column)}</td>
    </tr>
  );
}
