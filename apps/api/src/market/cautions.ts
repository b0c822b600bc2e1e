/** Short notes that stand where the act happens. They defer to the licence, local rules and the people on site. */
import type { Need } from '@skyberth/shared';

export interface Caution {
  readonly title: string;
  readonly text: string;
}

export const TRANSMITTING: Caution = {
  title: 'Transmitting needs a licence and coordination',
  text: 'Transmitting without licence and coordination is unlawful and can harm other users, and uplink power near people is a radiation hazard. The licence, local rules and the station’s own interlocks come first; Skyberth grants no right to a frequency and replaces none of them.',
};

export const MOVING_DISH: Caution = {
  title: 'A dish moves without warning',
  text: 'Nobody may be within its reach when a table drives it. Follow the station’s own safety rules.',
};

/** @param closestDeg least angle between spacecraft and Sun during the contact, seen from the antenna */
export function nearSun(closestDeg: number, keepOffDeg: number): Caution {
  return {
    title: `The track comes within ${closestDeg.toFixed(1)}° of the Sun`,
    text: `Pointing a receive chain at the Sun can damage it, and its noise hides weak signals. Closer than ${keepOffDeg}° is a common limit; the antenna’s own maker and engineer decide.`,
  };
}

const UNCHECKED: Caution = {
  title: 'Band and link were not checked',
  text: 'No radio of this spacecraft is on file for this direction, so nobody has compared frequency, polarisation or link margin with the antenna. Add the radio before you buy, or be sure of it yourself.',
};

const OLD_ELEMENTS: Caution = {
  title: 'The elements are old',
  text: 'AOS and LOS may be off by more than the set-up time. Give newer elements before you buy, or accept that risk when you hold.',
};

function sunNotes(sun: { closestDeg: number | null; keepOffDeg: number } | null): Caution[] {
  if (sun === null || sun.closestDeg === null || sun.closestDeg >= sun.keepOffDeg) return [];
  return [nearSun(sun.closestDeg, sun.keepOffDeg)];
}

/** The notes of one pass, the weightiest first. */
export function cautionsFor(pass: {
  need: Need;
  /** Null where it was not worked out; the angle is null where the Sun is down. */
  sun: { closestDeg: number | null; keepOffDeg: number } | null;
  radiosOnFile: boolean;
  stale: boolean;
  untrackable: readonly string[];
}): Caution[] {
  return [
    ...(pass.need === 'downlink' ? [] : [TRANSMITTING]),
    ...sunNotes(pass.sun),
    ...(pass.stale ? [OLD_ELEMENTS] : []),
    ...(pass.radiosOnFile ? [] : [UNCHECKED]),
    ...(pass.untrackable.length === 0
      ? []
      : [{ title: 'The mount cannot follow all of it', text: pass.untrackable.join(' ') }]),
  ];
}
