// Who asks: the address of the connection, or what a trusted proxy says of it; never what a client says of itself.
import type { IncomingMessage } from 'node:http';
import { isIP } from 'node:net';
import type { FrontSettings } from './settings.ts';

/** An IPv4 address that arrived over a dual-stack socket, as plain IPv4. */
const plain = (address: string): string => address.replace(/^::ffff:(?=\d+\.)/i, '');

const isTrusted = (address: string, { trustedProxies }: FrontSettings): boolean =>
  isIP(address) !== 0 && trustedProxies?.check(address, isIP(address) === 6 ? 'ipv6' : 'ipv4') === true;

/** The nearest address that is no proxy of ours: each proxy appends the address it was asked from. */
export function clientAddress(request: IncomingMessage, settings: FrontSettings): string {
  let address = plain(request.socket.remoteAddress ?? '');
  const said = String(request.headers['x-forwarded-for'] ?? '').split(',');
  while (isTrusted(address, settings)) {
    const before = plain(said.pop()?.trim() ?? '');
    if (!isIP(before)) break;
    address = before;
  }
  return address;
}

/**
 * Replaces whatever forwarding headers came in by our own: the framework believes the first value it sees.
 * @param scheme of the origin under which the site was asked for
 */
export function setForwardedHeaders(
  request: IncomingMessage,
  client: string,
  scheme: 'http' | 'https',
): void {
  for (const name of Object.keys(request.headers))
    if (
      name.startsWith('x-forwarded-') ||
      ['forwarded', 'x-real-ip', 'client-ip', 'true-client-ip'].includes(name)
    )
      delete request.headers[name];
  request.headers['x-forwarded-for'] = client;
  request.headers['x-forwarded-proto'] = scheme;
}
