import type { IncomingMessage } from 'node:http';

/** An IPv4 address that arrived over an IPv6 socket, written as IPv4. */
export const plainAddress = (address: string) => address.replace(/^::ffff:(?=\d+\.)/, '');

/**
 * Leaves X-Forwarded-For and X-Forwarded-Proto only where they can be believed: when the peer is a proxy we were told of.
 * Then -For becomes the one address the nearest trusted proxies vouch for, as anything left of it may be invented.
 */
export function keepForwardedHonest(req: IncomingMessage, peer: string, trustedProxies: readonly string[]): void {
  const trusts = (address: string) =>
    trustedProxies.includes(address) || (trustedProxies.includes('loopback') && /^(127\.|::1$)/.test(address));
  const addresses = list(req.headers['x-forwarded-for']).map(plainAddress);
  const protocol = list(req.headers['x-forwarded-proto']).at(-1)?.toLowerCase();

  for (const name of Object.keys(req.headers)) {
    if (name === 'forwarded' || name === 'x-real-ip' || name.startsWith('x-forwarded-')) delete req.headers[name];
  }
  if (!trusts(peer)) return;
  const client = addresses.findLast((address) => !trusts(address)) ?? addresses[0];
  if (client) req.headers['x-forwarded-for'] = client;
  if (protocol === 'http' || protocol === 'https') req.headers['x-forwarded-proto'] = protocol;
}

const list = (header: string | string[] | undefined) =>
  String(header ?? '')
    .split(',')
    .map((part) => part.trim())
    .filter(Boolean);
