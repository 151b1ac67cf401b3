import { spawnSync } from "node:child_process";
import { mkdtempSync, readdirSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import { writeStudy } from "./write-study.mjs";

const at = (/** @type {string} */ path) => fileURLToPath(new URL(path, import.meta.url));

/** Runs a program of Node; its wall clock, its work on all processors and its largest memory. */
function measured(/** @type {string[]} */ args) {
  const began = performance.now();
  const { status, stdout, stderr } = spawnSync(
    process.execPath,
    ["--import", at("tell-usage.mjs"), ...args],
    {
      encoding: "utf8",
      maxBuffer: 2 ** 26,
    },
  );
  const usage = /usage (\d+) ms (\d+) MB/.exec(stderr);
  if (status !== 0 || usage === null) throw new Error(`bench: ${args.join(" ")} failed: ${stdout}${stderr}`);
  return { wallMs: performance.now() - began, workMs: Number(usage[1]), memoryMb: Number(usage[2]) };
}

const times = (/** @type {number} */ a, /** @type {number} */ b) => `${(a / b).toFixed(2)} x`;

const folder = mkdtempSync(join(tmpdir(), "lastbed-bench-"));
try {
  for (const rows of [100_000, 1_000_000]) {
    const study = join(folder, String(rows));
    await writeStudy(study, rows);
    const bare = measured([at("bare-parse.mjs"), ...readdirSync(study).map((file) => join(study, file))]);
    const check = measured([at("../../dist/node/lastbed.js"), "check", study]);
    console.log(
      `${rows} finds: lastbed check over a bare chunked parse of all its files: ${times(check.wallMs, bare.wallMs)} the time, ${times(check.workMs, bare.workMs)} the work; ${check.memoryMb} MB at most (bare: ${bare.memoryMb} MB)`,
    );
  }
} finally {
  rmSync(folder, { recursive: true, force: true });
}
