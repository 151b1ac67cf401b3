/** Quotes that are not as they should be, by the row that a spreadsheet shows. */
export interface CsvFault {
  readonly code: "unclosed-quote" | "malformed-quote";
  readonly row: number;
}

interface WrittenRecord {
  readonly cells: readonly string[];
  readonly row: number;
}

interface Signs {
  readonly delimiter: string;
  readonly quote: string;
}

interface Cell {
  readonly text: string;
  readonly end: number;
  readonly code?: CsvFault["code"];
}

/**
 * Parts a text in which quotes stand where none belong: a cell with text after its closing quote goes on to the next
 * sign that parts cells, a quote that nothing closes is a sign like any other. Such cells stand as they are written.
 */
export function recordsWithOddQuotes(
  text: string,
  signs: Signs,
): { readonly records: readonly WrittenRecord[]; readonly faults: readonly CsvFault[] } {
  const records: WrittenRecord[] = [];
  const faults: CsvFault[] = [];
  let from = 0;
  for (let row = 1; from < text.length; row++) {
    const cells: string[] = [];
    let code: CsvFault["code"] | undefined;
    for (;;) {
      const cell = cellAt(text, from, signs);
      cells.push(cell.text);
      code ??= cell.code;
      from = cell.end + 1;
      if (text[cell.end] !== signs.delimiter) break;
    }
    if (text.startsWith("\r\n", from - 1)) from += 1;
    records.push({ cells, row });
    if (code !== undefined) faults.push({ code, row });
  }
  return { records, faults };
}

function cellAt(text: string, start: number, signs: Signs): Cell {
  const { quote } = signs;
  if (text[start] !== quote) return plainCell(text, start, { ...signs, start });
  let at = text.indexOf(quote, start + 1);
  while (at !== -1 && text[at + 1] === quote) at = text.indexOf(quote, at + 2);
  if (at === -1) return { ...plainCell(text, start, { ...signs, start }), code: "unclosed-quote" };
  const whole = plainCell(text, at + 1, { ...signs, start });
  if (text.slice(at + 1, whole.end).trim() !== "") return { ...whole, code: "malformed-quote" };
  return { text: text.slice(start + 1, at).replaceAll(quote + quote, quote), end: whole.end };
}

const isEnd = (sign: string, { delimiter }: Signs): boolean =>
  sign === delimiter || sign === "\n" || sign === "\r";

/** The cell from its start to the next sign that parts cells, sought from a place in it. */
function plainCell(
  text: string,
  from: number,
  { start, ...signs }: Signs & { readonly start: number },
): Cell {
  let end = from;
  while (end < text.length && !isEnd(text[end], signs)) end += 1;
  return { text: text.slice(start, end), end };
}
