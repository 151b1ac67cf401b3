import { analyse } from "../core/analysis.ts";
import { readStudy } from "../core/tables/read-study.ts";
import type { Runner } from "./runner.ts";

/** Works in the calling thread: for tests, scripts and small studies. */
export const inlineRunner: Runner = {
  async analyse({ name, files, settings }, { onProgress, signal } = {}) {
    const study = readStudy(files, { name, settings });
    return analyse(study, (step, done, total) => {
      signal?.throwIfAborted();
      onProgress?.(step, total === 0 ? 1 : done / total);
    });
  },
  async close() {},
};
