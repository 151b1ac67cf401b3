import { expose } from "comlink";
import { inlineRunner } from "./inline.ts";
import { type Part, type Parted, takeApart } from "./parts.ts";
import type { AnalysisJob } from "./runner.ts";

/** Where progress and the parts of the result go. */
export interface PageEars {
  readonly onProgress: (step: string, share: number) => unknown;
  readonly onPart: (part: Part) => unknown;
}

/** What the page may ask of its worker. */
const work = {
  analyse: async (job: AnalysisJob, ears: PageEars): Promise<Parted> => {
    const onProgress = (step: string, share: number) => void ears.onProgress(step, share);
    const analysis = await inlineRunner.analyse(job, { onProgress });
    const sent: unknown[] = [];
    const rest = takeApart(analysis, (part) => sent.push(ears.onPart(part)));
    await Promise.all(sent);
    return rest;
  },
};

export type PageWork = typeof work;

expose(work);
