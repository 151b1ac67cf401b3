/** An opening or closing tag, its name without prefix, its attributes by their name without prefix. */
export interface XmlTag {
  readonly name: string;
  readonly kind: "open" | "close" | "empty";
  readonly attributes: ReadonlyMap<string, string>;
  /** Text up to the next tag. */
  readonly text: string;
}

const entities = new Map([
  ["lt", "<"],
  ["gt", ">"],
  ["amp", "&"],
  ["quot", '"'],
  ["apos", "'"],
]);

function plainText(text: string): string {
  return text.replace(/&(#x[0-9a-f]{1,6}|#\d{1,7}|[a-z]+);/gi, (whole, name: string) => {
    if (!name.startsWith("#")) return entities.get(name) ?? whole;
    const code =
      name[1] === "x" || name[1] === "X" ? Number.parseInt(name.slice(2), 16) : Number(name.slice(1));
    return code <= 0x10ffff ? String.fromCodePoint(code) : whole;
  });
}

const localName = (name: string): string => name.slice(name.indexOf(":") + 1);

/** The tags of an XML text in their order; comments, declarations and instructions are passed over, nothing is fetched. */
export function* xmlTags(text: string): Generator<XmlTag> {
  let at = text.indexOf("<");
  while (at !== -1) {
    const special = [
      ["<!--", "-->"],
      ["<?", "?>"],
      ["<!", ">"],
    ].find(([start]) => text.startsWith(start, at));
    const end = special ? text.indexOf(special[1], at) : tagEnd(text, at);
    if (end === -1) return;
    const next = text.indexOf("<", end);
    if (!special) yield tagOf(text.slice(at + 1, end), text.slice(end + 1, next === -1 ? undefined : next));
    at = next;
  }
}

/** Where a tag ends: the first `>` outside quotes. */
function tagEnd(text: string, from: number): number {
  let quote = "";
  for (let at = from; at < text.length; at++) {
    const sign = text[at];
    if (quote !== "") quote = sign === quote ? "" : quote;
    else if (sign === '"' || sign === "'") quote = sign;
    else if (sign === ">") return at;
  }
  return -1;
}

function tagOf(inside: string, text: string): XmlTag {
  const isClose = inside.startsWith("/");
  const isEmpty = inside.endsWith("/");
  const name = /^\/?([^\s/]*)/.exec(inside)?.[1] ?? "";
  const attributes = new Map<string, string>();
  for (const [, key, double, single] of inside.matchAll(/\s([^\s=]+)\s*=\s*(?:"([^"]*)"|'([^']*)')/g)) {
    attributes.set(localName(key), plainText(double ?? single ?? ""));
  }
  return {
    name: localName(name),
    kind: isClose ? "close" : isEmpty ? "empty" : "open",
    attributes,
    text: plainText(text),
  };
}
