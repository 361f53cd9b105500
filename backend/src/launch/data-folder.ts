import { chmodSync, mkdirSync, statSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { CannotStart } from './say.ts';

export const projectRoot = join(import.meta.dirname, '..', '..', '..');

/**
 * The ignored folder that holds what the start command makes: the database, passwords, caught
 * letters, logs. EBBFOLK_DATA names another one. Only its owner can read what is in it; for root
 * it can be passed through, since PostgreSQL then runs as another user.
 */
export function dataFolder(): string {
  const folder = resolve(process.env['EBBFOLK_DATA'] ?? join(projectRoot, '.data'));
  mkdirSync(folder, { recursive: true });
  const uid = process.getuid?.() ?? 0;
  if (uid !== 0 && statSync(folder).uid !== uid) {
    throw new CannotStart(
      `${folder} belongs to another user. Start as that user, or remove the folder to begin anew.`,
    );
  }
  chmodSync(folder, uid === 0 ? 0o711 : 0o700);
  mkdirSync(join(folder, 'log'), { recursive: true, mode: 0o700 });
  return folder;
}
