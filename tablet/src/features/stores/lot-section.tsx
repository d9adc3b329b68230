import { useState, type ReactNode } from 'react';
import { Disclosure, DisclosureButton, DisclosurePanel } from '@headlessui/react';
import type { Ingredient, Lot } from '@steepfall/shared/contracts';
import { formatMass } from '@steepfall/shared/units';
import { format } from 'date-fns';
import { Banner } from '#components/banner.tsx';
import { Button, buttonClass } from '#components/button.tsx';
import { classNames } from '#components/class-names.ts';
import { Menu } from '#components/menu.tsx';
import { StatusChip } from '#components/status-chip.tsx';
import { priceMass, useMoney } from '#lib/money.ts';
import { useUnits } from '#lib/units.ts';
import { calendarDay, failureWords } from '#lib/words.ts';
import { alphaTodayWords } from './alpha-today.ts';
import { LabelPhoto } from './label-photo.tsx';
import { EditLotDialog } from './lot-form.tsx';
import { LotLedger } from './lot-ledger.tsx';
import { CountLotDialog, UseLotDialog } from './move-dialogs.tsx';
import { lotMarksOf } from './stock-marks.ts';
import { useRemove } from './use-stores.ts';

type Asked = 'count' | 'use' | 'edit';

interface LotSectionProps {
  ingredient: Ingredient;
  lot: Lot;
  /** The one to use first. */
  isFirst: boolean;
  mayManage: boolean;
}

/** One delivery: what it says of itself, what is left of it, and every line that made it so. */
export function LotSection({ ingredient, lot, isFirst, mayManage }: LotSectionProps) {
  const { mass: unit } = useUnits();
  const [asked, setAsked] = useState<Asked | null>(null);
  const remove = useRemove('lots');
  const today = format(new Date(), 'yyyy-MM-dd');
  const close = () => setAsked(null);
  const freeG = lot.stockG - lot.reservedG;
  const hasPhotoPlace = lot.hasPhoto || mayManage;
  return (
    <li
      className={classNames(
        'grid gap-x-8 gap-y-4 border-t-2 border-hair py-6',
        hasPhotoPlace && 'md:grid-cols-[13rem_1fr]',
      )}
    >
      {hasPhotoPlace ? (
        <div className="order-last md:order-first">
          <LabelPhoto lot={lot} mayManage={mayManage} />
        </div>
      ) : null}
      <div className="grid min-w-0 content-start gap-4">
        <div className="flex flex-wrap items-baseline gap-x-6 gap-y-1">
          <h3 className="text-title break-all">{lot.code}</h3>
          <p className="text-lead font-semibold tabular-nums">{formatMass(lot.stockG, { unit })}</p>
          {lot.reservedG > 0 ? (
            <p className="text-body tabular-nums text-soft">
              {formatMass(lot.reservedG, { unit })} set aside, {formatMass(freeG, { unit })} free
            </p>
          ) : null}
          {lotMarksOf(lot, today).map(({ word, shape, tone }) => (
            <StatusChip key={word} shape={shape} tone={tone}>
              {word}
            </StatusChip>
          ))}
          {isFirst ? <p className="text-body font-medium">Use this one first.</p> : null}
        </div>
        {lot.stockG < 0 ? (
          <Banner
            title={`The book is ${formatMass(-lot.stockG, { unit })} short`}
            action={mayManage ? <Button onClick={() => setAsked('count')}>Count it</Button> : null}
          >
            More was used than was ever written in. Weigh what is left and count it, or receive the delivery that nobody
            wrote down.
          </Banner>
        ) : null}
        <LotFactList lot={lot} today={today} />
        <Disclosure>
          <div className="flex flex-wrap gap-3">
            {mayManage ? (
              <>
                <Button onClick={() => setAsked('count')}>
                  Count<span className="sr-only"> lot {lot.code}</span>
                </Button>
                <Button onClick={() => setAsked('use')}>
                  Use some<span className="sr-only"> of lot {lot.code}</span>
                </Button>
              </>
            ) : null}
            <DisclosureButton className={buttonClass('quiet', 'desk', mayManage ? '' : '-ml-5')}>
              Ledger<span className="sr-only"> of lot {lot.code}</span>
            </DisclosureButton>
            {mayManage ? (
              <Menu
                label={
                  <>
                    More<span className="sr-only"> for lot {lot.code}</span>
                  </>
                }
                choices={[
                  { label: 'Change what it says', onChoose: () => setAsked('edit') },
                  {
                    label: 'Take the lot off the shelf',
                    isDanger: true,
                    onChoose: () => remove.mutate({ id: lot.id, words: `Lot ${lot.code} taken off the shelf.` }),
                  },
                ]}
              />
            ) : null}
          </div>
          <DisclosurePanel>
            <LotLedger lot={lot} mayManage={mayManage} />
          </DisclosurePanel>
        </Disclosure>
        {remove.error ? (
          <p role="alert" className="font-medium text-ember">
            {failureWords(remove.error)}
          </p>
        ) : null}
      </div>
      {asked === 'count' ? <CountLotDialog lot={lot} onClose={close} /> : null}
      {asked === 'use' ? <UseLotDialog lot={lot} onClose={close} /> : null}
      {asked === 'edit' ? <EditLotDialog ingredient={ingredient} lot={lot} onClose={close} /> : null}
    </li>
  );
}

function LotFactList({ lot, today }: { lot: Lot; today: string }) {
  const money = useMoney();
  const units = useUnits();
  const { word, massKg } = priceMass[units.mass];
  const { receivedOn, bestBefore, pricePerKg, hops, note } = lot;
  return (
    <dl className="flex flex-wrap gap-x-10 gap-y-3 text-body">
      <Fact label="Received">{calendarDay(receivedOn)}</Fact>
      <Fact label="Best before">{bestBefore === null ? 'not said' : calendarDay(bestBefore)}</Fact>
      <Fact label="Price">{pricePerKg === null ? 'not known' : `${money(pricePerKg * massKg)} a ${word}`}</Fact>
      {hops ? (
        <>
          <Fact label="Alpha at harvest">{hops.alphaPercent} %</Fact>
          <Fact label="Alpha today">
            {alphaTodayWords(hops, today) ?? 'not known: add the storage index or the harvest day'}
          </Fact>
          {hops.oilMlPer100G === null ? null : <Fact label="Oil in 100 g">{hops.oilMlPer100G} mL</Fact>}
          {hops.harvestedOn === null ? null : <Fact label="Harvested">{calendarDay(hops.harvestedOn)}</Fact>}
          {hops.storageIndex === null ? null : <Fact label="Storage index">{hops.storageIndex}</Fact>}
        </>
      ) : null}
      {note ? <Fact label="Note">{note}</Fact> : null}
    </dl>
  );
}

function Fact({ label, children }: { label: string; children: ReactNode }) {
  return (
    <div>
      <dt className="text-note text-soft">{label}</dt>
      <dd className="tabular-nums">{children}</dd>
    </div>
  );
}
