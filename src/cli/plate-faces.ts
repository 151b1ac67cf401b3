import { readFile } from "node:fs/promises";
import { FACES, type FaceId, fontFaceCss } from "../figures/index.ts";

const folder = new URL("../figures/fonts/", import.meta.url);

const read = async (id: FaceId) => (await readFile(new URL(FACES[id].file, folder))).toString("base64");

/** `@font-face` rules that carry the plates' faces, from the files that ship with the program. */
export async function plateFaces(): Promise<string> {
  const [sans, sansSemibold, serifItalic] = await Promise.all([
    read("sans"),
    read("sansSemibold"),
    read("serifItalic"),
  ]);
  return fontFaceCss({ sans, sansSemibold, serifItalic });
}
