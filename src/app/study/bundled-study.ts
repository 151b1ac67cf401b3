import { type GivenStudy, studyOf } from "./given-study.ts";

/** The study that lies beside the page: the example, or the one the page was opened with. */
export async function bundledStudy(signal: AbortSignal): Promise<GivenStudy> {
  const { name, files } = await index(signal);
  const entries = await Promise.all(
    files.map(async (file) => [file, await bytesOf(`./study/${encodeURIComponent(file)}`, signal)] as const),
  );
  return studyOf(name, new Map(entries));
}

async function index(signal: AbortSignal): Promise<{ name: string; files: readonly string[] }> {
  const given: unknown = JSON.parse(new TextDecoder().decode(await bytesOf("./study/index.json", signal)));
  if (
    typeof given === "object" &&
    given !== null &&
    "name" in given &&
    typeof given.name === "string" &&
    "files" in given &&
    Array.isArray(given.files)
  )
    return { name: given.name, files: given.files.filter((file) => typeof file === "string") };
  throw new Error("bundledStudy: expected study/index.json to hold a name and a list of files");
}

async function bytesOf(address: string, signal: AbortSignal): Promise<Uint8Array> {
  const answer = await fetch(address, { signal });
  if (!answer.ok)
    throw new Error(`bundledStudy: expected ${address} beside the page, got status ${answer.status}`);
  return new Uint8Array(await answer.arrayBuffer());
}
