// Runs everything that `npm test` promises: types, lint, format, unused code, a build, and every kind of test,
// the real-browser ones too; with --long calibration at full size. The last line counts them.
import { spawnSync } from "node:child_process";
import { existsSync, mkdtempSync, readFileSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { browserHint, findBrowser } from "./app/find-browser.mjs";

if (process.argv.includes("--long")) process.env.CALIBRATION = "full";

const counts = { passed: 0, failed: 0, skipped: 0 };

const call = (command, words, options = {}) =>
  spawnSync(command, words, { stdio: "inherit", ...options }).status === 0;

function step(title, command, words) {
  console.log(`\n== ${title}`);
  const isFine = call(command, words);
  counts[isFine ? "passed" : "failed"] += 1;
  return isFine;
}

/** An installed browser; as root on a Debian-like system the packaged one is installed first. */
function browser() {
  const found = findBrowser();
  if (found !== undefined) return found;
  const isRoot = process.getuid?.() === 0;
  if (!isRoot || !existsSync("/usr/bin/apt-get")) return undefined;
  console.log(
    "\n== No Chromium or Chrome found: installing the packaged Chromium (apt-get install chromium)",
  );
  const env = { ...process.env, DEBIAN_FRONTEND: "noninteractive" };
  call("apt-get", ["update", "-qq"], { env });
  call("apt-get", ["install", "-y", "-qq", "chromium"], { env });
  return findBrowser();
}

function tests() {
  console.log("\n== Tests");
  const folder = mkdtempSync(join(tmpdir(), "lastbed-tests-"));
  const file = join(folder, "result.json");
  const isFine = call("npx", [
    "vitest",
    "run",
    "--reporter=default",
    "--reporter=json",
    `--outputFile.json=${file}`,
  ]);
  const result = existsSync(file) ? JSON.parse(readFileSync(file, "utf8")) : undefined;
  rmSync(folder, { recursive: true, force: true });
  if (result === undefined) {
    counts.failed += 1;
    return;
  }
  const broken = result.testResults.filter(
    (one) => one.status === "failed" && one.assertionResults.every((test) => test.status !== "failed"),
  ).length;
  const failed = result.numFailedTests + broken;
  counts.passed += result.numPassedTests;
  counts.skipped += result.numPendingTests + result.numTodoTests;
  counts.failed += failed === 0 && !isFine ? 1 : failed;
}

step("Types", "npx", ["tsc", "-b"]);
step("Format", "npx", ["biome", "check"]);
step("Lint", "npx", ["oxlint", "--type-aware", "--deny-warnings"]);
step("Unused code", "npx", ["knip"]);
step("Build", "npm", ["run", "--silent", "build"]);
const found = browser();
tests();
if (found === undefined) console.log(`\n${browserHint}`);

const skipped = counts.skipped > 0 ? `, ${counts.skipped} skipped` : "";
console.log(`\n${counts.passed} passed, ${counts.failed} failed${skipped}`);
process.exitCode = counts.failed > 0 || found === undefined ? 1 : 0;
