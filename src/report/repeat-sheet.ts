import * as v from "valibot";
import type { Study } from "../core/study/model.ts";
import { type Settings, settingsSchema } from "../core/study/settings.ts";
import { BLOCK_LAYOUT_VERSION, SCHEMA_VERSION, VERSION } from "../core/version.ts";
import type { Difference } from "./compare-tables.ts";

/** SHA-256 as lower-case hexadecimal; each surrounding brings its own. */
export type Digest = (content: string | Uint8Array) => Promise<string>;

interface NamedDigest {
  readonly name: string;
  readonly sha256: string;
}

/** What lets somebody else repeat a run to the last digit. Holds no time, path, user or thread count. */
export interface RepeatSheet {
  readonly program: { readonly name: "lastbed"; readonly version: string };
  readonly schema: number;
  readonly blockLayout: number;
  readonly study: {
    readonly name: string;
    readonly tables: readonly (NamedDigest & { readonly size: number })[];
  };
  readonly seed: number;
  readonly settings: Settings;
  readonly results: readonly NamedDigest[];
}

/** @param results the text of every result table by file name. */
export async function repeatSheet(
  study: Study,
  results: ReadonlyMap<string, string>,
  digest: Digest,
): Promise<RepeatSheet> {
  const tables = study.files
    .toSorted((a, b) => (a.name < b.name ? -1 : 1))
    .map(async ({ name, bytes }) => ({ name, size: bytes.byteLength, sha256: await digest(bytes) }));
  const digests = [...results].map(async ([name, text]) => ({ name, sha256: await digest(text) }));
  return {
    program: { name: "lastbed", version: VERSION },
    schema: SCHEMA_VERSION,
    blockLayout: BLOCK_LAYOUT_VERSION,
    study: { name: study.name, tables: await Promise.all(tables) },
    seed: study.settings.seed,
    settings: study.settings,
    results: await Promise.all(digests),
  };
}

const sheetSchema = v.object({
  program: v.object({ name: v.literal("lastbed"), version: v.string() }),
  schema: v.number(),
  blockLayout: v.number(),
  study: v.object({
    name: v.string(),
    tables: v.array(v.object({ name: v.string(), size: v.number(), sha256: v.string() })),
  }),
  seed: v.number(),
  settings: settingsSchema,
  results: v.array(v.object({ name: v.string(), sha256: v.string() })),
});

/** The sheet in a text, or undefined where the text is not one. */
export function parseRepeatSheet(text: string): RepeatSheet | undefined {
  const result = v.safeParse(sheetSchema, parsed(text));
  return result.success ? result.output : undefined;
}

function parsed(text: string): unknown {
  try {
    const content: unknown = JSON.parse(text);
    return content;
  } catch {
    return undefined;
  }
}

/** What changed before anything was computed: the program's versions, and the tables read. */
export async function sheetDifferences(
  sheet: RepeatSheet,
  study: Study,
  digest: Digest,
): Promise<readonly Difference[]> {
  const now = await repeatSheet(study, new Map(), digest);
  const differences: Difference[] = [];
  const compare = (table: string, was: string, is: string) => {
    if (was !== is) differences.push({ table, was, now: is });
  };
  compare("program version", sheet.program.version, now.program.version);
  compare("schema version", String(sheet.schema), String(now.schema));
  compare("random block layout", String(sheet.blockLayout), String(now.blockLayout));
  compare("seed beside the settings", String(sheet.seed), String(sheet.settings.seed));
  const [before, after] = [sheet.study.tables, now.study.tables];
  for (const name of new Set([...before, ...after].map((table) => table.name))) {
    const [was, is] = [before.find((t) => t.name === name), after.find((t) => t.name === name)];
    compare(`study/${name}`, was?.sha256 ?? "no such table", is?.sha256 ?? "no such table");
  }
  return differences;
}
