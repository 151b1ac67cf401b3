import { suggestName } from "../study/nearest.ts";
import type { ProblemList } from "../study/problem-list.ts";
import { type TableName, tables } from "../study/tables/index.ts";
import { type DeclaredDialect, settingName } from "./dialect/declared.ts";
import { bestParting, previews } from "./dialect/delimiter.ts";
import { decodeBytes } from "./dialect/encoding.ts";
import { MOST_BYTES, MOST_COLUMNS } from "./limits.ts";

export type StudyTable = (typeof tables)[number];

/** A file that may be a table. */
export interface CandidateFile {
  readonly file: string;
  readonly path: string;
  readonly bytes: Uint8Array;
  readonly declared: DeclaredDialect;
}

/** The table's own name in a file's name; a sheet of a workbook stands in brackets behind the workbook's name. */
export function tableNamed(file: string): StudyTable | undefined {
  const sheet = /\[(.*)\]$/.exec(file)?.[1];
  const name = sheet ?? (/^(.*)\.(?:csv|tsv|tab|txt)$/i.exec(file)?.[1] || undefined);
  const plain = name
    ?.trim()
    .toLowerCase()
    .replace(/[\s_]+/g, "-");
  return tables.find(({ name }) => name === plain);
}

const isTableFile = (file: string): boolean => /(?:\.(?:csv|tsv|tab|txt)|\])$/i.test(file);

/** The table that an oddly named file holds by its columns, told; undefined, told, where it is none or could be several. */
export function tableByColumns(
  candidate: CandidateFile,
  taken: ReadonlySet<TableName>,
  problems: ProblemList,
): StudyTable | undefined {
  const { file, path } = candidate;
  const best = isTableFile(file) ? likeliest(candidate, taken) : [];
  if (best.length === 1) {
    const [table] = best;
    problems.add("taken-as", { file, found: file, detail: table.name, nearest: settingName(file) });
    return table;
  }
  const nearest = suggestName(
    file,
    tables.map(({ name }) => `${name}.csv`),
  );
  const detail = best.length > 1 ? best.map(({ name }) => `${name}.csv`).join(" or ") : undefined;
  problems.add("unknown-file", { file: path, found: file, detail, nearest });
  return undefined;
}

/** The tables all of whose necessary columns stand in the file, those with most columns recognised. */
function likeliest({ bytes, declared }: CandidateFile, taken: ReadonlySet<TableName>): readonly StudyTable[] {
  const decoded = bytes.byteLength > MOST_BYTES ? undefined : decodeBytes(bytes, declared.encoding);
  if (decoded === undefined) return [];
  const ways = previews(decoded.text, declared).map((way) => ({
    ...way,
    records: way.records.filter(({ cells }) => cells.length <= MOST_COLUMNS).slice(0, 60),
  }));
  const fitting = tables.flatMap((table) => {
    const header = taken.has(table.name) ? undefined : bestParting(ways, table)?.header;
    return header?.isComplete === true ? [{ table, recognised: header.recognised }] : [];
  });
  const most = fitting.reduce((most, { recognised }) => Math.max(most, recognised), 0);
  return fitting.filter(({ recognised }) => recognised === most).map(({ table }) => table);
}
