import { xmlTags } from "./xml-tags.ts";

/** Decimals that a style shows, by the style's place; styles that show no fixed number of them are absent. */
export function decimalStyles(stylesXml: string): ReadonlyMap<number, number> {
  const formats = new Map([[2, 2]]); // 0.00, which has no entry of its own (ECMA-376 part 1, 18.8.30)
  const styles = new Map<number, number>();
  let isCellStyle = false;
  let place = 0;
  for (const { name, kind, attributes } of xmlTags(stylesXml)) {
    if (name === "cellXfs") isCellStyle = kind === "open";
    if (kind === "close") continue;
    const decimals = decimalsOf(attributes.get("formatCode") ?? "");
    if (name === "numFmt" && decimals !== undefined)
      formats.set(Number(attributes.get("numFmtId")), decimals);
    if (name !== "xf" || !isCellStyle) continue;
    const shown = formats.get(Number(attributes.get("numFmtId")));
    if (shown !== undefined) styles.set(place, shown);
    place += 1;
  }
  return styles;
}

const decimalsOf = (format: string): number | undefined => /^0\.(0+)$/.exec(format)?.[1]?.length;

/** A number in the shortest text of its double, with the zeros at its end that its cell shows. */
export function shownNumber(value: number, decimals: number | undefined): string {
  const shortest = String(value);
  if (decimals === undefined || shortest.includes("e")) return shortest;
  const [whole = "", fraction = ""] = shortest.split(".");
  return fraction.length < decimals ? `${whole}.${fraction.padEnd(decimals, "0")}` : shortest;
}
