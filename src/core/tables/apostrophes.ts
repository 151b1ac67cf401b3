const startsFormula = /^'*[=+\-@\t]/;
const isNumber = /^[+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?$/;

/** True for a text that a spreadsheet would run as a formula, or that reading would take an apostrophe from. */
export const needsApostrophe = (text: string): boolean => startsFormula.test(text) && !isNumber.test(text);

/** The text with an apostrophe before a sign that starts a formula. */
export const putApostrophe = (text: string): string => (needsApostrophe(text) ? `'${text}` : text);

/** The text as it was before `putApostrophe`. */
export const takeOffApostrophe = (text: string): string =>
  text.startsWith("'") && startsFormula.test(text) ? text.slice(1) : text;
