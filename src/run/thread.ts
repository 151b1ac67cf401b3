import { parentPort, workerData } from "node:worker_threads";
import { surveySection } from "../core/markers/find-markers.ts";
import { readSources } from "../core/tables/read-sources.ts";
import type { ThreadWork } from "./node.ts";

// A thread reads the study once, then surveys the sections it is handed, one message each.
const { name, files, settings }: ThreadWork = workerData;
const study = await readSources(files, { name, settings });

parentPort?.on("message", (index: number) => {
  parentPort?.postMessage({ index, survey: surveySection(study.sections[index], study.settings) });
});
