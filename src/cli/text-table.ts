/** Text without control characters, shortened to `most`, so that no cell can write to the terminal. */
export function tame(text: string, most = 60): string {
  const safe = text.replace(/\p{Cc}+/gu, " ");
  return safe.length > most ? `${safe.slice(0, most - 1)}…` : safe;
}

/** A table for a terminal: columns as wide as their widest cell, two spaces between. */
export function textTable(rows: readonly (readonly string[])[], indent = "  "): string {
  const tamed = rows.map((row) => row.map((cell) => tame(cell)));
  const columns = Math.max(0, ...tamed.map((row) => row.length));
  const widths = Array.from({ length: columns }, (_, i) =>
    Math.max(...tamed.map((row) => (row[i] ?? "").length)),
  );
  return tamed
    .map(
      (row) =>
        indent + row.map((cell, i) => (i === row.length - 1 ? cell : cell.padEnd(widths[i]))).join("  "),
    )
    .join("\n");
}
