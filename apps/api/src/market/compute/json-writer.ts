/**
 * Writes JSON as bytes, number by number. Turning hundreds of thousands of fractions into the shortest text that reads back,
 * as `JSON.stringify` must, costs more than finding the passes; here the decimals are known beforehand. The bytes lie in
 * shared memory, so that another thread can send them without a copy; they are never changed once written.
 */

const FIRST_BYTES = 65_536;
/** UTF-8 needs at most three bytes for a unit of a JavaScript string. */
const MOST_BYTES_A_UNIT = 3;
const LONGEST_NUMBER = 32;
const DAY_MS = 86_400_000;
const ZERO = 0x30;
const SCALES = [1, 10, 100, 1e3, 1e4, 1e5, 1e6, 1e7, 1e8] as const;

/** Text that stays where it was written, to be copied from there. */
export interface WrittenText {
  readonly bytes: Buffer;
  readonly from: number;
  readonly to: number;
}

export class JsonWriter {
  private bytes: Buffer;
  private at = 0;
  private day = Number.NaN;
  private dayText = '';

  constructor(capacity = FIRST_BYTES) {
    this.bytes = Buffer.from(new SharedArrayBuffer(capacity));
  }

  get length(): number {
    return this.at;
  }

  /** Text of which every character is ASCII and needs no escape, such as a key with its quotes. */
  ascii(text: string): void {
    this.reserve(text.length);
    const { bytes } = this;
    let at = this.at;
    for (let i = 0; i < text.length; i += 1) bytes[at++] = text.charCodeAt(i);
    this.at = at;
  }

  /** Anything else, as JSON. */
  json(value: unknown): void {
    const text = JSON.stringify(value);
    this.reserve(text.length * MOST_BYTES_A_UNIT);
    this.at += this.bytes.write(text, this.at);
  }

  /** A number rounded to so many decimals (0 to 8), without zeros at its end: what JSON has for the rounded number. */
  fixed(value: number, decimals: keyof typeof SCALES & number): void {
    if (!Number.isFinite(value)) throw new Error(`${value} has no place in JSON.`);
    this.reserve(LONGEST_NUMBER);
    let scaled = Math.round(value * (SCALES[decimals] as number));
    if (scaled < 0) {
      this.bytes[this.at++] = 0x2d;
      scaled = -scaled;
    }
    let places: number = decimals;
    while (places > 0 && scaled % 10 === 0) {
      scaled /= 10;
      places -= 1;
    }
    if (places === 0) {
      this.whole(scaled);
      return;
    }
    const scale = SCALES[places] as number;
    const whole = Math.floor(scaled / scale);
    this.whole(whole);
    this.bytes[this.at++] = 0x2e;
    this.padded(scaled - whole * scale, places);
  }

  /** An instant in quotes, to the millisecond, as `toISOString` has it. Years 0 to 9999. */
  utc(timeMs: number): void {
    this.reserve(LONGEST_NUMBER);
    const day = Math.floor(timeMs / DAY_MS);
    if (day !== this.day) {
      this.day = day;
      this.dayText = `"${new Date(timeMs).toISOString().slice(0, 11)}`;
    }
    this.ascii(this.dayText);
    const inDay = timeMs - day * DAY_MS;
    this.padded(Math.floor(inDay / 3_600_000), 2);
    this.bytes[this.at++] = 0x3a;
    this.padded(Math.floor(inDay / 60_000) % 60, 2);
    this.bytes[this.at++] = 0x3a;
    this.padded(Math.floor(inDay / 1_000) % 60, 2);
    this.bytes[this.at++] = 0x2e;
    this.padded(inDay % 1_000, 3);
    this.ascii('Z"');
  }

  copy({ bytes, from, to }: WrittenText): void {
    this.reserve(to - from);
    this.at += bytes.copy(this.bytes, this.at, from, to);
  }

  /** Everything since `from`. More may be written behind it. */
  since(from: number): WrittenText {
    return { bytes: this.bytes, from, to: this.at };
  }

  private whole(value: number): void {
    let digits = 1;
    for (let bound = 10; value >= bound; bound *= 10) digits += 1;
    this.padded(value, digits);
  }

  private padded(value: number, digits: number): void {
    let rest = value;
    for (let at = this.at + digits - 1; at >= this.at; at -= 1) {
      const next = Math.floor(rest / 10);
      this.bytes[at] = ZERO + (rest - next * 10);
      rest = next;
    }
    this.at += digits;
  }

  private reserve(more: number): void {
    if (this.at + more <= this.bytes.length) return;
    const larger = Buffer.from(new SharedArrayBuffer(Math.max(this.bytes.length * 2, this.at + more)));
    this.bytes.copy(larger, 0, 0, this.at);
    this.bytes = larger;
  }
}
