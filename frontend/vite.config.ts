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
            // What the pages share travels in one file: small ones squeeze badly one by one. Claims
            // are left out, since the month, the largest page, has none.
            {
              name: 'shared',
              test: /node_modules[\\/](@tanstack|dayjs)[\\/]|shared[\\/]src[\\/]|frontend[\\/]src[\\/](?!features[\\/]slots)/,
              minShareCount: 2,
            },
          ],
        },
      },
    },
  },
});
