import { createServer, type IncomingMessage } from 'node:http';
import { type AddressInfo } from 'node:net';
import { describe, expect, it } from 'vitest';
import { clientAddress, markPeerAddresses } from '@/lib/server/http/client-address';

const PEER = 'x-polhode-peer';
const from = (peer: string, forwarded?: string) =>
  new Headers({ [PEER]: peer, ...(forwarded === undefined ? {} : { 'x-forwarded-for': forwarded }) });

describe('the address of a client', () => {
  it('is that of the connection, whatever X-Forwarded-For claims, when no proxy is trusted', () => {
    expect(clientAddress(from('192.0.2.7', '198.51.100.1'), [])).toBe('192.0.2.7');
  });

  it('is what a trusted proxy says', () => {
    expect(clientAddress(from('10.0.0.2', '198.51.100.1'), ['10.0.0.0/8'])).toBe('198.51.100.1');
  });

  it('is the last address before the trusted ones: what stands further left was the client’s own claim', () => {
    const chain = from('10.0.0.2', '203.0.113.9, 198.51.100.1, 10.0.0.3');
    expect(clientAddress(chain, ['10.0.0.0/8'])).toBe('198.51.100.1');
  });

  it('is not taken from a connection outside the trusted block', () => {
    expect(clientAddress(from('11.0.0.2', '198.51.100.1'), ['10.0.0.0/8'])).toBe('11.0.0.2');
  });

  it('stops at the proxy when the next entry is no address', () => {
    expect(clientAddress(from('10.0.0.2', 'unknown'), ['10.0.0.2'])).toBe('10.0.0.2');
    expect(clientAddress(from('10.0.0.2'), ['10.0.0.2'])).toBe('10.0.0.2');
  });

  it('knows IPv4 inside IPv6, and IPv6', () => {
    expect(clientAddress(from('::ffff:10.0.0.2', '198.51.100.1'), ['10.0.0.2'])).toBe('198.51.100.1');
    expect(clientAddress(from('fd00::1', '2001:db8::7'), ['fd00::/8'])).toBe('2001:db8::7');
  });

  it('refuses a setting that is no address', () => {
    expect(() => clientAddress(from('10.0.0.2'), ['proxy.example'])).toThrow(
      /TRUSTED_PROXIES: proxy.example/,
    );
    expect(() => clientAddress(from('10.0.0.2'), ['10.0.0.0/33'])).toThrow(/TRUSTED_PROXIES/);
  });
});

it('comes from the connection itself, written over what a client sends under that name', async () => {
  markPeerAddresses();
  const seen: IncomingMessage['headers'][] = [];
  const server = createServer((request, response) => {
    seen.push(request.headers);
    response.end();
  });
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  const { port } = server.address() as AddressInfo;
  await fetch(`http://127.0.0.1:${port}/`, { headers: { [PEER]: '203.0.113.9' } });
  server.close();
  expect(seen[0]?.[PEER]).toBe('127.0.0.1');
});
