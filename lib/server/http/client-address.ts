import { subscribe } from 'node:diagnostics_channel';
import { type IncomingMessage } from 'node:http';
import { BlockList, isIP } from 'node:net';

/** Set by this process on every request, whatever the client sent under the name. */
const PEER_HEADER = 'x-polhode-peer';

/**
 * Writes the address of the connection into each request before the framework sees it: handlers are given headers only, and
 * X-Forwarded-For is whatever a client likes to claim.
 */
export function markPeerAddresses(): void {
  subscribe('http.server.request.start', (message) => {
    const { request } = message as { request: IncomingMessage };
    request.headers[PEER_HEADER] = request.socket.remoteAddress ?? 'unknown';
  });
}

/**
 * The client's address: the connection's, unless that is a trusted proxy; then the last address of X-Forwarded-For that is not
 * one. `trusted` holds addresses and CIDR blocks. `unknown` where nothing tells.
 */
export function clientAddress(headers: Headers, trusted: readonly string[]): string {
  const list = blockList(trusted);
  const hops = (headers.get('x-forwarded-for') ?? '').split(',').map(plain).filter(Boolean);
  let address = plain(headers.get(PEER_HEADER) ?? 'unknown');
  while (isTrusted(list, address)) {
    const before = hops.pop();
    if (before === undefined || isIP(before) === 0) return address;
    address = before;
  }
  return address;
}

/** An IPv4 address that came over an IPv6 socket, in its own form. */
function plain(address: string): string {
  return address.trim().replace(/^::ffff:(?=\d+\.\d+\.\d+\.\d+$)/i, '');
}

function isTrusted(list: BlockList, address: string): boolean {
  const version = isIP(address);
  return version !== 0 && list.check(address, version === 6 ? 'ipv6' : 'ipv4');
}

function blockList(entries: readonly string[]): BlockList {
  const list = new BlockList();
  for (const entry of entries) {
    const [address = '', prefix] = entry.split('/');
    const version = isIP(address);
    const bits = prefix === undefined ? (version === 6 ? 128 : 32) : Number(prefix);
    if (version === 0 || !Number.isInteger(bits) || bits < 0 || bits > (version === 6 ? 128 : 32)) {
      throw new Error(`TRUSTED_PROXIES: ${entry} is neither an address nor a block such as 10.0.0.0/8`);
    }
    list.addSubnet(address, bits, version === 6 ? 'ipv6' : 'ipv4');
  }
  return list;
}
