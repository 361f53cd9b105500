import { existsSync, readFileSync, renameSync, writeFileSync } from 'node:fs';
import type { z } from 'zod';
import { CannotStart } from './say.ts';

/** What a file of the data folder holds; null when there is none. */
export function readKept<Shape extends z.ZodType>(
  file: string,
  shape: Shape,
): z.output<Shape> | null {
  if (!existsSync(file)) return null;
  let held: unknown;
  try {
    held = JSON.parse(readFileSync(file, 'utf8'));
  } catch (error) {
    throw new CannotStart(`${file} cannot be read (${String(error)}). Remove it to begin anew.`);
  }
  const parsed = shape.safeParse(held);
  if (!parsed.success) {
    throw new CannotStart(`${file} does not hold what it should. Remove it to begin anew.`);
  }
  return parsed.data;
}

/** Writes a file that only its owner can read, whole or not at all. */
export function writeKept(file: string, held: unknown): void {
  const next = `${file}.next`;
  writeFileSync(next, `${JSON.stringify(held, null, 2)}\n`, { mode: 0o600 });
  renameSync(next, file);
}
