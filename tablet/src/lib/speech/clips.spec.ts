import { compileSheet } from '@steepfall/shared/sheets';
import { foldRun, speechOf, temperatureClips } from '@steepfall/shared/runs';
import { buildDocument, LogBuilder } from '@steepfall/shared/testing';
import { describe, expect, it } from 'vitest';

const files = new Set(Object.keys(import.meta.glob('../../../public/speech/*.mp3')));
const missing = (clips: string[]) => clips.filter((clip) => !files.has(`../../../public/speech/${clip}.mp3`));

describe('the spoken clips', () => {
  it.each(['C', 'F'] as const)('are there for every action and level of a sheet, in °%s', (unit) => {
    const sheet = compileSheet(buildDocument(), { altitudeM: 0, reachS: 10 });
    expect(missing(speechOf(foldRun(new LogBuilder(sheet).entries), unit))).toEqual([]);
  });

  it('are there for every temperature that water can have', () => {
    const tenthsC = Array.from({ length: 1041 }, (_, tenth) => tenth / 10);
    const clips = tenthsC.flatMap((tempC) => [...temperatureClips(tempC, 'C'), ...temperatureClips(tempC, 'F')]);
    expect(missing(clips)).toEqual([]);
  });
});
