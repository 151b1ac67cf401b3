import { proxy, releaseProxy, wrap } from "comlink";
import type { Analysis } from "../core/analysis-result.ts";
import type { Study } from "../core/study/model.ts";
import type { PageWork } from "./page-worker.ts";
import { type Parted, putTogether } from "./parts.ts";
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
    async analyse(job: AnalysisJob, { onProgress = () => {}, onRead, signal }: Watch = {}) {
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
        const files = [...job.files].map(([name, bytes]) => ({ name, bytes }));
        let study: Study | undefined;
        const takeStudy = (parted: Parted) => {
          const read = whole(parted);
          if (!isStudy(read) || signal?.aborted) return;
          study = receivedStudy({ ...read, files });
          onRead?.(study);
        };
        const ears = proxy({ onProgress, onPart: take, onRead: takeStudy });
        const analysis = whole(await Promise.race([work.analyse(job, ears), failed]));
        if (study === undefined || !isAnalysis(analysis))
          throw new Error("pageRunner: expected a study and its analysis from the worker");
        return { ...analysis, study };
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

const isStudy = (value: unknown): value is Omit<Study, "files"> =>
  typeof value === "object" && value !== null && "sheets" in value && "sections" in value;

const isAnalysis = (value: unknown): value is Omit<Analysis, "study"> =>
  typeof value === "object" && value !== null && "markers" in value && "timing" in value;
