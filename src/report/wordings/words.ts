/** A piece of a sentence: plain, stressed, or a taxon's name (set in italics). */
export type Span = string | { readonly strong: string } | { readonly name: string };
export type Words = readonly Span[];

export const strong = (text: string): Span => ({ strong: text });
export const name = (text: string): Span => ({ name: text });

/** Template tag: `say\`${strong("17")} of ${n} taxa\`` gives the sentence as spans. */
export function say(parts: TemplateStringsArray, ...values: readonly (Span | Words | number)[]): Words {
  const spans: Span[] = [];
  for (const [i, part] of parts.entries()) {
    if (part !== "") spans.push(part);
    if (i >= values.length) continue;
    const value = values[i];
    if (typeof value === "number") spans.push(String(value));
    else if (typeof value === "object" && "length" in value) spans.push(...value);
    else spans.push(value);
  }
  return spans;
}

export function plain(words: Words): string {
  return words
    .map((span) => (typeof span === "string" ? span : "strong" in span ? span.strong : span.name))
    .join("");
}

/** `a`, `a and b`, `a, b and c`; longer than `most`: `a, b and 3 more`. */
export function list(items: readonly string[], most = 6): string {
  const shown =
    items.length > most ? [...items.slice(0, most - 1), `${items.length - most + 1} more`] : items;
  if (shown.length < 2) return shown.join("");
  return `${shown.slice(0, -1).join(", ")} and ${shown[shown.length - 1]}`;
}

export const plural = (count: number, one: string, many = `${one}s`): string =>
  `${count.toLocaleString("en")} ${count === 1 ? one : many}`;
