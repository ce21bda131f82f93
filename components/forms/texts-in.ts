/** What the text fields of a form hold now, by their names. */
export function textsIn(form: HTMLFormElement): Readonly<Record<string, string>> {
  return Object.fromEntries(
    [...new FormData(form)].flatMap(([name, value]) => (typeof value === 'string' ? [[name, value]] : [])),
  );
}
