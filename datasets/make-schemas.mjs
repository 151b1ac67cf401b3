// Writes README.md and schemas/ anew from the table declarations: `node datasets/make-schemas.mjs`
import { mkdirSync, writeFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { runnerImport } from "vite";

const at = (path) => fileURLToPath(new URL(path, import.meta.url));
const { module } = await runnerImport(at("../src/core/study/documentation.ts"), {
  configFile: false,
  root: at(".."),
});
mkdirSync(at("schemas"), { recursive: true });
for (const [name, text] of module.tableDocumentation()) writeFileSync(at(name), text);
