import { problemList } from "../core/study/problem-list.ts";
import { readSettings } from "../core/study/read-settings.ts";
import { partedAssignment, setSetting } from "../core/study/setting-path.ts";
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
  refuseBadSettings(assignments.reduce<unknown>(assign, undefined));
  return assignments.reduce<unknown>(assign, under);
}

function refuseBadSettings(ofCall: unknown): void {
  const problems = problemList();
  readSettings(ofCall ?? {}, "the call", problems);
  const [first] = problems.problems();
  if (first === undefined) return;
  const what = first.column === undefined ? "" : ` for ${first.column}`;
  throw new CallError(`lastbed: expected ${first.expected}${what}, got ${first.found}`);
}

function assign(settings: unknown, assignment: string): unknown {
  const parts = partedAssignment(assignment);
  if (parts === undefined) throw new CallError(`lastbed: expected --set path=value, got ${assignment}`);
  const result = setSetting(settings, ...parts);
  if (result.kind === "set") return result.settings;
  const hint = result.nearest === undefined ? "" : `; did you mean ${result.nearest}?`;
  throw new CallError(`lastbed: expected a known setting, got ${result.path}${hint}`);
}

/** A whole number from 1 (to `most`) from an option; 1 where it is absent. */
export function countOption(
  text: string | undefined,
  name: string,
  { most = Number.MAX_SAFE_INTEGER }: { readonly most?: number } = {},
): number {
  if (text === undefined) return 1;
  const count = /^\d+$/.test(text) ? Number(text) : 0;
  if (count >= 1 && count <= most) return count;
  const limit = most === Number.MAX_SAFE_INTEGER ? "of at least 1" : `from 1 to ${most}`;
  throw new CallError(`lastbed: expected --${name} to be a whole number ${limit}, got ${text}`);
}
