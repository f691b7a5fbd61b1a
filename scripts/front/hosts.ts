import type { FrontConfig } from './config';

/**
 * Which Host headers are answered and which origins may change something. In production that is PUBLIC_URL's alone. The
 * demo is also reached from other devices of the network, by the machine's address: any IP address and localhost go.
 */
export function hostPolicy(config: FrontConfig) {
  const own = config.publicUrl.host;
  return {
    allowed(host: string | undefined): boolean {
      if (!host) return false;
      if (host === own) return true;
      if (config.NODE_ENV === 'production') return false;
      return /^(localhost|127(\.\d{1,3}){3}|\d{1,3}(\.\d{1,3}){3}|\[[0-9a-f:]+\]|[a-z0-9-]+\.local)(:\d{1,5})?$/i.test(
        host,
      );
    },
    /** The one origin that a page served under this Host has. */
    originOf(host: string): string {
      return host === own ? config.publicUrl.origin : `http://${host}`;
    },
  };
}
