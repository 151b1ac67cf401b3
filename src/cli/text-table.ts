/** Text without control characters, shortened to `most`, so that no cell can write to the terminal. */
export function tame(text: string, most = 60): string {
  const safe = text.replace(/\p{Cc}+/gu, " ");
  return safe.length > most ? `${safe.slice(0, most - 1)}…` : safe;
}

/** A table for a terminal: columns as wide as their widest cell, two spaces between. */
export function textTable(rows: readonly (readonly string[])[], indent = "  "): string {
  const tamed = rows.map((row) => row.map((cell) => tame(cell)));
  const widths: number[] = [];
  for (const row of tamed)
    for (const [i, cell] of row.entries()) widths[i] = Math.max(widths[i] ?? 0, cell.length);
  return tamed
    .map(
      (row) =>
        indent + row.map((cell, i) => (i === row.length - 1 ? cell : cell.padEnd(widths[i]))).join("  "),
    )
    .join("\n");
}
