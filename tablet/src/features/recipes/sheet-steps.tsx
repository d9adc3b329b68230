import type { ReactNode } from 'react';
import { cautionWords, type RunSheet, type Step } from '@steepfall/shared/sheets';
import {
  formatDuration,
  formatMass,
  formatPressure,
  formatVolume,
  type UnitPreferences,
} from '@steepfall/shared/units';
import type { Shape, Tone } from '#components/shapes.tsx';
import { ShapeGlyph, toneText } from '#components/shapes.tsx';
import { formatLevel, inPersonsWords, useUnits } from '#lib/units.ts';

/** What the liquid does in a step, for its shape and hue; the rest carry none. */
const doing: Partial<Record<Step['kind'], { shape: Shape; tone: Tone }>> = {
  heat: { shape: 'up', tone: 'copper' },
  steep: { shape: 'flat', tone: 'leaf' },
  chill: { shape: 'down', tone: 'tarn' },
  catch: { shape: 'down', tone: 'tarn' },
};

function conditionWords({ start, done }: Step, units: UnitPreferences): string {
  if (start.by === 'temperature') return `at ${formatLevel(start.tempC, units)}, ${start.direction}`;
  if (done.by === 'temperature') return `until ${formatLevel(done.tempC, units)}, ${done.direction}`;
  if (done.by === 'timer') return `for ${formatDuration(done.durationS)}`;
  return '';
}

function settingWords({ label, quantity, value }: Step['settings'][number], units: UnitPreferences): string {
  const words = {
    pH: `pH ${value}`,
    tempC: formatLevel(value, units),
    volumeL: formatVolume(value, { unit: units.volume }),
    massG: formatMass(value, { unit: units.mass }),
    pressureKPa: formatPressure(value, { unit: units.pressure }),
    tasteScore: String(value),
  };
  return `${label} ${words[quantity]}`;
}

interface SheetStepsProps {
  sheet: RunSheet;
  /** What can be done with a step, at its end. */
  acts?: (step: Step, index: number) => ReactNode;
}

/** The steps as they will be asked for. */
export function SheetSteps({ sheet, acts }: SheetStepsProps) {
  const units = useUnits();
  return (
    <ol className="gap-x-14 lg:columns-2">
      {sheet.steps.map((step, index) => {
        const dress = doing[step.kind];
        return (
          <li
            key={step.id}
            className="grid break-inside-avoid grid-cols-[2.5rem_1fr] gap-x-3 sm:grid-cols-[2.5rem_1fr_auto] border-b border-hair py-4"
          >
            <span className="text-lead tabular-nums text-soft">{index + 1}</span>
            <div className="min-w-0">
              <p className="flex flex-wrap items-baseline gap-x-3 text-lead">
                <span className="font-semibold break-words">{step.title}</span>
                {dress ? (
                  <span className={toneText[dress.tone]}>
                    <ShapeGlyph shape={dress.shape} />
                  </span>
                ) : null}
                <span className="text-body tabular-nums">{conditionWords(step, units)}</span>
              </p>
              {step.amounts.length > 0 || step.settings.length > 0 ? (
                <p className="text-body font-medium">
                  {[
                    ...step.amounts.map(
                      ({ massG, name, bag }) =>
                        `${formatMass(massG, { unit: units.mass })} ${name}${bag ? `, ${bag}` : ''}`,
                    ),
                    ...step.settings.map((setting) => settingWords(setting, units)),
                  ].join(' · ')}
                </p>
              ) : null}
              {step.detail ? <p className="text-body text-soft">{inPersonsWords(step.detail, units)}</p> : null}
              {step.meanwhile.length > 0 ? (
                <p className="text-body text-soft">Meanwhile: {step.meanwhile.map(({ text }) => text).join(', ')}.</p>
              ) : null}
              {step.cautions.length > 0 ? (
                <p className="mt-1 text-note font-medium text-ember">
                  {step.cautions.map((caution) => cautionWords[caution].mark).join(' · ')}
                </p>
              ) : null}
            </div>
            {acts ? <div className="flex items-start max-sm:col-start-2 max-sm:-ml-3">{acts(step, index)}</div> : null}
          </li>
        );
      })}
    </ol>
  );
}
