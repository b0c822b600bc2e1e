/** A found pass as it travels. What is the same for everybody is written once for each pass and copied from then on. */
import type { Interval } from '@skyberth/market';
import type { FoundPass } from '@skyberth/shared';
import type { AntennaInput, CraftInput, ElementsSpan } from '../workers/job-types.js';
import type { Horizon } from './horizons.js';
import { JsonWriter, type WrittenText } from './json-writer.js';
import type { Sale } from './sales.js';
import type { Stay } from './stay.js';
import type { Look, TrackTables } from './track-table.js';

/** Steps along a pass, and tenths of a degree: enough for a smooth curve of a few hundred pixels. */
export const PROFILE_STEPS = 28;
/** Passes are written into chunks of this size; one holds some three hundred. */
const CHUNK_BYTES = 262_144;
/** No pass without reasons and parts is longer; most are a third of it. */
const LONGEST_SHAPE = 4_096;
/** A reason besides its sentence; its remedy is a sentence of ours. */
const LONGEST_REASON = 1_024;
const LONGEST_PART = 128;

export interface Sent {
  readonly stay: Stay;
  readonly craft: CraftInput;
  readonly antenna: AntennaInput;
  readonly horizon: Horizon;
  readonly sale: Sale;
  /** For which question, and how long, this is the answer; null where it is only for now. */
  readonly keep: { readonly question: string; readonly at: Interval } | null;
}

export class PassTexts {
  private chunk = new JsonWriter(CHUNK_BYTES);
  private readonly elevations = new Float64Array(PROFILE_STEPS + 1);
  private readonly masks = new Float64Array(PROFILE_STEPS + 1);
  private readonly look: Look = { azimuthDeg: 0, elevationDeg: 0 };

  constructor(private readonly tables: TrackTables) {}

  /** Writes one pass in the form of `FoundPass`, behind a comma; the text stays with the pass where it may be given again. */
  write(sent: Sent): WrittenText {
    const { stay, keep, sale } = sent;
    const chunk = this.roomFor(sent);
    const from = chunk.length;
    this.writePass(chunk, sent);
    const text = chunk.since(from);
    if (keep !== null) stay.answer = { ...keep, text, forSale: isForSale(sale) };
    return text;
  }

  /** The chunk to write into; what is written never moves afterwards. */
  private roomFor({ sale }: Sent): JsonWriter {
    const words = sale.reasons.reduce((sum, reason) => sum + LONGEST_REASON + reason.sentence.length * 3, 0);
    const most = LONGEST_SHAPE + words + sale.parts.length * LONGEST_PART;
    if (this.chunk.length + most > CHUNK_BYTES) this.chunk = new JsonWriter(Math.max(CHUNK_BYTES, most));
    return this.chunk;
  }

  private writePass(out: JsonWriter, sent: Sent): void {
    const { stay, craft, antenna, sale } = sent;
    out.ascii(`,{"key":"${antenna.id.slice(-12)}-${craft.id.slice(-12)}-`);
    out.fixed(stay.aosMs, 0);
    out.ascii(`","antennaId":"${antenna.id}","spacecraftId":"${craft.id}","currency":"${antenna.price.currency}"`);
    out.ascii(`,"state":"${sale.state}","bookingId":${sale.bookingId === null ? 'null' : `"${sale.bookingId}"`}`);
    writeParts(out, sale.parts);
    const { source } = this.tables.originOf(spanOf(craft, stay), stay);
    if (source !== 'element set') out.ascii(`,"source":"${source}"`);
    if (sale.reasons.length === 0) out.ascii(',"reasons":[],');
    else {
      out.ascii(',"reasons":');
      out.json(sale.reasons);
      out.ascii(',');
    }
    this.writeShape(out, sent);
    out.ascii('}');
  }

  /** Two members of a JSON object, without braces: `"geometry":…,"profile":…`. */
  private writeShape(out: JsonWriter, sent: Sent): void {
    const { stay } = sent;
    if (stay.shape !== null) {
      out.copy(stay.shape);
      return;
    }
    const from = out.length;
    writeGeometry(out, stay);
    out.ascii(',');
    this.writeProfile(out, sent);
    stay.shape = out.since(from);
  }

  private writeProfile(out: JsonWriter, { stay, craft, horizon }: Sent): void {
    const { elevations, masks, look } = this;
    const span = spanOf(craft, stay);
    const stepMs = (stay.losMs - stay.aosMs) / PROFILE_STEPS;
    for (let i = 0; i <= PROFILE_STEPS; i += 1) {
      this.tables.look(span, horizon.frame, stay.aosMs + i * stepMs, look);
      elevations[i] = look.elevationDeg;
      masks[i] = horizon.maskDeg(look.azimuthDeg);
    }
    out.ascii('"profile":{"elevationDeg":[');
    writeList(out, elevations, 1);
    out.ascii('],"maskDeg":[');
    if (horizon.mask.flat) out.fixed(masks[0] ?? 0, 1);
    else writeList(out, masks, 1);
    out.ascii(']}');
  }
}

/** Whether the caller could buy some of the pass. */
export const isForSale = (sale: Sale): boolean => sale.parts.length > 0 && sale.bookingId === null;

/** The span whose elements a stay was computed from. */
export function spanOf(craft: CraftInput, stay: Stay): ElementsSpan {
  const span = craft.spans.find((each) => each.elementSetId === stay.elementSetId);
  if (span === undefined) throw new Error(`Pass ${stay.aosMs} was made from elements that are not among those given.`);
  return span;
}

function writeParts(out: JsonWriter, parts: FoundPass['parts']): void {
  out.ascii(',"parts":[');
  parts.forEach((part, index) => {
    out.ascii(
      `${index > 0 ? ',' : ''}{"aosUtc":"${part.aosUtc}","losUtc":"${part.losUtc}","totalMinor":${part.totalMinor}}`,
    );
  });
  out.ascii(']');
}

/** The same digits as `geometryOf`. */
function writeGeometry(out: JsonWriter, stay: Stay): void {
  out.ascii('"geometry":{"aosUtc":');
  out.utc(stay.aosMs);
  out.ascii(',"tcaUtc":');
  out.utc(stay.tcaMs);
  out.ascii(',"losUtc":');
  out.utc(stay.losMs);
  out.ascii(`,"clippedStart":${stay.clippedStart},"clippedEnd":${stay.clippedEnd},"azimuthDeg":[`);
  writeList(out, stay.azimuthDeg, 4);
  out.ascii('],"elevationDeg":[');
  writeList(out, stay.elevationDeg, 4);
  out.ascii('],"rangeKm":[');
  writeList(out, stay.rangeKm, 3);
  out.ascii('],"rangeRateKmPerS":[');
  writeList(out, stay.rangeRateKmPerS, 6);
  out.ascii('],"maxElevationDeg":');
  out.fixed(stay.maxElevationDeg, 4);
  out.ascii('}');
}

function writeList(out: JsonWriter, values: ArrayLike<number>, decimals: 1 | 3 | 4 | 6): void {
  for (let i = 0; i < values.length; i += 1) {
    if (i > 0) out.ascii(',');
    out.fixed(values[i] ?? Number.NaN, decimals);
  }
}
