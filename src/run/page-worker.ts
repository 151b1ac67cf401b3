import { expose } from "comlink";
import { inlineRunner } from "./inline.ts";
import type { AnalysisJob } from "./runner.ts";

/** What the page may ask of its worker. */
const work = {
  analyse: (job: AnalysisJob, onProgress: (step: string, share: number) => void) =>
    inlineRunner.analyse(job, { onProgress }),
};

export type PageWork = typeof work;

expose(work);
