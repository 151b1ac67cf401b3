import { expose } from "comlink";
import { inlineRunner } from "./inline.ts";
import { type Part, type Parted, takeApart } from "./parts.ts";
import type { AnalysisJob } from "./runner.ts";

/** Where progress, the study read and the parts of what is sent go. */
export interface PageEars {
  readonly onProgress: (step: string, share: number) => unknown;
  readonly onPart: (part: Part) => unknown;
  /** The study as soon as it is read; its parts come before it. */
  readonly onRead: (study: Parted) => unknown;
}

/** What the page may ask of its worker. */
const work = {
  /** The analysis without its study, which is sent when it is read. */
  analyse: async (job: AnalysisJob, ears: PageEars): Promise<Parted> => {
    const sent: unknown[] = [];
    const apart = takeApart((part) => sent.push(ears.onPart(part)));
    const { study: _, ...analysis } = await inlineRunner.analyse(job, {
      onProgress: (step, share) => void ears.onProgress(step, share),
      onRead: (study) => {
        const { files: __, ...read } = study;
        sent.push(ears.onRead(apart(read)));
      },
    });
    const rest = apart(analysis);
    await Promise.all(sent);
    return rest;
  },
};

export type PageWork = typeof work;

expose(work);
