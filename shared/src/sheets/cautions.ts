import type { Caution } from './step.js';

/** The words of a caution: a short mark for the step, and what to do. Local codes and qualified people come first. */
export const cautionWords: Record<Caution, { mark: string; text: string }> = {
  scald: {
    mark: 'Scalds at once',
    text: 'Gloves on, lid away from you, lift slowly. If scalded: cool running water at once, and call for help.',
  },
  co2: {
    mark: 'CO₂',
    text: 'Open a window or run the fan. CO₂ is heavier than air and pools low. If someone is down, do not go in: call the emergency number.',
  },
  pressure: {
    mark: 'Under pressure',
    text: 'Vent, then open. Never pass the pressure stamped on the keg or the regulator, and never block a relief valve.',
  },
  acid: { mark: 'Acid', text: 'Goggles and gloves. Acid goes into water, never water into acid.' },
  dogs: {
    mark: 'Keep hops from dogs',
    text: 'Spent hops: sealed bag, lidded bin. If a dog has eaten any, call a vet now.',
  },
  lift: { mark: 'Heavy', text: 'A full keg is a two-person lift, or a trolley.' },
  caffeine: { mark: 'Caffeine', text: 'Holds caffeine from the tea. Write it on the keg tag.' },
  allergens: {
    mark: 'Shared kit',
    text: 'If this kit is shared with grain, nuts or dairy, say so on the keg tag.',
  },
  cold: { mark: 'Keep cold', text: 'Into the fridge without delay, and write down when. Follow your local food code.' },
  burner: { mark: 'Flame', text: 'Never leave a lit burner. Never burn gas made for outdoors in a room.' },
};
