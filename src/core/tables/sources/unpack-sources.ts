import type { Problem } from "../../study/problem.ts";
import { type ProblemList, problemList } from "../../study/problem-list.ts";
import { MOST_BYTES, mebibytes } from "../limits.ts";
import { type ArchiveLimits, archiveLimits } from "./archive-limits.ts";
import { readDarwinCore } from "./darwin-core.ts";
import { isWorkbook, readWorkbook } from "./workbook.ts";
import { ArchiveFault, isZip, readZip } from "./zip-archive.ts";

/** The tables of a study as plain files, whatever they were packed in. */
export interface UnpackedSources {
  readonly files: ReadonlyMap<string, Uint8Array>;
  readonly problems: readonly Problem[];
}

/**
 * Unpacks what a study was given as: zip archives, workbooks (a file for each sheet), Darwin Core archives; anything
 * else stays as it is. What cannot be unpacked is told and takes nothing else with it. Never throws on bad input.
 */
export async function unpackSources(
  files: ReadonlyMap<string, Uint8Array>,
  limits: ArchiveLimits = archiveLimits,
): Promise<UnpackedSources> {
  const problems = problemList();
  const unpacked = new Map<string, Uint8Array>();
  for (const [path, bytes] of files) {
    for (const [name, content] of await unpackFile({ path, bytes, limits, problems, isInside: false }))
      unpacked.set(name, content);
  }
  return { files: readDarwinCore(unpacked, problems), problems: problems.problems() };
}

interface PackedFile {
  readonly path: string;
  readonly bytes: Uint8Array;
  readonly limits: ArchiveLimits;
  readonly problems: ProblemList;
  /** True for a file of an archive: an archive in it is not opened. */
  readonly isInside: boolean;
}

type Files = readonly (readonly [string, Uint8Array])[];

async function unpackFile(file: PackedFile): Promise<Files> {
  const { path, bytes, problems, isInside } = file;
  if (isCompoundFile(bytes)) {
    problems.add("old-workbook", { file: path, found: "an old or locked workbook" });
    return [];
  }
  if (!isZip(bytes) && !/\.(?:zip|xlsx|xlsm|ods)$/i.test(path)) return [[path, bytes]];
  const parts = partsOf(file);
  if (parts === undefined) return [];
  if (isWorkbook(parts)) return [...(await readWorkbook({ path, parts, problems }))];
  if (isInside || parts.has("mimetype")) {
    problems.add("archive-inside", {
      file: path,
      found: isInside ? "an archive in an archive" : "another format",
    });
    return [];
  }
  const inner: (readonly [string, Uint8Array])[] = [];
  const archives = [...parts.values()].filter(isZip).length;
  const limits = { ...file.limits, bytes: file.limits.bytes / Math.max(1, archives) };
  for (const [name, content] of parts)
    inner.push(
      ...(await unpackFile({ ...file, limits, path: `${path}/${name}`, bytes: content, isInside: true })),
    );
  return inner;
}

/** The files of an archive; undefined, told, where it cannot be unpacked. */
function partsOf({ path, bytes, limits, problems }: PackedFile): ReadonlyMap<string, Uint8Array> | undefined {
  if (bytes.byteLength > MOST_BYTES) {
    const found = mebibytes(bytes.byteLength);
    problems.add("file-too-large", { file: path, found, detail: mebibytes(MOST_BYTES) });
    return undefined;
  }
  try {
    return readZip(bytes, limits);
  } catch (fault) {
    if (!(fault instanceof ArchiveFault)) throw fault;
    const found = fault.entry === "" ? fault.message : `${fault.message}: ${fault.entry}`;
    problems.add(fault.code, { file: path, found, detail: mebibytes(limits.bytes) });
    return undefined;
  }
}

/** The old format of workbooks, in which locked new ones are kept too. */
const isCompoundFile = (bytes: Uint8Array): boolean =>
  [0xd0, 0xcf, 0x11, 0xe0, 0xa1, 0xb1, 0x1a, 0xe1].every((byte, at) => bytes[at] === byte);
