import { expect } from 'vitest';
import type { Response } from 'supertest';
import { problemCatalogue, type ProblemType } from '@steepfall/shared/problems';

/** Asserts that an answer is this problem, in the one shape, and with these bad fields (in any order) when some are named. */
export function expectProblem(response: Response, type: ProblemType, pointers?: string[]): void {
  expect(response.body).toMatchObject({ type: `/problems/${type}` });
  expect(response.status).toBe(problemCatalogue[type].status);
  expect(response.headers['content-type']).toContain('application/problem+json');
  if (!pointers) return;
  const { errors = [] } = response.body as { errors?: { pointer: string }[] };
  expect(errors.map(({ pointer }) => pointer).sort()).toEqual([...pointers].sort());
}
