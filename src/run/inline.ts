import { analyse } from "../core/analysis.ts";
import { readSources } from "../core/tables/read-sources.ts";
import type { Runner } from "./runner.ts";

/** Works in the calling thread: for tests, scripts and small studies. */
export const inlineRunner: Runner = {
  async analyse({ name, files, settings }, { onProgress, onRead, signal } = {}) {
    onProgress?.("reading", 0);
    const study = await readSources(files, { name, settings });
    signal?.throwIfAborted();
    onRead?.(study);
    return analyse(study, (step, done, total) => {
      signal?.throwIfAborted();
      onProgress?.(step, total === 0 ? 1 : done / total);
    });
  },
  async close() {},
};
