import { formatDuration, formatRate, formatTemp, type UnitPreferences } from '@steepfall/shared/units';
import { ShapeGlyph, type Shape } from '#components/shapes.tsx';
import { useLive, useRun } from '#lib/run-store/run-context.tsx';
import type { LiveState } from '#lib/run-store/run-store.ts';
import { useUnits } from '#lib/units.ts';

type Unit = UnitPreferences['temperature'];
type Look = 'climbing' | 'holding' | 'falling' | 'unsure' | 'silent';

const shapeOf: Record<Look, Shape> = {
  climbing: 'up',
  holding: 'flat',
  falling: 'down',
  unsure: 'dash',
  silent: 'ring',
};
const hueOf: Record<Look, string> = {
  climbing: 'text-copper-strong',
  holding: 'text-leaf-strong',
  falling: 'text-tarn-strong',
  unsure: 'text-text',
  silent: 'text-soft',
};

function lookOf({ view, newest }: LiveState): Look {
  if (!view) return newest?.tempC == null ? 'silent' : 'unsure';
  const { status, mode } = view.estimate;
  if (status === 'live') return mode;
  return status === 'starting' && newest?.tempC != null ? 'unsure' : 'silent';
}

/** The liquid itself, the lag of the probe taken out; the bare reading while there are too few of them. */
function figureOf(live: LiveState, unit: Unit): string {
  const look = lookOf(live);
  if (look === 'silent') return '–';
  const tempC = look === 'unsure' ? live.newest?.tempC : live.view?.estimate.tempC;
  return formatTemp(tempC, { unit, showUnit: false });
}

function rateOf(live: LiveState, unit: Unit): string {
  const look = lookOf(live);
  if (look === 'silent') {
    const atMs = live.view?.estimate.lastGoodAtMs ?? live.newest?.atMs ?? null;
    if (atMs === null) return 'no reading yet';
    return `no signal for ${formatDuration(Math.floor((live.nowMs - atMs) / 1000))}`;
  }
  if (look === 'unsure') return 'settling';
  if (look === 'holding') return 'holding';
  return formatRate(live.view?.estimate.rateCPerMin, { unit });
}

/** The number to be read from three metres. Each part is a leaf: a reading changes its text and nothing else. */
export function LiveTemperature() {
  const { summary } = useRun();
  const look = useLive(lookOf);
  const { temperature } = useUnits();
  const isAwaited = useLive(({ view }) => view?.target != null);
  if (summary && summary.probeId === null) {
    return (
      <div className="live-temp">
        <p className="live-rate text-soft">No probe on this run. Type temperatures with “Measure”.</p>
      </div>
    );
  }
  // Nothing is waited for and the probe is out of the liquid: no news, and no reason for a large dash.
  if (look === 'silent' && !isAwaited) {
    return (
      <div className="live-temp">
        <p className="live-rate text-soft">
          <ShapeGlyph shape="ring" className="size-[0.8em]" />
          <LiveRate />
        </p>
      </div>
    );
  }
  return (
    <div className="live-temp" data-look={look}>
      <p className={`live-figure ${hueOf[look]}`}>
        <LiveFigure />
        <span className="live-unit">°{temperature}</span>
      </p>
      <p className={`live-rate ${hueOf[look]}`}>
        <ShapeGlyph shape={shapeOf[look]} className="size-[0.8em]" />
        {look === 'climbing' || look === 'falling' ? <span className="sr-only">{look} </span> : null}
        <LiveRate />
      </p>
    </div>
  );
}

export function LiveFigure() {
  const { temperature } = useUnits();
  return <span>{useLive((live) => figureOf(live, temperature))}</span>;
}

function LiveRate() {
  const { temperature } = useUnits();
  return <span>{useLive((live) => rateOf(live, temperature))}</span>;
}
