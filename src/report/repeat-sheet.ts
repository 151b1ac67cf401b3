import type { Study } from "../core/study/model.ts";
import type { Settings } from "../core/study/settings.ts";
import { BLOCK_LAYOUT_VERSION, SCHEMA_VERSION, VERSION } from "../core/version.ts";

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
