import type { Delimiter } from "../../study/model.ts";
import type { TableDeclaration } from "../../study/tables/declare.ts";
import { type CsvRecord, parseRecords } from "../csv.ts";
import { type FoundHeader, findHeader } from "./header.ts";

const delimiters: readonly Delimiter[] = [",", ";", "\t", "|"];

/** Characters looked at before the whole file is read. */
export const PREVIEW = 65536;

/** The beginning of a text, parted by each sign that can part cells. */
export interface Preview {
  readonly delimiter: Delimiter;
  readonly records: readonly CsvRecord[];
}

/** Parts the beginning of a text in every way that is possible. */
export function previews(
  text: string,
  declared?: { readonly delimiter?: Delimiter; readonly quote?: string },
) {
  const cut = text.length <= PREVIEW ? text : wholeLines(text.slice(0, PREVIEW));
  return (declared?.delimiter === undefined ? delimiters : [declared.delimiter]).map(
    (delimiter): Preview => ({
      delimiter,
      records: parseRecords(cut, { delimiter, quote: declared?.quote }).records,
    }),
  );
}

function wholeLines(text: string): string {
  const end = Math.max(text.lastIndexOf("\n"), text.lastIndexOf("\r"));
  return end === -1 ? text : text.slice(0, end);
}

export interface Parting {
  readonly delimiter: Delimiter;
  readonly header: FoundHeader;
}

/** The sign under which a header of the table is found: complete, with most columns recognised, else of most cells. */
export function bestParting(ways: readonly Preview[], table: TableDeclaration): Parting | undefined {
  const partings = ways
    .filter(({ records }) => records.length > 0)
    .map(({ delimiter, records }) => ({ delimiter, header: findHeader(records, table) }));
  return partings.reduce<Parting | undefined>(
    (best, one) => (best === undefined || isBetter(one.header, best.header) ? one : best),
    undefined,
  );
}

function isBetter(one: FoundHeader, best: FoundHeader): boolean {
  if (one.isComplete !== best.isComplete) return one.isComplete;
  if (one.recognised !== best.recognised) return one.recognised > best.recognised;
  return one.headers.length > best.headers.length;
}
