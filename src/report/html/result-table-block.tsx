import type { ReactElement } from "react";
import type { ResultTable } from "../tables/result-table.ts";

/** Rows shown in the report; the CSV beside it holds all. */
const MOST = 60;
const shownInReport = new Set(["candidates", "markers", "flags", "ties", "timing"]);

/** A result table folded away under its title; long ones name their CSV alone. */
export function ResultTableBlock({ table }: { readonly table: ResultTable }): ReactElement {
  const { name, title, columns, rows } = table;
  const isShown = shownInReport.has(name);
  return (
    <details>
      <summary>
        <code>{name}.csv</code> {title}, {rows.length} rows
      </summary>
      {isShown && (
        <div className="wide">
          <table>
            <thead>
              <tr>
                {columns.map((column) => (
                  <th key={column.name} title={column.help}>
                    {column.name}
                  </th>
                ))}
              </tr>
            </thead>
            <tbody>
              {rows.slice(0, MOST).map((row, i) => (
                <tr key={`${i}`}>
                  {row.map((cell, k) => (
                    <td key={columns[k].name}>
                      {typeof cell === "number" ? String(Number(cell.toPrecision(6))) : cell}
                    </td>
                  ))}
                </tr>
              ))}
            </tbody>
          </table>
        </div>
      )}
      {isShown && rows.length > MOST && <p>{rows.length - MOST} more rows in the CSV.</p>}
      {!isShown && (
        <ul className="columns">
          {columns.map((column) => (
            <li key={column.name}>
              <code>{column.name}</code> {column.help}
            </li>
          ))}
        </ul>
      )}
    </details>
  );
}
