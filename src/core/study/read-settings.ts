import * as v from "valibot";
import { suggestName } from "./nearest.ts";
import type { ProblemList } from "./problem-wordings.ts";
import { knownSettingPaths, withoutPath } from "./setting-path.ts";
import { defaultSettings, type Settings, settingsSchema } from "./settings.ts";

/** Settings with every default written out. A setting that cannot be used is told and takes its default; the rest stands. */
export function readSettings(raw: unknown, file: string, problems: ProblemList): Settings {
  if (Array.isArray(raw)) {
    problems.add("bad-setting", { file, found: JSON.stringify(raw), detail: "an object of settings" });
    return defaultSettings;
  }
  let left = raw;
  for (;;) {
    const result = v.safeParse(settingsSchema, left);
    if (result.success) return result.output;
    const paths = new Set<string>();
    let reduced = left;
    for (const issue of result.issues) {
      const path = (issue.path ?? []).map(({ key }) => String(key));
      const name = path.join(".");
      if (paths.has(name)) continue;
      paths.add(name);
      tellIssue(issue, name, { file, problems });
      reduced = withoutPath(reduced, path);
    }
    if (paths.has("") || JSON.stringify(reduced) === JSON.stringify(left)) return defaultSettings;
    left = reduced;
  }
}

interface Told {
  readonly file: string;
  readonly problems: ProblemList;
}

function tellIssue(issue: v.BaseIssue<unknown>, path: string, { file, problems }: Told): void {
  const isUnknown = issue.type === "strict_object" && issue.expected === "never";
  if (isUnknown) {
    const nearest = suggestName(path, knownSettingPaths());
    problems.add("unknown-setting", { file, column: path, found: path, nearest });
  } else {
    const found = JSON.stringify(issue.input) ?? "nothing";
    problems.add("bad-setting", { file, column: path, found, detail: issue.expected ?? issue.message });
  }
}
