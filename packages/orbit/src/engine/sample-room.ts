import { INTERVAL_NUMBERS } from './interpolation.js';

/**
 * Memory for one path at a time, used again for the next: a search over a market would otherwise take a megabyte for each
 * spacecraft and leave it to be swept up. What a room has lent is valid until it lends again.
 */
export class SampleRoom {
  private positionNumbers = new Float64Array(0);
  private velocityNumbers = new Float64Array(0);
  private powerNumbers = new Float64Array(0);
  private knownFlags = new Uint8Array(0);

  positions(samples: number): Float64Array {
    this.positionNumbers = atLeast(this.positionNumbers, 3 * samples);
    return this.positionNumbers.subarray(0, 3 * samples);
  }

  velocities(samples: number): Float64Array {
    this.velocityNumbers = atLeast(this.velocityNumbers, 3 * samples);
    return this.velocityNumbers.subarray(0, 3 * samples);
  }

  powers(samples: number): Float64Array {
    const numbers = INTERVAL_NUMBERS * (samples - 1);
    this.powerNumbers = atLeast(this.powerNumbers, numbers);
    return this.powerNumbers.subarray(0, numbers);
  }

  /** All zero. */
  known(samples: number): Uint8Array {
    if (this.knownFlags.length < samples) this.knownFlags = new Uint8Array(samples + (samples >> 3));
    return this.knownFlags.subarray(0, samples).fill(0);
  }
}

/** A little more than asked for, since the next path is about as long. */
function atLeast(numbers: Float64Array<ArrayBuffer>, length: number): Float64Array<ArrayBuffer> {
  return numbers.length >= length ? numbers : new Float64Array(length + (length >> 3));
}
