/** What the planner is given and what it answers. Times are UTC milliseconds, stretches half-open, money whole minor units. */

/** A pass, or a part of one, that could be bought for a spacecraft; or a contact that it has already. */
export interface Candidate {
  readonly id: string;
  readonly craftId: string;
  readonly antennaId: string;
  readonly stationId: string;
  readonly aosMs: number;
  readonly losMs: number;
  /** What the antenna is kept for: with set-up, teardown and turning. */
  readonly guardFromMs: number;
  readonly guardToMs: number;
  /** How many contacts the antenna can serve at one time. */
  readonly beams: number;
  readonly priceMinor: number;
  readonly currency: string;
  /** Data that comes down; 0 where nothing can be computed. */
  readonly volumeBits: number;
  /** Whether commands can be sent in it. */
  readonly uplink: boolean;
  /** Bought before: it counts towards the need, costs nothing and cannot be left out. */
  readonly booked: boolean;
}

/** What one spacecraft must get. Days are counted in steps of 24 h from the beginning of the period. */
export interface CraftNeed {
  readonly craftId: string;
  readonly name: string;
  /** Contacts that begin within each day; 0 for any number. */
  readonly contactsPerDay: number;
  readonly volumeBitsPerDay: number;
  /** The day's volume counts only where the contact ends by this time of the day; null for the whole day. */
  readonly deliverByMs: number | null;
  /** From the end of a contact, or the period's beginning, to the next contact or the period's end. */
  readonly longestGapMs: number | null;
  /** The same between contacts in which commands can be sent. */
  readonly uplinkEveryMs: number | null;
}

export interface PlanNeed {
  readonly fromMs: number;
  readonly toMs: number;
  readonly craft: readonly CraftNeed[];
  /** The most that the new contacts may cost in a currency. */
  readonly budgets: readonly { readonly currency: string; readonly amountMinor: number }[];
  /** What one minor unit of each currency counts for when costs are compared; at least one entry. */
  readonly rates: Readonly<Record<string, number>>;
  readonly bannedStationIds: readonly string[];
  readonly preferredStationIds: readonly string[];
  /** By how much a pass elsewhere must be cheaper to be taken instead of one at a preferred station, in percent. */
  readonly preferencePercent: number;
  readonly pinnedIds: readonly string[];
  readonly struckIds: readonly string[];
}

export const DAY_MS = 86_400_000;

/** What a row of the program stands for. */
export type RowTag =
  | { readonly kind: 'contacts' | 'volume'; readonly craftId: string; readonly dayMs: number }
  | { readonly kind: 'gap' | 'uplink'; readonly craftId: string; readonly afterMs: number }
  | { readonly kind: 'budget'; readonly currency: string }
  | { readonly kind: 'antenna'; readonly antennaId: string }
  | { readonly kind: 'own'; readonly craftId: string };

export interface Row {
  readonly tag: RowTag;
  readonly lower: number;
  readonly upper: number;
  readonly columns: readonly number[];
  readonly values: readonly number[];
  /** What one unit of shortfall counts for in the elastic solve; null where the row must hold. */
  readonly giveWay: number | null;
}

/** Minimise `costs`, every column between `lower` and `upper`; those before `integers` are whole. */
export interface Program {
  readonly costs: readonly number[];
  readonly lower: readonly number[];
  readonly upper: readonly number[];
  readonly integers: number;
  readonly rows: readonly Row[];
}

export interface SolverQuestion {
  readonly program: Program;
  /** False to let whole columns take any value. */
  readonly whole: boolean;
  readonly relativeGap: number;
  readonly timeLimitS: number;
  /** Told the present gap now and then. */
  readonly onGap?: (gap: number) => void;
}

/** `stopped`: the time ran out; `values` is empty where nothing had been found by then. */
export interface SolverAnswer {
  readonly status: 'solved' | 'infeasible' | 'stopped';
  readonly objective: number;
  /** No solution costs less. */
  readonly bound: number;
  readonly values: ArrayLike<number>;
  /** Of a solve that is not whole. */
  readonly reducedCosts: ArrayLike<number>;
  readonly rowDuals: ArrayLike<number>;
}

/** A solver for linear and integer programs; it holds the calling thread until it is done. */
export type Solve = (question: SolverQuestion) => SolverAnswer;

export type MoneyWriter = (amountMinor: number, currency: string) => string;

/** One thing worth saying about the plan, about a spacecraft or about the whole. */
export interface Finding {
  readonly craftId: string | null;
  readonly kind: 'contacts' | 'volume' | 'gap' | 'uplink' | 'budget' | 'station';
  readonly sentence: string;
}
