import { fileURLToPath } from "node:url";
import { openScreen, surviveClosedOutput, tellFailure } from "./screen.ts";
import { open } from "./verbs/open.ts";
import { run } from "./verbs/run.ts";

/** The whole job on the bundled example, then the page; `--once` stops after writing. */
const example = fileURLToPath(new URL("../../datasets/veyra-shelf", import.meta.url));
const screen = openScreen({});

surviveClosedOutput();

try {
  process.exitCode = await run([example], { out: "out/veyra-shelf" }, screen);
  if (!process.argv.includes("--once")) process.exitCode = await open(undefined, {}, screen);
} catch (error) {
  tellFailure(error);
}
