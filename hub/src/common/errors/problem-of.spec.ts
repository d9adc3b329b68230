import { BadRequestException, NotFoundException } from '@nestjs/common';
import { ProblemError } from '@steepfall/shared/problems';
import { ConnectionRefusedError, DatabaseError, UniqueConstraintError } from 'sequelize';
import { describe, expect, it } from 'vitest';
import { problemOf } from './problem-of.js';

describe(problemOf, () => {
  it.each([
    [new ProblemError('last-owner', 'Mind this.'), '/problems/last-owner', false],
    [new NotFoundException('Cannot GET /secret'), '/problems/not-found', false],
    [new BadRequestException('x'), '/problems/not-readable', false],
    [Object.assign(new Error('too big'), { status: 413, expose: true }), '/problems/too-large', false],
    [Object.assign(new Error('decode'), { status: 400, expose: true }), '/problems/not-readable', false],
    [new UniqueConstraintError({}), '/problems/already-exists', false],
    [new ConnectionRefusedError(new Error('connect')), '/problems/unavailable', true],
    [
      new DatabaseError(Object.assign(new Error('socket closed'), { sql: '', fatal: true })),
      '/problems/unavailable',
      true,
    ],
    [
      new DatabaseError(Object.assign(new Error('syntax'), { sql: '', fatal: false })),
      '/problems/internal-error',
      true,
    ],
    [new Error('SELECT password FROM users'), '/problems/internal-error', true],
    [Object.assign(new Error('inner'), { status: 404, expose: false }), '/problems/internal-error', true],
    ['a string', '/problems/internal-error', true],
    [undefined, '/problems/internal-error', true],
  ])('%s becomes %s', (error, type, isUnexpected) => {
    expect(problemOf(error)).toMatchObject({ problem: { type }, isUnexpected });
  });

  it('tells nobody the text of an unforeseen error', () => {
    const told = [
      new Error('SELECT secret'),
      new NotFoundException('secret'),
      new ConnectionRefusedError(new Error('secret')),
    ];
    for (const error of told) expect(JSON.stringify(problemOf(error).problem)).not.toContain('secret');
  });
});
