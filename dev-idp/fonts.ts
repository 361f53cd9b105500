import { readFileSync } from 'node:fs';
import type { ServerResponse } from 'node:http';
import { createRequire } from 'node:module';

const packages = createRequire(import.meta.url);
const fonts = new Map(
  ['400', '600'].map((weight) => [
    `/fonts/${weight}.woff2`,
    `@fontsource/work-sans/files/work-sans-latin-${weight}-normal.woff2`,
  ]),
);

/** Answers a request for one of the two fonts; false when the path is another. */
export function answerFont(path: string, response: ServerResponse): boolean {
  const font = fonts.get(path);
  if (font === undefined) return false;
  response.writeHead(200, { 'Content-Type': 'font/woff2', 'Cache-Control': 'max-age=86400' });
  response.end(readFileSync(packages.resolve(font)));
  return true;
}
