import type { ColumnChoice, TableDeclaration } from "../study/tables/declare.ts";
import { type TableName, tables } from "../study/tables/index.ts";
import { choicesByContent, type ListedNames } from "./by-content.ts";
import type { DeclaredDialect, TableSetting } from "./dialect/declared.ts";
import { bestParting, type Parting, type Preview, previews } from "./dialect/delimiter.ts";
import { decodeBytes } from "./dialect/encoding.ts";
import { MOST_COLUMNS } from "./limits.ts";
import { wideShape } from "./wide/wide-shape.ts";

/** A declared table, with what is chosen for the columns of one file. */
export type PlannedTable = TableDeclaration & { readonly name: TableName };

/** How a file is to be read. */
export type FilePlan = LongPlan | { readonly kind: "wide"; readonly delimiter: Parting["delimiter"] };

interface LongPlan {
  readonly kind: "long";
  readonly table: PlannedTable;
  /** True where it has no column for the section, and needs one. */
  readonly lacksSection: boolean;
  /** Columns taken by their content, by header. */
  readonly byContent: ReadonlyMap<string, ColumnChoice>;
  readonly recognised: number;
  /** The columns of its header. */
  readonly width: number;
}

export interface PlannedFile {
  readonly bytes: Uint8Array;
  readonly declared: DeclaredDialect;
  readonly said: TableSetting | undefined;
  readonly listed: ListedNames;
}

/** Bytes that are looked at. */
const HEAD = 262_144;

/** What a person chose for the columns of a file. */
export const choicesOf = (said: TableSetting | undefined): ReadonlyMap<string, ColumnChoice> =>
  new Map(
    Object.entries(said?.columns ?? {}).map(([header, choice]) => [header, { ...choice, by: "chosen" }]),
  );

/** The table with the choices that it has columns for. */
export function withChoices(table: PlannedTable, choices: ReadonlyMap<string, ColumnChoice>): PlannedTable {
  const fitting = [...choices].filter(
    ([, { is }]) => is === undefined || is === "unused" || table.columns[is] !== undefined,
  );
  return fitting.length === 0 ? table : { ...table, chosen: new Map(fitting) };
}

/** The beginning of a file, parted in every way that is possible; undefined where it is no text. */
export function headOf({
  bytes,
  declared,
}: Pick<PlannedFile, "bytes" | "declared">): readonly Preview[] | undefined {
  const decoded = decodeBytes(headBytes(bytes), declared.encoding);
  return (
    decoded &&
    previews(decoded.text, declared).map((way) => ({
      ...way,
      records: way.records.filter(({ cells }) => cells.length <= MOST_COLUMNS).slice(0, 200),
    }))
  );
}

/** Whole lines from the beginning, in one- and two-byte encodings. */
function headBytes(bytes: Uint8Array): Uint8Array {
  if (bytes.byteLength <= HEAD) return bytes;
  const end = bytes.lastIndexOf(10, HEAD);
  const isTwoBytes = (bytes[0] === 0xff && bytes[1] === 0xfe) || (bytes[0] === 0xfe && bytes[1] === 0xff);
  return bytes.subarray(0, isTwoBytes || end < 0 ? HEAD : end + 1);
}

/** How a file of a known table is to be read: as it stands where its header is whole, else as what it can be. */
export function planFor(table: PlannedTable, file: PlannedFile): FilePlan {
  const chosen = choicesOf(file.said);
  const own = withChoices(table, chosen);
  const asIs = {
    kind: "long" as const,
    table: own,
    lacksSection: false,
    byContent: noChoices,
    recognised: 0,
    width: 0,
  };
  const ways = headOf(file);
  if (ways === undefined) return asIs;
  const isWide = file.said?.shape === "samples-down" || file.said?.shape === "taxa-down";
  const whole = isWide ? undefined : longPlan(own, ways, { listed: file.listed, maySeekContent: false });
  if (whole !== undefined && !whole.lacksSection) return whole;
  const wide = table.name === "occurrences" ? widePlan(ways, file.said) : undefined;
  const isFirst = wide !== undefined && (whole === undefined || standsFirst(wide, file.said));
  return (
    (isFirst ? wide : undefined) ??
    whole ??
    longPlan(own, ways, { listed: file.listed, maySeekContent: true }) ??
    asIs
  );
}

const noChoices: ReadonlyMap<string, ColumnChoice> = new Map();

export interface OtherPlans {
  /** Tables that other files are read as. */
  readonly taken: ReadonlySet<TableName>;
  /** True where the finds are those of a wide sheet, and further ones join it. */
  readonly mayJoinWide: boolean;
}

/** The ways in which a file of no known name can be read: those of most recognised columns. */
export function plansByColumns(file: PlannedFile, { taken, mayJoinWide }: OtherPlans): readonly FilePlan[] {
  const ways = headOf(file);
  if (ways === undefined) return [];
  const wide = taken.has("occurrences") && !mayJoinWide ? undefined : widePlan(ways, file.said);
  if (wide !== undefined && standsFirst(wide, file.said)) return [wide];
  const chosen = choicesOf(file.said);
  const open = tables.filter(({ name }) => !taken.has(name)).map((table) => withChoices(table, chosen));
  const plans = open.flatMap(
    (table) => longPlan(table, ways, { listed: file.listed, maySeekContent: false }) ?? [],
  );
  // A wide sheet with taxa down has names in a column as any table; one of which most columns are known is that table.
  const isWide = wide !== undefined && !plans.some(isOther);
  if (isWide) return [wide];
  const best = mostRecognised(plans.filter(({ lacksSection }) => !lacksSection));
  const withoutSection = mostRecognised(plans.filter(({ lacksSection }) => lacksSection));
  const [first] = best;
  const [second] = withoutSection;
  if (first !== undefined && (second === undefined || first.recognised >= second.recognised)) return best;
  if (second !== undefined) return withoutSection;
  const finds = open.find(({ name }) => name === "occurrences");
  const byContent = finds && longPlan(finds, ways, { listed: file.listed, maySeekContent: true });
  return byContent === undefined ? [] : [byContent];
}

const isOther = ({ table, recognised, width }: LongPlan): boolean =>
  table.name !== "taxa" && 2 * recognised >= width;

/** Headers that are names of taxa tell a wide sheet, whatever else stands there; names in a column are those of any table. */
const standsFirst = (
  { shape, sure }: { readonly shape: "samples-down" | "taxa-down"; readonly sure: number },
  said: TableSetting | undefined,
): boolean => (said?.shape !== undefined && said.shape !== "long") || (shape === "samples-down" && sure >= 2);

function mostRecognised<T extends { readonly recognised: number }>(plans: readonly T[]): readonly T[] {
  const most = plans.reduce((most, { recognised }) => Math.max(most, recognised), 0);
  return plans.filter(({ recognised }) => recognised === most);
}

function widePlan(ways: readonly Preview[], said: TableSetting | undefined) {
  const shapes = ways.flatMap(({ delimiter, records }) => {
    const shaped = wideShape(records, { chosen: choicesOf(said), shape: said?.shape });
    return shaped === undefined
      ? []
      : [{ kind: "wide" as const, delimiter, shape: shaped.shape, sure: shaped.layout.sure }];
  });
  return shapes.reduce<(typeof shapes)[number] | undefined>(
    (best, one) => (best === undefined || one.sure > best.sure ? one : best),
    undefined,
  );
}

interface LongSearch {
  readonly listed: ListedNames;
  /** Whether columns of unknown header may be taken for something by their content. */
  readonly maySeekContent: boolean;
}

/** The table as far as its header is whole, but for a section that one name can stand for; undefined where it is not. */
function longPlan(
  table: PlannedTable,
  ways: readonly Preview[],
  { listed, maySeekContent }: LongSearch,
): LongPlan | undefined {
  const strict = bestParting(ways, table);
  const plan = { kind: "long" as const, byContent: noChoices };
  if (strict?.header.isComplete)
    return {
      ...plan,
      table,
      lacksSection: false,
      recognised: strict.header.recognised,
      width: strict.header.headers.length,
    };
  const open = withoutSection(table);
  const loose = bestParting(ways, open) ?? strict;
  if (open !== table && loose?.header.isComplete)
    return {
      ...plan,
      table: open,
      lacksSection: true,
      recognised: loose.header.recognised,
      width: loose.header.headers.length,
    };
  if (!maySeekContent || loose === undefined) return undefined;
  const records = ways.find(({ delimiter }) => delimiter === loose.delimiter)?.records ?? [];
  const byContent = choicesByContent(loose.header, records, { table, listed });
  const known = { ...table, chosen: new Map([...byContent, ...(table.chosen ?? [])]) };
  const again = byContent.size === 0 ? undefined : longPlan(known, ways, { listed, maySeekContent: false });
  return again && { ...again, byContent };
}

/** The table with the section as a column that need not be there. */
function withoutSection(table: PlannedTable): PlannedTable {
  const { section } = table.columns;
  if (section?.required !== true || table.name === "sections") return table;
  return { ...table, columns: { ...table.columns, section: { ...section, required: false } } };
}
