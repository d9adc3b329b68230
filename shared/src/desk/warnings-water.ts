import { chargeBalance, saltKinds, undissolvedSalts, waterFromReport, type HazeFlag } from '../figures/index.js';
import type { RowContext } from './figure-row.js';
import type { DeskWarning } from './types.js';
import { pathOf, warning, wordsIn } from './warning.js';

export function waterWarnings(context: RowContext): DeskWarning[] {
  return [
    ...reportWarnings(context),
    ...brackishWarnings(context),
    ...floorWarnings(context),
    ...context.figures.haze.map((flag) => hazeWarning(context, flag)),
  ];
}

function reportWarnings({ document }: RowContext): DeskWarning[] {
  return document.waters.flatMap(({ id, name, percent, report }, index) => {
    const { verdict, imbalancePercent } = chargeBalance(waterFromReport(report));
    if (percent === 0 || verdict === 'balanced') return [];
    const size = Math.abs(imbalancePercent).toFixed(0);
    return [
      warning(`water-unbalanced.${id}`, 'care', `waters.${index}.report`, {
        what: `The plus and minus charges of ${name} differ by ${size} %.`,
        why: 'In water they are equal. Something in the report is missing, or stands in another unit.',
        act:
          verdict === 'refused'
            ? 'Type the report again: above 20 % its numbers say nothing about the pH.'
            : 'Ask for the report again, and look whether the alkalinity is as HCO₃ or as CaCO₃.',
      }),
    ];
  });
}

function brackishWarnings({ document, figures }: RowContext): DeskWarning[] {
  if (figures.water.salinity !== 'brackish') return [];
  const salt = document.additions.filter((one) => one.kind === 'salt').sort((a, b) => b.massG - a.massG)[0];
  return [
    warning('brackish', 'care', pathOf(document, salt ?? null, 'massG') ?? 'waters', {
      what: 'The treated water holds more than 1 g of salts in a litre: it is brackish.',
      why: 'It tastes of salt whatever is put in.',
      act: 'Take less salt, or blend with reverse-osmosis water.',
    }),
  ];
}

function floorWarnings({ document, plan, units }: RowContext): DeskWarning[] {
  const { mass, volume } = wordsIn(units);
  return undissolvedSalts(plan.waterL, plan.salts).map(({ salt, leftG }) => {
    const line = document.additions.find((one) => one.kind === 'salt' && one.salt === salt) ?? null;
    const { gives } = saltKinds[salt];
    const takesAcid = 'oh' in gives || 'hco3' in gives;
    return warning(`salt-on-the-floor.${salt}`, 'care', pathOf(document, line, 'massG'), {
      what: `About ${mass(leftG)} of ${line?.name ?? 'the salt'} will not dissolve in ${volume(plan.waterL)} of plain water.`,
      why: 'It lies on the floor of the pot, and the figures count it as dissolved.',
      act: takesAcid
        ? 'Put it in together with the acid, which dissolves it and is used up by it; or leave it out.'
        : 'Take less of it, or part of it as another salt.',
    });
  });
}

function hazeWarning({ document, figures, units }: RowContext, flag: HazeFlag): DeskWarning {
  const { mgPerL, temp } = wordsIn(units);
  const calciumSalt = document.additions.find((one) => one.kind === 'salt' && 'ca' in saltKinds[one.salt].gives);
  const path = pathOf(document, calciumSalt ?? null, 'massG');
  switch (flag.kind) {
    case 'calcium':
      return warning('calcium-haze', 'care', path, {
        what: `Calcium is at ${mgPerL(figures.water.ions.ca)}; above 40 mg/L ${flag.level === 'red' ? 'strong black tea clouds' : 'green and white tea may cloud'}.`,
        why: 'Calcium meets the acids of tea, oxalic acid first: haze at once, sediment over days.',
        act: 'Take part of the calcium as a magnesium or sodium salt, or let the keg rest and draw off the first glass.',
      });
    case 'film':
      return warning('film', 'note', path, {
        what: `Hardness is ${mgPerL(figures.water.hardnessAsCaCo3)} as CaCO₃: a film may stand on the tea.`,
        why: 'Polyphenols and calcium make a skin where the tea meets air. Acid weakens it.',
        act: 'Keep the lid on, put the acid in before the leaf, or soften the water.',
      });
    case 'cold-rest':
      return warning('tea-cream', 'note', 'gas.tempC', {
        what: 'The drink will cloud as it gets cold.',
        why: `Polyphenols and caffeine come together below about ${temp(10)} (tea cream), and hop resin falls out with them.`,
        act: 'Let the keg rest cold for a day, then draw off the sediment.',
      });
  }
}
