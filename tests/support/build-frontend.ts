import { buildFrontend } from '#backend/launch/build-frontend.ts';

/** Builds the pages once before the tests that look at them, where their sources have changed. */
export default function buildPages(): Promise<void> {
  return buildFrontend();
}
