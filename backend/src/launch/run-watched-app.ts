import { spawn } from 'node:child_process';

// Node's own watcher lives on when its parent is gone; this process between the two does not.
const watcher = spawn(process.execPath, ['--watch', '--import', 'tsx', 'backend/src/main.ts'], {
  stdio: ['ignore', 'inherit', 'inherit', 'ipc'],
});
watcher.on('message', (message) => {
  if (typeof message === 'object' && 'ready' in message) process.send?.(message);
});
watcher.once('exit', (code) => process.exit(code ?? 0));
const end = (): void => {
  watcher.kill('SIGTERM');
};
process.once('SIGTERM', end);
process.once('SIGINT', end);
process.once('disconnect', end);
