import { Worker } from "node:worker_threads";
import { analyseFrom } from "../core/analysis.ts";
import { type SectionSurvey, settleMarkers } from "../core/markers/find-markers.ts";
import type { Study } from "../core/study/model.ts";
import { readSources } from "../core/tables/read-sources.ts";
import { inlineRunner } from "./inline.ts";
import type { AnalysisJob, Runner, Watch } from "./runner.ts";

/** What a thread is started with. */
export type ThreadWork = AnalysisJob;

interface Surveyed {
  readonly index: number;
  readonly survey: SectionSurvey;
}

/**
 * Works on threads of Node: sections are surveyed side by side and put together in their order, so that any number of
 * threads gives the same bits. One thread is the calling one.
 *
 * @param startThread makes a thread that runs `thread.ts` on a job.
 */
export function nodeRunner(
  threads: number,
  startThread: (job: ThreadWork) => Worker = startBuiltThread,
): Runner {
  if (threads === 1) return inlineRunner;
  return {
    async analyse(job: AnalysisJob, { onProgress, onRead, signal }: Watch = {}) {
      const study = await readSources(job.files, { name: job.name, settings: job.settings });
      onRead?.(study);
      const count = Math.min(threads, study.sections.length);
      const workers = Array.from({ length: count }, () => startThread(job));
      const stop = () => Promise.all(workers.map((worker) => worker.terminate()));
      try {
        const surveys = await surveyAll(study, workers, { onProgress, signal });
        return analyseFrom(settleMarkers(surveys, study.settings), study, (step, done, total) => {
          signal?.throwIfAborted();
          onProgress?.(step, total === 0 ? 1 : done / total);
        });
      } finally {
        await stop();
      }
    },
    async close() {},
  };
}

const startBuiltThread = (job: ThreadWork) =>
  new Worker(new URL("./thread.js", import.meta.url), { workerData: job });

/** Hands section after section to whichever thread is free. */
function surveyAll(
  study: Study,
  workers: readonly Worker[],
  { onProgress, signal }: Watch,
): Promise<SectionSurvey[]> {
  const total = study.sections.length;
  const surveys: SectionSurvey[] = [];
  if (total === 0) return Promise.resolve(surveys);
  let next = 0;
  let done = 0;
  return new Promise((resolve, reject) => {
    signal?.addEventListener("abort", () => reject(signal.reason));
    for (const worker of workers) {
      const hand = () => {
        if (next < total) worker.postMessage(next++);
      };
      worker.on("error", reject);
      worker.on("message", ({ index, survey }: Surveyed) => {
        surveys[index] = survey;
        done += 1;
        onProgress?.("markers", done / total);
        if (done === total) resolve(surveys);
        else hand();
      });
      hand();
    }
  });
}
