import * as v from "valibot";
import { suggestName } from "./nearest.ts";
import type { ProblemList } from "./problem-list.ts";
import { knownSettingPaths, withoutPath } from "./setting-path.ts";
import { defaultSettings, type Settings, settingsSchema } from "./settings.ts";

/** Settings with every default written out. A setting that cannot be used is told and takes its default; the rest stands. */
export function readSettings(raw: unknown, file: string, problems: ProblemList): Settings {
  if (Array.isArray(raw)) {
    problems.add("bad-setting", { file, found: "a list", detail: "an object of settings" });
    return defaultSettings;
  }
  let left = raw;
  for (;;) {
    const result = v.safeParse(settingsSchema, left);
    if (result.success) {
      for (const path of lostPaths(left, result.output))
        problems.add("bad-setting", { file, column: path, found: path, detail: "another name" });
      return result.output;
    }
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
    problems.add("bad-setting", { file, column: path, found, detail: expectation(issue) });
  }
}

const expectations: Readonly<Record<string, string>> = {
  Object: "a part that holds settings",
  Array: "a list",
  number: "a number",
  string: "a text",
};

function expectation({ type, expected, message }: v.BaseIssue<unknown>): string {
  if (type === "integer" || type === "safe_integer") return "a whole number";
  if (expected === null) return message;
  if (type === "non_empty") return "something, neither a blank nor an empty list";
  return expectations[expected] ?? expected;
}

/** Paths of parts that reading left out without a word: names like `__proto__`, which no list can hold. */
function lostPaths(raw: unknown, read: unknown, before = ""): readonly string[] {
  if (!isPart(raw) || !isPart(read)) return [];
  return Object.entries(raw).flatMap(([name, value]) =>
    Object.hasOwn(read, name)
      ? lostPaths(value, new Map<string, unknown>(Object.entries(read)).get(name), `${before}${name}.`)
      : [`${before}${name}`],
  );
}

const isPart = (value: unknown): value is object =>
  typeof value === "object" && value !== null && !Array.isArray(value);
