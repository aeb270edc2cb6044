import react from '@vitejs/plugin-react';
import { defineConfig } from 'vite';

/** Where the service listens while the application is served with reload. */
const SERVICE = 'http://127.0.0.1:4870';

export default defineConfig({
  root: import.meta.dirname,
  plugins: [react()],
  server: { port: 4871, proxy: { '/api': SERVICE, '/health': SERVICE } },
  build: {
    outDir: 'dist',
    emptyOutDir: true,
    // The map library is one chunk, loaded only by the pages that draw the sky.
    chunkSizeWarningLimit: 700,
    // Fonts stay files: the content policy allows them from this origin only.
    assetsInlineLimit: 0,
  },
});
