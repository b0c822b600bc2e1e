import { badParameter } from '../core/errors.js';
import type { Input } from '../core/input.js';

/** An http(s) address, or null when the parameter is absent. */
export function readUrl(input: Input, field: string): string | null {
  const text = input.text(field);
  if (text === undefined) return null;
  const url = URL.canParse(text) ? new URL(text) : undefined;
  if (url?.protocol !== 'http:' && url?.protocol !== 'https:')
    throw badParameter(input.name(field), `Not a valid URL: ${text}`, 'url_invalid');
  return text;
}

const OWN_HOSTS: readonly string[] = ['127.0.0.1', 'localhost', '[::1]'];

/** True for addresses on this machine and for hosts that were explicitly trusted at the start. */
export function staysTrusted(address: string, trustedHosts: readonly string[]): boolean {
  if (!URL.canParse(address)) return false;
  const url = new URL(address);
  const web = url.protocol === 'http:' || url.protocol === 'https:';
  return web && url.username === '' && url.password === '' && [...OWN_HOSTS, ...trustedHosts].includes(url.hostname);
}
