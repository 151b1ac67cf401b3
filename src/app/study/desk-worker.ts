import { expose } from "comlink";
import type { Study } from "../../core/study/model.ts";
import { readSources } from "../../core/tables/read-sources.ts";
import { packStudy } from "../../core/tables/sources/pack-study.ts";
import { unpackSources } from "../../core/tables/sources/unpack-sources.ts";
import { type ApplyOptions, applyEdits, type Edit } from "../tables/edits.ts";
import { filesGivenOut, type GivingOut, tableGivenOut, workbookGivenOut } from "../tables/give-out.ts";
import { type LeavingSheet, type LeftOut, leftOut } from "../tables/given-table.ts";

type Files = ReadonlyMap<string, Uint8Array>;

/** Work on the bytes of tables that would hold the hand up. */
const desk = {
  read: async (files: Files): Promise<Pick<Study, "sheets" | "problems">> => {
    const { sheets, problems } = await readSources(files);
    return { sheets, problems };
  },
  /** What the reading left out of the tables. */
  leftOut: async (
    files: Files,
    leaving: readonly LeavingSheet[],
    unread: readonly string[],
  ): Promise<LeftOut> => leftOut((await unpackSources(files)).files, leaving, unread),
  /** The tables as plain files, whatever they were packed in, with the edits made. */
  edited: async (files: Files, edits: readonly Edit[], options: ApplyOptions): Promise<Files> =>
    applyEdits((await unpackSources(files)).files, edits, options),
  /** The file of one table to give out. */
  table: async (files: Files, edits: readonly Edit[], to: GivingOut & { readonly file: string }) =>
    tableGivenOut((await unpackSources(files)).files, edits, to),
  /** The whole study to give out, as files. */
  files: async (files: Files, edits: readonly Edit[], to: GivingOut): Promise<Files> =>
    filesGivenOut((await unpackSources(files)).files, edits, to),
  /** The same as a zip. */
  packed: async (files: Files, edits: readonly Edit[], to: GivingOut): Promise<Uint8Array> =>
    packStudy(filesGivenOut((await unpackSources(files)).files, edits, to)),
  /** The tables to give out as a workbook. */
  workbook: async (files: Files, edits: readonly Edit[], to: GivingOut): Promise<Uint8Array> =>
    workbookGivenOut((await unpackSources(files)).files, edits, to),
};

export type Desk = typeof desk;

expose(desk);
