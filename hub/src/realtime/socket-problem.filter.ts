import { Catch, Logger, type ArgumentsHost, type ExceptionFilter } from '@nestjs/common';
import type { Socket } from 'socket.io';
import { problemOf } from '../common/errors/problem-of.js';
import { newId } from '../common/ids.js';

/** Renders everything thrown behind the socket door: as the acknowledgement when there is one, else as a `problem` message. Never silence. */
@Catch()
export class SocketProblemFilter implements ExceptionFilter {
  private readonly logger = new Logger('Problem');

  catch(error: unknown, host: ArgumentsHost): void {
    const { problem, isUnexpected } = problemOf(error);
    const told = { ...problem, traceId: newId() };
    const facts = { traceId: told.traceId, type: told.type, message: host.switchToWs().getPattern() };
    if (isUnexpected)
      this.logger.error('problem.unexpected', error instanceof Error ? error.stack : String(error), facts);
    else this.logger.debug('problem.told', facts);
    const acknowledge = host
      .getArgs<unknown[]>()
      .find((argument): argument is (answer: unknown) => void => typeof argument === 'function');
    if (acknowledge) acknowledge({ problem: told });
    else host.switchToWs().getClient<Socket>().emit('problem', told);
  }
}
