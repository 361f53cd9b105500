import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';

// Minutes as Date.getTimezoneOffset gives them: behind UTC positive.
const processZones = [
  ['UTC', 0, 0],
  ['Europe/London', 0, -60],
  ['America/Los_Angeles', 480, 420],
] as const;

/**
 * Runs the same promises in three process zones. Modules that the body imports in a `beforeAll` of
 * its own are loaded anew in each zone, so that nothing they remember comes from another.
 */
export function describeInEachProcessZone(body: () => void): void {
  describe.each(processZones)(
    'on a machine whose own zone is %s',
    (processZone, januaryOffset, julyOffset) => {
      const zoneBefore = process.env['TZ'];

      beforeAll(() => {
        process.env['TZ'] = processZone;
        vi.resetModules();
      });

      afterAll(() => {
        if (zoneBefore === undefined) delete process.env['TZ'];
        else process.env['TZ'] = zoneBefore;
      });

      it('really runs in that zone', () => {
        expect(new Date(2026, 0, 15).getTimezoneOffset()).toBe(januaryOffset);
        expect(new Date(2026, 6, 15).getTimezoneOffset()).toBe(julyOffset);
      });

      body();
    },
  );
}
