/** Comma-separated UTF-8 with every cell in quotes, so that nothing in a cell can be taken for a sign of the table. */
export const csvOf = (rows: Iterable<readonly string[]>): Uint8Array =>
  new TextEncoder().encode(
    Array.from(rows, (cells) => `${cells.map((cell) => `"${cell.replaceAll('"', '""')}"`).join(",")}\n`).join(
      "",
    ),
  );
