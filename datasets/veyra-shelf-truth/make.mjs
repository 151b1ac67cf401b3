// Writes ../veyra-shelf anew from truth.json: `node datasets/veyra-shelf-truth/make.mjs`
import { readFileSync, writeFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { runnerImport } from "vite";

const at = (path) => fileURLToPath(new URL(path, import.meta.url));
const { module } = await runnerImport(at("generator/study.ts"), { configFile: false, root: at("../..") });
for (const [name, text] of module.exampleStudy(readFileSync(at("truth.json"), "utf8"))) {
  writeFileSync(at(`../veyra-shelf/${name}`), text);
  console.log(`${name}: ${text.split("\n").length - 2} rows`);
}
