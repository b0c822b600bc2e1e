/**
 * What the tide board is fed with. Everything is plain data in UTC milliseconds and degrees; the board fetches nothing,
 * reads no clock (`nowMs` comes in) and keeps no state of its own except the view while it is being dragged.
 */
import type { ReactNode } from 'react';

/**
 * How a pass stands with the person looking. Being picked is not a state: it lies over any of them
 * (see `TideBoardProps.pickedIds`), as does a station's night.
 */
export type HumpState = 'forSale' | 'held' | 'asked' | 'berth' | 'underWay' | 'done' | 'taken' | 'notForSale';

/** A half-open stretch of time, UTC milliseconds. */
export interface Interval {
  readonly fromMs: number;
  readonly toMs: number;
}

/** A pass seen from one antenna: elevation and mask at equal steps of time, both ends included. */
export interface HumpProfile extends Interval {
  /** Elevation of the spacecraft in degrees; at least two samples from `fromMs` to `toMs`. */
  readonly elevationDeg: Float32Array;
  /** The antenna's own horizon in degrees, in the spacecraft's direction at the same instants. */
  readonly maskDeg: Float32Array;
  /** Doppler shift in Hz at the same instants; written along the curve at close zoom when given. */
  readonly dopplerHz?: Float32Array;
}

/** Why a pass can't be sold as a whole: one word on the board, a sentence in the bubble. */
export interface HumpReason {
  /** One or two words for the board: `notice`, `short`, `taken`, `too late`, `no time to turn`. */
  readonly word: string;
  /** The full sentence, with figures. */
  readonly sentence: string;
  /** True when the pass was refused by a rule of the act itself: adds the red barred ring. */
  readonly refused?: boolean;
}

/** One pass of one spacecraft over one row. */
export interface BoardHump {
  readonly id: string;
  readonly rowId: string;
  /** Two to four letters for the board: `W4`. */
  readonly spacecraftShort: string;
  readonly spacecraftName: string;
  /** Rise above and fall below what counts: mask, travel limits and lowest elevation together. */
  readonly aosMs: number;
  readonly losMs: number;
  readonly highestMs: number;
  readonly highestDeg: number;
  readonly profile: HumpProfile;
  readonly state: HumpState;
  /** `€82`: to the nearest unit of the currency, as the board's legend says. */
  readonly priceLabel?: string;
  /** The price in full for the screen reader's table and the hump's name: `€81.88`. */
  readonly priceText?: string;
  /** For `held`: when the hold runs out. The countdown stands inside the hump. */
  readonly holdEndsMs?: number;
  /** When only a part was bought, held or asked for, that part. The rest of the curve stays for sale. */
  readonly part?: Interval;
  readonly reason?: HumpReason;
}

/** Maintenance, own use or weather: woven ground over a row. */
export interface BoardBlackout extends Interval {
  readonly id: string;
  readonly rowId: string;
  readonly reason: string;
}

/** Somebody else's contact: slanted lines with a flat top, without the curve, which is nobody's business. */
export interface OthersBlock extends Interval {
  readonly id: string;
  readonly rowId: string;
}

/** One antenna (or, when the board is turned, one spacecraft). */
export interface BoardRow {
  readonly id: string;
  readonly name: string;
  /** Up to two short lines: `7.3 m, S and X`, `from €6.40 a min`. */
  readonly detail: readonly string[];
}

/** Rows that share a place, and so its clock, its night and its sunset. */
export interface BoardStation {
  readonly id: string;
  readonly name: string;
  /** IANA name; used for the local time beside the name. */
  readonly timeZone: string;
  /** The station's nights that touch the limits, sunset to sunrise, ascending. */
  readonly nights: readonly Interval[];
  readonly rows: readonly BoardRow[];
}

/** Props of `TideBoard`. */
export interface TideBoardProps {
  /** Names the board for a screen reader: `Passes from 14:00 to 17:00 on day 335`. */
  readonly label: string;
  readonly stations: readonly BoardStation[];
  readonly humps: readonly BoardHump[];
  readonly blackouts?: readonly BoardBlackout[];
  readonly othersBlocks?: readonly OthersBlock[];
  readonly nowMs: number;
  /** The stretch of time in view; between 2 minutes and 14 days wide. */
  readonly view: Interval;
  /** Called once a drag, a zoom or a key has come to rest, never for each frame. */
  readonly onViewChange: (view: Interval) => void;
  /** How far one may pan. Default: anywhere. */
  readonly limits?: Interval;
  /** Passes that stand between posts. Several when several are being bought together. */
  readonly pickedIds?: readonly string[];
  /** A click, or Space. `additive` is true with Shift, Ctrl or the command key held. */
  readonly onPick: (humpId: string, additive: boolean) => void;
  /** Enter, or a click on a pass already picked: open its card, contact or sentence. */
  readonly onOpen: (humpId: string) => void;
  /** Escape: let the picked ones go. */
  readonly onClear?: () => void;
  /** A bubble with its tip on a pass, for the reason why it can't be sold. The caller makes the content. */
  readonly bubble?: { readonly humpId: string; readonly content: ReactNode };
  /** `phone` lays the row's name over its top edge and gives each pass a target of 44 px. Default `wide`. */
  readonly variant?: 'wide' | 'phone';
  /** Height above which the rows scroll inside the board, in px. Default 620. */
  readonly maxHeightPx?: number;
  /** Stands in place of the rows when there are none. */
  readonly empty?: ReactNode;
  /** Hides the legend and its sentence, for small boards inside other pages. Default false. */
  readonly bare?: boolean;
}
