import { describe, expect, it } from 'vitest';
import { fallFrame, levelMarks, strokesOf, type FallFrameInput } from './fall-frame.ts';
import type { Level } from './levels.ts';

const NOW_MS = 1_790_000_000_000;
const MINUTE_MS = 60_000;

function readings(count: number, tempC: (secondsAgo: number) => number) {
  return Array.from({ length: count }, (_, i) => ({
    atMs: NOW_MS - (count - 1 - i) * 1000,
    tempC: tempC(count - 1 - i),
  }));
}

function input(overrides: Partial<FallFrameInput> = {}): FallFrameInput {
  const shown = { width: 800, height: 200, nowMs: NOW_MS, target: null, crossingAtMs: null, curve: [], levels: [] };
  return { ...shown, readings: readings(900, () => 70), ...overrides };
}

const level = (overrides: Partial<Level>): Level => ({
  key: 'hops-in',
  tempC: 62,
  direction: 'falling',
  text: 'hops in',
  isDone: false,
  doneAtMs: null,
  ...overrides,
});

describe(fallFrame, () => {
  it('shows a quarter of an hour back, and room for what is to come', () => {
    const { fromMs, toMs, x } = fallFrame(input());
    expect((NOW_MS - fromMs) / MINUTE_MS).toBe(15);
    expect((toMs - NOW_MS) / MINUTE_MS).toBe(10);
    expect(x(NOW_MS)).toBeCloseTo(480, 6);
  });

  it('shows less of a run that has just begun', () => {
    expect((NOW_MS - fallFrame(input({ readings: readings(100, () => 20) })).fromMs) / MINUTE_MS).toBe(3);
  });

  it('reaches as far ahead as the crossing, never further than back', () => {
    const { toMs } = fallFrame(input({ crossingAtMs: NOW_MS + 10 * MINUTE_MS }));
    expect((toMs - NOW_MS) / MINUTE_MS).toBe(15);
    expect((fallFrame(input({ crossingAtMs: NOW_MS + 90 * MINUTE_MS })).toMs - NOW_MS) / MINUTE_MS).toBe(15);
  });

  it('has the level that is waited for in the picture, and stands still on fives', () => {
    const { lowC, highC, y } = fallFrame(input({ target: { tempC: 62 } }));
    expect([lowC % 5, highC % 5]).toEqual([0, 0]);
    expect(y(62)).toBeGreaterThan(0);
    expect(y(62)).toBeLessThan(200);
  });

  it('is not torn open by the code of a broken wire', () => {
    const broken = readings(900, (ago) => (ago === 5 ? -127 : 70));
    expect(fallFrame(input({ readings: broken })).lowC).toBeGreaterThan(50);
  });

  it('has a frame before the first reading', () => {
    const { lowC, highC } = fallFrame(input({ readings: [] }));
    expect(highC).toBeGreaterThan(lowC);
  });
});

describe(strokesOf, () => {
  it('tells climbing, holding and falling apart', () => {
    const hill = readings(900, (ago) =>
      ago > 600 ? 70 - (ago - 600) * 0.03 : ago > 300 ? 70 : 70 - (300 - ago) * 0.1,
    );
    const frame = fallFrame(input({ readings: hill }));
    expect(
      strokesOf(hill, frame, 30_000)
        .map(({ doing }) => doing)
        .filter((doing, i, all) => doing !== all[i - 1]),
    ).toEqual(['holding', 'climbing', 'holding', 'falling']);
  });

  it('breaks at a silence', () => {
    const gappy = readings(300, () => 70).filter((_, i) => i < 100 || i > 160);
    const strokes = strokesOf(gappy, fallFrame(input({ readings: gappy })), 30_000);
    expect(strokes).toHaveLength(2);
  });
});

describe(levelMarks, () => {
  const frame = fallFrame(input({ target: { tempC: 62 }, crossingAtMs: NOW_MS + 2 * MINUTE_MS }));
  const size = { width: 800, height: 200 };
  const next = { key: 'hops-in', crossingAtMs: NOW_MS + 2 * MINUTE_MS, about: 'about 2:00' };

  it('puts the mark where line and level will meet, the words where no line passes', () => {
    const [mark] = levelMarks([level({})], frame, size, next);
    expect(mark).toMatchObject({ label: 'hops in, about 2:00', isDone: false, isBelow: false });
    expect(mark!.x).toBeCloseTo(frame.x(NOW_MS + 2 * MINUTE_MS), 6);
    expect(mark!.labelX).toBeGreaterThan(mark!.x);
  });

  it('goes under the level when there is no room at its right', () => {
    const late = { ...next, crossingAtMs: NOW_MS + 9 * MINUTE_MS };
    const [mark] = levelMarks([level({})], frame, size, late);
    expect(mark!.isBelow).toBe(true);
    expect(mark!.labelX).toBeLessThan(mark!.x);
  });

  it('never overprints: what comes next wins', () => {
    const near = level({ key: 'near', tempC: 62.5, text: 'near' });
    expect(levelMarks([near, level({})], frame, size, next).map(({ key }) => key)).toEqual(['hops-in']);
  });

  it('keeps the level that is waited for in a drawing too low for it, and lets others go', () => {
    const low = { width: 300, height: 84 };
    const edge = { ...frame, y: () => 83 };
    const other = level({ key: 'other' });
    const marks = levelMarks([other, level({})], edge, low, next);
    expect(marks.map(({ key, y }) => [key, y])).toEqual([['hops-in', 78]]);
    expect(levelMarks([other], edge, low, next)).toEqual([]);
  });

  it('leaves out what was met before the picture begins', () => {
    const long = level({ isDone: true, doneAtMs: NOW_MS - 40 * MINUTE_MS });
    expect(levelMarks([long], frame, size, null)).toEqual([]);
  });
});
