/** The need as the form keeps it, and as the API takes it. Pure. */
import type { PlanCraft, PlanInput } from '@skyberth/shared';

export const DAY_MS = 86_400_000;
const GB = 1e9;

type Typed = number | '';

export interface CraftValues {
  readonly spacecraftId: string;
  readonly contactsPerDay: Typed;
  readonly gbPerDay: Typed;
  readonly deliverByH: Typed;
  readonly longestGapH: Typed;
  readonly uplinkEveryH: Typed;
  readonly lowestElevationDeg: Typed;
  readonly shortestMin: Typed;
}

export interface NeedValues {
  readonly name: string;
  readonly firstDay: string;
  readonly days: Typed;
  readonly currency: string;
  readonly budgetMinor: Typed;
  readonly preferredStationIds: readonly string[];
  readonly bannedStationIds: readonly string[];
  readonly craft: readonly CraftValues[];
}

/** Two contacts a day are a beginning that most low orbits can meet. */
export const freshCraft = (spacecraftId: string): CraftValues => ({
  spacecraftId,
  contactsPerDay: 2,
  gbPerDay: '',
  deliverByH: '',
  longestGapH: '',
  uplinkEveryH: '',
  lowestElevationDeg: 10,
  shortestMin: 4,
});

/** A week from tomorrow, as UTC counts days. */
export function freshNeed(nowMs: number, spacecraftIds: readonly string[]): NeedValues {
  const firstDay = new Date((Math.floor(nowMs / DAY_MS) + 1) * DAY_MS).toISOString().slice(0, 10);
  return {
    name: `Week from ${firstDay}`,
    firstDay,
    days: 7,
    currency: 'EUR',
    budgetMinor: '',
    preferredStationIds: [],
    bannedStationIds: [],
    craft: spacecraftIds.map(freshCraft),
  };
}

const orNull = (value: Typed): number | null => (value === '' ? null : value);

export function needOf(values: NeedValues): PlanInput {
  const { name, firstDay, days, currency, budgetMinor } = values;
  return {
    name,
    firstDay,
    days: days === '' ? 0 : days,
    currency: { kind: 'one', currency },
    budgets: budgetMinor === '' ? [] : [{ amountMinor: budgetMinor, currency }],
    preferredStationIds: [...values.preferredStationIds],
    preferencePercent: 10,
    bannedStationIds: [...values.bannedStationIds],
    craft: values.craft.map(
      (each): PlanCraft => ({
        spacecraftId: each.spacecraftId,
        contactsPerDay: orNull(each.contactsPerDay) ?? 0,
        bytesPerDay: (orNull(each.gbPerDay) ?? 0) * GB,
        deliverByH: orNull(each.deliverByH),
        longestGapH: orNull(each.longestGapH),
        uplinkEveryH: orNull(each.uplinkEveryH),
        lowestElevationDeg: orNull(each.lowestElevationDeg) ?? 0,
        shortestS: Math.round((orNull(each.shortestMin) ?? 0) * 60),
      }),
    ),
  };
}

export function valuesOf(need: PlanInput): NeedValues {
  const currency = need.currency.kind === 'one' ? need.currency.currency : need.currency.base;
  return {
    name: need.name,
    firstDay: need.firstDay,
    days: need.days,
    currency,
    budgetMinor: need.budgets.find((each) => each.currency === currency)?.amountMinor ?? '',
    preferredStationIds: need.preferredStationIds,
    bannedStationIds: need.bannedStationIds,
    craft: need.craft.map((each) => ({
      spacecraftId: each.spacecraftId,
      contactsPerDay: each.contactsPerDay || '',
      gbPerDay: each.bytesPerDay > 0 ? each.bytesPerDay / GB : '',
      deliverByH: each.deliverByH ?? '',
      longestGapH: each.longestGapH ?? '',
      uplinkEveryH: each.uplinkEveryH ?? '',
      lowestElevationDeg: each.lowestElevationDeg,
      shortestMin: each.shortestS / 60,
    })),
  };
}
