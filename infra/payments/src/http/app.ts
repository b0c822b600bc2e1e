import express, { type Express, type NextFunction, type Request, type Response } from 'express';
import { ApiError } from '../core/errors.js';
import type { Api } from './api.js';

const BODY_LIMIT = '256kb';
const LOCAL_HOST = /^(127\.0\.0\.1|localhost|\[::1\])(:\d+)?$/;

/** The express application: payment API under /v1, everything else from the routers given. */
export function buildApp(api: Api, mount: (app: Express) => void): Express {
  const app = express();
  app.disable('x-powered-by');
  app.disable('etag');
  app.use(onlyLocalNames);
  app.get('/health', (_request, response) => {
    response.json({ status: 'ok' });
  });
  app.use('/v1', allowBrowsers);
  app.use(/^\/v1(?=\/|$)/, express.text({ type: () => true, limit: BODY_LIMIT }));
  app.all('/v1/*rest', api.handle);
  mount(app);
  app.use((_request, response) => {
    response.status(404).type('text/plain').send('There is nothing at this address.');
  });
  app.use(onBrokenRequest);
  return app;
}

/** A page elsewhere must not reach this service by giving its own name our address. */
function onlyLocalNames(request: Request, response: Response, next: NextFunction): void {
  if (LOCAL_HOST.test(request.get('host') ?? '')) next();
  else response.status(421).type('text/plain').send('This service answers only to local names.');
}

/** Card entry in a browser talks to /v1 directly with a publishable key, from whatever origin the product has. */
function allowBrowsers(request: Request, response: Response, next: NextFunction): void {
  response.set('access-control-allow-origin', '*');
  if (request.method !== 'OPTIONS') {
    next();
    return;
  }
  response.set({
    'access-control-allow-methods': 'GET, POST, DELETE',
    'access-control-allow-headers': 'authorization, content-type, idempotency-key, stripe-version',
    'access-control-max-age': '600',
  });
  response.status(204).end();
}

function onBrokenRequest(error: unknown, _request: Request, response: Response, _next: NextFunction): void {
  const status =
    typeof error === 'object' && error !== null && 'status' in error && typeof error.status === 'number'
      ? error.status
      : 500;
  if (status >= 500) console.error('payment stand-in:', error);
  const message = status === 413 ? `The request is larger than ${BODY_LIMIT}.` : 'The request could not be read.';
  response
    .status(status)
    .json(new ApiError(status, status >= 500 ? 'api_error' : 'invalid_request_error', message).body());
}
