import { applyDecorators, HttpCode, SerializeOptions } from '@nestjs/common';
import { ApiResponse } from '@nestjs/swagger';
import { problemSchema } from '@steepfall/shared/problems';
import type { z } from 'zod';

/** Says what a handler answers: for the OpenAPI document, and held against every real answer (a miss is a 500). */
export function Answers(
  schema: z.ZodType,
  { status = 200, isArray = false }: { status?: number; isArray?: boolean } = {},
) {
  return applyDecorators(
    HttpCode(status),
    SerializeOptions({ schema }),
    ApiResponse({ status, standardSchema: isArray ? schema.array() : schema, description: 'Done' }),
    ApiResponse({ status: 'default', standardSchema: problemSchema, description: 'A problem (RFC 9457)' }),
  );
}
/** For handlers that answer a list: the schema is that of one item. */
export const AnswersList = (schema: z.ZodType) => Answers(schema, { isArray: true });

/** For handlers that answer with no body. */
export function AnswersNothing() {
  return applyDecorators(
    HttpCode(204),
    ApiResponse({ status: 204, description: 'Done' }),
    ApiResponse({ status: 'default', standardSchema: problemSchema, description: 'A problem (RFC 9457)' }),
  );
}

/** For handlers that answer with a file of this media type. */
export function AnswersFile(mediaType: string) {
  const schema = { type: 'string', format: 'binary' };
  return applyDecorators(
    HttpCode(200),
    ApiResponse({ status: 200, content: { [mediaType]: { schema } }, description: 'Done' }),
    ApiResponse({ status: 'default', standardSchema: problemSchema, description: 'A problem (RFC 9457)' }),
  );
}
