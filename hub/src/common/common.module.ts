import { Global, Module, StandardSchemaSerializerInterceptor } from '@nestjs/common';
import { APP_FILTER, APP_GUARD, APP_INTERCEPTOR, APP_PIPE } from '@nestjs/core';
import { AccessGuard } from './access/access.guard.js';
import { Clock } from './clock.js';
import { ProblemFilter } from './errors/problem.filter.js';
import { ProblemValidationPipe } from './http/validation.pipe.js';

/** What every door has in common. Guard, pipe and interceptor also run for socket messages; the filter does not. */
@Global()
@Module({
  providers: [
    Clock,
    { provide: APP_GUARD, useClass: AccessGuard },
    { provide: APP_PIPE, useClass: ProblemValidationPipe },
    { provide: APP_FILTER, useClass: ProblemFilter },
    { provide: APP_INTERCEPTOR, useClass: StandardSchemaSerializerInterceptor },
  ],
  exports: [Clock],
})
export class CommonModule {}
