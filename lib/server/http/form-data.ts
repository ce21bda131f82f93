const SECRET_FIELD = /password|token|secret/i;
const FRAMEWORK_FIELD = /^\$ACTION/;

/** A form as an object: text trimmed, except passwords; a field sent more than once is an array. */
export function readForm(form: FormData): Record<string, unknown> {
  const read: Record<string, unknown> = {};
  for (const name of new Set(form.keys())) {
    if (FRAMEWORK_FIELD.test(name)) continue;
    const values = form
      .getAll(name)
      .map((value) => (typeof value === 'string' && !SECRET_FIELD.test(name) ? value.trim() : value));
    read[name] = values.length === 1 ? values[0] : values;
  }
  return read;
}

/** What may go back into the form after a failure: text, no passwords and no files. */
export function valuesToKeep(form: FormData): Record<string, string> {
  const kept: Record<string, string> = {};
  for (const [name, value] of form.entries()) {
    if (typeof value !== 'string' || FRAMEWORK_FIELD.test(name) || SECRET_FIELD.test(name)) continue;
    kept[name] = kept[name] === undefined ? value : `${kept[name]},${value}`;
  }
  return kept;
}
