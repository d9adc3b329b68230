import { mkdirSync } from 'node:fs';
import { resolve } from 'node:path';

/** The folder that each product puts its throw-away database in. */
export default function setup(): void {
  mkdirSync(resolve(import.meta.dirname, '../../.test-data'), { recursive: true });
}
