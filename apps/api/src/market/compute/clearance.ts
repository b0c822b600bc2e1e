/** For which times transmitting is cleared, and in words what is missing for the others. */
import type { ClearanceVerdict } from '@skyberth/market';
import type { CraftClearance } from '../../clearances/clearance-book.js';
import type { AntennaInput, CraftInput } from '../workers/job-types.js';

const day = (timeMs: number): string => new Date(timeMs).toISOString().slice(0, 10);

/** Only clearances in force let anything be sold; one that is asked for says who must act. */
export function clearanceOf(craft: CraftInput, antenna: AntennaInput, bands: readonly string[]): ClearanceVerdict {
  const here = craft.clearances.filter((each) => each.stationId === antenna.stationId && bands.includes(each.band));
  const inForce = here.filter((each) => each.state === 'in force');
  return {
    valid: inForce.map(({ fromMs, toMs }) => ({ fromMs, toMs })),
    ...wordsFor({ craft, antenna, bands, here, inForce }),
  };
}

interface Known {
  readonly craft: CraftInput;
  readonly antenna: AntennaInput;
  readonly bands: readonly string[];
  readonly here: readonly CraftClearance[];
  readonly inForce: readonly CraftClearance[];
}

function wordsFor({ craft, antenna, bands, here, inForce }: Known): { sentence: string; remedy: string } {
  const where = `${craft.name} from ${antenna.stationName} in ${bands.join(' or ') || 'any'} band`;
  const [valid] = inForce;
  if (valid) {
    return {
      sentence: `Clearance ${valid.number} lets ${where} be transmitted to from ${day(valid.fromMs)} to ${day(valid.toMs)} only, and uplink is not sold outside a clearance.`,
      remedy: 'Ask for its renewal under Clearances, or take the pass for downlink only.',
    };
  }
  const [pending] = here;
  if (pending) {
    const who = pending.state === 'requested' ? 'the station has not answered yet' : 'the papers are being checked';
    return {
      sentence: `Clearance ${pending.number} to transmit to ${where} is not in force: ${who}. Uplink is not sold before.`,
      remedy: 'It can be bought once the clearance is in force. Until then take the pass for downlink only.',
    };
  }
  return {
    sentence: `Nobody has cleared transmitting to ${where}. Uplink is not sold without a clearance in force through LOS.`,
    remedy: 'Ask the station for a clearance under Clearances, or take the pass for downlink only.',
  };
}
