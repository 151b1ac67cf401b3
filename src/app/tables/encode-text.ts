import type { Encoding } from "../../core/study/model.ts";

/** Letters of bytes 0x80 to 0x9F of Windows-1252 (WHATWG Encoding Standard, index windows-1252); blanks are unassigned. */
const upperControls = "€ ‚ƒ„…†‡ˆ‰Š‹Œ Ž  ‘’“”•–—˜™š›œ žŸ";

/**
 * Bytes of a text in the encoding its file had, marked as that file was. A letter that Windows-1252 lacks turns the
 * file to UTF-16 with a mark, which every reading knows whatever was declared.
 */
export function encodeText(text: string, encoding: Encoding, original: Uint8Array): Uint8Array {
  switch (encoding) {
    case "UTF-8":
      return new TextEncoder().encode(hasUtf8Mark(original) ? `\uFEFF${text}` : text);
    case "UTF-16LE":
      return utf16(text, true);
    case "UTF-16BE":
      return utf16(text, false);
    case "Windows-1252":
      return windows1252(text) ?? utf16(text, true);
    default:
      return encoding satisfies never;
  }
}

const hasUtf8Mark = (bytes: Uint8Array): boolean =>
  [0xef, 0xbb, 0xbf].every((byte, at) => bytes[at] === byte);

function utf16(text: string, isLittle: boolean): Uint8Array {
  const bytes = new Uint8Array(2 * text.length + 2);
  const view = new DataView(bytes.buffer);
  view.setUint16(0, 0xfeff, isLittle);
  for (let at = 0; at < text.length; at++) view.setUint16(2 * at + 2, text.charCodeAt(at), isLittle);
  return bytes;
}

function windows1252(text: string): Uint8Array | undefined {
  const bytes = new Uint8Array(text.length);
  for (let at = 0; at < text.length; at++) {
    const code = text.charCodeAt(at);
    const isPlain = code < 0x80 || (code >= 0xa0 && code <= 0xff);
    const upper = isPlain ? -1 : upperControls.indexOf(text[at] ?? " ");
    if (!isPlain && upper < 0) return undefined;
    bytes[at] = isPlain ? code : 0x80 + upper;
  }
  return bytes;
}
