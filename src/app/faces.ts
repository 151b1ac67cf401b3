import { FACE_IDS, type FaceId, fontFaceCss, fontFaceLinks } from "../figures/faces.ts";
import sans from "../figures/fonts/lastbed-sans-regular.ttf?url";
import sansSemibold from "../figures/fonts/lastbed-sans-semibold.ttf?url";
import serifItalic from "../figures/fonts/lastbed-serif-italic.ttf?url";

const addresses: Readonly<Record<FaceId, string>> = { sans, sansSemibold, serifItalic };

/** Makes the faces of the plates known to the page, so that what is seen is what exports. */
export function declareFaces(document: Document): void {
  const style = document.createElement("style");
  style.textContent = fontFaceLinks(addresses);
  document.head.append(style);
}

/** The faces as rules that carry their bytes, for a figure that leaves the page as one file. */
export async function carriedFaces(): Promise<string> {
  const entries = await Promise.all(FACE_IDS.map(async (id) => [id, await base64Of(addresses[id])] as const));
  const byFace = new Map<FaceId, string>(entries);
  const bytes = (id: FaceId) => byFace.get(id) ?? "";
  return fontFaceCss({
    sans: bytes("sans"),
    sansSemibold: bytes("sansSemibold"),
    serifItalic: bytes("serifItalic"),
  });
}

async function base64Of(address: string): Promise<string> {
  const answer = await fetch(address);
  if (!answer.ok)
    throw new Error(`carriedFaces: expected the face at ${address}, got status ${answer.status}`);
  const bytes = new Uint8Array(await answer.arrayBuffer());
  let text = "";
  for (const byte of bytes) text += String.fromCharCode(byte);
  return btoa(text);
}
