export type Cell = string | number | undefined;
export type Row = Readonly<Record<string, Cell>>;

const quoted = (text: string): string => (/[",\n\r]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text);

/** A table as text: the named columns in order, blank where a row has none, lines ended by a line feed. */
export function csv(columns: readonly string[], rows: readonly Row[]): string {
  const lines = rows.map((row) => columns.map((column) => quoted(String(row[column] ?? ""))).join(","));
  return [columns.join(","), ...lines, ""].join("\n");
}
