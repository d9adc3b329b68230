import type { Sequelize } from 'sequelize-typescript';
import { foundation } from './0001-foundation.js';
import { runsAndProbes } from './0002-runs-and-probes.js';
import { recipeDesk } from './0003-recipe-desk.js';
import { stores } from './0004-stores.js';
import { kitAndUnits } from './0005-kit-and-units.js';
import { follow } from './0006-follow.js';
import { reach } from './0007-reach.js';

export interface Migration {
  name: string;
  up: (sequelize: Sequelize) => Promise<void>;
}

/** One line, forwards only: a new migration goes to the end. */
export const migrations: Migration[] = [foundation, runsAndProbes, recipeDesk, stores, kitAndUnits, follow, reach];
