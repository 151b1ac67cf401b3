import type { Dialect } from "../../study/model.ts";
import type { ProblemList } from "../../study/problem-list.ts";
import { type DeclaredDialect, tablePath } from "./declared.ts";

interface Telling {
  readonly file: string;
  readonly declared: DeclaredDialect;
  readonly isEncodingTaken: boolean;
  readonly problems: ProblemList;
}

const delimiterWords = { ",": "commas", ";": "semicolons", "\t": "tabs", "|": "bars" } as const;

/** Tells everything that was found in a file and not stated, where it differs from the plain way. */
export function tellDialect(dialect: Dialect, { file, declared, isEncodingTaken, problems }: Telling): void {
  const { encoding, delimiter, decimal, headerRows, notes } = dialect;
  const detail = tablePath(file);
  const found = [
    ...(encoding.startsWith("UTF-16") && declared.encoding === undefined ? [encoding] : []),
    ...(isOwnDelimiter(file, delimiter) || declared.delimiter !== undefined
      ? []
      : [`${delimiterWords[delimiter]} between cells`]),
    ...(decimal === "comma" && declared.decimal === undefined ? ["decimal commas"] : []),
    ...(headerRows.length > 1 ? [`a header of rows ${headerRows.join(" and ")}`] : []),
  ];
  if (isEncodingTaken) {
    problems.add("read-as-windows-1252", { file, found: "bytes that are not UTF-8", detail });
  }
  if (found.length > 0) problems.add("read-as", { file, found: found.join(", "), detail });
  if (notes.length > 0) {
    const rows = notes.map(
      ({ row, cells }) => `row ${row}: ${cells.filter((cell) => cell.trim() !== "").join(" ")}`,
    );
    problems.add("notes-above", {
      file,
      row: notes[0].row,
      found: rows.join("; "),
      detail: String(headerRows[0]),
    });
  }
}

/** A comma, or a tab in a file whose ending says so. */
const isOwnDelimiter = (file: string, delimiter: string): boolean =>
  delimiter === "," || (delimiter === "\t" && /\.(?:tsv|tab)$/i.test(file));
