import type { NextFunction, Request, Response } from 'express';
import { isRealName } from './real-name.js';

const YEAR_S = 365 * 24 * 60 * 60;

/** Tells a browser that came by HTTPS under a public name to come no other way. */
export function strictTransport(request: Request, response: Response, next: NextFunction): void {
  if (request.secure && isRealName(request.hostname ?? ''))
    response.setHeader('Strict-Transport-Security', `max-age=${YEAR_S}`);
  next();
}
