import type { Analysis } from "../core/analysis-result.ts";
import type { Study } from "../core/study/model.ts";

/** One piece of long work: a study as bytes, and the settings that stand in for those of its own file. */
export interface AnalysisJob {
  readonly name: string;
  readonly files: ReadonlyMap<string, Uint8Array>;
  /** Raw settings, read over settings.json. */
  readonly settings?: unknown;
}

export interface Watch {
  /** What is being done, and the share of it that is done, 0 to 1. */
  readonly onProgress?: (step: string, share: number) => void;
  /** The study as soon as it is read, before it is analysed; the analysis holds this very study. */
  readonly onRead?: (study: Study) => void;
  /** Aborting stops the work; the promise rejects with the signal's reason. */
  readonly signal?: AbortSignal;
}

/** Where analyses are worked out: inline, on threads of Node, or in a worker of the page. Same job, same bits. */
export interface Runner {
  analyse(job: AnalysisJob, watch?: Watch): Promise<Analysis>;
  close(): Promise<void>;
}
