import type { AcidAddition } from '../acid/acids.js';
import type { TemperatureCurve } from '../curve/temperature-curve.js';
import type { LeafForm } from '../tea/extraction.js';
import type { CaffeineClass } from '../tea/caffeine.js';
import type { TeaKind } from '../tea/steep-dose.js';
import type { IonsMgPerL } from '../water/ions.js';
import type { SaltAddition } from '../water/salts.js';

/** Something in the liquid from one instant of the curve to another. */
interface InLiquid {
  massG: number;
  inAtMs: number;
  outAtMs: number;
  /** Base of this lot over the default; 1 unless a measured pH told better (lotMultiplier). */
  baseMultiplier?: number;
  /** True when that multiplier comes from a measured pH: the band of the pH then shrinks to 0.1 either way. */
  isBaseMeasured?: boolean;
}

export interface TeaAddition extends InLiquid {
  kind: TeaKind;
  /** Unless told: that of `kind`. */
  caffeineClass?: CaffeineClass;
  /** Told by its maker or a laboratory, 0 to 100 mg/g; it goes before the class. */
  caffeineMgPerG?: number;
  form: LeafForm;
}

export interface HopAddition extends InLiquid {
  /** Alpha acids today, % of mass (alphaNowPercent). */
  alphaPercent: number;
  storageIndex?: number;
  /** Whole cones hold more of the drink than pellets; pellets unless told. */
  isCones?: boolean;
}

/** Everything the figures of one drink need: planned at the desk, or as it happened. */
export interface DrinkPlan {
  /** In the kettle, L at 20 °C. */
  waterL: number;
  source: IonsMgPerL;
  salts: readonly SaltAddition[];
  acids: readonly AcidAddition[];
  /** True when the acid goes in after the hops: they then meet a higher pH. */
  acidAfterHops?: boolean;
  teas: readonly TeaAddition[];
  hops: readonly HopAddition[];
  /** Peel, spice, flower in the kettle: it holds drink like leaf, and is in no other sum. */
  othersG?: number;
  /** Planned (planCurve) or recorded. */
  curve: TemperatureCurve;
  evaporatedL: number;
  deadSpaceL: number;
  servingMl: number;
  gas: { volumes: number; tempC: number; stationKPa?: number };
}
