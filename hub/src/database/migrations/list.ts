import type { Sequelize } from 'sequelize-typescript';
import { foundation } from './0001-foundation.js';

export interface Migration {
  name: string;
  up: (sequelize: Sequelize) => Promise<void>;
}

/** One line, forwards only: a new migration goes to the end. */
export const migrations: Migration[] = [foundation];
