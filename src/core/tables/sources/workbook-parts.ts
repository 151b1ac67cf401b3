import { columnLetters } from "./workbook-scan.ts";

/** A cell to write: a text, or a number with the decimals it is shown with. */
export type WorkbookCell = string | { readonly value: number; readonly decimals: number };

export interface WorkbookSheet {
  readonly name: string;
  /** Rows by the number that a spreadsheet shows for them, from above downward. */
  readonly rows: readonly { readonly row: number; readonly cells: readonly WorkbookCell[] }[];
}

const XML = '<?xml version="1.0" encoding="UTF-8" standalone="yes"?>\n';
const MAIN = "http://schemas.openxmlformats.org/spreadsheetml/2006/main";
const OFFICE = "http://schemas.openxmlformats.org/officeDocument/2006/relationships";
const PACKAGE = "http://schemas.openxmlformats.org/package/2006";
const SPREADSHEET = "application/vnd.openxmlformats-officedocument.spreadsheetml";

/** Decimals that have a number format of their own; more are shown as the spreadsheet likes. */
export const MOST_DECIMALS = 15;

/** The parts of a workbook (ECMA-376 part 1, 12 and 18), by path: a sheet for each table, texts inside their cells. */
export function workbookParts(sheets: readonly WorkbookSheet[]): ReadonlyMap<string, string> {
  const places = sheets.map(({ name }, at) => ({ name, id: at + 1, path: `worksheets/sheet${at + 1}.xml` }));
  return new Map([
    ["[Content_Types].xml", contentTypes(places.map(({ path }) => path))],
    ["_rels/.rels", relationships([{ id: 1, type: "officeDocument", target: "xl/workbook.xml" }])],
    [
      "xl/workbook.xml",
      `${XML}<workbook xmlns="${MAIN}" xmlns:r="${OFFICE}"><sheets>${places
        .map(({ name, id }) => `<sheet name="${escaped(name)}" sheetId="${id}" r:id="rId${id}"/>`)
        .join("")}</sheets></workbook>`,
    ],
    [
      "xl/_rels/workbook.xml.rels",
      relationships([
        ...places.map(({ id, path }) => ({ id, type: "worksheet", target: path })),
        { id: places.length + 1, type: "styles", target: "styles.xml" },
      ]),
    ],
    ["xl/styles.xml", styles()],
    ...sheets.map((sheet, at) => [`xl/${places[at].path}`, sheetText(sheet)] as const),
  ]);
}

const part = (path: string, type: string): string =>
  `<Override PartName="/xl/${path}" ContentType="${SPREADSHEET}.${type}+xml"/>`;

function contentTypes(sheets: readonly string[]): string {
  return `${XML}<Types xmlns="${PACKAGE}/content-types"><Default Extension="rels" ContentType="application/vnd.openxmlformats-package.relationships+xml"/><Default Extension="xml" ContentType="application/xml"/>${part("workbook.xml", "sheet.main")}${part("styles.xml", "styles")}${sheets.map((path) => part(path, "worksheet")).join("")}</Types>`;
}

interface Relationship {
  readonly id: number;
  readonly type: string;
  readonly target: string;
}

const relationships = (list: readonly Relationship[]): string =>
  `${XML}<Relationships xmlns="${PACKAGE}/relationships">${list
    .map(
      ({ id, type, target }) => `<Relationship Id="rId${id}" Type="${OFFICE}/${type}" Target="${target}"/>`,
    )
    .join("")}</Relationships>`;

const FIRST_OWN_FORMAT = 164;
/** The style of texts ("@", so that what is typed into their cells stays text), before those of numbers by decimals. */
const TEXT_STYLE = 1;
const styleOf = (decimals: number): number => (decimals > MOST_DECIMALS ? 0 : TEXT_STYLE + 1 + decimals);

const style = (format: number): string =>
  `<xf numFmtId="${format}" fontId="0" fillId="0" borderId="0" xfId="0" applyNumberFormat="1"/>`;

function styles(): string {
  const decimals = Array.from({ length: MOST_DECIMALS + 1 }, (_, count) => count);
  const formats = decimals.map(
    (count) =>
      `<numFmt numFmtId="${FIRST_OWN_FORMAT + count}" formatCode="${count === 0 ? "0" : `0.${"0".repeat(count)}`}"/>`,
  );
  const all = [style(0), style(49), ...decimals.map((count) => style(FIRST_OWN_FORMAT + count))];
  return `${XML}<styleSheet xmlns="${MAIN}"><numFmts count="${formats.length}">${formats.join("")}</numFmts><fonts count="1"><font><sz val="11"/><name val="Calibri"/></font></fonts><fills count="2"><fill><patternFill patternType="none"/></fill><fill><patternFill patternType="gray125"/></fill></fills><borders count="1"><border><left/><right/><top/><bottom/><diagonal/></border></borders><cellStyleXfs count="1"><xf numFmtId="0" fontId="0" fillId="0" borderId="0"/></cellStyleXfs><cellXfs count="${all.length}">${all.join("")}</cellXfs><cellStyles count="1"><cellStyle name="Normal" xfId="0" builtinId="0"/></cellStyles></styleSheet>`;
}

function sheetText({ rows }: WorkbookSheet): string {
  const body = rows.map(({ row, cells }) => {
    const inside = cells.map((cell, column) => cellText(cell, `${columnLetters(column)}${row}`)).join("");
    return `<row r="${row}">${inside}</row>`;
  });
  return `${XML}<worksheet xmlns="${MAIN}"><sheetData>${body.join("")}</sheetData></worksheet>`;
}

function cellText(cell: WorkbookCell, at: string): string {
  if (cell === "") return "";
  if (typeof cell !== "string") return `<c r="${at}" s="${styleOf(cell.decimals)}"><v>${cell.value}</v></c>`;
  return `<c r="${at}" s="${TEXT_STYLE}" t="inlineStr"><is><t xml:space="preserve">${escaped(cell)}</t></is></c>`;
}

const entities = new Map([
  ["&", "&amp;"],
  ["<", "&lt;"],
  [">", "&gt;"],
  ['"', "&quot;"],
]);

/** A text for XML; signs that XML cannot hold, and what would be taken for one of them, as ECMA-376 writes them (22.9.2.19). */
const escaped = (text: string): string =>
  text
    .replace(/_(?=x[0-9A-Fa-f]{4}_)/g, "_x005F_")
    .replace(/[\p{Cc}\p{Surrogate}\uFFFE\uFFFF]/gu, (sign) => (isXmlSign(sign) ? sign : signCode(sign)))
    .replace(/[&<>"]/g, (sign) => entities.get(sign) ?? sign);

/** A carriage return is none: XML reads it as a line feed. */
const isXmlSign = (sign: string): boolean => sign === "\t" || sign === "\n" || /[\u0080-\u009F]/.test(sign);

const signCode = (sign: string): string =>
  `_x${sign.charCodeAt(0).toString(16).toUpperCase().padStart(4, "0")}_`;
