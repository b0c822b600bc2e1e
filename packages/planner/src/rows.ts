/** The need as rows over a list of candidates. */
import { maximalCliques } from './cliques.js';
import { type Candidate, type CraftNeed, DAY_MS, type PlanNeed, type Row } from './types.js';
import { gapWindows } from './windows.js';

/** Places of some candidates in the list that the columns follow. */
type Places = readonly number[];

export const stretchOf = (each: Candidate): { fromMs: number; toMs: number } => ({
  fromMs: each.aosMs,
  toMs: each.losMs,
});

/** Whether the volume of a contact counts for the day that begins at `dayMs`. */
export function deliversOn(need: CraftNeed, dayMs: number, each: Candidate): boolean {
  return each.aosMs >= dayMs && each.aosMs < dayMs + DAY_MS && each.losMs <= dayMs + (need.deliverByMs ?? 2 * DAY_MS);
}

export const daysOf = ({ fromMs, toMs }: Pick<PlanNeed, 'fromMs' | 'toMs'>): number[] =>
  Array.from({ length: Math.max(0, Math.round((toMs - fromMs) / DAY_MS)) }, (_, day) => fromMs + day * DAY_MS);

/** Rows of one spacecraft's need; contacts that it has already are taken off what is asked. */
export function needRows(need: PlanNeed, craft: CraftNeed, all: readonly Candidate[], mine: Places): Row[] {
  const rows: Row[] = [];
  const { craftId } = craft;
  for (const dayMs of daysOf(need)) {
    const inDay = mine.filter((place) => beginsIn(one(all, place), dayMs));
    if (craft.contactsPerDay > 0) {
      rows.push(atLeast({ kind: 'contacts', craftId, dayMs }, all, inDay, () => 1, craft.contactsPerDay, 1));
    }
    if (craft.volumeBitsPerDay > 0) {
      const delivering = inDay.filter((place) => deliversOn(craft, dayMs, one(all, place)));
      // In shares of the day's need: figures of bits beside figures of money would cost the solver its accuracy.
      const share = (each: Candidate): number => each.volumeBits / craft.volumeBitsPerDay;
      rows.push(atLeast({ kind: 'volume', craftId, dayMs }, all, delivering, share, 1, 4));
    }
  }
  rows.push(...gapRows('gap', need, craftId, craft.longestGapMs, all, mine));
  const commanding = mine.filter((place) => one(all, place).uplink);
  rows.push(...gapRows('uplink', need, craftId, craft.uplinkEveryMs, all, commanding));
  return rows;
}

function gapRows(
  kind: 'gap' | 'uplink',
  need: PlanNeed,
  craftId: string,
  longestMs: number | null,
  all: readonly Candidate[],
  places: Places,
): Row[] {
  if (longestMs === null) return [];
  const windows = gapWindows(
    places.map((place) => stretchOf(one(all, place))),
    need,
    longestMs,
  );
  return windows.flatMap(({ afterMs, needed }) => {
    const inside = needed.map((index) => places[index] as number);
    const row = atLeast({ kind, craftId, afterMs }, all, inside, () => 1, 1, 2);
    return row.lower > 0 ? [row] : [];
  });
}

/** Rows that keep a spacecraft from being in two contacts at one time. */
export function ownRows(craftId: string, all: readonly Candidate[], mine: Places): Row[] {
  const open = mine.filter((place) => !one(all, place).booked);
  return maximalCliques(
    open.map((place) => stretchOf(one(all, place))),
    1,
  ).map((clique) =>
    atMost(
      { kind: 'own', craftId },
      clique.map((index) => open[index] as number),
      1,
    ),
  );
}

/** Rows that keep an antenna from serving more contacts at a time than it has beams. */
export function antennaRows(all: readonly Candidate[]): Row[] {
  const byAntenna = new Map<string, number[]>();
  for (const [place, each] of all.entries()) {
    if (each.booked) continue;
    const places = byAntenna.get(each.antennaId);
    if (places === undefined) byAntenna.set(each.antennaId, [place]);
    else places.push(place);
  }
  return [...byAntenna].flatMap(([antennaId, places]) => {
    const beams = one(all, places[0] as number).beams;
    const guards = places.map((place) => ({ fromMs: one(all, place).guardFromMs, toMs: one(all, place).guardToMs }));
    return (
      maximalCliques(guards, beams)
        .map((clique) => clique.map((index) => places[index] as number))
        // A clique of one spacecraft alone says what its own row says already.
        .filter(
          (clique) =>
            beams > 1 || new Set(clique.map((place) => one(all, place).craftId)).size > 1 || !ownOverlap(all, clique),
        )
        .map((clique) => atMost({ kind: 'antenna', antennaId }, clique, beams))
    );
  });
}

/** Whether the contacts themselves, without guards, share an instant. */
function ownOverlap(all: readonly Candidate[], clique: Places): boolean {
  const latestStart = Math.max(...clique.map((place) => one(all, place).aosMs));
  return latestStart < Math.min(...clique.map((place) => one(all, place).losMs));
}

export function budgetRows(need: PlanNeed, all: readonly Candidate[]): Row[] {
  return need.budgets.map(({ currency, amountMinor }) => {
    const columns = all.flatMap((each, place) => (!each.booked && each.currency === currency ? [place] : []));
    const values = columns.map((place) => one(all, place).priceMinor / 100);
    return {
      tag: { kind: 'budget', currency },
      lower: -Infinity,
      upper: amountMinor / 100,
      columns,
      values,
      giveWay: null,
    };
  });
}

function atLeast(
  tag: Row['tag'],
  all: readonly Candidate[],
  places: Places,
  value: (each: Candidate) => number,
  asked: number,
  giveWay: number,
): Row {
  const had = places.filter((place) => one(all, place).booked).reduce((sum, place) => sum + value(one(all, place)), 0);
  const columns = places.filter((place) => !one(all, place).booked && value(one(all, place)) > 0);
  const lower = Math.max(0, asked - had);
  return { tag, lower, upper: Infinity, columns, values: columns.map((place) => value(one(all, place))), giveWay };
}

const atMost = (tag: Row['tag'], columns: Places, upper: number): Row => ({
  tag,
  lower: -Infinity,
  upper,
  columns,
  values: columns.map(() => 1),
  giveWay: null,
});

const beginsIn = (each: Candidate, dayMs: number): boolean => each.aosMs >= dayMs && each.aosMs < dayMs + DAY_MS;

const one = (all: readonly Candidate[], place: number): Candidate => all[place] as Candidate;
