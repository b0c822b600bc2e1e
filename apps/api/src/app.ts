/** Builds the HTTP application; `main.ts` and the tests start it. */
import 'reflect-metadata';
import { existsSync } from 'node:fs';
import type { IncomingMessage } from 'node:http';
import { join } from 'node:path';
import { NestFactory } from '@nestjs/core';
import type { NestExpressApplication } from '@nestjs/platform-express';
import { FILE_LIMITS, routes } from '@skyberth/shared';
import cookieParser from 'cookie-parser';
import type { NextFunction, Request, Response } from 'express';
import helmet from 'helmet';
import { AppModule } from './app.module.js';
import { type ClockPort, systemClock } from './platform/clock.js';
import type { Config } from './platform/config.js';

/** Element files are large, and ephemerides the largest thing anyone sends. */
const BODY_LIMIT = '9mb';
const EPHEMERIS_LIMIT = '21mb';

export interface AppOptions {
  readonly clock?: ClockPort;
  readonly quiet?: boolean;
}

/** Creates the application without listening. Close it with `app.close()`, which stops jobs and the database. */
export async function createApp(config: Config, options: AppOptions = {}): Promise<NestExpressApplication> {
  const app = await NestFactory.create<NestExpressApplication>(
    AppModule.forRoot(config, options.clock ?? systemClock),
    {
      rawBody: true,
      logger: options.quiet ? false : ['error', 'warn', 'log'],
      abortOnError: false,
    },
  );
  app.useBodyParser('json', { limit: EPHEMERIS_LIMIT, type: holdsEphemeris });
  app.useBodyParser('json', { limit: BODY_LIMIT });
  app.useBodyParser('raw', { limit: FILE_LIMITS.bytes, type: isUpload });
  app.use(
    helmet({
      contentSecurityPolicy: { directives: contentPolicy() },
      strictTransportSecurity: config.publicUrl.startsWith('https:'),
    }),
  );
  app.use(cookieParser());
  app.set('query parser', 'simple');
  app.set('trust proxy', 'loopback');
  if (config.webDir) serveWeb(app, config.webDir);
  app.enableShutdownHooks();
  return app;
}

/** Only the route that keeps ephemerides takes so much. */
function holdsEphemeris({ url = '', headers }: IncomingMessage): boolean {
  const isJson = (headers['content-type'] ?? '').startsWith('application/json');
  return isJson && /^\/api\/spacecraft\/[^/?]+\/ephemerides(\?|$)/.test(url);
}

/** Bytes are taken on the one route that stores files. */
function isUpload({ url = '', headers }: IncomingMessage): boolean {
  return headers['content-type'] === routes.uploadFile.consumes && url.split('?')[0] === routes.uploadFile.path;
}

/** Everything comes from our own origin; Mantine sets styles on elements, hence inline styles. */
function contentPolicy(): Record<string, string[] | null> {
  return {
    defaultSrc: ["'self'"],
    scriptSrc: ["'self'"],
    styleSrc: ["'self'", "'unsafe-inline'"],
    imgSrc: ["'self'", 'data:', 'blob:'],
    fontSrc: ["'self'", 'data:'],
    connectSrc: ["'self'"],
    workerSrc: ["'self'", 'blob:'],
    objectSrc: ["'none'"],
    frameAncestors: ["'none'"],
    upgradeInsecureRequests: null,
  };
}

/** The built page: hashed files for a year, everything that is no file and not the API is the page itself. */
function serveWeb(app: NestExpressApplication, webDir: string): void {
  const page = join(webDir, 'index.html');
  if (!existsSync(page)) throw new Error(`There is no built page in ${webDir}. Run npm run build.`);
  app.useStaticAssets(webDir, {
    index: false,
    setHeaders: (response, path) => {
      response.setHeader(
        'Cache-Control',
        path.includes('/assets/') ? 'public, max-age=31536000, immutable' : 'no-cache',
      );
    },
  });
  app.use((request: Request, response: Response, next: NextFunction) => {
    const forPage = request.method === 'GET' && !request.path.startsWith('/api/') && request.accepts('html');
    if (!forPage) return next();
    response.setHeader('Cache-Control', 'no-cache');
    response.sendFile(page);
  });
}
