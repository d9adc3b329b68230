// Makes the four families of alarm tones as WAV files: `node tablet/scripts/make-sounds.mjs`.
//
// Rules they follow: fundamental between 440 and 800 Hz, so that five partials stay below 4 kHz; at least four harmonics
// within 15 dB of the fundamental, since a bare beep is hard to locate; a rise of 10 to 40 % of a pulse; each lasts half a
// second or more and differs from the others within its first half second; urgency by number of pulses and by pace.
import { writeFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';

const RATE = 22_050;
/** Level of the partials against the fundamental, dB. */
const PARTIALS_DB = [0, -5, -8, -11, -14];

/** A pulse: fundamental in Hz, start and length in ms, share of the length in which it rises, loudness 0 to 1. */
const families = {
  // Soft and low, twice, with a slow rise: a hand on the shoulder.
  'coming-up': {
    lengthMs: 900,
    pulses: [
      { hz: 523, atMs: 0, lengthMs: 240, rise: 0.4, loud: 0.45 },
      { hz: 523, atMs: 440, lengthMs: 240, rise: 0.4, loud: 0.45 },
    ],
  },
  // Three steps upward.
  'stand-by': {
    lengthMs: 1200,
    pulses: [
      { hz: 440, atMs: 0, lengthMs: 200, rise: 0.2, loud: 0.7 },
      { hz: 554, atMs: 360, lengthMs: 200, rise: 0.2, loud: 0.75 },
      { hz: 698, atMs: 720, lengthMs: 240, rise: 0.2, loud: 0.8 },
    ],
  },
  // Three and two, said twice, then a breath; it loops until somebody acknowledges it.
  now: {
    lengthMs: 5400,
    pulses: [0, 220, 440, 880, 1100, 1720, 1940, 2160, 2600, 2820].map((atMs, i) => ({
      hz: i % 5 < 3 ? 622 : 784,
      atMs,
      lengthMs: 120,
      rise: 0.12,
      loud: 1,
    })),
  },
  // The same when nobody answered: it starts higher, falls instead of rising, and takes two thirds of the time.
  urgent: {
    lengthMs: 4200,
    pulses: [0, 160, 320, 600, 760, 1160, 1320, 1480, 1760, 1920].map((atMs, i) => ({
      hz: i % 5 < 3 ? 784 : 622,
      atMs,
      lengthMs: 100,
      rise: 0.12,
      loud: 1,
    })),
  },
};

function envelope(share, rise) {
  if (share < rise) return Math.sin((share / rise) * (Math.PI / 2)) ** 2;
  const fall = 0.25;
  if (share > 1 - fall) return Math.cos(((share - 1 + fall) / fall) * (Math.PI / 2)) ** 2;
  return 1;
}

function render({ lengthMs, pulses }) {
  const samples = new Float64Array(Math.round((lengthMs / 1000) * RATE));
  for (const { hz, atMs, lengthMs: pulseMs, rise, loud } of pulses) {
    const from = Math.round((atMs / 1000) * RATE);
    const count = Math.round((pulseMs / 1000) * RATE);
    for (let i = 0; i < count && from + i < samples.length; i += 1) {
      const seconds = i / RATE;
      let value = 0;
      PARTIALS_DB.forEach((db, index) => {
        value += 10 ** (db / 20) * Math.sin(2 * Math.PI * hz * (index + 1) * seconds + index);
      });
      samples[from + i] += loud * envelope(i / count, rise) * value;
    }
  }
  return samples;
}

function wav(samples, peak) {
  const data = Buffer.alloc(44 + samples.length * 2);
  data.write('RIFF', 0);
  data.writeUInt32LE(36 + samples.length * 2, 4);
  data.write('WAVEfmt ', 8);
  data.writeUInt32LE(16, 16);
  data.writeUInt16LE(1, 20);
  data.writeUInt16LE(1, 22);
  data.writeUInt32LE(RATE, 24);
  data.writeUInt32LE(RATE * 2, 28);
  data.writeUInt16LE(2, 32);
  data.writeUInt16LE(16, 34);
  data.write('data', 36);
  data.writeUInt32LE(samples.length * 2, 40);
  samples.forEach((value, i) => data.writeInt16LE(Math.round((value / peak) * 0.95 * 32_767), 44 + i * 2));
  return data;
}

const rendered = Object.entries(families).map(([name, family]) => [name, render(family)]);
// One scale for all: what is soft stays soft beside what insists.
const peak = Math.max(
  ...rendered.flatMap(([, samples]) => samples.reduce((most, value) => Math.max(most, Math.abs(value)), 0)),
);
for (const [name, samples] of rendered) {
  const file = fileURLToPath(new URL(`../public/sounds/${name}.wav`, import.meta.url));
  writeFileSync(file, wav(samples, peak));
  process.stdout.write(`${name}.wav ${(samples.length / RATE).toFixed(2)} s\n`);
}
