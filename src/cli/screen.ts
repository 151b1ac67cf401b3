import type { Problem } from "../core/study/problem.ts";
import { VERSION } from "../core/version.ts";

export interface CommonOptions {
  readonly json?: boolean;
  readonly quiet?: boolean;
}

/** What a verb tells: prose for people on standard output, or one JSON document there and prose on standard error. */
export interface Screen {
  say(text?: string): void;
  progress(text: string): void;
  /** The one document of `--json`. */
  document(content: VerbDocument): void;
}

export interface VerbDocument {
  readonly command: string;
  readonly problems: readonly Problem[];
  readonly summary: unknown;
  readonly files: readonly string[];
}

export function openScreen({ json = false, quiet = false }: CommonOptions): Screen {
  const prose = json ? process.stderr : process.stdout;
  const isLive = process.stderr.isTTY && !quiet;
  const clear = () => {
    if (isLive) process.stderr.write("\r\u001b[K");
  };
  return {
    say(text = "") {
      clear();
      if (!quiet) prose.write(`${text}\n`);
    },
    progress(text) {
      if (isLive) process.stderr.write(`\r\u001b[K${text}`);
    },
    document({ command, ...content }) {
      clear();
      if (json)
        process.stdout.write(`${JSON.stringify({ command, version: VERSION, ...content }, null, 2)}\n`);
    },
  };
}
