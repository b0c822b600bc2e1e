/** Passes as columns of numbers: what a search of millions can hold, and what crosses between threads without a copy. */

export const CLIPPED_START = 1;
export const CLIPPED_END = 2;

/** Triples are AOS, highest point, LOS of row 0, then of row 1, and so on. */
export interface PassColumns {
  readonly count: number;
  /** Places in the lists of satellites and sites that were asked for. */
  readonly satellite: Uint32Array<ArrayBuffer>;
  readonly site: Uint32Array<ArrayBuffer>;
  /** CLIPPED_START and CLIPPED_END. */
  readonly flags: Uint8Array<ArrayBuffer>;
  readonly timeMs: Float64Array<ArrayBuffer>;
  readonly rangeKm: Float64Array<ArrayBuffer>;
  readonly azimuthDeg: Float32Array<ArrayBuffer>;
  readonly elevationDeg: Float32Array<ArrayBuffer>;
  readonly rangeRateKmPerS: Float32Array<ArrayBuffer>;
}

/** Columns being filled. */
class PassBlock implements PassColumns {
  count = 0;
  readonly satellite: Uint32Array<ArrayBuffer>;
  readonly site: Uint32Array<ArrayBuffer>;
  readonly flags: Uint8Array<ArrayBuffer>;
  readonly timeMs: Float64Array<ArrayBuffer>;
  readonly rangeKm: Float64Array<ArrayBuffer>;
  readonly azimuthDeg: Float32Array<ArrayBuffer>;
  readonly elevationDeg: Float32Array<ArrayBuffer>;
  readonly rangeRateKmPerS: Float32Array<ArrayBuffer>;

  constructor(readonly capacity: number) {
    this.satellite = new Uint32Array(capacity);
    this.site = new Uint32Array(capacity);
    this.flags = new Uint8Array(capacity);
    this.timeMs = new Float64Array(3 * capacity);
    this.rangeKm = new Float64Array(3 * capacity);
    this.azimuthDeg = new Float32Array(3 * capacity);
    this.elevationDeg = new Float32Array(3 * capacity);
    this.rangeRateKmPerS = new Float32Array(3 * capacity);
  }
}

const SMALLEST_BLOCK = 1_024;
const LARGEST_BLOCK = 32_768;

/** Takes rows and opens a new block when one is full. Blocks grow, so that a small search stays small. */
export class PassSink {
  readonly blocks: PassBlock[] = [];
  private open: PassBlock | undefined;
  count = 0;

  /** The block with room for one more row; the caller writes at `block.count` and raises it. */
  room(): PassBlock {
    const { open } = this;
    if (open !== undefined && open.count < open.capacity) return open;
    const block = new PassBlock(open === undefined ? SMALLEST_BLOCK : Math.min(LARGEST_BLOCK, 4 * open.capacity));
    this.blocks.push(block);
    this.open = block;
    return block;
  }
}

/** What a thread hands over with a block, so that it is moved and not copied. */
export function transferList(columns: PassColumns): ArrayBuffer[] {
  const { satellite, site, flags, timeMs, rangeKm, azimuthDeg, elevationDeg, rangeRateKmPerS } = columns;
  return [satellite, site, flags, timeMs, rangeKm, azimuthDeg, elevationDeg, rangeRateKmPerS].map(
    ({ buffer }) => buffer,
  );
}
