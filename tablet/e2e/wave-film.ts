import { mkdtemp, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';

const WIDTH = 160;
const HEIGHT = 120;
const FRAMES_PER_S = 15;
/** A camera begins the film anew when it is over; the wave comes once while anybody looks. */
const LENGTH_S = 30;
const WAVE_FROM_S = 3;
const WAVE_S = 1.2;

export type Film = 'sweep' | 'still' | 'flicker';

/** Where the bright bar is: at rest at the left edge, and once across and back. */
function placeAt(atS: number): number {
  const along = (atS - WAVE_FROM_S) / WAVE_S;
  if (along <= 0 || along >= 1) return 0;
  return 1 - Math.abs(2 * along - 1);
}

function brightness(film: Film, x: number, frame: number): number {
  const ground = film === 'flicker' && frame % 2 === 1 ? 170 : 60;
  const place = film === 'sweep' ? placeAt(frame / FRAMES_PER_S) : 0.5;
  return Math.abs(x / (WIDTH - 1) - place) < 0.125 ? 220 : ground;
}

/** A film for Chromium's camera that is none, as raw pictures; returns where it lies. */
export async function writeBarFilm(film: Film): Promise<string> {
  const header = Buffer.from(`YUV4MPEG2 W${WIDTH} H${HEIGHT} F${FRAMES_PER_S}:1 Ip A1:1 C420jpeg\n`);
  const colour = Buffer.alloc((WIDTH * HEIGHT) / 2, 128);
  const frames = Array.from({ length: LENGTH_S * FRAMES_PER_S }, (_, frame) => {
    const row = Buffer.from(Array.from({ length: WIDTH }, (__, x) => brightness(film, x, frame)));
    const light = Buffer.concat(Array.from({ length: HEIGHT }, () => row));
    return Buffer.concat([Buffer.from('FRAME\n'), light, colour]);
  });
  const path = join(await mkdtemp(join(tmpdir(), 'steepfall-film-')), `${film}.y4m`);
  await writeFile(path, Buffer.concat([header, ...frames]));
  return path;
}
