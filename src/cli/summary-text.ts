import type { Analysis } from "../core/analysis-result.ts";
import { summary } from "../report/summary.ts";
import { tame } from "./text-table.ts";

const WIDTH = 96;
const WARNINGS_SHOWN = 6;

/** The result as a person would tell it, wrapped for a terminal. */
export function summaryText(analysis: Analysis): string {
  return summary(analysis)
    .map(({ heading, sentences, warnings }) => {
      const title = tame(heading, WIDTH);
      const shown = warnings.slice(0, WARNINGS_SHOWN).map((warning) => wrap(warning, "  \u25b3 ", "    "));
      const more =
        warnings.length > WARNINGS_SHOWN
          ? [`    ${warnings.length - WARNINGS_SHOWN} more in report.html`]
          : [];
      return [
        title,
        "-".repeat(title.length),
        ...sentences.map((text) => wrap(text, "  ", "  ")),
        ...shown,
        ...more,
      ].join("\n");
    })
    .join("\n\n");
}

function wrap(text: string, first: string, rest: string): string {
  const lines: string[] = [];
  let line = first;
  for (const word of tame(text, 2000).split(" ")) {
    const isStart = line === first || line === rest;
    if (!isStart && line.length + word.length + 1 > WIDTH) {
      lines.push(line);
      line = rest + word;
    } else line = isStart ? line + word : `${line} ${word}`;
  }
  return [...lines, line].join("\n");
}
