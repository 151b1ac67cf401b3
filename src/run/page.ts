import { proxy, releaseProxy, wrap } from "comlink";
import type { Analysis } from "../core/analysis-result.ts";
import type { PageWork } from "./page-worker.ts";
import { putTogether } from "./parts.ts";
import { receivedStudy } from "./received-study.ts";
import type { AnalysisJob, Runner, Watch } from "./runner.ts";

/**
 * Works in a worker of the page, so that the hand is never held up. Cancelling ends the worker; the next job gets a
 * fresh one.
 *
 * @param startWorker makes the worker that runs `page-worker.ts`.
 */
export function pageRunner(startWorker: () => Worker): Runner {
  let worker: Worker | undefined;
  const end = () => {
    worker?.terminate();
    worker = undefined;
  };
  return {
    async analyse(job: AnalysisJob, { onProgress = () => {}, signal }: Watch = {}) {
      signal?.throwIfAborted();
      end();
      const own = startWorker();
      worker = own;
      const work = wrap<PageWork>(own);
      const failed = new Promise<never>((_, reject) => {
        own.addEventListener("error", (event) => reject(new Error(event.message)));
        signal?.addEventListener("abort", () => {
          if (worker === own) end();
          reject(signal.reason);
        });
      });
      try {
        const { take, whole } = putTogether();
        const ears = proxy({ onProgress, onPart: take });
        const analysis = whole(await Promise.race([work.analyse(job, ears), failed]));
        if (!isAnalysis(analysis)) throw new Error("pageRunner: expected an analysis from the worker");
        return { ...analysis, study: receivedStudy(analysis.study) };
      } finally {
        work[releaseProxy]();
        if (worker === own) end();
      }
    },
    async close() {
      end();
    },
  };
}

const isAnalysis = (value: unknown): value is Analysis =>
  typeof value === "object" && value !== null && "study" in value && "timing" in value;
