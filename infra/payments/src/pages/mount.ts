import type { Express } from 'express';
import type { Desk } from '../core/desk.js';
import type { Api } from '../http/api.js';
import type { Courier } from '../webhooks/courier.js';
import type { Outbox } from '../webhooks/outbox.js';

export interface PageTools {
  desk: Desk;
  api: Api;
  outbox: Outbox;
  courier: Courier;
}

/** The pages a person sees: what the service holds, card entry, confirmation. */
export function mountPages(_app: Express, _tools: PageTools): void {}
