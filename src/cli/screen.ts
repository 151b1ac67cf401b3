import type { Problem } from "../core/study/problem.ts";
import { VERSION } from "../core/version.ts";
import { failureOf } from "./failure.ts";

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

/** Tells a failure on standard error and sets the exit code. */
export function tellFailure(error: unknown): void {
  const { message, exitCode } = failureOf(error);
  process.stderr.write(`${message}\n`);
  process.exitCode = exitCode;
}

const isClosed = (error: Error) => "code" in error && error.code === "EPIPE";

/** Goes on with the work where nobody reads any more (`lastbed run ... | head`), and tells any other fault of writing. */
export function surviveClosedOutput(): void {
  process.stdout.on("error", (error) => {
    if (isClosed(error)) return;
    tellFailure(error);
    process.exit();
  });
  process.stderr.on("error", () => {});
}
