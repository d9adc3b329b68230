/** Calcium and magnesium in the liquid, free and bound, mol/L. */
export interface CitrateMetals {
  calciumMolPerL: number;
  magnesiumMolPerL: number;
}

/**
 * log10 of the constants with the free metal, hydrogen and citrate ions at no ionic strength and 25 °C, by hydrogens taken
 * along: 2, 1, 0 (USGS minteq.v4). Held at other temperatures.
 */
const logBound = { calcium: [12.257, 9.26, 4.87], magnesium: [12.2, 8.91, 4.89] } as const;
/** What a bound species adds to the sum of charges squared, its metal's own four taken off. */
const SQUARES = [0, -3, -4, -3] as const;
/** From the left it climbs to the root, and doubles its digits near it. */
const STEPS = 60;

/** `betas[i]` for the species that carries i charges of the citrate, before activities. */
export interface BindingMetal {
  molPerL: number;
  betas: readonly number[];
}

/** @param citrateBeta product of the three constants of citric acid. */
export function bindingMetals(
  { calciumMolPerL, magnesiumMolPerL }: CitrateMetals,
  citrateBeta: number,
): BindingMetal[] {
  const metal = (molPerL: number, logs: readonly number[]) => ({
    molPerL,
    betas: [0, ...logs.map((log) => citrateBeta * 10 ** log)],
  });
  return [metal(calciumMolPerL, logBound.calcium), metal(magnesiumMolPerL, logBound.magnesium)].filter(
    ({ molPerL }) => molPerL > 0,
  );
}

/** Weights of an acid's free species, summed: as such, times their charge, and times its square. */
export interface LadderSums {
  weights: number;
  charges: number;
  squares: number;
}

interface Bound extends LadderSums {
  molPerL: number;
  strength: number;
}

function boundSums({ molPerL, betas }: BindingMetal, aH: number, g1: number, g2: number): Bound {
  const sums = { molPerL, weights: 0, charges: 0, squares: 0, strength: 0 };
  for (let i = 1; i < betas.length; i += 1) {
    const weight = ((betas[i] ?? 0) * g2) / (i === 2 ? 1 : g1) / aH ** i;
    sums.weights += weight;
    sums.charges += i * weight;
    sums.squares += i * i * weight;
    sums.strength += (SQUARES[i] ?? 0) * weight;
  }
  return sums;
}

/** The undissociated acid that is left when metals take their part: free and bound add up to what went in. */
function undissociated(molPerL: number, free: LadderSums, bound: readonly Bound[]): number {
  let x = molPerL / bound.reduce((sum, metal) => sum + metal.molPerL * metal.weights, free.weights);
  for (let step = 0; step < STEPS; step += 1) {
    let missing = molPerL - x * free.weights;
    let slope = free.weights;
    for (const metal of bound) {
      const filled = 1 + x * metal.weights;
      missing -= (x * metal.molPerL * metal.weights) / filled;
      slope += (metal.molPerL * metal.weights) / filled ** 2;
    }
    const move = missing / slope;
    x += move;
    if (Math.abs(move) <= 1e-15 * x) return x;
  }
  return x;
}

export interface ComplexedCharge {
  /** Negative charge that the acid took on, eq/L. */
  chargeEqPerL: number;
  /** By how much that grows with one natural logarithm less of hydrogen ion, eq/L. */
  slopeEqPerL: number;
  /** What acid and bound metals add to the sum of charges squared, mol/L. */
  squaresMolPerL: number;
}

/**
 * Charge of citric acid in the presence of calcium and magnesium, which hold its ions and so free hydrogen.
 *
 * @see mass action with both mass balances; the slope is their exact derivative.
 */
export function complexedCharge(
  molPerL: number,
  free: LadderSums,
  metals: readonly BindingMetal[],
  { aH, g1, g2 }: { aH: number; g1: number; g2: number },
): ComplexedCharge {
  const bound = metals.map((metal) => boundSums(metal, aH, g1, g2));
  const x = undissociated(molPerL, free, bound);
  let charge = x * free.charges;
  let squares = x * free.squares;
  let chargeByH = x * free.squares;
  let chargeByX = free.charges;
  let totalByH = x * free.charges;
  let totalByX = free.weights;
  for (const metal of bound) {
    const filled = 1 + x * metal.weights;
    const taken = (metal.molPerL * x) / filled;
    charge += taken * metal.charges;
    squares += taken * metal.strength;
    chargeByH += taken * (metal.squares - (x * metal.charges ** 2) / filled);
    chargeByX += (metal.molPerL * metal.charges) / filled ** 2;
    totalByH += (taken * metal.charges) / filled;
    totalByX += (metal.molPerL * metal.weights) / filled ** 2;
  }
  return {
    chargeEqPerL: charge,
    slopeEqPerL: chargeByH - (chargeByX * totalByH) / totalByX,
    squaresMolPerL: squares,
  };
}
