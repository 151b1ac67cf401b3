/**
 * Text pasted from a spreadsheet as a file of a study, under a name that is not taken: cells parted by tabs, lines as
 * any system ends them. Any table of a study and any wide sheet can be pasted.
 */
export function pastedFile(
  text: string,
  taken: Iterable<string> = [],
): readonly [name: string, bytes: Uint8Array] {
  const names = new Set(taken);
  let name = "pasted.tsv";
  for (let count = 2; names.has(name); count++) name = `pasted-${count}.tsv`;
  return [name, new TextEncoder().encode(text)];
}
