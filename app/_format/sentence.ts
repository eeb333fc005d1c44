/** Ends a clause as a sentence, whichever way it was written; a symbol at its beginning stays as it is. */
export function sentence(clause: string, capital = true): string {
  const text = clause.trim();
  const begun = capital ? text.replace(/^[a-z](?=[a-z]*[ ;,])/, (letter) => letter.toUpperCase()) : text;
  return /[.!?]$/.test(begun) ? begun : `${begun}.`;
}
