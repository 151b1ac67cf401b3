import { handOver } from "../hand-over.ts";
import { type History, heldEdits } from "../tables/history.ts";
import { desk } from "./desk.ts";
import type { WorkedOut } from "./use-study.ts";

/** Hands over one table of the study as it is now, as its file. */
export async function giveOutTable(study: WorkedOut, history: History, file: string): Promise<void> {
  const { files, edits, to } = parts(study, history);
  const bytes = await desk().table(files, edits, { ...to, file });
  if (bytes !== undefined) handOver(file, new Uint8Array(bytes), "text/csv");
}

/** Hands over the whole study as it is now, as a data package in a zip. */
export async function giveOutStudy(study: WorkedOut, history: History): Promise<void> {
  const { files, edits, to } = parts(study, history);
  const bytes = await desk().packed(files, edits, to);
  handOver(`${to.name}.zip`, new Uint8Array(bytes), "application/zip");
}

function parts({ given, sheets, analysis }: WorkedOut, history: History) {
  const to = { name: analysis.study.name, forms: sheets };
  return { files: given.files, edits: heldEdits(history), to };
}
