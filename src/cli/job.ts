import { setSetting } from "../core/study/setting-path.ts";
import type { AnalysisJob } from "../run/runner.ts";
import { CallError } from "./call-error.ts";
import { readStudyFiles } from "./study-files.ts";
import type { VerbOptions } from "./verbs/verb.ts";

/** The study at a path, with the settings of the call over its own. */
export async function jobOf(path: string, options: VerbOptions, under?: unknown): Promise<AnalysisJob> {
  const { name, files } = await readStudyFiles(path);
  return { name, files, settings: settingsOfCall(options, under) };
}

function settingsOfCall({ set = [], seed }: VerbOptions, under: unknown): unknown {
  const assignments = seed === undefined ? set : [...set, `seed=${seed}`];
  return assignments.reduce<unknown>(assign, under);
}

function assign(settings: unknown, assignment: string): unknown {
  const at = assignment.indexOf("=");
  if (at < 1) throw new CallError(`lastbed: expected --set path=value, got ${assignment}`);
  const result = setSetting(settings, assignment.slice(0, at), assignment.slice(at + 1));
  if (result.kind === "set") return result.settings;
  const hint = result.nearest === undefined ? "" : `; did you mean ${result.nearest}?`;
  throw new CallError(`lastbed: expected a known setting, got ${result.path}${hint}`);
}

/** A whole number of at least 1 from an option. */
export function countOption(text: string | undefined, name: string, absent: number): number {
  if (text === undefined) return absent;
  const count = Number(text);
  if (!Number.isInteger(count) || count < 1)
    throw new CallError(`lastbed: expected --${name} to be a whole number of at least 1, got ${text}`);
  return count;
}
