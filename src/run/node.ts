import { inlineRunner } from "./inline.ts";
import type { Runner } from "./runner.ts";

export function nodeRunner(_threads: number): Runner {
  return inlineRunner;
}
