import type { Problem } from "../core/study/problem.ts";
import { VERSION } from "../core/version.ts";
import type { Failure } from "./failure.ts";
import { verbs } from "./verbs/index.ts";

/** True where a call asks for its one JSON document, even a call that cannot be understood otherwise. */
export const wantsDocument = (words: readonly string[]): boolean => words.includes("--json");

/** The JSON document of a call that came to nothing: the failure is its one problem. */
export function failedCall(words: readonly string[], failure: Failure): string {
  const command = verbs.find(({ name }) => name === words[0])?.name ?? "";
  const document = { command, version: VERSION, problems: [problemOf(failure)], summary: null, files: [] };
  return `${JSON.stringify(document, null, 2)}\n`;
}

function problemOf({ message, exitCode }: Failure): Problem {
  const [first, ...more] = message.split("\n");
  const plain = first.replace(/^(?:lastbed|error): /, "");
  const [, expected, got] = /^expected (.*?), got (.*)$/s.exec(plain) ?? [];
  const [found, ...hints] = (got ?? plain).split("; ");
  return {
    severity: "error",
    code: exitCode === 2 ? "call" : "fault",
    file: "command line",
    found,
    expected: expected ?? "a call as `lastbed --help` tells",
    mend: [...hints, ...more.map((line) => line.trim())].join("; ") || "Correct the call and make it again.",
  };
}
