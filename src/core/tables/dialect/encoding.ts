import type { Encoding } from "../../study/model.ts";

export interface DecodedText extends EncodingChoice {
  readonly text: string;
}

/** Bytes 0x80 to 0x9F of Windows-1252 (WHATWG Encoding Standard, index windows-1252); blanks are unassigned. */
const upperControls = "€ ‚ƒ„…†‡ˆ‰Š‹Œ Ž  ‘’“”•–—˜™š›œ žŸ";

/** Names under which a declared encoding goes, plain. */
const declaredNames = new Map<string, Encoding>([
  ...["utf8", "utf8sig", "ascii", "usascii"].map((name) => [name, "UTF-8"] as const),
  ...["utf16", "utf16le"].map((name) => [name, "UTF-16LE"] as const),
  ["utf16be", "UTF-16BE"],
  ...["windows1252", "cp1252", "iso88591", "latin1"].map((name) => [name, "Windows-1252"] as const),
]);

/** The encoding that a declaration names; undefined where it is none that can be read. */
export const namedEncoding = (name: string): Encoding | undefined =>
  declaredNames.get(name.toLowerCase().replace(/[^a-z0-9]/g, ""));

/** An encoding that bytes may be read in. */
export interface EncodingChoice {
  readonly encoding: Encoding;
  /** True where the bytes did not say so themselves and nobody declared it. */
  readonly isTaken: boolean;
}

/** The encodings to try, one after the other: by byte-order mark, else as declared, else UTF-8, then Windows-1252. */
export function encodingsOf(bytes: Uint8Array, declared?: Encoding): readonly EncodingChoice[] {
  const marked = byMark(bytes);
  if (marked !== undefined) return [{ encoding: marked, isTaken: false }];
  if (declared !== undefined && declared !== "UTF-8") return [{ encoding: declared, isTaken: false }];
  return [
    { encoding: "UTF-8", isTaken: false },
    { encoding: "Windows-1252", isTaken: true },
  ];
}

/**
 * Text of bytes: by byte-order mark, else as declared, else UTF-8, else Windows-1252 where every byte is a letter of it.
 * Undefined where the bytes are no text.
 */
export function decodeBytes(bytes: Uint8Array, declared?: Encoding): DecodedText | undefined {
  for (const choice of encodingsOf(bytes, declared)) {
    const text = textIn(choice.encoding, bytes);
    if (text !== undefined) return { text, ...choice };
  }
  return undefined;
}

function byMark([first, second]: Uint8Array): Encoding | undefined {
  if (first === 0xff && second === 0xfe) return "UTF-16LE";
  return first === 0xfe && second === 0xff ? "UTF-16BE" : undefined;
}

/** Text of bytes in an encoding; undefined where they are none. A byte-order mark at their beginning is no part of it. */
export function textIn(encoding: Encoding, bytes: Uint8Array): string | undefined {
  try {
    const text =
      encoding === "Windows-1252"
        ? windows1252(bytes)
        : new TextDecoder(encoding, { fatal: true }).decode(bytes);
    return text === undefined || text.includes("\0") ? undefined : text;
  } catch {
    return undefined;
  }
}

const isControl = (byte: number): boolean => byte < 0x20 && byte !== 0x09 && byte !== 0x0a && byte !== 0x0d;

function windows1252(bytes: Uint8Array): string | undefined {
  const parts: string[] = [];
  let part: string[] = [];
  for (const byte of bytes) {
    const sign = byte >= 0x80 && byte < 0xa0 ? upperControls[byte - 0x80] : String.fromCharCode(byte);
    if (isControl(byte) || (sign === " " && byte !== 0x20)) return undefined;
    part.push(sign);
    if (part.length < 65536) continue;
    parts.push(part.join(""));
    part = [];
  }
  return parts.join("") + part.join("");
}
