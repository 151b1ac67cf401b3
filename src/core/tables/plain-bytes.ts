import type { Encoding } from "../study/model.ts";
import { PREVIEW } from "./dialect/delimiter.ts";
import { textIn } from "./dialect/encoding.ts";

/** Thrown where bytes are no text of the encoding they are read in. */
export class NotText extends Error {}

/** Bytes of a file in which every ASCII sign stands for itself, and how to read them. */
export interface PlainBytes {
  readonly bytes: Uint8Array;
  /** Throws `NotText` where a piece is none. */
  readonly decode: (piece: Uint8Array) => string;
}

/** Bytes as they are, without a byte-order mark; of UTF-16 as UTF-8. */
export function plainBytes(bytes: Uint8Array, encoding: Encoding): PlainBytes {
  if (encoding === "Windows-1252") return { bytes, decode: decoderOf((piece) => textIn(encoding, piece)) };
  const utf8 = new TextDecoder("utf-8", { fatal: true, ignoreBOM: true });
  const decode = decoderOf((piece) => utf8.decode(piece));
  if (encoding === "UTF-8") return { bytes: bytes.subarray(hasMark(bytes) ? 3 : 0), decode };
  const text = textIn(encoding, bytes);
  if (text === undefined) throw new NotText();
  return { bytes: new TextEncoder().encode(text), decode };
}

const hasMark = ([first, second, third]: Uint8Array): boolean =>
  first === 0xef && second === 0xbb && third === 0xbf;

/** Pieces up to this many bytes are read without the decoder, which takes its time to start. */
const SHORT = 256;

function decoderOf(textOf: (piece: Uint8Array) => string | undefined): PlainBytes["decode"] {
  const text = (piece: Uint8Array) => {
    try {
      return textOf(piece);
    } catch {
      return undefined;
    }
  };
  return (piece) => {
    if (isShortAscii(piece)) return String.fromCharCode(...piece);
    const read = text(piece);
    if (read === undefined || read.includes("\0")) throw new NotText();
    return read;
  };
}

function isShortAscii(piece: Uint8Array): boolean {
  if (piece.length > SHORT) return false;
  for (let at = 0; at < piece.length; at++) if (piece[at] < 0x20 || piece[at] > 0x7e) return false;
  return true;
}

/** The beginning of a file as text, a preview long or more where there is more. */
export function headText({ bytes, decode }: PlainBytes): {
  readonly text: string;
  readonly isWhole: boolean;
} {
  // No more than three bytes of UTF-8 make a unit of text.
  let end = Math.min(bytes.length, 3 * PREVIEW);
  const isWhole = end === bytes.length;
  // A byte that goes on with a letter is not parted from it.
  const most = isWhole ? 0 : 3;
  for (let back = 0; back < most && (bytes[end] & 0xc0) === 0x80; back++) end -= 1;
  return { text: decode(bytes.subarray(0, end)), isWhole };
}
