/** The part of a pass that is the same for everybody, geometry and profile, as it travels; made once for each pass. */
import type { PassGeometry, Profile } from '@skyberth/shared';
import type { AntennaInput, CraftInput } from '../workers/job-types.js';
import type { Horizons } from './horizons.js';
import { geometryOf, type Stay } from './stay.js';
import type { TrackTables } from './track-table.js';

/** Steps along a pass: enough for a smooth curve of a few hundred pixels. */
const PROFILE_STEPS = 32;

export class ProfileTexts {
  /** Forgotten together with the pass. */
  private readonly made = new WeakMap<Stay, Uint8Array>();

  constructor(
    private readonly tables: TrackTables,
    private readonly horizons: Horizons,
  ) {}

  /** Two members of a JSON object, without braces: `"geometry":…,"profile":…`. */
  of(pass: { craft: CraftInput; antenna: AntennaInput; floorDeg: number; stay: Stay }): Uint8Array {
    const known = this.made.get(pass.stay);
    if (known !== undefined) return known;
    const geometry: PassGeometry = geometryOf(pass.stay);
    const profile: Profile = this.profileOf(pass);
    const bytes = new TextEncoder().encode(JSON.stringify({ geometry, profile }).slice(1, -1));
    this.made.set(pass.stay, bytes);
    return bytes;
  }

  private profileOf({
    craft,
    antenna,
    floorDeg,
    stay,
  }: {
    craft: CraftInput;
    antenna: AntennaInput;
    floorDeg: number;
    stay: Stay;
  }): Profile {
    const span = craft.spans.find((each) => each.elementSetId === stay.elementSetId);
    if (span === undefined)
      throw new Error(`Pass ${stay.aosMs} was made from elements that are not among those given.`);
    const horizon = this.horizons.of(antenna);
    const stepMs = (stay.losMs - stay.aosMs) / PROFILE_STEPS;
    const elevationDeg = new Array<number>(PROFILE_STEPS + 1);
    const maskDeg = new Array<number>(PROFILE_STEPS + 1);
    for (let i = 0; i <= PROFILE_STEPS; i += 1) {
      const look = this.tables.look(span, horizon.frame, stay.aosMs + i * stepMs);
      elevationDeg[i] = Math.round(look.elevationDeg * 100) / 100;
      maskDeg[i] = Math.round(Math.max(horizon.maskDeg(look.azimuthDeg), floorDeg) * 100) / 100;
    }
    return { fromUtc: new Date(stay.aosMs).toISOString(), stepS: stepMs / 1000, elevationDeg, maskDeg };
  }
}
