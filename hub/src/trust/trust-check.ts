import type { NestExpressApplication } from '@nestjs/platform-express';
import type { Request, Response } from 'express';

/** Asked by the page about trusting, which is of another origin: it learns that there was an answer, and nothing else. */
export const TRUST_CHECK_PATH = '/trust-check';

export function serveTrustCheck(app: NestExpressApplication): void {
  app.use(TRUST_CHECK_PATH, (_: Request, response: Response) => {
    response.setHeader('Cache-Control', 'no-store');
    response.setHeader('Cross-Origin-Resource-Policy', 'cross-origin');
    response.status(204).end();
  });
}
