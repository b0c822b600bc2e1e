/** What holds the price up: the relaxed program's prices of the need's rows, in sentences. */
import { fleetProgram } from './assemble.js';
import type { Candidate, Finding, MoneyWriter, PlanNeed, Program, Row, Solve } from './types.js';
import { hoursText, volumeText } from './words.js';

export interface BindingQuestion {
  readonly need: PlanNeed;
  readonly inside: readonly Candidate[];
  /** The program of the plan; its rows may ask for less than the need. */
  readonly program: Program;
  /** True where they do not. */
  readonly met: boolean;
  /** Passes at banned stations. */
  readonly banned: readonly Candidate[];
  readonly solve: Solve;
  readonly money: (cost: number) => string;
  readonly moneyIn: MoneyWriter;
  readonly stationName: (stationId: string) => string;
  readonly timeLimitS: number;
}

/** Below it a price is rounding, in major units. */
const NOTHING = 0.005;
/** Passes at a banned station that are looked at for each spacecraft: the cheapest. */
const BANNED_LOOKED_AT = 40;

/**
 * Figures are marginal and of the relaxed program, in which contacts may be had in fractions: they say which way the price
 * moves and about how fast, for small changes. The doubtful wording ("about") is part of the sentence for that reason.
 */
export function bindingFindings(question: BindingQuestion): Finding[] {
  const { need, inside, met, solve, timeLimitS } = question;
  const banned = met ? cheapestOf(question.banned) : [];
  const open = { ...need, bannedStationIds: [] };
  const base = met ? fleetProgram(open, [...inside, ...banned]) : question.program;
  const upper = base.upper.map((bound, place) => (place >= inside.length ? 0 : bound));
  const program = { ...base, upper };
  const answer = solve({ program, whole: false, relativeGap: 0, timeLimitS });
  if (answer.status !== 'solved') return [];
  const priced = program.rows.map((row, place) => ({ row, price: answer.rowDuals[place] ?? 0 }));
  const reduced = banned.map((each, place) => ({ each, reducedCost: answer.reducedCosts[inside.length + place] ?? 0 }));
  return [
    ...need.craft.flatMap((craft) => [
      ...contactFinding(question, craft, priced),
      ...volumeFinding(question, craft, priced),
      ...gapFinding(question, craft, priced),
    ]),
    ...budgetFindings(question, priced),
    ...stationFindings(question, reduced),
  ];
}

interface Priced {
  readonly row: Row;
  readonly price: number;
}
type Craft = PlanNeed['craft'][number];

const pricesOf = (priced: readonly Priced[], kind: Row['tag']['kind'], craftId: string): Priced[] =>
  priced.filter(
    ({ row, price }) => row.tag.kind === kind && 'craftId' in row.tag && row.tag.craftId === craftId && price > NOTHING,
  );

const total = (some: readonly Priced[]): number => some.reduce((sum, each) => sum + each.price, 0);

function contactFinding(
  { money }: BindingQuestion,
  { craftId, name, contactsPerDay }: Craft,
  priced: readonly Priced[],
): Finding[] {
  const binding = pricesOf(priced, 'contacts', craftId);
  if (binding.length === 0) return [];
  const sentence = `${contactsPerDay} ${contactsPerDay === 1 ? 'contact' : 'contacts'} a day for ${name} bind on ${days(binding)}. One fewer on each would save about ${money(total(binding))}; one more would cost at least about as much.`;
  return [{ craftId, kind: 'contacts', sentence }];
}

function volumeFinding(
  { money }: BindingQuestion,
  { craftId, name, volumeBitsPerDay }: Craft,
  priced: readonly Priced[],
): Finding[] {
  const binding = pricesOf(priced, 'volume', craftId);
  if (binding.length === 0) return [];
  const sentence = `${volumeText(volumeBitsPerDay)} a day for ${name} bind on ${days(binding)}. A tenth less would save about ${money(total(binding) / 10)}.`;
  return [{ craftId, kind: 'volume', sentence }];
}

function gapFinding({ money }: BindingQuestion, craft: Craft, priced: readonly Priced[]): Finding[] {
  const { craftId, name } = craft;
  const one = (kind: 'gap' | 'uplink', allowedMs: number | null, what: string): Finding[] => {
    const binding = pricesOf(priced, kind, craftId);
    if (binding.length === 0 || allowedMs === null) return [];
    const places = binding.length === 1 ? 'once' : `${binding.length} times`;
    const sentence = `${what} of ${hoursText(allowedMs)} for ${name} binds ${places}; about ${money(total(binding))} of the cost is owed to it.`;
    return [{ craftId, kind, sentence }];
  };
  return [
    ...one('gap', craft.longestGapMs, 'The longest gap'),
    ...one('uplink', craft.uplinkEveryMs, 'The longest time between uplinks'),
  ];
}

function budgetFindings({ money, moneyIn, need }: BindingQuestion, priced: readonly Priced[]): Finding[] {
  return priced.flatMap(({ row: { tag }, price }) => {
    if (tag.kind !== 'budget' || price > -NOTHING) return [];
    const budget = need.budgets.find((each) => each.currency === tag.currency);
    if (budget === undefined) return [];
    const sentence = `The budget of ${moneyIn(budget.amountMinor, tag.currency)} is used up. Each ${moneyIn(100, tag.currency)} more would save about ${money(-price)} elsewhere.`;
    return [{ craftId: null, kind: 'budget' as const, sentence }];
  });
}

function stationFindings(
  { money, stationName }: BindingQuestion,
  reduced: readonly { each: Candidate; reducedCost: number }[],
): Finding[] {
  const best = new Map<string, number>();
  for (const { each, reducedCost } of reduced)
    best.set(each.stationId, Math.min(best.get(each.stationId) ?? 0, reducedCost));
  return [...best].flatMap(([stationId, reducedCost]) =>
    reducedCost > -NOTHING
      ? []
      : [
          {
            craftId: null,
            kind: 'station' as const,
            sentence: `${stationName(stationId)} is banned. Its first contact in the plan would save about ${money(-reducedCost)}.`,
          },
        ],
  );
}

function cheapestOf(banned: readonly Candidate[]): Candidate[] {
  const taken = new Map<string, number>();
  return [...banned]
    .sort((a, b) => a.priceMinor - b.priceMinor)
    .filter((each) => {
      const name = `${each.craftId} ${each.stationId}`;
      const count = taken.get(name) ?? 0;
      taken.set(name, count + 1);
      return count < BANNED_LOOKED_AT;
    });
}

const days = (some: readonly Priced[]): string => (some.length === 1 ? 'one day' : `${some.length} days`);
