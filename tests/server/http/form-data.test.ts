import { expect, it } from 'vitest';
import { readForm, valuesToKeep } from '@/lib/server/http/form-data';

function form(...entries: [string, string | File][]): FormData {
  const data = new FormData();
  for (const [name, value] of entries) data.append(name, value);
  return data;
}

it('trims text and leaves passwords as they were typed', () => {
  expect(readForm(form(['name', '  Ann '], ['newPassword', '  two words  ']))).toEqual({
    name: 'Ann',
    newPassword: '  two words  ',
  });
});

it('reads a field that came more than once as an array', () => {
  expect(readForm(form(['scopes', 'a'], ['scopes', 'b'], ['$ACTION_ID_1', 'x']))).toEqual({
    scopes: ['a', 'b'],
  });
});

it('gives back what was typed, and neither passwords, secrets nor files', () => {
  const sent = form(
    ['email', 'ann@skerry.example'],
    ['password', 'hush'],
    ['linkSecret', 'hush'],
    ['file', new File(['x'], 'x.csv')],
    ['scopes', 'a'],
    ['scopes', 'b'],
  );
  expect(valuesToKeep(sent)).toEqual({ email: 'ann@skerry.example', scopes: 'a,b' });
});
