import express, { type Express, type NextFunction, type Request, type Response } from 'express';
import type { Message, MessageStore } from './message-store.js';
import { listPage, messagePage, missingPage, STYLE } from './pages.js';

const LOCAL_HOST = /^(127\.0\.0\.1|localhost|\[::1\])(:\d+)?$/;
const LIST_DEFAULT = 100;
const LIST_MAX = 1000;

/** Pages and JSON to read what was sent. */
export function buildWeb(store: MessageStore): Express {
  const app = express();
  app.disable('x-powered-by');
  app.use(protect);
  app.get('/health', (_request, response) => {
    response.json({ status: 'ok' });
  });
  app.get('/style.css', (_request, response) => {
    response.type('text/css').send(STYLE);
  });
  app.get('/', (request, response) => {
    const to = textOf(request.query.to);
    response.send(listPage(store.list({ to, limit: LIST_DEFAULT }), to));
  });
  app.get(
    '/messages/:id',
    withMessage(store, (message, _request, response) => response.send(messagePage(message))),
  );
  app.get('/messages/:id/html', withMessage(store, sendHtml));
  app.get('/messages/:id/attachments/:index', withMessage(store, sendAttachment));
  app.get('/api/messages', (request, response) => {
    const limit = Number(textOf(request.query.limit) ?? LIST_DEFAULT);
    if (!Number.isInteger(limit) || limit < 1 || limit > LIST_MAX) {
      response.status(400).json({ error: `limit must be a whole number from 1 to ${LIST_MAX}` });
      return;
    }
    response.json({ messages: store.list({ to: textOf(request.query.to), limit }) });
  });
  app.get(
    '/api/messages/:id',
    withMessage(store, (message, _request, response) => {
      const { contents: _contents, ...shown } = message;
      response.json(shown);
    }),
  );
  app.get('/api/messages/:id/attachments/:index', withMessage(store, sendAttachment));
  app.delete('/api/messages', (request, response) => {
    const site = request.get('sec-fetch-site');
    if (site !== undefined && site !== 'same-origin') {
      response.status(403).json({ error: 'not from another page' });
      return;
    }
    store.clear();
    response.status(204).end();
  });
  return app;
}

function protect(request: Request, response: Response, next: NextFunction): void {
  if (!LOCAL_HOST.test(request.get('host') ?? '')) {
    response.status(421).type('text/plain').send('This service answers only to local names.');
    return;
  }
  response.set({
    'content-security-policy':
      "default-src 'none'; style-src 'self'; frame-src 'self'; base-uri 'none'; form-action 'none'",
    'x-content-type-options': 'nosniff',
    'referrer-policy': 'no-referrer',
    'cache-control': 'no-store',
  });
  next();
}

type Show = (message: Message, request: Request, response: Response) => void;

function withMessage(store: MessageStore, show: Show) {
  return async (request: Request, response: Response): Promise<void> => {
    const message = await store.read(String(request.params.id));
    if (message) show(message, request, response);
    else if (request.path.startsWith('/api/')) response.status(404).json({ error: 'there is no such message' });
    else response.status(404).send(missingPage());
  };
}

/** The message's own HTML: sandboxed by the frame and once more by its headers, with inline styles and nothing else. */
function sendHtml(message: Message, _request: Request, response: Response): void {
  response.set('content-security-policy', "sandbox; default-src 'none'; style-src 'unsafe-inline'; img-src data:");
  response.type('text/html').send(message.html ?? '');
}

/** Always a download, whatever type the sender claims, so that nothing in a mail can run on our origin. */
function sendAttachment(message: Message, request: Request, response: Response): void {
  const index = Number(request.params.index);
  const info = message.attachments[index];
  const content = message.contents[index];
  if (!info || !content) {
    response.status(404).type('text/plain').send('There is no such attachment.');
    return;
  }
  response.attachment(info.name);
  response.set('content-type', info.contentType);
  response.send(content);
}

function textOf(value: unknown): string | undefined {
  return typeof value === 'string' && value !== '' ? value : undefined;
}
