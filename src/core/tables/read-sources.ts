import type { Study } from "../study/model.ts";
import { type ReadStudyOptions, readStudy } from "./read-study.ts";
import { unpackSources } from "./sources/unpack-sources.ts";

/** Reads a study from files as they were given: tables, or a zip, a workbook, a data package, a Darwin Core archive. */
export async function readSources(
  given: ReadonlyMap<string, Uint8Array>,
  options: Pick<ReadStudyOptions, "name" | "settings"> = {},
): Promise<Study> {
  const { files, problems } = await unpackSources(given);
  return readStudy(files, { ...options, originals: given, problems });
}
