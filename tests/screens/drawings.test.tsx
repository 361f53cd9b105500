import { render, screen } from '@testing-library/react';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { HeroFacts } from '#frontend/components/hero-layout.ts';
import { layoutHero } from '#frontend/components/hero-layout.ts';
import { boxOf, meet } from '#frontend/components/label-box.ts';
import { LevelGauge } from '#frontend/components/level-gauge.tsx';
import { LimpetRow } from '#frontend/components/limpet.tsx';
import { cutCurve, heightAt, linePath, xOf, yOf } from '#frontend/components/water-curve.ts';
import { addDays, startOfDay } from '#shared/kernel/time.ts';
import { madeUpCurve, madeUpNoonLow } from './made-up-tide.ts';

const zone = 'Europe/London';
const MINUTE_MS = 60_000;

function drawn(element: Element | null, selector: string): string[] {
  return [...(element?.querySelectorAll(selector) ?? [])].map(
    (path) => path.getAttribute('d') ?? '',
  );
}

describe('limpets', () => {
  it('stand on one rock line, each as wide as the next', () => {
    const { container } = render(<LimpetRow looks={['claimed', 'gap', 'in-doubt', 'yours']} />);
    const limpets = [...container.querySelectorAll('[data-limpet]')];
    expect(limpets.map((limpet) => limpet.getAttribute('data-limpet'))).toEqual([
      'claimed',
      'gap',
      'in-doubt',
      'yours',
    ]);
    for (const limpet of limpets) {
      expect(limpet).toHaveAttribute('viewBox', '0 0 14 15');
      expect(limpet).toHaveAttribute('aria-hidden', 'true');
      expect(drawn(limpet, '.stroke-edge')[0]).toMatch(/^M0 10\.7H/);
    }
  });

  it('draw a gap as a flat empty ring of 9.8 by 4.2 and no shell', () => {
    const { container } = render(<LimpetRow looks={['gap']} />);
    const ring = container.querySelector('ellipse');
    expect([ring?.getAttribute('rx'), ring?.getAttribute('ry')]).toEqual(['4.9', '2.1']);
    expect(container.querySelector('.fill-deep')).toBeNull();
  });

  it('tilt the shell of a slot in doubt by 24 degrees on its left edge', () => {
    const { container } = render(<LimpetRow looks={['in-doubt']} />);
    expect(container.querySelector('g')).toHaveAttribute('transform', 'rotate(-24 1.9 10.1)');
  });

  it('have ribs from 18 pixels on', () => {
    const small = render(<LimpetRow looks={['claimed']} sizePx={17} />).container;
    const large = render(<LimpetRow looks={['claimed']} sizePx={18} />).container;
    expect(small.querySelector('.stroke-foam')).toBeNull();
    expect(large.querySelector('.stroke-foam')).not.toBeNull();
  });
});

describe('the level gauge', () => {
  it('holds water for the share of the validity that is left, and a notch for the notice', () => {
    const { container } = render(<LevelGauge state="current" shareLeft={0.5} noticeShare={0.25} />);
    expect(drawn(container, '.fill-tide')[0]).toMatch(/^M2\.7 22Q/);
    expect(drawn(container, '.stroke-ink')).toEqual(['M16 32H21']);
  });

  it('keeps at least 2.4 of 40 units of water while it is current, and the notch at 3.2', () => {
    const { container } = render(<LevelGauge state="current" shareLeft={0} noticeShare={0.01} />);
    expect(drawn(container, '.fill-tide')[0]).toMatch(/^M2\.7 39\.6Q/);
    expect(drawn(container, '.stroke-ink')).toEqual(['M16 38.8H21']);
  });

  it('is dry and cracked when lapsed, dashed when not held', () => {
    const lapsed = render(<LevelGauge state="lapsed" shareLeft={0} noticeShare={0.1} />).container;
    expect(lapsed.querySelector('.fill-tide')).toBeNull();
    expect(lapsed.querySelector('.stroke-anemone')).not.toBeNull();
    const none = render(
      <LevelGauge state="not-held" shareLeft={null} noticeShare={null} />,
    ).container;
    expect(none.querySelector('[stroke-dasharray]')).not.toBeNull();
  });

  it('is full and without a notch where there is no end', () => {
    const { container } = render(<LevelGauge state="current" shareLeft={null} noticeShare={0.1} />);
    expect(drawn(container, '.fill-tide')[0]).toMatch(/^M2\.7 3\.2Q/);
    expect(container.querySelector('.stroke-ink')).toBeNull();
  });

  it('is hidden beside its words and speaks where it stands alone', () => {
    render(<LevelGauge state="not-held" shareLeft={null} noticeShare={null} />);
    expect(screen.queryByRole('img')).toBeNull();
    render(
      <LevelGauge
        state="renew-by"
        shareLeft={0.01}
        noticeShare={0.1}
        label="Tide safety, renew by 3 May, four days left"
      />,
    );
    expect(screen.getByRole('img')).toHaveAccessibleName(
      'Tide safety, renew by 3 May, four days left',
    );
  });
});

describe('a water curve', () => {
  const curve = [
    { at: 0, heightM: 1 },
    { at: 10, heightM: 3 },
    { at: 20, heightM: 2 },
  ];

  it('is straight between its points and unknown outside them', () => {
    expect(heightAt(curve, 5)).toBe(2);
    expect(heightAt(curve, 15)).toBe(2.5);
    expect(heightAt(curve, -1)).toBeNull();
    expect(heightAt(curve, 21)).toBeNull();
    expect(heightAt([], 0)).toBeNull();
  });

  it('is cut at both ends of a span', () => {
    expect(cutCurve(curve, 5, 15)).toEqual([
      { at: 5, heightM: 2 },
      { at: 10, heightM: 3 },
      { at: 15, heightM: 2.5 },
    ]);
  });

  it('is drawn over the whole width, high water above low', () => {
    const plot = {
      fromAt: 0,
      untilAt: 20,
      widthPx: 100,
      topPx: 10,
      basePx: 50,
      axis: { bottomM: 0, topM: 4 },
    };
    expect(linePath(plot, curve)).toBe('M0 40L50 20L100 30');
  });
});

describe('the large water line', () => {
  const facts = (daysOn: number, sunriseHour: number, isStoodDown = false): HeroFacts => {
    const day = addDays('2027-01-01', daysOn);
    const fromAt = startOfDay(day, zone);
    const untilAt = startOfDay(addDays(day, 1), zone);
    const low = madeUpNoonLow(day, zone);
    return {
      curve: madeUpCurve(fromAt, untilAt, 6),
      axis: { bottomM: 0.07, topM: 5.87 },
      dayFromAt: fromAt,
      dayUntilAt: untilAt,
      zone,
      crewMeetsAt: low.at - 165 * MINUTE_MS,
      partyMeetsAt: low.at - 140 * MINUTE_MS,
      startsAt: low.at - 120 * MINUTE_MS,
      lowWaterAt: low.at,
      lowWaterHeightM: low.heightM,
      clearByAt: low.at,
      offByAt: low.at + 30 * MINUTE_MS,
      sunriseAt: fromAt + sunriseHour * 60 * MINUTE_MS,
      sunsetAt: untilAt - sunriseHour * 60 * MINUTE_MS,
      isStoodDown,
    };
  };
  const anyDrawing = [
    fc.integer({ min: 0, max: 364 }),
    fc.integer({ min: 4, max: 8 }),
    fc.integer({ min: 280, max: 1600 }),
    fc.constantFrom(1, 1.5, 2),
  ] as const;

  it('never lets its words touch each other, whatever the day and the width', () => {
    fc.assert(
      fc.property(...anyDrawing, (daysOn, sunriseHour, widthPx, scale) => {
        const boxes = layoutHero(facts(daysOn, sunriseHour), widthPx, scale).labels.map((label) =>
          boxOf(label, scale),
        );
        boxes.forEach((box, index) => {
          boxes.slice(index + 1).forEach((other) => expect(meet(box, other, 0)).toBe(false));
        });
      }),
    );
  });

  it('keeps its words clear of the curve and inside the drawing', () => {
    fc.assert(
      fc.property(...anyDrawing, (daysOn, sunriseHour, widthPx, scale) => {
        const day = facts(daysOn, sunriseHour);
        const { plot, labels, leftPx } = layoutHero(day, widthPx, scale);
        for (const label of labels) {
          const box = boxOf(label, scale);
          expect(box.x1).toBeGreaterThanOrEqual(-leftPx);
          expect(box.x2).toBeLessThanOrEqual(plot.widthPx);
          const ys = day.curve
            .filter(({ at }) => xOf(plot, at) >= box.x1 && xOf(plot, at) <= box.x2)
            .map(({ heightM }) => yOf(plot, heightM));
          expect(ys.every((y) => y > box.y2) || ys.every((y) => y < box.y1)).toBe(true);
        }
      }),
    );
  });

  it('says every time either in the drawing or under it', () => {
    fc.assert(
      fc.property(...anyDrawing, (daysOn, sunriseHour, widthPx, scale) => {
        const { labels, unplaced } = layoutHero(facts(daysOn, sunriseHour), widthPx, scale);
        const said = [...labels.map(({ key }) => key), ...unplaced];
        expect(said).toEqual(
          expect.arrayContaining(['off-by', 'clear-by', 'starts', 'crew-meets']),
        );
        expect(new Set(said).size).toBe(said.length);
      }),
    );
  });

  it('names both deadlines in the drawing on a desktop and on a phone', () => {
    for (const widthPx of [1304, 358]) {
      const keys = layoutHero(facts(128, 5), widthPx, 1).labels.map(({ key }) => key);
      expect(keys).toEqual(expect.arrayContaining(['off-by', 'clear-by', 'low-water', 'starts']));
    }
  });

  it('names no deadline of a session that is stood down', () => {
    const { labels } = layoutHero(facts(128, 5, true), 1304, 1);
    const keys = labels.map(({ key }) => key);
    expect(keys).toContain('stood-down');
    expect(keys).not.toContain('off-by');
  });
});
