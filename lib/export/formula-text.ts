const STARTS_FORMULA = /^'*[=+\-@\t\r]/u;
const GUARDED = /^'+[=+\-@\t\r]/u;
const PLAIN_NUMBER = /^[+-]?(?:\d+(?:\.\d*)?|\.\d+)(?:[eE][+-]?\d+)?$/u;

/** Text that a spreadsheet would run as a formula, made harmless by an apostrophe before it; plain numbers stay as they are. */
export function neutraliseFormula(text: string): string {
  return STARTS_FORMULA.test(text) && !PLAIN_NUMBER.test(text) ? `'${text}` : text;
}

/** Undoes `neutraliseFormula`, so that an exported list reads back the same. */
export function restoreFormula(text: string): string {
  return text.startsWith("'") && GUARDED.test(text) ? text.slice(1) : text;
}
