/** What the card says of a pass. Pure. */
import type { FoundPass, PassDetail, Quote } from '@skyberth/shared';
import type { RefundStep } from '../../drawing/curves/curves-types.js';
import { formatDayTime, formatDuration, formatNumber, formatTime } from '../../ui/format.js';

const DAY_MS = 86_400_000;

/** `15:00:05` within a day of now, with the day of year further off. */
export const nearTime = (atMs: number, nowMs: number): string =>
  Math.abs(atMs - nowMs) < DAY_MS ? formatTime(atMs) : formatDayTime(atMs);

const STATE_WORDS: Readonly<Record<FoundPass['state'], string>> = {
  'for sale': 'For sale',
  'part for sale': 'For sale in part',
  'not for sale': 'Not for sale',
  held: 'Held by you',
  asked: 'The owner has been asked',
  berth: 'Your berth',
  'under way': 'Under way',
  done: 'Done',
};

/** `For sale. Rises in 54 min 56 s.` */
export function standing(state: FoundPass['state'], aosMs: number, losMs: number, nowMs: number): string {
  if (nowMs < aosMs) return `${STATE_WORDS[state]}. Rises in ${formatDuration(aosMs - nowMs)}.`;
  if (nowMs < losMs) return `${STATE_WORDS[state]}. Sets in ${formatDuration(losMs - nowMs)}.`;
  return `${STATE_WORDS[state]}. Set ${formatDuration(nowMs - losMs)} ago.`;
}

/** `569 to 2 214`, one figure where both are the same when written. */
export function spanWords(values: readonly number[], decimals = 0): string | null {
  const finite = values.filter(Number.isFinite);
  if (finite.length === 0) return null;
  const [least, most] = [Math.min(...finite), Math.max(...finite)].map((one) => formatNumber(one, decimals));
  return least === most ? (least ?? null) : `${least} to ${most}`;
}

/** `±191.8` kHz: the larger of approach and departure. */
export function dopplerWords(dopplerHz: readonly number[]): string | null {
  const most = Math.max(0, ...dopplerHz.filter(Number.isFinite).map(Math.abs));
  return most > 0 ? `±${formatNumber(most / 1000, 1)}` : null;
}

/** Steps of the refund, the present one with its end as a time of day. */
export function refundSteps(ladder: Quote['ladder'], nowMs: number): RefundStep[] {
  return ladder.map((step) => ({
    percent: step.refundPercent,
    isNow: step.now,
    untilText: untilWords(step, nowMs),
  }));
}

function untilWords(step: Quote['ladder'][number], nowMs: number): string {
  if (step.untilUtc === null) return 'after that';
  if (step.now) return `till ${nearTime(Date.parse(step.untilUtc), nowMs)}`;
  return `till ${formatNumber(step.hoursBeforeAos, step.hoursBeforeAos % 1 === 0 ? 0 : 1)} h`;
}

/** `25 % back` of a cancellation at this moment. */
export function refundNowWords(ladder: Quote['ladder']): string {
  const step = ladder.find((one) => one.now);
  return step ? `${step.refundPercent} % back` : 'nothing back';
}

/** `9 h old`, `3 d 4 h old` */
export const ageWords = (ageH: number): string => `${formatDuration(ageH * 3_600_000)} old`;

/** How far a figure of a link is known, for the card's label: `Margin, X band`. */
export function marginOf(link: PassDetail['links'][number]): string | null {
  return spanWords(link.marginDb, 1);
}

type Followed = Pick<PassDetail, 'aosUtc' | 'losUtc' | 'mountGaps'>;

const lengthMs = (from: string, to: string): number => Date.parse(to) - Date.parse(from);

/** How much of the stretch the mount can follow. */
export const followedMs = ({ aosUtc, losUtc, mountGaps }: Followed): number =>
  mountGaps.reduce((left, gap) => left - lengthMs(gap.fromUtc, gap.toUtc), lengthMs(aosUtc, losUtc));

const GAP_WORDS = { keyhole: 'keyhole', travel: 'end of travel', unwind: 'unwinding' } as const;

/** What is lost when: `keyhole 15:04:10, 22 s`. */
export const gapWords = ({ mountGaps }: Followed): string =>
  mountGaps
    .map((gap) => {
      const length = formatDuration(lengthMs(gap.fromUtc, gap.toUtc));
      return `${GAP_WORDS[gap.code]} ${gap.fromUtc.slice(11, 19)}, ${length}`;
    })
    .join('; ');
