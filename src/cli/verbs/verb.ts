import type { Screen } from "../screen.ts";

export interface VerbOptions {
  readonly json?: boolean;
  readonly quiet?: boolean;
  readonly seed?: string;
  readonly threads?: string;
  readonly set?: readonly string[];
  readonly figures?: string;
  readonly out?: string;
  readonly port?: string;
}

/** A verb of the command line is a row of data; its help follows from it. */
export interface Verb {
  readonly name: string;
  /** As the help shows them: `<study>`, `[study]`, `<studies...>`. */
  readonly parameters: readonly string[];
  readonly summary: string;
  readonly needsOut?: boolean;
  /** Loads what the verb needs, does it, and returns the exit code. */
  readonly act: (words: readonly string[], options: VerbOptions, screen: Screen) => Promise<number>;
}
