import type { Verb } from "./verb.ts";

/** Every verb; heavy parts load only when the verb is called. */
export const verbs: readonly Verb[] = [
  {
    name: "new",
    parameters: ["<folder>"],
    summary: "a study to fill in: tables with headers and worked rows",
    act: async (words, _options, screen) => (await import("./new.ts")).newStudy(words[0], screen),
  },
  {
    name: "check",
    parameters: ["<study>"],
    summary: "read and validate; problems as a table; writes nothing; exit 1 on errors",
    act: async (words, options, screen) => (await import("./check.ts")).check(words[0], options, screen),
  },
  {
    name: "run",
    parameters: ["<studies...>"],
    summary: "the whole job: results, figures, report, repeat sheet",
    needsOut: true,
    act: async (words, options, screen) => (await import("./run.ts")).run(words, options, screen),
  },
  {
    name: "repeat",
    parameters: ["<sheet>", "[study]"],
    summary: "do a run again from its repeat.json and compare every number; exit 1 where one differs",
    act: async (words, options, screen) => (await import("./repeat.ts")).repeat(words, options, screen),
  },
  {
    name: "open",
    parameters: ["[study]"],
    summary: "the page on this machine, with that study",
    act: async (words, options, screen) => (await import("./open.ts")).open(words[0], options, screen),
  },
];
