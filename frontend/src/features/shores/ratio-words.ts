import type { ShoreSettings } from '#shared/contracts/shores.ts';

type Preset = ShoreSettings['ratioPreset'];

/** What each preset of adults to party asks for (product rule R6). */
export const ratioWords: Record<Preset, { readonly name: string; readonly sentence: string }> = {
  schools: {
    name: 'Schools',
    sentence:
      'Adults of the crew and named staff count: the children of each age band by its ratio, added up and rounded up.',
  },
  families: {
    name: 'Families',
    sentence: 'Each child has a named adult; the crew go by heads, one to 15, at least two.',
  },
  strict: {
    name: 'Strict',
    sentence: 'The crew alone count, and the ratio of the youngest band holds for all.',
  },
};
