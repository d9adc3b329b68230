import { ConsoleLogger } from '@nestjs/common';
import { NestFactory } from '@nestjs/core';
import type { NestExpressApplication } from '@nestjs/platform-express';
import cookieParser from 'cookie-parser';
import { json, type NextFunction, type Request, type Response } from 'express';
import helmet from 'helmet';
import { AppModule } from './app.module.js';
import type { HubConfig } from './config/environment.js';
import { serveOpenApi } from './open-api.js';
import { serveTablet } from './serve-tablet.js';
import { strictTransport } from './trust/strict-transport.js';
import { serveTrustCheck } from './trust/trust-check.js';

/**
 * The device door takes ten thousand readings in one call, the runs door five hundred events; the stores take a file of two million
 * letters, of which each is up to three bytes.
 */
const WIDE_DOORS = { '/api/device': '2mb', '/api/runs': '2mb', '/api/stores/import': '7mb' };
const USUAL_BODY = '256kb';

/**
 * The whole hub, ready to listen. Tests start the same one.
 * @param tls as PEM; with it the hub speaks HTTPS and nothing else
 */
export async function createApp(
  config: HubConfig,
  tls?: { key: string; cert: string },
): Promise<NestExpressApplication> {
  const app = await NestFactory.create<NestExpressApplication>(AppModule.forRoot(config), {
    httpsOptions: tls,
    bodyParser: false,
    abortOnError: false,
    forceCloseConnections: true,
    logger: new ConsoleLogger({
      json: true,
      logLevels: config.logLevels,
      flattenParams: true,
      redact: ['password', 'accessToken', 'deviceToken', 'refreshToken', 'followToken', 'authorization', 'cookie'],
    }),
  });
  app.enableShutdownHooks();
  app.set('query parser', 'simple');
  app.set('trust proxy', config.trustedProxies);
  app.disable('x-powered-by');
  app.use(
    helmet({
      contentSecurityPolicy: {
        useDefaults: false,
        directives: {
          defaultSrc: ["'self'"],
          scriptSrc: ["'self'"],
          // Positions and sizes of charts and pop-ups are set as styles of elements.
          styleSrc: ["'self'", "'unsafe-inline'"],
          imgSrc: ["'self'", 'data:', 'blob:'],
          fontSrc: ["'self'"],
          connectSrc: ["'self'"],
          mediaSrc: ["'self'", 'data:', 'blob:'],
          workerSrc: ["'self'", 'blob:'],
          manifestSrc: ["'self'"],
          objectSrc: ["'none'"],
          baseUri: ["'none'"],
          formAction: ["'self'"],
          frameAncestors: ["'none'"],
        },
      },
      // Not for every name that leads here: see `strictTransport`.
      strictTransportSecurity: false,
      // Both need a secure context and only warn without one.
      crossOriginOpenerPolicy: false,
      originAgentCluster: false,
    }),
  );
  app.use(strictTransport);
  // Answers of the API are of this moment and of this member: nothing in between keeps them.
  app.use('/api', (_: Request, response: Response, next: NextFunction) => {
    response.setHeader('Cache-Control', 'no-store');
    next();
  });
  for (const [door, limit] of Object.entries(WIDE_DOORS)) app.use(door, json({ limit }));
  app.use(json({ limit: USUAL_BODY }));
  app.use(cookieParser());
  app.setGlobalPrefix('api');
  if (config.lan !== null) serveTrustCheck(app);
  if (config.tabletDist !== null) serveTablet(app, config.tabletDist);
  serveOpenApi(app);
  return app;
}
