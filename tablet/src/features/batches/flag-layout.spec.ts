import { describe, expect, it } from 'vitest';
import { footnotesOf, layoutFlags, PENNANT_PX, type Flag } from './flag-layout.ts';

const flag = (number: number, atMs: number, title = 'Tea in', isVital = false): Flag => ({
  id: `event-${number}`,
  number,
  title,
  atMs,
  isVital,
});
const room = { width: 1000, lanes: 4, hasLabels: true, xOf: (atMs: number) => atMs };

describe(layoutFlags, () => {
  it('keeps flags that are far apart on the top lane, with their words', () => {
    const placed = layoutFlags([flag(1, 100), flag(2, 500)], room);
    expect(placed.map(({ lane, hasLabel }) => [lane, hasLabel])).toEqual([
      [0, true],
      [0, true],
    ]);
  });

  it('lowers a flag whose place is taken, so that no pole runs through words', () => {
    const placed = layoutFlags([flag(1, 100), flag(2, 115), flag(3, 130)], room);
    expect(placed.map(({ lane }) => lane)).toEqual([0, 1, 2]);
  });

  it('flies to the left at the right edge', () => {
    const [placed] = layoutFlags([flag(1, 995, 'Hops out')], room);
    expect(placed).toMatchObject({ isLeftward: true, hasLabel: true });
  });

  it('gives the vital one the room', () => {
    const crowd = Array.from({ length: 12 }, (_, i) => flag(i + 1, 200 + i * 3, 'Something', i === 6));
    const placed = layoutFlags(crowd, room);
    expect(placed[6]).toMatchObject({ isVital: true, lane: 0, hasLabel: true });
    expect(placed.some(({ lane }) => lane === null)).toBe(true);
  });

  it('leaves out what is not in the window, and words on a phone', () => {
    const placed = layoutFlags([flag(1, -20), flag(2, 300), flag(3, 1200)], { ...room, hasLabels: false });
    expect(placed.map(({ number, hasLabel }) => [number, hasLabel])).toEqual([[2, false]]);
  });

  it('lets no pennant cover another', () => {
    const placed = layoutFlags(
      Array.from({ length: 40 }, (_, i) => flag(i + 1, (i * 97) % 1000, 'Step')),
      room,
    );
    for (const one of placed) {
      for (const other of placed) {
        if (one === other || one.lane === null || one.lane !== other.lane) continue;
        expect(Math.abs(one.x - other.x)).toBeGreaterThan(one.isLeftward === other.isLeftward ? PENNANT_PX - 1 : 0);
      }
    }
  });
});

describe(footnotesOf, () => {
  it('numbers every flag that no lane had room for, neighbours together', () => {
    const crowd = Array.from({ length: 12 }, (_, i) => flag(i + 1, 200 + i * 3, 'Something'));
    const placed = layoutFlags([...crowd, flag(13, 700), flag(14, 702)], { ...room, lanes: 1 });
    const left = placed.filter(({ lane }) => lane === null).map(({ number }) => number);
    const footnotes = footnotesOf(placed);
    expect(footnotes.flatMap(({ flags }) => flags.map(({ number }) => number))).toEqual(left);
    expect(footnotes.length).toBeLessThan(left.length);
  });

  it('writes a run of numbers as a span, and a gap as a comma', () => {
    const at = (number: number, x: number) => ({
      ...flag(number, x),
      x,
      lane: null,
      hasLabel: false,
      isLeftward: false,
    });
    expect(footnotesOf([at(6, 10), at(7, 12), at(9, 20), at(12, 200)]).map(({ numbers }) => numbers)).toEqual([
      '6–7, 9',
      '12',
    ]);
  });
});
