export type Delimiter = ',' | ';' | '\t';
const DELIMITERS: readonly Delimiter[] = [',', ';', '\t'];

/**
 * The delimiter that the header row uses most, quoted text apart; comma if it uses none.
 * Null while the text holds no whole header row; `final` says that no more text will come.
 */
export function headerDelimiter(text: string, final: boolean): Delimiter | null {
  const counts = new Map<string, number>(DELIMITERS.map((delimiter) => [delimiter, 0]));
  let quoted = false;
  let begun = false;
  let ended = final;
  for (const character of text) {
    if (character === '"') quoted = !quoted;
    if (character === '\n' && !quoted && begun) {
      ended = true;
      break;
    }
    if (character !== '\n') begun = true;
    const count = counts.get(character);
    if (!quoted && count !== undefined) counts.set(character, count + 1);
  }
  if (!ended) return null;
  return DELIMITERS.reduce((best, next) => ((counts.get(next) ?? 0) > (counts.get(best) ?? 0) ? next : best));
}
