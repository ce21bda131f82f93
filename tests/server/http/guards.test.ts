import { describe, expect, it } from 'vitest';
import { requireDeclaredSize, requireOwnOrigin } from '@/lib/server/http/guards';
import { ownPath } from '@/lib/server/http/own-path';

const APP = 'https://polhode.example';

describe('a request that may change something', () => {
  it.each(['POST', 'PUT', 'PATCH', 'DELETE'])('by %s must carry our Origin', (method) => {
    expect(() => requireOwnOrigin(method, new Headers({ origin: APP }), APP)).not.toThrow();
    for (const origin of [
      'https://evil.example',
      'http://polhode.example',
      'https://polhode.example.evil.example',
      'null',
      '',
    ]) {
      expect(() => requireOwnOrigin(method, new Headers({ origin }), APP), origin).toThrow(
        /did not come from/,
      );
    }
    expect(() => requireOwnOrigin(method, new Headers(), APP)).toThrow(/did not come from/);
  });

  it('is not helped by what the fetch metadata say', () => {
    expect(() => requireOwnOrigin('POST', new Headers({ 'sec-fetch-site': 'same-origin' }), APP)).toThrow();
  });
});

describe('a request that reads', () => {
  it.each(['same-origin', 'none'])('passes with Sec-Fetch-Site: %s', (site) => {
    expect(() => requireOwnOrigin('GET', new Headers({ 'sec-fetch-site': site }), APP)).not.toThrow();
  });

  it('passes without fetch metadata', () => {
    expect(() => requireOwnOrigin('GET', new Headers(), APP)).not.toThrow();
  });

  it.each(['cross-site', 'same-site'])('does not pass with Sec-Fetch-Site: %s', (site) => {
    expect(() => requireOwnOrigin('GET', new Headers({ 'sec-fetch-site': site }), APP)).toThrow();
  });
});

describe('the declared size', () => {
  const check = (headers: Record<string, string>, max = 100) =>
    requireDeclaredSize('POST', new Headers(headers), max);

  it('passes up to the limit and not beyond', () => {
    expect(() => check({ 'content-length': '100' })).not.toThrow();
    expect(() => check({ 'content-length': '101' })).toThrow(expect.objectContaining({ code: 'too-large' }));
    expect(() => check({ 'content-length': '1' }, 0)).toThrow(/takes no body/);
  });

  it('must be declared when there is a body', () => {
    expect(() => check({ 'transfer-encoding': 'chunked' })).toThrow(
      expect.objectContaining({ code: 'length-required' }),
    );
    expect(() => check({})).not.toThrow();
  });

  it.each(['-1', '1e3', '0x10', '1 2'])('must be a number, and %s is none', (text) => {
    expect(() => check({ 'content-length': text })).toThrow(
      expect.objectContaining({ code: 'invalid-request' }),
    );
  });
});

describe('the path after sign-in', () => {
  it.each([
    ['/programs/one', '/programs/one'],
    ['/programs/one?sort=mass', '/programs/one?sort=mass'],
    ['//evil.example', '/'],
    ['/\\evil.example', '/'],
    ['https://evil.example/', '/'],
    ['javascript:alert(1)', '/'],
    ['/\t/evil.example', '/'],
    ['', '/'],
  ])('from %j is %j', (next, path) => {
    expect(ownPath(next)).toBe(path);
  });

  it('is the programs without one', () => {
    expect(ownPath(undefined)).toBe('/');
  });
});
