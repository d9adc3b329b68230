import type { RecipeDocument } from '@steepfall/shared/sheets';
import { formatDuration, formatTemp } from '@steepfall/shared/units';

const START_C = 15;
const WIDTH = 720;
const HEIGHT = 340;
const TOP = 54;
const BOTTOM = 26;

/** The first tea and the first hops; the rest stands in words. */
export function levelsOf({ additions, steepC }: RecipeDocument) {
  const tea = additions.find(({ kind }) => kind === 'tea');
  const hops = additions.find(({ kind }) => kind === 'hops');
  const durationS = tea && 'out' in tea && tea.out.at === 'timer' ? tea.out.durationS : 0;
  const inC = hops?.in.at === 'falling' ? hops.in.tempC : steepC;
  const outC = hops && 'out' in hops && hops.out.at === 'falling' ? hops.out.tempC : inC;
  return { steep: { tempC: steepC, durationS }, hops: { inC, outC } };
}

/** The day as its levels: to the scale of temperature, not of time. What it says stands in words below it. */
export function PlannedLine({ document }: { document: RecipeDocument }) {
  const { transferC } = document;
  const { steep, hops } = levelsOf(document);
  const top = Math.max(steep.tempC, hops.inC) + 2;
  const low = Math.min(START_C, transferC) - 2;
  const y = (tempC: number) => TOP + (1 - (tempC - low) / (top - low)) * (HEIGHT - TOP - BOTTOM);
  // The fall of a chiller: fast first, then slower. Where the curve meets a level follows from it.
  const fallFrom = 300;
  const fallTo = WIDTH - 10;
  const endC = transferC - 1;
  const x = (tempC: number) => {
    const share = (tempC - endC + 3) / (steep.tempC - endC + 3);
    const whole = 3 / (steep.tempC - endC + 3);
    return fallFrom + ((fallTo - fallFrom) * Math.log(share)) / Math.log(whole);
  };
  const fall = Array.from({ length: 41 }, (_, i) => steep.tempC + ((endC - steep.tempC) * i) / 40)
    .map((tempC) => `L${x(tempC).toFixed(1)} ${y(tempC).toFixed(1)}`)
    .join('');
  const levels = [
    { tempC: hops.inC, words: 'hops in' },
    { tempC: hops.outC, words: 'hops out' },
    { tempC: transferC, words: 'into the keg' },
  ];
  return (
    <svg viewBox={`0 0 ${WIDTH} ${HEIGHT}`} className="w-full" aria-hidden="true" fill="none" fontFamily="inherit">
      {[{ tempC: steep.tempC, words: 'tea in' }, ...levels].map(({ tempC, words }) => (
        <path key={words} d={`M0 ${y(tempC)}H${WIDTH}`} stroke="var(--edge)" strokeWidth="1.5" strokeDasharray="8 8" />
      ))}
      <path
        d={`M4 ${y(START_C)}C70 ${y(START_C + 25)} 110 ${y(steep.tempC - 12)} 180 ${y(steep.tempC)}`}
        stroke="var(--copper-line)"
        strokeWidth="6"
      />
      <path d={`M180 ${y(steep.tempC)}H${fallFrom}`} stroke="var(--leaf-line)" strokeWidth="6" />
      <path
        d={`M${fallFrom} ${y(steep.tempC)}${fall}`}
        stroke="var(--tarn-line)"
        strokeWidth="6"
        strokeLinejoin="round"
      />
      <g
        className="text-[19px] max-sm:text-[32px]"
        fill="var(--text)"
        stroke="var(--ground)"
        strokeWidth="6"
        paintOrder="stroke"
      >
        <text x="180" y={y(steep.tempC) - 16}>
          tea in {formatTemp(steep.tempC, { unit: 'C', digits: 0 })}, for {formatDuration(steep.durationS)}
        </text>
        {levels.map(({ tempC, words }) => (
          <text key={words} x={Math.max(6, x(tempC) - 18)} y={y(tempC) + 27} textAnchor="end">
            {words} {formatTemp(tempC, { unit: 'C', digits: 0 })}
          </text>
        ))}
      </g>
      {levels.map(({ tempC, words }) => (
        <path
          key={words}
          d="M0-9l9 9-9 9-9-9z"
          transform={`translate(${x(tempC)} ${y(tempC)})`}
          fill="var(--ground)"
          stroke="var(--text)"
          strokeWidth="3.5"
        />
      ))}
    </svg>
  );
}
