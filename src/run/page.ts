import { proxy, releaseProxy, wrap } from "comlink";
import type { PageWork } from "./page-worker.ts";
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
        const analysis = await Promise.race([work.analyse(job, proxy(onProgress)), failed]);
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
