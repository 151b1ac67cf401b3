import { caution, error, nearest, type Wording } from "./wording.ts";

/** Wordings of what is wrong with a whole file, its dialect or its header, by code. */
export const sourceWordings = {
  "empty-file": () =>
    error("a header row and at least one row", "Fill the file in, or take it out of the study."),
  "header-only": () =>
    error("at least one row below the header", "Add rows, or take the file out of the study."),
  "undecodable-bytes": () =>
    error(
      "text in UTF-8, UTF-16 with a byte-order mark, or Windows-1252",
      "Save the file again as CSV UTF-8 (in a spreadsheet: Save as, CSV UTF-8).",
    ),
  "file-too-large": (p) =>
    error(`a file of at most ${p.detail}`, "Part the table into several studies, or thin it out."),
  "too-many-columns": (p) =>
    error(`at most ${p.detail} columns`, "Take the columns out that the study does not need."),
  "table-too-large": (p) =>
    error(
      `a table of at most ${p.detail} cells, rows times columns`,
      "Take columns out that the study does not need, or part the table into several studies.",
    ),
  "read-as": (p) =>
    caution(
      "comma-separated UTF-8 with a decimal point and the header in row 1",
      `It was read as found; where that is wrong, say what is right under ${p.detail} in the settings (decimal, delimiter, encoding).`,
    ),
  "read-as-windows-1252": (p) =>
    caution(
      "text in UTF-8",
      `It was read as Windows-1252: look at its accented letters, or save it as CSV UTF-8. Settle it with ${p.detail}.encoding.`,
    ),
  "notes-above": (p) =>
    caution(
      `the header in row 1`,
      `The header was found in row ${p.detail}; what stands above is kept, not used.`,
    ),
  "decimal-ambiguous": (p) =>
    error(
      "a number that can be read in one way",
      `The sign in ${p.found} can part decimals or thousands. Set ${p.detail}.decimal to point or comma (and take signs between thousands out).`,
    ),
  "taken-as": (p) =>
    caution(
      "a file named as its table",
      `By its columns it was taken to be ${p.detail}; name it ${p.detail}.csv, or set ${p.nearest}.table, if it is another.`,
    ),
  "read-wide": (p) =>
    caution(
      "a row for each find, or a wide sheet",
      `It was read as a wide sheet, cells as ${p.detail}: a number, x or + is a find, 0 or - looked for and not found. Say what is right under ${p.nearest} (shape, columns, codes, blank).`,
    ),
  "taken-by-content": (p) =>
    caution(
      "a header that is known",
      `By its content it was taken to be ${p.detail}: look. Settle it with ${p.nearest}.`,
    ),
  "section-by-name": (p) =>
    caution(
      "a column section",
      `The table names no section: all of it was taken to be of section ${p.found}. Settle it with ${p.detail}.`,
    ),
  "code-unknown": (p) =>
    error(
      "a number, x, +, 0, - or a code that a legend explains",
      `Say what ${p.found} means: found, not-found, not-searched, doubtful or reworked, with ${p.nearest}, in a note above the table (R = rare), or in taxa.scales. These cells are left out until then.`,
    ),
  "not-a-wide-cell": () =>
    error(
      "a number, x, +, 0, - or a code of up to four letters",
      "Correct the cell, or say that its column is unused. It is left out until then.",
    ),
  "blank-samples": (p) =>
    caution(
      "0 or - where a group was looked for and not found",
      `Where all cells of a group are blank in a sample, it counts as not looked for there. If it was looked for, set ${p.detail} to not-found.`,
    ),
  "values-without-unit": (p) =>
    error(
      "a unit for the values",
      `Add a column unit, write it in the header, as value (ppb), or set ${p.detail}. Nothing is assumed: the values are left out until then.`,
    ),
  "amount-without-unit": (p) =>
    caution(
      "an amount_unit beside the amount",
      `Write the unit in amount_unit or in the header, as amount (g), or set ${p.detail}. The amount is kept without a unit.`,
    ),
  "effort-without-unit": (p) =>
    caution(
      "an effort_unit beside the effort",
      `Write the unit in effort_unit or in the header, as effort (h), or set ${p.detail}. The effort is kept without a unit.`,
    ),
  "column-setting-unused": (p) =>
    caution(`a header of the file under ${p.detail}`, `No column has this header; correct it.${nearest(p)}`),
  "column-setting-foreign": (p) =>
    error(`a column of ${p.detail}, or unused`, `The table has no such column; it is not used.${nearest(p)}`),
  "resource-unread": (p) =>
    caution("a resource that can be read", `It is not used as the data package says: ${p.detail}.`),
  "archive-broken": () => error("a whole zip archive", "Pack or save the file again; nothing of it is used."),
  "archive-encrypted": () => error("an archive without a password", "Pack it again without a password."),
  "archive-too-large": (p) =>
    error(
      `an archive of at most 1000 files and ${p.detail}, packed no tighter than tables are`,
      "Give the tables as a folder, or take out what the study does not need.",
    ),
  "archive-inside": () =>
    caution("tables or .xlsx workbooks", "It is kept and not opened: unpack it, or save it as .xlsx or CSV."),
  "old-workbook": () =>
    error(
      "an .xlsx workbook without a password",
      "Save it as .xlsx (in a spreadsheet: Save as, Excel workbook), without a password.",
    ),
  "workbook-unreadable": () =>
    error("a workbook that can be read", "Open it in a spreadsheet and save it again as .xlsx, or as CSV."),
  "cell-without-value": (p) =>
    caution(
      `a value in column ${p.column}`,
      "The cell is read as blank: mend or work out its formula in the spreadsheet and save again.",
    ),
  "terms-unused": () =>
    caution("terms that the table knows", "These terms are kept in the archive and not used."),
  "status-contradicted": () =>
    caution(
      "an individualCount of 0 or a blank beside occurrenceStatus absent",
      "Correct one of them; the count decides whether it is a find.",
    ),
  "status-unknown": () =>
    caution("present or absent", "Write one of the two words; it is read as present until then."),
  "table-setting-unused": (p) =>
    caution("a file of the study under tables", `No file is named so; correct the name.${nearest(p)}`),
  "unclosed-quote": () =>
    error(
      "every opening quote to be closed",
      "Close the quote that opens here; a quote inside a cell is written twice.",
    ),
  "malformed-quote": () =>
    error(
      "quotes only around a whole cell",
      "Put the whole cell in quotes and write a quote inside it twice.",
    ),
  "too-many-cells": (p) =>
    error(
      `${p.detail ?? "as many"} cells, as in the header`,
      "Put a cell that holds the sign between cells in quotes, or take the further cells out.",
    ),
  "too-few-cells": (p) =>
    caution(
      `${p.detail ?? "as many"} cells, as in the header`,
      "The cells that lack at the end are read as blank; fill them in if they should not be.",
    ),
  "duplicate-header": () =>
    error("each column once", "Rename or take out one of the two columns that were read as the same."),
  "missing-column": (p) =>
    error(
      `a column ${p.detail}`,
      `Add the column ${p.detail}, or name the one that holds it so.${nearest(p)}`,
    ),
  "unknown-column": (p) => caution("a declared column", `The column is kept and not used.${nearest(p)}`),
  "blank-header": () => caution("a name above every column", "Name the column; it is kept and not used."),
  "duplicate-table": (p) =>
    error("one file for each table", `${p.detail} was read already; put the rows into one file.`),
  "unknown-file": (p) =>
    caution(
      "a table of the study",
      `The file is kept and not used.${p.detail === undefined ? "" : ` It could be ${p.detail}: name it so.`}${nearest(p)}`,
    ),
  "no-data": () =>
    error("occurrences.csv, published-ranges.csv or measurements.csv", "Add at least one of these tables."),
} satisfies Record<string, Wording>;
