import { expose } from "comlink";
import type { Sheet } from "../../core/study/model.ts";
import { readSources } from "../../core/tables/read-sources.ts";
import { packStudy } from "../../core/tables/sources/pack-study.ts";
import { unpackSources } from "../../core/tables/sources/unpack-sources.ts";
import { type ApplyOptions, applyEdits, type Edit } from "../tables/edits.ts";
import { filesGivenOut, type GivingOut } from "../tables/give-out.ts";

type Files = ReadonlyMap<string, Uint8Array>;

/** Work on the bytes of tables that would hold the hand up. */
const desk = {
  sheets: async (files: Files): Promise<readonly Sheet[]> => (await readSources(files)).sheets,
  /** The tables as plain files, whatever they were packed in, with the edits made. */
  edited: async (files: Files, edits: readonly Edit[], options: ApplyOptions): Promise<Files> =>
    applyEdits((await unpackSources(files)).files, edits, options),
  /** The file of one table to give out. */
  table: async (
    files: Files,
    edits: readonly Edit[],
    { file, ...to }: GivingOut & { readonly file: string },
  ) => filesGivenOut((await unpackSources(files)).files, edits, to).get(file),
  /** The whole study to give out, as a zip. */
  packed: async (files: Files, edits: readonly Edit[], to: GivingOut): Promise<Uint8Array> =>
    packStudy(filesGivenOut((await unpackSources(files)).files, edits, to)),
};

export type Desk = typeof desk;

expose(desk);
