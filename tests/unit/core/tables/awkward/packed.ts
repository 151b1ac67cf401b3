import { strToU8, zipSync } from "fflate";
import writeExcel from "write-excel-file/universal";

type Cell = string | number | boolean | Date | null;

/** A workbook written by another program than the one that reads it: rows by sheet name. */
export async function workbook(sheets: Readonly<Record<string, readonly (readonly Cell[])[]>>) {
  const parts = Object.entries(sheets).map(([sheet, rows]) => ({
    sheet,
    data: rows.map((cells) =>
      cells.map((value) =>
        value === null ? null : value instanceof Date ? { value, format: "yyyy-mm-dd" } : { value },
      ),
    ),
  }));
  return new Uint8Array(await (await writeExcel(parts).toBlob()).arrayBuffer());
}

/** A zip archive of texts and bytes. */
export const zip = (files: Readonly<Record<string, string | Uint8Array>>, level: 0 | 9 = 9): Uint8Array =>
  zipSync(
    Object.fromEntries(
      Object.entries(files).map(([name, content]) => [
        name,
        typeof content === "string" ? strToU8(content) : content,
      ]),
    ),
    { level },
  );

/** The smallest workbook of one sheet, given as the XML of its rows. */
export const bareWorkbook = (rows: string): Uint8Array =>
  zip({
    "[Content_Types].xml": "<Types/>",
    "xl/workbook.xml":
      '<workbook xmlns:r="r"><sheets><sheet name="occurrences" sheetId="1" r:id="rId1"/></sheets></workbook>',
    "xl/_rels/workbook.xml.rels":
      '<Relationships><Relationship Id="rId1" Type="http://schemas.openxmlformats.org/officeDocument/2006/relationships/worksheet" Target="worksheets/sheet1.xml"/></Relationships>',
    "xl/worksheets/sheet1.xml": `<worksheet><sheetData>${rows}</sheetData></worksheet>`,
  });

const text = (at: string, value: string) => `<c r="${at}" t="inlineStr"><is><t>${value}</t></is></c>`;

export const bareHeader = `<row r="1">${text("A1", "section")}${text("B1", "taxon")}${text("C1", "height (m)")}</row>`;

export const bareRow = (row: number, position: string) =>
  `<row r="${row}">${text(`A${row}`, "Orskel Ledge")}${text(`B${row}`, "Orvella tenuis")}${position}</row>`;
