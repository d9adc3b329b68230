import { describe, expect, it } from 'vitest';
import { may, permissionTable, roleSchema, type Permission } from './roles.js';

const permissions = Object.keys(permissionTable) as Permission[];

describe(may, () => {
  it('lets an owner do everything', () => {
    expect(permissions.filter((permission) => !may('owner', permission))).toEqual([]);
  });

  it('lets nobody manage what they may not read', () => {
    for (const role of roleSchema.options) {
      for (const permission of permissions.filter((name) => name.endsWith(':manage'))) {
        const read = permission.replace(':manage', ':read') as Permission;
        expect(may(role, permission) && !may(role, read), `${role} ${permission}`).toBe(false);
      }
    }
  });

  it('keeps a taster blind', () => {
    const allowed = permissions.filter((permission) => may('taster', permission));
    expect(allowed).toEqual(['house:read']);
  });

  it('lets a hand act and rehearse, and not write recipes', () => {
    expect(may('hand', 'runs:act') && may('hand', 'rehearsals:start')).toBe(true);
    expect(may('hand', 'recipes:manage')).toBe(false);
  });
});
