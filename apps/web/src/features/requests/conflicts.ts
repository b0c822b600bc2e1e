/** Which of an owner's own plans a request collides with; other contacts cannot, since the database refuses them. */
import type { AntennaCalendar, BookingSummary } from '@skyberth/shared';

export interface Conflicts {
  readonly blackouts: AntennaCalendar['blackouts'];
  readonly isOutsideHours: boolean;
}

/** `calendar` is that of the request's own time, so its open time is cut to it. */
export function conflictsOf(
  { open, blackouts }: Pick<AntennaCalendar, 'open' | 'blackouts'>,
  { aosUtc, losUtc }: Pick<BookingSummary, 'aosUtc' | 'losUtc'>,
): Conflicts {
  const [aosMs, losMs] = [Date.parse(aosUtc), Date.parse(losUtc)];
  return {
    blackouts: blackouts.filter((each) => Date.parse(each.fromUtc) < losMs && Date.parse(each.toUtc) > aosMs),
    isOutsideHours: !open.some((each) => Date.parse(each.fromUtc) <= aosMs && Date.parse(each.toUtc) >= losMs),
  };
}
