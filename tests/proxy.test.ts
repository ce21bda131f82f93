import { NextRequest } from 'next/server';
import { describe, expect, it } from 'vitest';
import { proxy } from '@/proxy';

const ask = (path: string) => proxy(new NextRequest(`https://polhode.example${path}`));

describe('a page', () => {
  it('is refused where its query holds a NUL character, before any text of it reaches the database', () => {
    for (const path of ['/programs/p/trail?subject=%00', '/programs/p/baselines/submit?configuration=a%00b'])
      expect(ask(path).status).toBe(400);
  });

  it('is made for every other query, a per cent sign and two noughts among them', () => {
    for (const path of [
      '/programs/p/trail',
      '/programs/p/trail?subject=%2500',
      '/programs/p/trail?subject=100%25',
    ])
      expect(ask(path).headers.get('x-middleware-next')).toBe('1');
  });
});
