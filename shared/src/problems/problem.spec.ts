import { describe, expect, it } from 'vitest';
import { z } from 'zod';
import { errorsOfIssues, problem, ProblemError, problemSchema, problemTypeOf } from './index.js';

describe(problem, () => {
  it('has the shape of RFC 9457', () => {
    const made = problem('not-found', 'There is no such recipe.', { instance: '/api/recipes/7' });
    expect(problemSchema.parse(made)).toEqual({
      type: '/problems/not-found',
      title: 'Not found',
      status: 404,
      detail: 'There is no such recipe.',
      instance: '/api/recipes/7',
    });
  });
});

describe(problemTypeOf, () => {
  it('names what this build knows, and nothing else', () => {
    expect(problemTypeOf(problem('last-owner', ''))).toBe('last-owner');
    expect(problemTypeOf({ ...problem('last-owner', ''), type: '/problems/of-tomorrow' })).toBeNull();
    expect(problemTypeOf({ ...problem('last-owner', ''), type: 'about:blank' })).toBeNull();
  });
});

describe(ProblemError, () => {
  it('carries its extras', () => {
    const errors = [{ pointer: '/name', detail: 'Give it a name.' }];
    expect(new ProblemError('not-valid', 'No.', { errors }).toProblem()).toMatchObject({ status: 422, errors });
  });
});

describe(errorsOfIssues, () => {
  it('points at every bad field', () => {
    const result = z
      .object({ 'a/b': z.number(), list: z.array(z.object({ name: z.string() })) })
      .safeParse({ 'a/b': 'x', list: [{ name: 'ok' }, {}] });
    expect(errorsOfIssues(result.error!.issues).map(({ pointer }) => pointer)).toEqual(['/a~1b', '/list/1/name']);
  });
});
