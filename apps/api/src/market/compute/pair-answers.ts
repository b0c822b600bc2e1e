/** Whole answers about one spacecraft over one antenna, so that a repeated search only looks them up. */
import type { Interval } from '@skyberth/market';
import { WeightedCache } from '../../platform/weighted-cache.js';
import type { AntennaInput, CraftInput } from '../workers/job-types.js';
import { sourceName } from './ephemeris-layers.js';
import type { WrittenText } from './json-writer.js';

export interface PairAnswer {
  /** In few pieces: what was written one after the other is one. */
  readonly texts: readonly WrittenText[];
  readonly passes: number;
  readonly forSale: number;
}

/** Everything that an answer depends on besides the instant of asking. */
export interface PairQuestion extends Interval {
  /** Of `QuestionNames`: terms, contacts and wish. */
  readonly name: string;
  /** Of `spansName`: the elements. */
  readonly spans: string;
  readonly nowMs: number;
}

interface Kept {
  readonly question: Omit<PairQuestion, 'nowMs'>;
  /** The instants of asking at which it is the answer. */
  readonly at: Interval;
  readonly answer: PairAnswer;
}

/** Pairs remembered, the last question about each; the text itself is kept with the passes. */
const MAX_KEPT = 20_000;

export class PairAnswers {
  private readonly kept = new WeightedCache<Kept>(MAX_KEPT);

  get(craft: CraftInput, antenna: AntennaInput, asked: PairQuestion): PairAnswer | null {
    const known = this.kept.get(`${craft.id}|${antenna.id}`);
    if (known === undefined) return null;
    const { question, at, answer } = known;
    const same =
      question.fromMs === asked.fromMs &&
      question.toMs === asked.toMs &&
      question.spans === asked.spans &&
      question.name === asked.name &&
      asked.nowMs >= at.fromMs &&
      asked.nowMs <= at.toMs;
    return same ? answer : null;
  }

  keep(craft: CraftInput, antenna: AntennaInput, asked: PairQuestion, at: Interval, answer: PairAnswer): void {
    const { name, spans, fromMs, toMs } = asked;
    this.kept.set(`${craft.id}|${antenna.id}`, { question: { name, spans, fromMs, toMs }, at, answer }, 1);
  }
}

/** Names which elements a spacecraft is flown by, and when. */
export const spansName = ({ spans }: CraftInput): string =>
  spans.map((span) => `${sourceName(span)} ${span.fromMs} ${span.toMs}`).join('|');
