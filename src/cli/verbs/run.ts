import { basename, join, resolve } from "node:path";
import type { Analysis } from "../../core/analysis-result.ts";
import { runFiles } from "../../report/run-files.ts";
import { summary } from "../../report/summary.ts";
import { plural } from "../../report/wordings/words.ts";
import { nodeRunner } from "../../run/node.ts";
import type { Runner } from "../../run/runner.ts";
import { CallError } from "../call-error.ts";
import { digest } from "../digest.ts";
import { withoutEnding } from "../file-kinds.ts";
import { countOption, jobOf } from "../job.ts";
import { plateFaces } from "../plate-faces.ts";
import { hasErrors, problemCount, problemLines } from "../problem-lines.ts";
import type { Screen } from "../screen.ts";
import { refuseOut, writeRun, writeSummary } from "../study-out.ts";
import { summaryText } from "../summary-text.ts";
import type { VerbOptions } from "./verb.ts";

const PROBLEMS_SHOWN = 12;

/** The whole job for one study or several: results, figures, report and repeat sheet; exit 1 where a study has errors. */
export async function run(paths: readonly string[], options: VerbOptions, screen: Screen): Promise<number> {
  const out = options.out ?? "";
  if ((options.figures ?? "svg") !== "svg")
    throw new CallError(
      `lastbed: expected --figures svg, got ${options.figures}; other formats are not made yet`,
    );
  const folders = outFolders(paths, out);
  for (const folder of new Set([out, ...folders])) await refuseOut(folder, paths);
  const runner = nodeRunner(countOption(options.threads, "threads"));
  try {
    const runs: StudyRun[] = [];
    for (const [i, path] of paths.entries())
      runs.push(await runOne({ path, out: folders[i], options, runner, screen }));
    if (paths.length > 1)
      await writeSummary(
        out,
        runs.map(({ analysis }) => analysis),
      );
    screen.document({
      command: "run",
      problems: runs.flatMap(({ analysis }) => analysis.study.problems),
      summary: runs.map(({ analysis }) => ({ study: analysis.study.name, parts: summary(analysis) })),
      files: runs.flatMap(({ files }) => files),
    });
    return runs.some(({ analysis }) => hasErrors(analysis.study.problems)) ? 1 : 0;
  } finally {
    await runner.close();
  }
}

interface StudyRun {
  readonly analysis: Analysis;
  readonly files: readonly string[];
}

interface OneRun {
  readonly path: string;
  readonly out: string;
  readonly options: VerbOptions;
  readonly runner: Runner;
  readonly screen: Screen;
}

async function runOne({ path, out, options, runner, screen }: OneRun): Promise<StudyRun> {
  const job = await jobOf(path, options);
  const onProgress = (step: string, share: number) =>
    screen.progress(`${job.name}: ${step} ${Math.round(100 * share)} %`);
  const analysis = await runner.analyse(job, { onProgress });
  screen.progress(`${job.name}: figures and report`);
  const files = await runFiles(analysis, { digest, fontFaces: await plateFaces() });
  await writeRun(out, files);
  screen.say(summaryText(analysis));
  const { problems } = analysis.study;
  if (problems.length > 0)
    screen.say(`\nInput: ${problemCount(problems)}\n${problemLines(problems, PROBLEMS_SHOWN)}`);
  screen.say(`\n${filesText(out, [...files.keys()])}`);
  return { analysis, files: [...files.keys()].map((file) => join(out, file)) };
}

/** One study goes to the folder itself; several get a folder each, named after them. */
function outFolders(paths: readonly string[], out: string): readonly string[] {
  if (paths.length === 1) return [out];
  const folders = paths.map((path) => join(out, withoutEnding(basename(resolve(path)))));
  const twice = folders.find((folder, i) => folders.indexOf(folder) !== i);
  if (twice !== undefined)
    throw new CallError(`lastbed: expected studies of different names, got two for ${twice}; run them apart`);
  return folders;
}

function filesText(out: string, files: readonly string[]): string {
  const top = files.filter((file) => !file.includes("/"));
  const count = (folder: string) => files.filter((file) => file.startsWith(`${folder}/`)).length;
  return [
    `Written to ${out}:`,
    `  ${top.join(", ")}`,
    `  figures/ (${plural(count("figures"), "plate")}), study/ (${plural(count("study"), "file")}, as read)`,
  ].join("\n");
}
