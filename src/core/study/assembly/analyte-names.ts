const symbols = new Map([
  ["ir", "iridium"],
  ["ni", "nickel"],
  ["hg", "mercury"],
  ["cr", "chromium"],
  ["co", "cobalt"],
  ["pt", "platinum"],
  ["os", "osmium"],
  ["al", "aluminium"],
  ["aluminum", "aluminium"],
  ["ca", "calcium"],
  ["fe", "iron"],
  ["δ13c", "d13c"],
  ["delta13c", "d13c"],
  ["d13ccarb", "d13c"],
  ["δ18o", "d18o"],
]);

/** An analyte in lower case with hyphens; element symbols and isotope signs by their usual names. */
export function plainAnalyte(written: string): string {
  const plain = written
    .trim()
    .toLowerCase()
    .replace(/[\s_]+/g, "-");
  return symbols.get(plain) ?? plain;
}
