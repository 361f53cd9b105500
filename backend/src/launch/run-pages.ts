import { createServer } from 'vite';
import { endWithLauncher } from './end-with-launcher.ts';

const pages = await createServer({
  root: 'frontend',
  configFile: 'frontend/vite.config.ts',
  server: { host: '127.0.0.1', port: Number(process.env['PAGES_PORT']), strictPort: true },
});
await pages.listen();
endWithLauncher(() => pages.close());
