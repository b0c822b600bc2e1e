import express, { type Express, type NextFunction, type Request, type Response } from 'express';
import type { Desk } from '../core/desk.js';
import { ApiError, missing } from '../core/errors.js';
import { PLATFORM } from '../core/store.js';
import { FAULT_MODES, type Faults } from '../http/faults.js';
import type { Courier } from '../webhooks/courier.js';
import { MISCHIEFS, type MischiefMaker } from '../webhooks/mischief.js';
import type { Delivery, Outbox } from '../webhooks/outbox.js';
import { asBody, BadHook, type Body, textOf, wholeNumber, word, wordsOf } from './body.js';
import { moneyHooks } from './money-hooks.js';

export interface HookTools {
  desk: Desk;
  mischief: MischiefMaker;
  outbox: Outbox;
  courier: Courier;
  faults: Faults;
  /** Does what time has made due and starts deliveries. */
  tick: () => void;
}

export type Hook = (body: Body, params: Readonly<Record<string, string>>) => object | Promise<object>;

/** Endpoints under /_test that make the outside world behave: time, networks, banks. The real service has none of them. */
export function mountTestHooks(app: Express, tools: HookTools): void {
  app.use('/_test', refuseOtherOrigins, express.json({ limit: '64kb' }));
  const hooks = { ...clockHooks(tools), ...deliveryHooks(tools), ...faultHooks(tools), ...moneyHooks(tools) };
  for (const [path, hook] of Object.entries(hooks)) app.post(`/_test/${path}`, answer(tools, hook));
  app.get('/_test/clock', (_request, response) => {
    response.json({ nowMs: tools.desk.clock.nowMs() });
  });
  app.get('/_test/deliveries', (_request, response) => {
    const rows = tools.desk.store.sql('SELECT * FROM deliveries ORDER BY seq DESC LIMIT 1000').all() as Delivery[];
    response.json({ deliveries: rows });
  });
}

function clockHooks(tools: HookTools): Record<string, Hook> {
  return {
    clock: async (body) => {
      tools.desk.clock.advance(wholeNumber(body, 'advanceMs', 0));
      tools.tick();
      await tools.courier.settled();
      return { nowMs: tools.desk.clock.nowMs() };
    },
  };
}

function deliveryHooks(tools: HookTools): Record<string, Hook> {
  return {
    mischief: (body) => {
      tools.mischief.add({
        mode: word(body, 'mode', MISCHIEFS),
        types: wordsOf(body, 'types'),
        times: wholeNumber(body, 'times', 1),
        delayMs: wholeNumber(body, 'delayMs', 0),
      });
      return { rules: tools.mischief.rules };
    },
    'mischief/clear': () => {
      tools.mischief.clear();
      return { rules: [] };
    },
    'deliveries/release': async (body) => {
      const released = tools.desk.store.transaction(() => tools.outbox.release({ reversed: body.reversed === true }));
      await tools.courier.settled();
      return { released };
    },
    'deliveries/settle': async () => {
      await tools.courier.settled();
      return { settled: true };
    },
    'events/:id/resend': async (_body, params) => {
      const id = params.id ?? '';
      const account = tools.desk.store.accountOf(id) ?? PLATFORM;
      const event = tools.desk.store.find('event', id, account);
      if (!event) throw missing('event', id);
      const deliveries = tools.desk.store.transaction(() => tools.outbox.resend(event, account));
      await tools.courier.settled();
      return { deliveries };
    },
  };
}

function faultHooks(tools: HookTools): Record<string, Hook> {
  return {
    faults: (body) => {
      const error = {
        error: { type: 'api_error', message: 'The payment service is out of order (asked for by a test).' },
      };
      tools.faults.add({
        mode: word(body, 'mode', FAULT_MODES),
        match: textOf(body, 'match', ''),
        times: wholeNumber(body, 'times', 1),
        status: wholeNumber(body, 'status', 500),
        body: JSON.stringify(body.body ?? error),
        kept: body.kept === true,
        delayMs: wholeNumber(body, 'delayMs', 0),
      });
      return { faults: tools.faults.list };
    },
    'faults/clear': () => {
      tools.faults.clear();
      return { faults: [] };
    },
  };
}

function answer(tools: HookTools, hook: Hook) {
  return async (request: Request, response: Response): Promise<void> => {
    try {
      const params = Object.fromEntries(Object.entries(request.params).map(([name, value]) => [name, String(value)]));
      response.json(await hook(asBody(request.body ?? {}), params));
    } catch (error) {
      if (error instanceof BadHook) response.status(400).json({ error: { type: 'test_hook', message: error.message } });
      else if (error instanceof ApiError) response.status(error.status).json(error.body());
      else throw error;
    } finally {
      tools.courier.wake();
    }
  };
}

/** Some other page in the same browser must not be able to push these buttons. */
function refuseOtherOrigins(request: Request, response: Response, next: NextFunction): void {
  const origin = request.get('origin');
  if (origin === undefined || origin === `http://${request.get('host') ?? ''}`) next();
  else response.status(403).json({ error: { type: 'test_hook', message: 'Not from another page.' } });
}
