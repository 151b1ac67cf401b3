import type { CodeMeaning } from "../../study/recognised.ts";

/** Words of a legend that say more than that something was found; common practice, from memory. */
const meanings: readonly (readonly [RegExp, CodeMeaning])[] = [
  [
    /^(?:not (?:searched|examined|studied|looked for)|no (?:data|sample)|nicht (?:untersucht|gesucht)|non (?:étudié|examiné)|no (?:estudiado|buscado))/iu,
    "not-searched",
  ],
  [
    /^(?:absent|not found|none|barren|not (?:present|observed)|fehlt|nicht gefunden|non trouvé|ausente|assente|no encontrado)/iu,
    "not-found",
  ],
  [/^(?:reworked|umgelagert|aufgearbeitet|remanié|retrabajado|rimaneggiato|retrabalhado)/iu, "reworked"],
  [/^(?:doubtful|questionable|uncertain|fraglich|douteux|dudoso|dubbio|duvidoso)/iu, "doubtful"],
  [
    /^(?:very |sehr |très |muy |molto |muito |single|one |few|some|\d|<|>|rare|scarce|frequent|common|abundant|dominant|present|found|selten|häufig|vereinzelt|massenhaft|vorhanden|rar|fréquent|commun|abondant|présent|raro|rara|escaso|frecuente|común|abundante|presente|comune|abbondante|frequente|comum)/iu,
    "found",
  ],
];

const entry = /(?:^|[\s,;:(])([\p{L}*+•]{1,4})\s*[=:]\s*([^,;=:]+)/gu;

/**
 * What notes say of codes, as `R = rare (1-3), A = absent`. A code whose words are none of those known here is left
 * open: it has to be asked.
 */
export function legendOf(notes: readonly string[]): ReadonlyMap<string, CodeMeaning> {
  const legend = new Map<string, CodeMeaning>();
  for (const note of notes) {
    for (const [, code, words] of note.matchAll(entry)) {
      const [, meaning] = meanings.find(([form]) => form.test(words.trim())) ?? [];
      if (meaning !== undefined && !legend.has(code)) legend.set(code, meaning);
    }
  }
  return legend;
}

/** True for a row of words about the table instead of a row of it. */
export function isNote(cells: readonly string[]): boolean {
  const filled = cells.filter((cell) => cell.trim() !== "");
  if (filled.length === 0) return false;
  if (filled.every((cell) => /^[\p{L}*+•]{1,4}\s*[=:]\s*\S/u.test(cell.trim()))) return true;
  return filled.length === 1 && (legendOf(filled).size > 0 || filled[0].trim().length > 60);
}
