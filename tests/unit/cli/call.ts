import { spawn, spawnSync } from "node:child_process";
import { existsSync, mkdtempSync } from "node:fs";
import { tmpdir } from "node:os";
import { join, resolve } from "node:path";

const program = resolve("dist/node/lastbed.js");
if (!existsSync(program)) throw new Error(`expected ${program}: run npm run build first`);

export const example = resolve("datasets/veyra-shelf");

/** Calls the built command line as a person would. */
export function lastbed(...words: readonly string[]) {
  const { status, stdout, stderr } = spawnSync(process.execPath, [program, ...words], { encoding: "utf8" });
  return { status, stdout, stderr };
}

/** Starts a verb that goes on, like `open`. */
export const start = (...words: readonly string[]) => spawn(process.execPath, [program, ...words]);

export const freshFolder = () => mkdtempSync(join(tmpdir(), "lastbed-"));
