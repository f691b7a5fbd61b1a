// Under which names the site may be asked for, and from which pages it may be written to.
import { hostname, networkInterfaces } from 'node:os';
import type { FrontSettings } from './settings.ts';

/** The demo's own names: no foreign name can be among them, so no foreign page can be rebound to it. */
function ownNames(): Set<string> {
  const names = new Set([
    'localhost',
    '127.0.0.1',
    '[::1]',
    hostname().toLowerCase(),
    `${hostname().toLowerCase()}.local`,
  ]);
  for (const { address, family } of Object.values(networkInterfaces()).flatMap((list) => list ?? []))
    names.add(family === 'IPv6' ? `[${address}]` : address);
  return names;
}

/**
 * The origin that a request with this Host header belongs to, or undefined where the host is not ours.
 * A production site has one: PUBLIC_URL's. The demo also answers under this machine's names and addresses, so that
 * another device on the network reaches it.
 */
export function originOf(host: string | undefined, settings: FrontSettings): string | undefined {
  if (!host || !/^[A-Za-z0-9.\-:[\]]+$/.test(host)) return undefined;
  const { publicUrl, demo, production } = settings;
  if (host.toLowerCase() === publicUrl.host) return publicUrl.origin;
  if (!demo || production) return undefined;
  try {
    const url = new URL(`http://${host}`);
    const port = url.port || '80';
    return port === (publicUrl.port || '80') && ownNames().has(url.hostname) ? url.origin : undefined;
  } catch {
    return undefined;
  }
}
