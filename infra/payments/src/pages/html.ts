import type { Response } from 'express';
import { shownDigits } from '../core/currencies.js';

/** Text that is HTML already; everything else is escaped by `html`. */
export class Markup {
  constructor(readonly text: string) {}
}

type Piece = string | number | null | undefined | Markup | readonly Markup[];

/** A template tag that escapes what is put into it, so that a page cannot forget to. */
export function html(strings: TemplateStringsArray, ...pieces: Piece[]): Markup {
  return new Markup(
    strings.reduce((text, part, index) => text + (index > 0 ? piece(pieces[index - 1]) : '') + part, ''),
  );
}

function piece(value: Piece): string {
  if (value instanceof Markup) return value.text;
  if (Array.isArray(value)) return value.map((item: Markup) => item.text).join('');
  return String(value ?? '').replace(/[&<>"']/g, (letter) => `&#${letter.charCodeAt(0)};`);
}

export function money(amountMinor: number, currency: string): string {
  const digits = shownDigits(currency);
  const sign = amountMinor < 0 ? '-' : '';
  const text = String(Math.abs(amountMinor)).padStart(digits + 1, '0');
  const whole = text.slice(0, text.length - digits);
  return `${sign}${whole}${digits === 0 ? '' : `.${text.slice(-digits)}`} ${currency.toUpperCase()}`;
}

export function utc(seconds: number): string {
  return new Date(seconds * 1000).toISOString().slice(0, 19).replace('T', ' ');
}

export interface PageOptions {
  title: string;
  status?: number;
  /** Origins besides our own that a form's answer may lead the browser to. */
  formTargets?: readonly string[];
}

const STYLE = `
:root { color-scheme: light dark; --paper: #f5f2ea; --ink: #14303a; --line: #b9c4c2; --deep: #0e5a6b; --warn: #8f2f1d; }
@media (prefers-color-scheme: dark) { :root { --paper: #10242c; --ink: #e9efe9; --line: #3d565e; --deep: #8fc9c2; --warn: #ff9b85; } }
* { box-sizing: border-box; }
body { margin: 0; background: var(--paper); color: var(--ink); font: 16px/1.5 system-ui, sans-serif; font-variant-numeric: tabular-nums; }
.notice { padding: .5rem 1rem; border-bottom: 3px double var(--line); font-weight: 600; }
main { max-width: 76rem; margin: 0 auto; padding: 1rem; }
main.narrow { max-width: 30rem; }
h1 { font-size: 1.4rem; } h2 { font-size: 1.1rem; margin-top: 2rem; }
table { border-collapse: collapse; width: 100%; font-size: .9rem; }
th, td { text-align: left; padding: .3rem .6rem; border-bottom: 1px solid var(--line); overflow-wrap: anywhere; }
td.money { text-align: right; white-space: nowrap; }
label { display: block; margin: .6rem 0 0; }
input { width: 100%; padding: .5rem; font: inherit; color: inherit; background: transparent; border: 1px solid var(--line); border-radius: 4px; }
button { padding: .5rem .9rem; font: inherit; cursor: pointer; border: 1px solid var(--deep); border-radius: 4px; background: transparent; color: var(--deep); }
button.main { background: var(--deep); color: var(--paper); width: 100%; margin-top: 1rem; }
.row { display: flex; gap: .75rem; } .row > * { flex: 1; }
.buttons { display: flex; flex-wrap: wrap; gap: .5rem; }
.problem { border-left: 4px solid var(--warn); padding: .25rem .75rem; color: var(--warn); }
.scroll { overflow-x: auto; }
a { color: var(--deep); }
:focus-visible { outline: 3px solid var(--deep); outline-offset: 2px; }
`;

export function sendStyle(response: Response): void {
  response.type('text/css').send(STYLE);
}

/** Sends a page without scripts; the rules in its headers keep it that way. */
export function sendPage(response: Response, options: PageOptions, body: Markup): void {
  const targets = ["'self'", ...(options.formTargets ?? [])].join(' ');
  response.set({
    'content-security-policy': `default-src 'none'; style-src 'self'; form-action ${targets}; frame-ancestors 'none'; base-uri 'none'`,
    'referrer-policy': 'no-referrer',
    'x-content-type-options': 'nosniff',
    'cache-control': 'no-store',
  });
  const page = html`<!doctype html>
<html lang="en">
<head>
<meta charset="utf-8">
<meta name="viewport" content="width=device-width, initial-scale=1">
<title>${options.title}</title>
<link rel="stylesheet" href="/style.css">
</head>
<body>
<div class="notice">Local payment stand-in. No real money moves here. Never enter the number of a real card.</div>
${body}
</body>
</html>`;
  response
    .status(options.status ?? 200)
    .type('text/html')
    .send(page.text);
}
