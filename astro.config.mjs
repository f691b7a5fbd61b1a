import node from '@astrojs/node';
import react from '@astrojs/react';
import tailwind from '@astrojs/tailwind';
import { defineConfig } from 'astro/config';

// Server mode on the Node adapter's middleware mode: the HTTP front (scripts/front) stands before it.
export default defineConfig({
  output: 'server',
  adapter: node({ mode: 'middleware' }),
  integrations: [react(), tailwind({ applyBaseStyles: false })],
  devToolbar: { enabled: false },
  // The front checks Origin on every unsafe request; Astro's own check stays on behind it. Any host is allowed
  // here because the front has already refused hosts that are not PUBLIC_URL's.
  security: { checkOrigin: true, allowedDomains: [{}] },
  // Nothing is inlined as a data: address: the policy allows fonts and scripts from our own files alone.
  vite: { build: { assetsInlineLimit: 0 } },
  // Hashes of the inline scripts that start islands, and of inlined styles; the front puts them into its own policy.
  experimental: { csp: true },
});
