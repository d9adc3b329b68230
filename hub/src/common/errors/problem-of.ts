import { HttpException } from '@nestjs/common';
import { ProblemError, problem, type Problem, type ProblemType } from '@steepfall/shared/problems';
import { ConnectionAcquireTimeoutError, ConnectionError, DatabaseError, UniqueConstraintError } from 'sequelize';

/** What is told to the client, and whether the error is one that nobody foresaw and belongs in the log. */
export interface Translated {
  problem: Problem;
  isUnexpected: boolean;
}

const typeOfStatus: Partial<Record<number, ProblemType>> = {
  400: 'not-readable',
  401: 'not-signed-in',
  403: 'not-allowed',
  404: 'not-found',
  413: 'too-large',
  415: 'not-readable',
  422: 'not-valid',
  429: 'too-many-tries',
};

const detailOfType: Partial<Record<ProblemType, string>> = {
  'not-readable': 'The body is not JSON that can be read.',
  'not-found': 'There is nothing at this address.',
  'too-large': 'Send less at once.',
};

/** Errors of Express and its body parser carry a status, and texts that are not meant for clients. */
function statusOf(error: unknown): number | null {
  if (error instanceof HttpException) return error.getStatus();
  const { status, expose } = error as { status?: unknown; expose?: unknown };
  return typeof status === 'number' && expose === true ? status : null;
}

/** The pool has no connection to give, or the one in use broke in the middle of a statement. */
function isConnectionGone(error: unknown): boolean {
  if (error instanceof ConnectionError || error instanceof ConnectionAcquireTimeoutError) return true;
  return error instanceof DatabaseError && (error.original as { fatal?: boolean }).fatal === true;
}

/** Turns anything thrown into a problem. Texts of unforeseen errors stay in the log. */
export function problemOf(error: unknown): Translated {
  if (error instanceof ProblemError) return { problem: error.toProblem(), isUnexpected: false };
  if (error instanceof UniqueConstraintError)
    return {
      problem: problem('already-exists', 'Something with the same name or number is there already.'),
      isUnexpected: false,
    };
  if (isConnectionGone(error))
    return {
      problem: problem('unavailable', 'The database does not answer. Try again in a moment.'),
      isUnexpected: true,
    };
  const status = error instanceof Object ? statusOf(error) : null;
  const type = status === null ? undefined : typeOfStatus[status];
  if (type) return { problem: problem(type, detailOfType[type] ?? ''), isUnexpected: false };
  return {
    problem: problem('internal-error', 'The hub has written down what happened. Try again.'),
    isUnexpected: true,
  };
}
