import { fileURLToPath } from 'node:url';
import { createServer, type ViteDevServer } from 'vite';

/** Serves the bench by itself on a free port of this machine. */
export async function serveBench(): Promise<{ url: string; close: () => Promise<void> }> {
  const server: ViteDevServer = await createServer({
    configFile: fileURLToPath(new URL('./vite.config.ts', import.meta.url)),
    logLevel: 'error',
    server: { port: 0, strictPort: false, hmr: false, watch: null },
  });
  await server.listen();
  const address = server.httpServer?.address();
  if (address === null || address === undefined || typeof address === 'string')
    throw new Error('The bench is not served.');
  return { url: `http://127.0.0.1:${address.port}/`, close: () => server.close() };
}
