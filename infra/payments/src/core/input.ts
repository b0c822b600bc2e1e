import type Stripe from 'stripe';
import { badParameter } from './errors.js';

type Raw = Readonly<Record<string, unknown>>;

const METADATA_KEYS_MAX = 50;
const METADATA_KEY_LENGTH_MAX = 40;
const METADATA_VALUE_LENGTH_MAX = 500;
const TEXT_LENGTH_MAX = 5000;

function isRecord(value: unknown): value is Raw {
  return typeof value === 'object' && value !== null && !Array.isArray(value);
}

/**
 * Reads the parameters of a request and remembers which ones it was asked for,
 * so that `done` can refuse what nobody reads: a misspelt parameter must not pass in silence.
 */
export class Input {
  readonly #read = new Set<string>();
  readonly #groups: Input[] = [];

  constructor(
    private readonly raw: Raw,
    private readonly path = '',
  ) {}

  name(field: string): string {
    return this.path === '' ? field : `${this.path}[${field}]`;
  }

  has(field: string): boolean {
    return Object.hasOwn(this.raw, field);
  }

  /** Text, or undefined where the parameter is absent. Empty text is refused. */
  text(field: string, maxLength = TEXT_LENGTH_MAX): string | undefined {
    const value = this.#take(field);
    if (value === undefined) return undefined;
    if (typeof value !== 'string') throw badParameter(this.name(field), `Invalid string: ${this.name(field)}`);
    if (value === '') {
      throw badParameter(
        this.name(field),
        `You passed an empty string for '${this.name(field)}'.`,
        'parameter_invalid_empty',
      );
    }
    if (value.length > maxLength) {
      throw badParameter(
        this.name(field),
        `'${this.name(field)}' must be at most ${maxLength} characters, not ${value.length}.`,
      );
    }
    return value;
  }

  requiredText(field: string, maxLength = TEXT_LENGTH_MAX): string {
    return this.#required(field, this.text(field, maxLength));
  }

  /** Text where empty means "unset it". */
  textOrNull(field: string, maxLength = TEXT_LENGTH_MAX): string | null | undefined {
    if (this.raw[field] === '') {
      this.#read.add(field);
      return null;
    }
    return this.text(field, maxLength);
  }

  integer(field: string): number | undefined {
    const value = this.text(field);
    if (value === undefined) return undefined;
    const number = Number(value);
    if (!/^-?\d+$/.test(value) || !Number.isSafeInteger(number)) {
      throw badParameter(this.name(field), `Invalid integer: ${value}`, 'parameter_invalid_integer');
    }
    return number;
  }

  requiredInteger(field: string): number {
    return this.#required(field, this.integer(field));
  }

  flag(field: string): boolean | undefined {
    const value = this.text(field);
    if (value === undefined || value === 'true' || value === 'false')
      return value === undefined ? undefined : value === 'true';
    throw badParameter(this.name(field), `Invalid boolean: ${value}`);
  }

  choice<T extends string>(field: string, options: readonly T[]): T | undefined {
    const value = this.text(field);
    if (value === undefined) return undefined;
    const found = options.find((option) => option === value);
    if (found === undefined) {
      throw badParameter(this.name(field), `Invalid ${this.name(field)}: must be one of ${options.join(', ')}`);
    }
    return found;
  }

  texts(field: string): string[] | undefined {
    const value = this.#take(field);
    if (value === undefined) return undefined;
    if (!Array.isArray(value) || !value.every((item) => typeof item === 'string')) {
      throw badParameter(this.name(field), `Invalid array: ${this.name(field)}`);
    }
    return value;
  }

  group(field: string): Input | undefined {
    const value = this.#take(field);
    if (value === undefined) return undefined;
    if (!isRecord(value)) throw badParameter(this.name(field), `Invalid object: ${this.name(field)}`);
    const group = new Input(value, this.name(field));
    this.#groups.push(group);
    return group;
  }

  /** A list of groups, such as `line_items[0][quantity]`. */
  groups(field: string): Input[] | undefined {
    const value = this.#take(field);
    if (value === undefined) return undefined;
    if (!Array.isArray(value) || !value.every(isRecord))
      throw badParameter(this.name(field), `Invalid array: ${this.name(field)}`);
    const groups = value.map((item, index) => new Input(item, `${this.name(field)}[${index}]`));
    this.#groups.push(...groups);
    return groups;
  }

  /** The stored metadata with the request's changes: an empty value unsets a key, an empty whole unsets all. */
  metadata(current: Stripe.Metadata = {}): Stripe.Metadata {
    const value = this.#take('metadata');
    if (value === undefined) return current;
    if (value === '') return {};
    if (!isRecord(value)) throw badParameter('metadata', 'Invalid object: metadata');
    const result = { ...current };
    for (const [key, item] of Object.entries(value)) {
      if (typeof item !== 'string') throw badParameter(`metadata[${key}]`, 'Metadata values must be strings.');
      if (key.length > METADATA_KEY_LENGTH_MAX || item.length > METADATA_VALUE_LENGTH_MAX) {
        throw badParameter(
          `metadata[${key}]`,
          `Metadata takes keys up to ${METADATA_KEY_LENGTH_MAX} and values up to ${METADATA_VALUE_LENGTH_MAX} characters.`,
        );
      }
      if (item === '') delete result[key];
      else result[key] = item;
    }
    if (Object.keys(result).length > METADATA_KEYS_MAX) {
      throw badParameter('metadata', `Metadata takes up to ${METADATA_KEYS_MAX} keys.`);
    }
    return result;
  }

  /** Refuses every parameter that was not read. */
  done(): void {
    for (const field of Object.keys(this.raw)) {
      if (!this.#read.has(field)) {
        throw badParameter(this.name(field), `Received unknown parameter: ${this.name(field)}`, 'parameter_unknown');
      }
    }
    for (const group of this.#groups) group.done();
  }

  #take(field: string): unknown {
    this.#read.add(field);
    return this.has(field) ? this.raw[field] : undefined;
  }

  #required<T>(field: string, value: T | undefined): T {
    if (value !== undefined) return value;
    throw badParameter(this.name(field), `Missing required param: ${this.name(field)}.`, 'parameter_missing');
  }
}
