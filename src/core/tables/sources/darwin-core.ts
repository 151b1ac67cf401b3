import { recogniseColumns } from "../../study/columns.ts";
import type { ProblemList } from "../../study/problem-list.ts";
import { type TableName, tables } from "../../study/tables/index.ts";
import { baseName } from "../base-name.ts";
import { decodeText } from "../csv.ts";
import { type DescribedFile, readMeta } from "./darwin-core-meta.ts";
import { type DarwinRow, darwinRows, filledTerms, isFilled } from "./darwin-core-rows.ts";
import { csvOf } from "./quoted-csv.ts";
import { withStatedUnits } from "./stated-positions.ts";

type Files = ReadonlyMap<string, Uint8Array>;

/** The study table that a row type becomes. */
const tableOfType = new Map<string, TableName>([
  ["Event", "samples"],
  ["Occurrence", "occurrences"],
  ["MeasurementOrFact", "measurements"],
  ["ExtendedMeasurementOrFact", "measurements"],
]);

/** Terms that name the section, the first that is filled. */
const sectionTerms = ["parentEventID", "locality", "locationID"];

interface DarwinTable {
  readonly file: DescribedFile;
  readonly path: string;
  readonly table: TableName;
  readonly rows: readonly DarwinRow[];
}

/**
 * The files with a Darwin Core archive among them turned into study tables: events are samples, their parent event or
 * locality is the section, occurrences and measurements belong to their event. Without a meta.xml, as they are.
 */
export function readDarwinCore(files: Files, problems: ProblemList): Files {
  const [metaPath, metaBytes] = [...files].find(([path]) => baseName(path) === "meta.xml") ?? ["", undefined];
  const described = metaBytes === undefined ? undefined : readMeta(decodeText(metaBytes) ?? "");
  if (described === undefined) return files;
  const kept = new Map([...files].filter(([path]) => path !== metaPath && baseName(path) !== "eml.xml"));
  const parts: DarwinTable[] = [];
  for (const file of described) {
    const path = [...kept.keys()].find((path) => baseName(path) === baseName(file.location));
    const part = path === undefined ? undefined : partOf(file, path, { files, problems });
    if (path === undefined)
      problems.add("resource-unread", {
        file: metaPath,
        found: file.location,
        detail: "the file is missing",
      });
    else kept.delete(path);
    if (part) parts.push(part);
  }
  const events = parts.find(({ table }) => table === "samples");
  const places = placesOf(events?.rows ?? []);
  for (const part of parts) {
    const name = `${part.path} [${part.table}]`;
    kept.set(name, tableText(part, places, { name, problems }));
  }
  return kept;
}

function partOf(
  file: DescribedFile,
  path: string,
  { files, problems }: { readonly files: Files; readonly problems: ProblemList },
): DarwinTable | undefined {
  const table = tableOfType.get(file.rowType);
  if (table === undefined) {
    problems.add("resource-unread", {
      file: path,
      found: file.rowType,
      detail: "its rows are of no kind used here",
    });
    return undefined;
  }
  const rows = darwinRows(file, files.get(path) ?? new Uint8Array());
  if (rows === undefined) {
    problems.add("undecodable-bytes", { file: path, found: `bytes that are not ${file.encoding}` });
    return undefined;
  }
  return { file, path, table, rows: withStatedUnits(rows) };
}

interface EventPlaces {
  readonly hasEvents: boolean;
  /** Section of an event. */
  readonly sections: ReadonlyMap<string, string>;
  /** Events that other events belong to: they are sections, not samples. */
  readonly parents: ReadonlySet<string>;
}

const eventId = ({ id, values }: DarwinRow): string => (values.get("eventID") ?? id).trim() || id;

function sectionOf(rows: readonly DarwinRow[]): (row: DarwinRow) => string {
  const term = sectionTerms.find((term) => isFilled(rows, term)) ?? "parentEventID";
  return ({ values }) => (values.get(term) ?? "").trim();
}

function placesOf(rows: readonly DarwinRow[]): EventPlaces {
  const section = sectionOf(rows);
  const ids = new Set(rows.map(eventId));
  const parents = new Set(
    rows.flatMap(({ values }) => values.get("parentEventID") ?? []).filter((id) => ids.has(id)),
  );
  const sections = new Map(
    rows.flatMap((row) => [row.id, eventId(row)].map((id) => [id, section(row)] as const)),
  );
  return { hasEvents: rows.length > 0, sections, parents };
}

interface Telling {
  readonly name: string;
  readonly problems: ProblemList;
}

/** A study table of the terms that it knows; rows keep their numbers. What is left aside is told once. */
function tableText(part: DarwinTable, places: EventPlaces, { name, problems }: Telling): Uint8Array {
  const { rows, table } = part;
  const declaration = tables.find(({ name }) => name === table) ?? tables[0];
  const own = filledTerms(rows).filter((term) => term !== "eventID" && !sectionTerms.includes(term));
  const known = recogniseColumns(own, declaration);
  const used = known.flatMap(({ header, column }) =>
    column === undefined || column === "section" || column === "sample" ? [] : [header],
  );
  const unused = own.filter((term) => !used.includes(term));
  if (unused.length > 0) problems.add("terms-unused", { file: name, found: unused.join(", ") });
  const sectionHere = sectionOf(rows);
  const hasSample = places.hasEvents || isFilled(rows, "eventID");
  const lines: (readonly string[])[] = [["section", ...(hasSample ? ["sample"] : []), ...used]];
  const offset = part.file.headerLines > 0 ? 0 : 1;
  for (const row of rows) {
    const event = table === "samples" ? eventId(row) : (row.values.get("eventID") ?? "").trim() || row.id;
    if (table === "samples" && places.parents.has(event)) continue;
    const section =
      table === "samples" || !places.hasEvents ? sectionHere(row) : (places.sections.get(event) ?? "");
    while (lines.length < row.row + offset - 1) lines.push([""]);
    lines.push([section, ...(hasSample ? [event] : []), ...used.map((term) => row.values.get(term) ?? "")]);
  }
  return csvOf(lines);
}
