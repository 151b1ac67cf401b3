export type FaceId = "sans" | "sansSemibold" | "serifItalic";

export interface Face {
  readonly file: string;
  readonly family: string;
  readonly weight: 400 | 600;
  readonly style: "normal" | "italic";
}

/** The three faces of every plate; `file` lies in `fonts/`. */
export const FACES: Readonly<Record<FaceId, Face>> = {
  sans: { file: "lastbed-sans-regular.ttf", family: "Lastbed Sans", weight: 400, style: "normal" },
  sansSemibold: { file: "lastbed-sans-semibold.ttf", family: "Lastbed Sans", weight: 600, style: "normal" },
  serifItalic: { file: "lastbed-serif-italic.ttf", family: "Lastbed Serif", weight: 400, style: "italic" },
};

export const FACE_IDS: readonly FaceId[] = ["sans", "sansSemibold", "serifItalic"];

export interface FontAttributes {
  readonly fontFamily: string;
  readonly fontWeight?: number;
  readonly fontStyle?: string;
}

/** Presentation attributes of a face: they hold in a page, a bare SVG file and its conversions alike. */
export function fontAttributes(face: FaceId): FontAttributes {
  const { family, weight, style } = FACES[face];
  return {
    fontFamily: family,
    ...(weight === 400 ? {} : { fontWeight: weight }),
    ...(style === "normal" ? {} : { fontStyle: style }),
  };
}

/** `@font-face` rules that carry the faces inside a standalone file; `bytes` holds each TTF in base64. */
export function fontFaceCss(bytes: Readonly<Record<FaceId, string>>): string {
  return FACE_IDS.map((id) => fontFaceRule(FACES[id], `data:font/ttf;base64,${bytes[id]}`)).join("");
}

/** `@font-face` rules for a page that serves the files of `fonts/` at these addresses. */
export function fontFaceLinks(addresses: Readonly<Record<FaceId, string>>): string {
  return FACE_IDS.map((id) => fontFaceRule(FACES[id], addresses[id])).join("");
}

// No quotes: markup renderers escape them inside <style>, and none of these values needs any.
function fontFaceRule({ family, weight, style }: Face, address: string): string {
  return `@font-face{font-family:${family};font-weight:${weight};font-style:${style};src:url(${address})}`;
}
