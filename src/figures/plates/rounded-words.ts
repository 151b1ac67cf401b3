/** A number for reading: three significant figures, no trailing zeros, a true minus sign. */
export function roundedWords(value: number): string {
  const magnitude = Math.abs(value);
  const text =
    magnitude >= 100 ? Math.round(magnitude).toString() : Number(magnitude.toPrecision(3)).toString();
  return `${value < 0 && Number(text) !== 0 ? "−" : ""}${text}`;
}
