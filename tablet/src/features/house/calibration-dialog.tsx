import { useState, type ReactNode } from 'react';
import { useQuery } from '@tanstack/react-query';
import type { Probe, ProbeCalibration } from '@steepfall/shared/contracts';
import {
  boilingPointAtAltitudeC,
  boilingPointC,
  correctedTempC,
  correctionUncertaintyK,
  type ProbeCorrection,
} from '@steepfall/shared/figures';
import { calibrationOf, calibrationRefusalWords } from '@steepfall/shared/readings';
import { cautionWords } from '@steepfall/shared/sheets';
import { formatTemp, kelvinToFahrenheitDegrees } from '@steepfall/shared/units';
import { Banner } from '#components/banner.tsx';
import { Button } from '#components/button.tsx';
import { CautionMark } from '#components/caution-mark.tsx';
import { Dialog } from '#components/dialog.tsx';
import { QuantityField } from '#components/quantity-field.tsx';
import { houseQuery } from '#lib/hub-queries.ts';
import { useKnown } from '#lib/session.ts';
import { useUnits, type Quantity } from '#lib/units.ts';
import { failureWords, fieldProblems } from '#lib/words.ts';
import { ProbeLiveView } from './probe-live-view.tsx';
import { useProbeLive, type ProbeLive } from './probe-readings.ts';
import { useSaveProbe } from './use-save-probe.ts';

const hectopascal: Quantity = { symbol: 'hPa', fromInside: (kPa) => kPa * 10, toInside: (hPa) => hPa / 10 };
/** What a barometer in a kitchen can show, from the highest to the lowest house. */
const LOWEST_KPA = 45;
const HIGHEST_KPA = 110;
/** An ice bath in a kitchen, a rolling boil, and the weather where nobody tells the pressure (common practice, about so much). */
const ICE_K = 0.1;
const BOIL_K = 0.2;
const WEATHER_K = 0.8;
/** Further off than this it is not that water. Our choice. */
const OTHER_WATER_K = 6;
const SHOWN_AT_C = 80;

type Point = 'low' | 'high';

/** Ice water and boiling water are known: what the probe shows there gives the line that puts it right in between. */
export function CalibrationDialog({ probe, onClose }: { probe: Probe; onClose: () => void }) {
  const known = useKnown();
  const { data: house = known.house } = useQuery(houseQuery);
  const { temperature: unit } = useUnits();
  const live = useProbeLive(probe);
  const save = useSaveProbe(probe);
  const [taken, setTaken] = useState<Partial<Record<Point, number>>>({});
  const [pressureKPa, setPressureKPa] = useState<number | null>(null);
  const isPressureRight = pressureKPa === null || (pressureKPa >= LOWEST_KPA && pressureKPa <= HIGHEST_KPA);
  const hasPressure = pressureKPa !== null && isPressureRight;
  const boilC = hasPressure ? boilingPointC(pressureKPa) : boilingPointAtAltitudeC(house.altitudeM);
  const temp = (tempC: number, digits = 1) => formatTemp(tempC, { unit, digits });

  const calibration: ProbeCalibration | null =
    taken.low === undefined || taken.high === undefined
      ? null
      : { low: { shownC: taken.low, trueC: 0 }, high: { shownC: taken.high, trueC: Math.round(boilC * 100) / 100 } };
  const verdict = calibration && calibrationOf(calibration);
  const problems = save.isError ? fieldProblems(save.error) : [];
  const take = (point: Point) => (shownC: number) => {
    save.reset();
    setTaken((before) => ({ ...before, [point]: shownC }));
  };
  const refusalAt = (point: Point) =>
    verdict?.kind === 'refused' && verdict.at === point ? calibrationRefusalWords[verdict.reason] : null;
  return (
    // A stray touch outside must not throw away a point that took ten minutes.
    <Dialog
      isOpen
      onClose={() => (Object.keys(taken).length > 0 ? undefined : onClose())}
      size="wide"
      title={`Calibrate ${probe.name}`}
    >
      <div className="grid gap-6">
        <ProbeLiveView live={live} />
        {live.error ? (
          <Banner tone="act" title="The readings cannot be fetched">
            {failureWords(live.error)}
          </Banner>
        ) : null}
        <PointToTake
          title="In ice water"
          trueC={0}
          live={live}
          takenC={taken.low}
          onTake={take('low')}
          error={refusalAt('low')}
        >
          Crushed ice packed in a cup, water up to its top, stirred. Hold the probe in the middle, off the wall.
        </PointToTake>
        <PointToTake
          title="At the boil"
          trueC={boilC}
          live={live}
          takenC={taken.high}
          onTake={take('high')}
          error={refusalAt('high')}
          below={
            <>
              <CautionMark mark={cautionWords.scald.mark}>{cautionWords.scald.text}</CautionMark>
              <div className="max-w-96">
                <QuantityField
                  kind={hectopascal}
                  label="Barometer here, if there is one"
                  hint="In this room, not reduced to the sea. Empty: by altitude, so the weather is not in it."
                  value={pressureKPa}
                  onChange={setPressureKPa}
                  error={isPressureRight ? undefined : `A number from ${LOWEST_KPA * 10} to ${HIGHEST_KPA * 10}.`}
                />
              </div>
            </>
          }
        >
          A rolling boil, the probe in the middle of the water, away from the heated bottom.
        </PointToTake>
        {verdict?.kind === 'accepted' ? (
          <Result correction={verdict.correction} boilC={boilC} boilK={hasPressure ? BOIL_K : WEATHER_K} temp={temp} />
        ) : null}
        {save.isError ? (
          <Banner tone="act" title="The calibration was not saved">
            {problems.length > 0 ? problems.map(({ detail }) => detail).join(' ') : failureWords(save.error)}
          </Banner>
        ) : null}
        <div className="flex flex-wrap gap-3">
          {verdict?.kind === 'accepted' ? (
            <Button
              look="primary"
              onClick={() => save.mutate({ calibration }, { onSuccess: onClose })}
              isBusy={save.isPending}
              busyLabel="Saving"
            >
              Save the calibration
            </Button>
          ) : null}
          <Button onClick={onClose}>Close</Button>
        </div>
      </div>
    </Dialog>
  );
}

interface PointToTakeProps {
  title: string;
  trueC: number;
  live: ProbeLive;
  takenC: number | undefined;
  onTake: (shownC: number) => void;
  error: string | null;
  /** How to make it. */
  children: ReactNode;
  below?: ReactNode;
}

/** One water that is known. It is taken when the probe stands still in it. */
function PointToTake({ title, trueC, live, takenC, onTake, error, children, below }: PointToTakeProps) {
  const { temperature: unit } = useUnits();
  const [refusal, setRefusal] = useState<string | null>(null);
  const tryTake = () => {
    const { meanC, isSteady } = live.steady;
    if (live.isSilent || meanC === null) return setRefusal('No reading comes in, so there is nothing to take.');
    if (Math.abs(meanC - trueC) > OTHER_WATER_K)
      return setRefusal(`It shows ${formatTemp(meanC, { unit })}: that is not this water yet.`);
    if (!isSteady) return setRefusal('It still moves. Wait until it says steady.');
    setRefusal(null);
    onTake(meanC);
  };
  const said = refusal ?? error;
  return (
    <section aria-label={title} className="grid gap-4 border-t-2 border-hair pt-5">
      <div className="flex flex-wrap items-center gap-x-6 gap-y-3">
        <div className="min-w-60 flex-1">
          <h3 className="text-lead font-semibold">
            {title}: <span className="tabular-nums">{formatTemp(trueC, { unit })}</span>
          </h3>
          <p className="text-soft">{children}</p>
        </div>
        <div className="flex items-center gap-4">
          {takenC === undefined ? null : (
            <p className="text-lead tabular-nums">
              shows <span className="font-semibold">{formatTemp(takenC, { unit, digits: 2 })}</span>
            </p>
          )}
          <Button onClick={tryTake} look={live.steady.isSteady && takenC === undefined ? 'primary' : 'plain'}>
            {takenC === undefined ? 'Take it' : 'Take it again'}
            <span className="sr-only"> {title.toLowerCase()}</span>
          </Button>
        </div>
      </div>
      {said ? (
        <p role="alert" className="font-medium text-ember">
          {said}
        </p>
      ) : null}
      {below}
    </section>
  );
}

function Result({
  correction,
  boilC,
  boilK,
  temp,
}: {
  correction: ProbeCorrection;
  boilC: number;
  boilK: number;
  temp: (tempC: number, digits?: number) => string;
}) {
  const { temperature: unit } = useUnits();
  const becomesC = correctedTempC(SHOWN_AT_C, correction);
  const sureK = 2 * correctionUncertaintyK(SHOWN_AT_C, { boilC, iceK: ICE_K, boilK });
  const sure = unit === 'F' ? kelvinToFahrenheitDegrees(sureK) : sureK;
  return (
    <div role="status" className="border-l-8 border-text bg-raised px-5 py-4">
      <p className="text-title tabular-nums">
        {temp(SHOWN_AT_C)} shown is {temp(becomesC)}
      </p>
      <p className="mt-1 tabular-nums text-soft">
        Give or take {sure.toFixed(1)} °{unit} there. Readings from now on are kept corrected, with what the probe sent
        beside them; those before stay as they are.
      </p>
    </div>
  );
}
