import { volumeAtTemperatureL } from '../figures/index.js';
import type { Addition, KettleFacts, RecipeDocument } from '../sheets/index.js';
import { measurableAtMostL, measurableL, weighableG } from './rounding.js';

export interface ScaleOptions {
  /** What the scale shows, g; without it masses are not rounded. */
  resolutionG?: number;
}

/** What a recipe document may hold (`recipeDocumentSchema`). */
const MOST_DRINK_L = 500;
const MOST_WATER_L = 600;
const MOST_MASS_G = 100_000;

/**
 * The recipe for another volume of drink. Grams per litre of water stay as they are, save for additions that keep their grams; times and
 * temperatures never change: sum the planned curve of the other kettle again. Water is rounded to three figures, masses to the scale,
 * and nothing is rounded to nothing.
 *
 * @param volumeL drink wanted, above 0 to 500 L; kept as it is typed.
 * @throws RangeError outside that range, and when water or an addition passes what a recipe may hold.
 * @see scaledMassG.
 */
export function scaleToVolume(document: RecipeDocument, volumeL: number, options: ScaleOptions = {}): RecipeDocument {
  if (!(volumeL > 0 && volumeL <= MOST_DRINK_L)) {
    throw new RangeError(`Scale to a volume above 0 and at most ${MOST_DRINK_L} L.`);
  }
  const isSame = volumeL === document.volumeL;
  return scaled(document, {
    volumeL,
    waterL: isSame ? document.waterL : measurableL((document.waterL * volumeL) / document.volumeL),
    ...options,
  });
}

interface Volumes extends ScaleOptions {
  volumeL: number;
  waterL: number;
}

function scaled(document: RecipeDocument, { volumeL, waterL, resolutionG }: Volumes): RecipeDocument {
  if (waterL > MOST_WATER_L) throw new RangeError(`That takes more than ${MOST_WATER_L} L of water: choose less.`);
  const additions = document.additions.map((addition): Addition => {
    if (addition.keeps === 'mass') return addition;
    const massG = weighableG(addition.massG, document.waterL, waterL, resolutionG);
    if (massG > MOST_MASS_G) throw new RangeError(`That takes more than 100 kg of ${addition.name}: choose less.`);
    return { ...addition, massG };
  });
  return { ...document, volumeL, waterL, additions };
}

/** Free height under the rim: room to stir, and for what rises when leaf goes in (a judgement). */
export const KETTLE_HEADROOM_RATIO = 0.1;
/** What dry leaf or hops push aside once they are wet through, L per g (a judgement: plant matter is a little denser than water). */
const LEAF_SPACE_L_PER_G = 0.001;

/**
 * How far the kettle fills at its hottest, L: the water as it stands at the steep temperature, and the leaf and hops in it.
 *
 * @see volumeAtTemperatureL; leaf 1 mL a gram is a judgement.
 */
export function hotVolumeL({ waterL, steepC, additions }: RecipeDocument): number {
  const leafG = additions
    .filter(({ kind, in: { at } }) => (kind === 'tea' || kind === 'hops' || kind === 'other') && at !== 'transfer')
    .reduce((sum, { massG }) => sum + massG, 0);
  return volumeAtTemperatureL(waterL, 20, Math.max(20, steepC)) + leafG * LEAF_SPACE_L_PER_G;
}

export interface KettleScaling {
  document: RecipeDocument;
  /** Whether the recipe already fills the kettle, or had to become smaller or larger to do so. */
  kind: 'fits' | 'shrunk' | 'grown';
}

/**
 * The recipe for as much as a kettle takes: hot, with its leaf, under the headroom. It stays as it is when it already fills the kettle
 * to within a twentieth.
 *
 * @throws RangeError when the additions that keep their grams alone fill the kettle, or as `scaleToVolume`.
 */
export function scaleToKettle(
  document: RecipeDocument,
  kettle: KettleFacts,
  options: ScaleOptions = {},
): KettleScaling {
  const roomL = kettle.volumeL * (1 - KETTLE_HEADROOM_RATIO);
  const hotL = hotVolumeL(document);
  if (hotL <= roomL && hotL >= roomL * 0.95) return { document, kind: 'fits' };
  const kept = document.additions.filter(({ keeps }) => keeps === 'mass');
  const keptL = hotVolumeL({ ...document, additions: kept }) - hotVolumeL({ ...document, additions: [] });
  if (keptL >= roomL) throw new RangeError('What keeps its grams fills this kettle alone: choose a larger one.');
  const ratio = (roomL - keptL) / (hotL - keptL);
  const waterL = measurableAtMostL(Math.min(MOST_WATER_L, document.waterL * ratio));
  const volumeL = measurableAtMostL(Math.min(MOST_DRINK_L, (document.volumeL * waterL) / document.waterL));
  return {
    document: scaled(document, { volumeL, waterL, ...options }),
    kind: waterL < document.waterL ? 'shrunk' : 'grown',
  };
}
