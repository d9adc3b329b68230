import type { NestExpressApplication } from '@nestjs/platform-express';
import express, { type NextFunction, type Request, type Response } from 'express';
import { join } from 'node:path';

/** Names that carry a hash of their content never change; everything else is asked for again each time. */
function cacheControlOf(path: string): string {
  return /[/\\]assets[/\\]/.test(path) ? 'public, max-age=31536000, immutable' : 'no-cache';
}

const isPage = (path: string) =>
  !/^\/(api|socket\.io)(\/|$)/.test(path) && !/\.[a-z0-9]+$/i.test(path) && !path.startsWith('/assets/');

/** Serves the built tablet, and its `index.html` for every address that is a screen of it. */
export function serveTablet(app: NestExpressApplication, tabletDist: string): void {
  app.use(
    express.static(tabletDist, {
      index: 'index.html',
      redirect: false,
      setHeaders: (response, path) => response.setHeader('Cache-Control', cacheControlOf(path)),
    }),
  );
  app.use((request: Request, response: Response, next: NextFunction) => {
    if ((request.method !== 'GET' && request.method !== 'HEAD') || !isPage(request.path)) return next();
    response.setHeader('Cache-Control', 'no-cache');
    response.sendFile(join(tabletDist, 'index.html'), (error) => {
      if (error) next(error);
    });
  });
}
