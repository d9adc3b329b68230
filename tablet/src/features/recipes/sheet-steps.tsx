import { cautionWords, type RunSheet, type Step } from '@steepfall/shared/sheets';
import { formatDuration, formatMass, formatPressure, formatTemp, formatVolume } from '@steepfall/shared/units';
import type { Shape, Tone } from '#components/shapes.tsx';
import { ShapeGlyph, toneText } from '#components/shapes.tsx';

const unit = 'C' as const;

/** What the liquid does in a step, for its shape and hue; the rest carry none. */
const doing: Partial<Record<Step['kind'], { shape: Shape; tone: Tone }>> = {
  heat: { shape: 'up', tone: 'copper' },
  steep: { shape: 'flat', tone: 'leaf' },
  chill: { shape: 'down', tone: 'tarn' },
  catch: { shape: 'down', tone: 'tarn' },
};

function conditionWords({ start, done }: Step): string {
  if (start.by === 'temperature') return `at ${formatTemp(start.tempC, { unit })}, ${start.direction}`;
  if (done.by === 'temperature') return `until ${formatTemp(done.tempC, { unit })}, ${done.direction}`;
  if (done.by === 'timer') return `for ${formatDuration(done.durationS)}`;
  return '';
}

function settingWords({ label, quantity, value }: Step['settings'][number]): string {
  const words = {
    pH: `pH ${value}`,
    tempC: formatTemp(value, { unit }),
    volumeL: formatVolume(value, { unit: 'L' }),
    massG: formatMass(value, { unit: 'g' }),
    pressureKPa: formatPressure(value, { unit: 'kPa' }),
    tasteScore: String(value),
  };
  return `${label} ${words[quantity]}`;
}

/** The steps as they will be asked for. */
export function SheetSteps({ sheet }: { sheet: RunSheet }) {
  return (
    <ol className="gap-x-14 lg:columns-2">
      {sheet.steps.map((step, index) => {
        const dress = doing[step.kind];
        return (
          <li
            key={step.id}
            className="grid break-inside-avoid grid-cols-[2.5rem_1fr] gap-x-3 border-b border-hair py-4"
          >
            <span className="text-lead tabular-nums text-soft">{index + 1}</span>
            <div>
              <p className="flex flex-wrap items-baseline gap-x-3 text-lead">
                <span className="font-semibold">{step.title}</span>
                {dress ? (
                  <span className={toneText[dress.tone]}>
                    <ShapeGlyph shape={dress.shape} />
                  </span>
                ) : null}
                <span className="text-body tabular-nums">{conditionWords(step)}</span>
              </p>
              {step.amounts.length > 0 || step.settings.length > 0 ? (
                <p className="text-body font-medium">
                  {[
                    ...step.amounts.map(
                      ({ massG, name, bag }) => `${formatMass(massG, { unit: 'g' })} ${name}${bag ? `, ${bag}` : ''}`,
                    ),
                    ...step.settings.map(settingWords),
                  ].join(' · ')}
                </p>
              ) : null}
              {step.detail ? <p className="text-body text-soft">{step.detail}</p> : null}
              {step.meanwhile.length > 0 ? (
                <p className="text-body text-soft">Meanwhile: {step.meanwhile.map(({ text }) => text).join(', ')}.</p>
              ) : null}
              {step.cautions.length > 0 ? (
                <p className="mt-1 text-note font-medium text-ember">
                  {step.cautions.map((caution) => cautionWords[caution].mark).join(' · ')}
                </p>
              ) : null}
            </div>
          </li>
        );
      })}
    </ol>
  );
}
