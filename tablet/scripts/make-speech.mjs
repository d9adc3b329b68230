// Makes the spoken clips as MP3 files: `node tablet/scripts/make-speech.mjs`. Needs Debian's flite, sox and lame.
//
// One clip a phrase and one a number, so that a sentence is put together as verb, thing, number: "Hops in", "sixty", "degrees". Each is cut to
// its sound, brought to one loudness and given silence around it, so that clips follow each other like words.
import { execFileSync } from 'node:child_process';
import { mkdirSync, mkdtempSync, readdirSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';

/** Water boils at 100 °C and 212 °F. */
const HIGHEST = 220;
const VOICE = 'slt';
/** About 150 words a minute. */
const STRETCH = '1.05';

const out = fileURLToPath(new URL('../public/speech/', import.meta.url));
const phrases = JSON.parse(readFileSync(new URL('../src/lib/speech/phrases.json', import.meta.url), 'utf8'));
const numbers = Object.fromEntries(Array.from({ length: HIGHEST + 1 }, (_, n) => [`n${n}`, String(n)]));
const tenths = Object.fromEntries(Array.from({ length: 9 }, (_, n) => [`point${n + 1}`, `point ${n + 1}`]));

const work = mkdtempSync(join(tmpdir(), 'speech-'));
const run = (program, ...args) => execFileSync(program, args, { stdio: ['ignore', 'ignore', 'inherit'] });
mkdirSync(out, { recursive: true });
for (const name of readdirSync(out)) rmSync(join(out, name));
for (const [id, text] of Object.entries({ ...phrases, ...numbers, ...tenths })) {
  const raw = join(work, 'raw.wav');
  const cut = join(work, 'cut.wav');
  run('flite', '-voice', VOICE, '--setf', `duration_stretch=${STRETCH}`, '-t', text, '-o', raw);
  const edge = ['silence', '1', '0.01', '0.5%'];
  run(
    'sox',
    // The same dither each time, so that the files come out as they are committed.
    '-R',
    raw,
    '-r',
    '22050',
    cut,
    ...edge,
    'reverse',
    ...edge,
    'reverse',
    'gain',
    '-n',
    '-1',
    'pad',
    '0.03',
    '0.09',
  );
  run('lame', '--quiet', '--noreplaygain', '-m', 'm', '-b', '32', '--resample', '22.05', cut, join(out, `${id}.mp3`));
}
rmSync(work, { recursive: true });
