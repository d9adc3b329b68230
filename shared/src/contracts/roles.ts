import { z } from 'zod';
import type { RunEventType } from '../runs/index.js';

export const roleSchema = z.enum(['owner', 'brewer', 'hand', 'taster', 'pourer']);
export type Role = z.infer<typeof roleSchema>;

/** Who may do what: the one table. The hub's guard enforces it, the tablet hides by it. */
export const permissionTable = {
  'house:read': ['owner', 'brewer', 'hand', 'taster', 'pourer'],
  'house:manage': ['owner'],
  'members:read': ['owner', 'brewer', 'hand', 'pourer'],
  'members:manage': ['owner'],
  'equipment:read': ['owner', 'brewer', 'hand'],
  'equipment:manage': ['owner', 'brewer'],
  'probes:read': ['owner', 'brewer', 'hand'],
  'probes:manage': ['owner', 'brewer'],
  'recipes:read': ['owner', 'brewer', 'hand'],
  'recipes:manage': ['owner', 'brewer'],
  'stores:read': ['owner', 'brewer', 'hand'],
  'stores:manage': ['owner', 'brewer'],
  // A taster tastes blind: batches and runs would tell them which keg is which.
  'batches:read': ['owner', 'brewer', 'hand', 'pourer'],
  'batches:manage': ['owner', 'brewer'],
  'runs:read': ['owner', 'brewer', 'hand'],
  'runs:act': ['owner', 'brewer', 'hand'],
  'rehearsals:start': ['owner', 'brewer', 'hand'],
} as const satisfies Record<string, readonly Role[]>;

export type Permission = keyof typeof permissionTable;
export const permissionSchema = z.enum(Object.keys(permissionTable) as [Permission, ...Permission[]]);

export function may(role: Role, permission: Permission): boolean {
  return (permissionTable[permission] as readonly Role[]).includes(role);
}

/** Events that only the hub writes: a device that sends one is refused. */
export const hubOnlyEventTypes: readonly RunEventType[] = ['run.started'];
