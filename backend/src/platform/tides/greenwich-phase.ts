/**
 * TICON-4 counts the phases of a few constituents from other arguments than NOAA Special
 * Publication 98: degrees to add to its phases. 90 are the constant of the diurnal part, which it
 * leaves out, 180 is that constant with its sign turned round, and 20.3 are half a year's motion of
 * the moon's perigee, which NOAA's M1 leaves out. Found by setting the same gauges side by side as
 * TICON-4, NOAA (Anchorage) and the Norwegian Mapping Authority (Norwegian ports) analysed them.
 */
const TICON_PHASE_DEG: Readonly<Record<string, number>> = {
  M1: 110.3,
  '2MK5': 90,
  '2MO5': -90,
  SGM: 180,
};

/**
 * The Greenwich phase lag G in degrees, as NOAA Special Publication 98 counts it, of a constituent
 * from the phase that a source of the tide database gives. Not reduced to a circle.
 */
export function greenwichPhaseDeg(source: string, constituent: string, phaseDeg: number): number {
  return source === 'TICON-4' ? phaseDeg + (TICON_PHASE_DEG[constituent] ?? 0) : phaseDeg;
}
