import { fileURLToPath } from "node:url";
import { countOption } from "../job.ts";
import type { Screen } from "../screen.ts";
import { servePage } from "../serve-page.ts";
import { readStudyFiles } from "../study-files.ts";
import type { VerbOptions } from "./verb.ts";

const page = fileURLToPath(new URL("../page/", import.meta.url));

/** Serves the page on this machine until it is stopped; without a study it shows the bundled example. */
export async function open(path: string | undefined, options: VerbOptions, screen: Screen): Promise<number> {
  const study = path === undefined ? undefined : await readStudyFiles(path);
  const wanted =
    options.port === undefined || options.port === "0"
      ? 0
      : countOption(options.port, "port", { most: 65535 });
  const { address, closed, close } = await servePage(page, { port: wanted, study });
  screen.say(`\nThe page: ${address}   (this machine only; Ctrl+C stops it)`);
  screen.document({ command: "open", problems: [], summary: { address }, files: [] });
  process.once("SIGINT", close);
  process.once("SIGTERM", close);
  await closed;
  return 0;
}
