import { Injectable, StandardSchemaValidationPipe, type ArgumentMetadata } from '@nestjs/common';
import { errorsOfIssues, ProblemError } from '@steepfall/shared/problems';

/** Nest's own pipe, answering with our problems: every issue, not only the first. */
@Injectable()
export class ProblemValidationPipe extends StandardSchemaValidationPipe {
  constructor() {
    super({
      exceptionFactory: (issues) => {
        const errors = errorsOfIssues(issues);
        const count = errors.length === 1 ? 'One field does' : `${errors.length} fields do`;
        return new ProblemError('not-valid', `${count} not fit.`, { errors });
      },
    });
  }

  override async transform<T>(value: T, metadata: ArgumentMetadata): Promise<T> {
    if (metadata.type === 'body' && metadata.schema && (value === undefined || value === null))
      throw new ProblemError('not-readable', 'Send a JSON body, with "Content-Type: application/json".');
    try {
      return await super.transform(value, metadata);
    } catch (error) {
      // An id that cannot be one names nothing.
      if (metadata.type === 'param' && error instanceof ProblemError)
        throw new ProblemError('not-found', 'There is nothing at this address.');
      throw error;
    }
  }
}
