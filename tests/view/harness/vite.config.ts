import react from '@vitejs/plugin-react';
import tailwindcss from 'tailwindcss';
import { defineConfig } from 'vite';
import { fileURLToPath } from 'node:url';
import tw from './tw.mjs';

export default defineConfig({
  root: import.meta.dirname,
  plugins: [react()],
  css: { postcss: { plugins: [tailwindcss(tw as never)] } },
  server: { port: 4901, host: '127.0.0.1', hmr: false },
  cacheDir: fileURLToPath(new URL('../../../node_modules/.vite-bench', import.meta.url)),
});
