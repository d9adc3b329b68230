import { Catch, Logger, type ArgumentsHost, type ExceptionFilter } from '@nestjs/common';
import type { Request, Response } from 'express';
import { newId } from '../ids.js';
import { problemOf } from './problem-of.js';

/** Renders everything thrown behind the HTTP door as `application/problem+json`. */
@Catch()
export class ProblemFilter implements ExceptionFilter {
  private readonly logger = new Logger('Problem');

  catch(error: unknown, host: ArgumentsHost): void {
    const http = host.switchToHttp();
    const request = http.getRequest<Request>();
    const response = http.getResponse<Response>();
    const { problem, isUnexpected } = problemOf(error);
    const traceId = newId();
    const facts = { traceId, type: problem.type, method: request.method, path: request.path };
    if (isUnexpected)
      this.logger.error('problem.unexpected', error instanceof Error ? error.stack : String(error), facts);
    else this.logger.debug('problem.told', facts);
    if (response.headersSent) {
      response.end();
      return;
    }
    response
      .status(problem.status)
      .type('application/problem+json')
      .send(JSON.stringify({ ...problem, instance: problem.instance ?? request.originalUrl, traceId }));
  }
}
