import { recogniseColumns } from "../../study/columns.ts";
import type { ProblemList } from "../../study/problem-list.ts";
import { type TableName, tables } from "../../study/tables/index.ts";
import { baseName } from "../base-name.ts";
import { decodeText } from "../csv.ts";
import { plainFind } from "./darwin-core-finds.ts";
import { type DescribedFile, readMeta } from "./darwin-core-meta.ts";
import { type DarwinPlaces, eventId, placesOf, sectionOf, sectionTerms } from "./darwin-core-places.ts";
import { partPositions, type StatedPosition } from "./darwin-core-positions.ts";
import { type DarwinRow, darwinRows, filledTerms, isFilled } from "./darwin-core-rows.ts";
import { sectionsText } from "./darwin-core-sections.ts";
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

interface DarwinTable {
  readonly file: DescribedFile;
  readonly path: string;
  readonly table: TableName;
  readonly rows: readonly DarwinRow[];
}

interface Unpacking {
  readonly files: Files;
  readonly problems: ProblemList;
}

/**
 * The files with a Darwin Core archive among them turned into study tables: events are samples, their parent event or
 * locality is the section, occurrences and measurements belong to their event; a measurement that is a height or depth
 * is the position of what it was measured on. Without a meta.xml, as they are.
 */
export function readDarwinCore(files: Files, problems: ProblemList): Files {
  const [metaPath, metaBytes] = [...files].find(([path]) => baseName(path) === "meta.xml") ?? ["", undefined];
  const described = metaBytes === undefined ? undefined : readMeta(decodeText(metaBytes) ?? "");
  if (described === undefined) return files;
  const kept = new Map([...files].filter(([path]) => path !== metaPath && baseName(path) !== "eml.xml"));
  const read: DarwinTable[] = [];
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
    if (part) read.push(part);
  }
  const { parts, positions } = withoutPositions(read);
  const rowsOf = (table: TableName) =>
    parts.filter((part) => part.table === table).flatMap(({ rows }) => rows);
  const places = placesOf(rowsOf("samples"), rowsOf("occurrences"), positions);
  for (const part of parts) {
    const name = nameOf(part, part.table);
    kept.set(name, tableText(part, places, { name, problems }));
  }
  const events = parts.find(({ table }) => table === "samples");
  const sections = sectionsText(events?.rows ?? [], places, events?.file.headerLines ?? 0);
  const hasOwn = [...kept.keys()].some((path) => /^sections\.[a-z]+$/i.test(baseName(path)));
  if (sections !== undefined && !hasOwn) kept.set(nameOf(events ?? parts[0], "sections"), sections);
  return kept;
}

/** The name of a table made of an archive's file. */
const nameOf = ({ path }: DarwinTable, table: TableName): string => `${path} [${table}]`;

function partOf(file: DescribedFile, path: string, { files, problems }: Unpacking): DarwinTable | undefined {
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
  const part = { file, path, table };
  if (table !== "occurrences") return { ...part, rows: withStatedUnits(rows) };
  const telling = { file: nameOf({ ...part, rows }, table), problems };
  return { ...part, rows: withStatedUnits(rows.map((row) => plainFind(row, telling))) };
}

/** The parts with the measurements that are positions taken out; a file that held nothing else is no table. */
function withoutPositions(read: readonly DarwinTable[]) {
  const positions = new Map<string, StatedPosition>();
  const parts = read.flatMap((part) => {
    if (part.table !== "measurements") return [part];
    const parted = partPositions(part.rows);
    for (const [of, position] of parted.positions) positions.set(of, position);
    return parted.rest.length === 0 && parted.positions.size > 0 ? [] : [{ ...part, rows: parted.rest }];
  });
  return { parts, positions };
}

interface Telling {
  readonly name: string;
  readonly problems: ProblemList;
}

/** A study table of the terms that it knows; rows keep their numbers. What is left aside is told once. */
function tableText(part: DarwinTable, places: DarwinPlaces, { name, problems }: Telling): Uint8Array {
  const { table } = part;
  const rows = table === "samples" ? part.rows.filter((row) => !places.parents.has(eventId(row))) : part.rows;
  const hasSample = places.hasEvents || isFilled(rows, "eventID");
  const sectionHere = sectionOf(rows);
  const ofRow = (row: DarwinRow) => placed(row, table, places);
  const hasPosition = rows.some((row) => ofRow(row).position !== undefined);
  const own = filledTerms(rows).filter(
    (term) => !["eventID", "occurrenceID"].includes(term) && !sectionTerms.includes(term),
  );
  const used = usedTerms(own, table, hasPosition);
  const unused = own.filter((term) => !used.includes(term));
  if (unused.length > 0) problems.add("terms-unused", { file: name, found: unused.join(", ") });
  const lines: (readonly string[])[] = [
    ["section", ...(hasSample ? ["sample"] : []), ...(hasPosition ? ["position"] : []), ...used],
  ];
  const offset = part.file.headerLines > 0 ? 0 : 1;
  for (const row of rows) {
    const { event, position } = ofRow(row);
    const isOwnSection = table === "samples" || !places.hasEvents;
    const section = isOwnSection ? sectionHere(row) : (places.sections.get(event) ?? "");
    while (lines.length < row.row + offset - 1) lines.push([""]);
    lines.push([
      section || (places.sections.get(event) ?? ""),
      ...(hasSample ? [event] : []),
      ...(hasPosition ? [position?.value ?? ""] : []),
      ...used.map((term) => row.values.get(term) ?? ""),
    ]);
  }
  return csvOf(lines);
}

/** The event of a row, and the position measured on it, or on the occurrence where there are no events. */
function placed(row: DarwinRow, table: TableName, { positions, events, hasEvents }: DarwinPlaces) {
  const event = table === "samples" ? eventId(row) : (row.values.get("eventID") ?? "").trim() || row.id;
  const occurrence = (row.values.get("occurrenceID") ?? "").trim() || (hasEvents ? "" : row.id);
  const of = table === "samples" ? event : table === "occurrences" ? occurrence : "";
  return { event: events.get(event) ?? event, position: positions.get(of) };
}

const positionColumns = ["position", "base", "top"];

/** The terms that the table knows, each column by the first of them; positions only where none was measured. */
function usedTerms(own: readonly string[], table: TableName, hasPosition: boolean): readonly string[] {
  const declaration = tables.find(({ name }) => name === table) ?? tables[0];
  const taken = new Set<string>(["section", "sample", ...(hasPosition ? positionColumns : [])]);
  return recogniseColumns(own, declaration).flatMap(({ header, column }) => {
    if (column === undefined || taken.has(column)) return [];
    taken.add(column);
    return [header];
  });
}
