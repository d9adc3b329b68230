import { readdirSync, readFileSync } from 'node:fs';
import { join, relative } from 'node:path';
import { describe, expect, it } from 'vitest';

const root = join(import.meta.dirname, '../..');
const files = readdirSync(root, { recursive: true, encoding: 'utf8' })
  .filter((path) => path.endsWith('.ts') && !path.endsWith('.spec.ts'))
  .map((path) => ({ path: relative(root, join(root, path)), text: readFileSync(join(root, path), 'utf8') }));

/** Work of the hub itself that has no house yet: who signs in, whose token it is, what goes on after a restart. */
const MAY_CROSS_HOUSES = [
  'follow/follow-links.service.ts',
  'members/members.service.ts',
  'probes/probes.service.ts',
  'runs/run-log.service.ts',
  'sessions/sessions.service.ts',
];

const ownedModels = files.flatMap(({ text }) =>
  [...text.matchAll(/class (\w+) extends HouseOwnedModel/g)].map(([, name]) => name!),
);
const QUERY =
  'findAll|findOne|findByPk|findOrCreate|findAndCountAll|count|max|min|sum|create|bulkCreate|update|upsert|destroy|increment|decrement|truncate';

describe('rows of a house', () => {
  it('are all known here', () => {
    expect(ownedModels).toEqual(
      expect.arrayContaining([
        ...['Membership', 'Equipment', 'Recipe', 'RecipeRevision', 'Batch'],
        ...['Ingredient', 'Lot', 'LotMove', 'LotReservation', 'Attachment'],
        ...['FollowLink', 'PushSubscriber'],
      ]),
    );
  });

  it.each(files)('$path reaches them through the house scope only', ({ path, text }) => {
    if (path.startsWith('common/house-scope/')) return;
    // Names under which this file holds an owned model: the class itself, and what it is injected as.
    const names = ownedModels.flatMap((model) => [
      model,
      ...[...text.matchAll(new RegExp(`(\\w+): typeof ${model}\\b`, 'g'))].map(([, name]) => `this\\.${name}`),
    ]);
    const direct = new RegExp(`(?<![\\w.])(${names.join('|')})\\s*\\.(${QUERY})\\(`);
    expect(direct.exec(text)?.[0]).toBeUndefined();
  });

  it('are looked at across houses in few places', () => {
    const crossing = files.filter(({ path, text }) => text.includes('acrossHouses(') && !path.startsWith('common/'));
    expect(crossing.map(({ path }) => path).sort()).toEqual(MAY_CROSS_HOUSES);
  });
});
