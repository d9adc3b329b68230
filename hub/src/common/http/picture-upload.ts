import {
  applyDecorators,
  UploadedFile,
  UseInterceptors,
  type CallHandler,
  type ExecutionContext,
  type NestInterceptor,
} from '@nestjs/common';
import { FileInterceptor } from '@nestjs/platform-express';
import { ApiBody, ApiConsumes } from '@nestjs/swagger';
import { ProblemError } from '@steepfall/shared/problems';
import type { Request } from 'express';

const MEGABYTE = 1_000_000;
const MOST_MEGABYTES = 12;
const MOST_BYTES = MOST_MEGABYTES * MEGABYTE;
/** Boundaries and heads of the parts. */
const AROUND_BYTES = 16_384;

const pointed = (type: 'too-large' | 'not-valid', pointer: string, detail: string) =>
  new ProblemError(type, 'The photo was not kept.', { errors: [{ pointer, detail }] });

function uploadOf(field: string): new () => NestInterceptor {
  const pointer = `/${field}`;
  const tooLarge = () =>
    pointed('too-large', pointer, `At most ${MOST_MEGABYTES} MB: make the photo smaller, then send it again.`);
  return class extends FileInterceptor(field, { limits: { fileSize: MOST_BYTES, files: 1, parts: 4 } }) {
    override async intercept(context: ExecutionContext, next: CallHandler) {
      // Answered before it is read; what still comes is thrown away as it comes, so that the sender gets to see the answer.
      const request = context.switchToHttp().getRequest<Request>();
      if (Number(request.headers['content-length'] ?? 0) > MOST_BYTES + AROUND_BYTES) throw tooLarge();
      try {
        return await super.intercept(context, next);
      } catch (error) {
        const status = (error as { getStatus?: () => number }).getStatus?.();
        if (status === 413) throw tooLarge();
        // Nobody is there any more to read it; it is no fault of the hub either.
        if (status === undefined && !request.complete)
          throw new ProblemError('not-readable', 'The sending was broken off.');
        if (status === undefined || status >= 500) throw error;
        throw pointed(
          'not-valid',
          pointer,
          `Send one picture in the field "${field}" of a form (multipart/form-data).`,
        );
      }
    }
  };
}

/** A handler that takes a picture in this field of a form. */
export function TakesPicture(field: string) {
  return applyDecorators(
    UseInterceptors(uploadOf(field)),
    ApiConsumes('multipart/form-data'),
    ApiBody({
      required: true,
      schema: { type: 'object', required: [field], properties: { [field]: { type: 'string', format: 'binary' } } },
    }),
  );
}

/** The picture as it came: `@SentPicture('photo') sent: Buffer`. */
export const SentPicture = (field: string) =>
  UploadedFile({
    transform: (file?: { buffer: Buffer }) => {
      if (!file || file.buffer.length === 0) throw pointed('not-valid', `/${field}`, 'Choose a picture.');
      return file.buffer;
    },
  });
