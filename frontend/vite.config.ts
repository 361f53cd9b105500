import { fileURLToPath } from 'node:url';
import tailwind from '@tailwindcss/vite';
import react from '@vitejs/plugin-react';
import { defineConfig } from 'vite';

const app = process.env['EBBFOLK_APP'] ?? 'http://127.0.0.1:3700';

export default defineConfig({
  root: fileURLToPath(new URL('.', import.meta.url)),
  plugins: [react(), tailwind()],
  server: {
    proxy: { '/api': app, '/auth': app },
  },
  build: {
    outDir: 'dist',
    emptyOutDir: true,
    // The policy for content allows pictures and fonts from the server itself; only small fonts of
    // the calendar come as data.
    assetsInlineLimit: 0,
    rolldownOptions: {
      output: {
        codeSplitting: {
          groups: [
            {
              name: 'react',
              test: /node_modules[\\/](react|react-dom|react-router|scheduler)[\\/]/,
            },
            { name: 'calendar', test: /node_modules[\\/](@fullcalendar|preact)[\\/]/ },
          ],
        },
      },
    },
  },
});
