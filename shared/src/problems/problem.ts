import { z } from 'zod';
import { problemCatalogue, type ProblemType } from './catalogue.js';

/** One error shape for HTTP and socket (RFC 9457, with `errors` and `traceId` as extension members). */
export const problemSchema = z
  .object({
    type: z.string(),
    title: z.string(),
    status: z.number().int(),
    detail: z.string(),
    instance: z.string().optional(),
    /** Each bad field, as a JSON pointer (RFC 6901) and what to do about it. */
    errors: z.array(z.object({ pointer: z.string(), detail: z.string() })).optional(),
    /** Finds the matching line in the hub's log. */
    traceId: z.string().optional(),
  })
  .meta({ id: 'Problem' });
export type Problem = z.infer<typeof problemSchema>;

/** The short name of a problem, from its `type` path; `null` for a type this build does not know. */
export function problemTypeOf(problem: Problem): ProblemType | null {
  const name = problem.type.replace(/^\/problems\//, '');
  return name in problemCatalogue ? (name as ProblemType) : null;
}

export interface ProblemExtras {
  instance?: string;
  errors?: { pointer: string; detail: string }[];
  traceId?: string;
}

/** Builds a problem of the catalogue; `detail` says what happened here and what to do about it. */
export function problem(type: ProblemType, detail: string, extras: ProblemExtras = {}): Problem {
  const { title, status } = problemCatalogue[type];
  return { type: `/problems/${type}`, title, status, detail, ...extras };
}

/** A problem on its way out. Deliberately not tied to HTTP: each door (HTTP, socket) renders it in its own way. */
export class ProblemError extends Error {
  override readonly name = 'ProblemError';
  constructor(
    readonly type: ProblemType,
    detail: string,
    readonly extras: ProblemExtras = {},
  ) {
    super(detail);
  }

  toProblem(): Problem {
    return problem(this.type, this.message, this.extras);
  }
}

/** One issue of a Standard Schema validation, in the part that is used here. */
interface SchemaIssue {
  message: string;
  path?: readonly (PropertyKey | { key: PropertyKey })[] | undefined;
}

/** Turns schema issues into `errors` members: every issue, not only the first. */
export function errorsOfIssues(issues: readonly SchemaIssue[]): { pointer: string; detail: string }[] {
  return issues.map((issue) => ({
    pointer: (issue.path ?? [])
      .map((part) => (typeof part === 'object' ? part.key : part))
      .map((key) => `/${String(key).replaceAll('~', '~0').replaceAll('/', '~1')}`)
      .join(''),
    detail: issue.message,
  }));
}
