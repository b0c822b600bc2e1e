/**
 * Skipping what cannot matter. From one sample to the next a path turns around the Earth's centre by no more than its longest
 * step, so a path that stands far from a station's zenith cannot be over its horizon before so many samples. The angle from
 * the zenith is bounded from the component along the station's up axis alone, through a table, because an arc cosine for
 * every look would cost more than the look.
 */
const BINS = 256;
/** Rounding in the table and in the angles, in samples. */
const SLACK = 1e-6;

export class TurnTable {
  /** For each bin of the up component: samples, at least, between the zenith and the path. */
  readonly samplesFromZenith = new Float64Array(BINS + 1);
  readonly lowestKm: number;
  readonly binsPerKm: number;

  constructor(
    private readonly longestStepRad: number,
    private readonly leastRadiusKm: number,
    private readonly greatestRadiusKm: number,
  ) {
    this.lowestKm = -greatestRadiusKm;
    this.binsPerKm = BINS / (2 * greatestRadiusKm);
    for (let bin = 0; bin <= BINS; bin += 1) {
      const highestKm = this.lowestKm + (bin + 1) / this.binsPerKm;
      this.samplesFromZenith[bin] = this.leastAngle(highestKm) / longestStepRad - SLACK;
    }
  }

  /** Samples, at most, between the zenith and a path that stands higher along the up axis than so much. */
  mostSamples(upKm: number): number {
    const radiusKm = upKm > 0 ? this.greatestRadiusKm : this.leastRadiusKm;
    return Math.acos(clamped(upKm / radiusKm)) / this.longestStepRad + SLACK;
  }

  /** Least angle between the up axis and a path that stands no higher along it. */
  private leastAngle(upKm: number): number {
    return Math.acos(clamped(upKm / (upKm > 0 ? this.leastRadiusKm : this.greatestRadiusKm)));
  }
}

function clamped(cosine: number): number {
  return Math.min(1, Math.max(-1, cosine));
}
