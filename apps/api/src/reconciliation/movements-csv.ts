/**
 * Movements from a CSV file (RFC 4180) with the fields of the provider's balance transactions as columns, in any order:
 * `id,type,reporting_category,source,payment_intent,amount,fee,net,currency,created,available_on,description`. Amounts are
 * whole minor units, times ISO 8601 or whole seconds since 1970.
 */
import type { FieldError } from '@skyberth/shared';
import type { ProviderMovement } from '../payments/provider-books.port.js';

const NEEDED = ['id', 'type', 'amount', 'fee', 'net', 'currency', 'created'] as const;
const MOST_ROWS = 20_000;

export type ReadCsv =
  | { readonly ok: true; readonly movements: readonly ProviderMovement[] }
  | { readonly ok: false; readonly errors: readonly FieldError[] };

/** Reads the whole file or says what is wrong with it, line by line. */
export function readMovementsCsv(text: string): ReadCsv {
  const [head, ...rows] = cellsOf(text.replace(/^\uFEFF/, ''));
  const columns = new Map((head ?? []).map((name, index) => [name.trim().toLowerCase(), index]));
  const missing = NEEDED.filter((name) => !columns.has(name));
  if (missing.length > 0) return refuse(1, `The first line lacks the columns ${missing.join(', ')}.`);
  if (rows.length > MOST_ROWS) return refuse(MOST_ROWS + 2, `A file takes at most ${MOST_ROWS} movements.`);
  const errors: FieldError[] = [];
  const movements = rows.flatMap((cells, index) => {
    const of = (name: string) => cells[columns.get(name) ?? -1]?.trim() ?? '';
    const read = movementOf(of);
    if (typeof read !== 'string') return [read];
    errors.push({ pointer: `/lines/${index + 2}`, detail: `Line ${index + 2}: ${read}` });
    return [];
  });
  return errors.length > 0 ? { ok: false, errors } : { ok: true, movements };
}

const refuse = (line: number, detail: string): ReadCsv => ({
  ok: false,
  errors: [{ pointer: `/lines/${line}`, detail }],
});

/** The movement, or what is wrong with the line. */
function movementOf(of: (name: string) => string): ProviderMovement | string {
  const [id, type, currency] = [of('id'), of('type'), of('currency').toUpperCase()];
  if (!/^[A-Za-z0-9_]{3,80}$/.test(id)) return 'the id is missing or is none.';
  if (!/^[A-Z]{3}$/.test(currency)) return `“${of('currency')}” is no currency.`;
  const [amountMinor, feeMinor, netMinor] = [wholeOf(of('amount')), wholeOf(of('fee')), wholeOf(of('net'))];
  if (amountMinor === null || feeMinor === null || netMinor === null) return 'amounts are whole minor units.';
  if (netMinor !== amountMinor - feeMinor) return `${amountMinor} less ${feeMinor} is not ${netMinor}.`;
  const atMs = timeOf(of('created'));
  if (atMs === null) return `“${of('created')}” is no time.`;
  return {
    id,
    type,
    category: of('reporting_category') || type,
    sourceId: of('source') || null,
    intentId: of('payment_intent') || null,
    amountMinor,
    feeMinor,
    netMinor,
    currency,
    atMs,
    availableMs: timeOf(of('available_on')) ?? atMs,
    description: of('description').slice(0, 500),
  };
}

function wholeOf(text: string): number | null {
  const value = Number(text);
  return /^-?\d{1,15}$/.test(text) && Number.isSafeInteger(value) ? value : null;
}

function timeOf(text: string): number | null {
  const ms = /^\d{9,11}$/.test(text) ? Number(text) * 1000 : Date.parse(text);
  return text === '' || Number.isNaN(ms) ? null : ms;
}

/** Lines of cells; quotes may hold commas, line ends and doubled quotes. Empty lines are left out. */
function cellsOf(text: string): string[][] {
  const rows: string[][] = [];
  let row: string[] = [];
  for (const match of text.matchAll(/(?:"((?:[^"]|"")*)"|([^",\r\n]*))(,|\r?\n|$)/g)) {
    const [whole, quoted, plain = '', end] = match;
    if (whole === '' && row.length === 0) continue;
    row.push(quoted === undefined ? plain : quoted.replaceAll('""', '"'));
    if (end === ',') continue;
    if (row.some((cell) => cell !== '')) rows.push(row);
    row = [];
  }
  return rows;
}
