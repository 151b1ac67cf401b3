/** A file as someone has it, and what must come out of it. */
export interface AwkwardFile {
  readonly title: string;
  readonly files: Readonly<Record<string, string | readonly number[] | Uint8Array>>;
  readonly settings?: unknown;
  /** Finds that are used, as section, verbatim name and height in metres. */
  readonly finds: readonly (readonly [string, string, number])[];
  /** Codes of everything told, in order, but for what any study of few finds is told. */
  readonly told: readonly string[];
}

const encoder = new TextEncoder();

export const bytesOf = (content: string | readonly number[] | Uint8Array): Uint8Array =>
  typeof content === "string" ? encoder.encode(content) : new Uint8Array(content);

/** UTF-16 with its byte-order mark. */
export function utf16(text: string, end: "little" | "big"): readonly number[] {
  const units = [0xfeff, ...Array.from(text, (_, at) => text.charCodeAt(at))];
  return units.flatMap((unit) => (end === "little" ? [unit & 0xff, unit >> 8] : [unit >> 8, unit & 0xff]));
}

/** One byte a sign, for letters that Windows-1252 and Unicode share. */
export const oneByte = (text: string): readonly number[] => Array.from(text, (sign) => sign.charCodeAt(0));
