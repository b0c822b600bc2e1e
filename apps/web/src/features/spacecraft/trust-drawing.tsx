/** The estimated error of AOS and LOS against the age of the set, with now and the days on which it turns. */
import { useElementSize } from '@mantine/hooks';
import { type ElementSummary, FRESHNESS_FROM_S } from '@skyberth/shared';
import { useNow } from '../../lib/use-now.js';
import { DayTime } from '../../ui/day-time.js';
import { errorWords } from './element-words.js';
import { dayStep, type TrustCurve, trustCurve } from './trust.js';
import classes from './trust-drawing.module.css';

const HOUR_MS = 3_600_000;
const HEIGHT = 168;
const TOP = 26;
const BOTTOM = HEIGHT - 24;
const LEFT = 44;
const RIGHT_GAP = 8;
const DAY_MARK_PX = 56;
const WORDS_PX = 60;
/** The scale of seconds is one of powers of ten: each tenfold error is one step up. */
const LEAST_S = 0.1;

export function TrustDrawing({ elements }: { readonly elements: ElementSummary }) {
  const { ref, width } = useElementSize();
  const nowMs = useNow(60_000);
  const epochMs = Date.parse(elements.epochUtc);
  const ageH = (nowMs - epochMs) / HOUR_MS;
  const curve = trustCurve(elements.meanMotionRevPerDay, ageH);
  return (
    <figure className={classes.figure}>
      <figcaption className={classes.words}>
        <TurnWords curve={curve} epochMs={epochMs} nowMs={nowMs} />
      </figcaption>
      <div ref={ref} className={classes.drawing}>
        {width > 0 && <Drawing curve={curve} ageH={ageH} errorS={elements.timingErrorS} width={width} />}
      </div>
    </figure>
  );
}

interface TurnWordsProps {
  readonly curve: TrustCurve;
  readonly epochMs: number;
  readonly nowMs: number;
}

/** `Ageing from 2026-338 04:12:00, stale from 2026-347 10:00:00, unless newer ones come.` */
function TurnWords({ curve, epochMs, nowMs }: TurnWordsProps) {
  const turn = (word: string, atH: number | null) => {
    if (atH === null) return null;
    const atMs = epochMs + atH * HOUR_MS;
    return (
      <>
        {word} {atMs < nowMs ? 'since' : 'from'} <DayTime atMs={atMs} />
      </>
    );
  };
  const [ageing, stale] = [turn('Ageing', curve.ageingH), turn('stale', curve.staleH)];
  return (
    <>
      {ageing ?? 'They stay fresh for more than a year'}
      {stale && <>, {stale}</>}, unless newer ones come. An estimate by common practice, not a bound: a manoeuvre or a
      storm of the Sun makes it worse.
    </>
  );
}

interface DrawingProps {
  readonly curve: TrustCurve;
  readonly ageH: number;
  readonly errorS: number;
  readonly width: number;
}

function Drawing({ curve, ageH, errorS, width }: DrawingProps) {
  const mostS = Math.max(30, (curve.points.at(-1)?.errorS ?? 0) * 1.3);
  const right = width - RIGHT_GAP;
  const x = (atH: number) => LEFT + (Math.max(0, atH) / curve.endH) * (right - LEFT);
  const y = (seconds: number) => {
    const share = Math.log(Math.max(seconds, LEAST_S) / LEAST_S) / Math.log(mostS / LEAST_S);
    return BOTTOM - share * (BOTTOM - TOP);
  };
  const path = curve.points.map((point) => `${x(point.ageH).toFixed(1)} ${y(point.errorS).toFixed(1)}`).join(' L');
  const [ageingY, staleY] = [y(FRESHNESS_FROM_S.ageing), y(FRESHNESS_FROM_S.stale)];
  // The curve begins low at the left, so the upper words stand there, beside the line of now where it is near.
  const wordsX = x(ageH) < LEFT + WORDS_PX ? x(ageH) + 10 : LEFT + 8;
  const band = (top: number, bottom: number, colour: string) => (
    <rect x={LEFT} y={top} width={right - LEFT} height={bottom - top} fill={`var(--sk-${colour})`} />
  );
  return (
    <svg
      width={width}
      height={HEIGHT}
      role="img"
      aria-label={`Estimated error of AOS and LOS: now ${errorWords(errorS)}, growing with each day`}
    >
      {band(TOP, staleY, 'buoy-wash')}
      {band(staleY, ageingY, 'brass-wash')}
      {band(ageingY, BOTTOM, 'kelp-wash')}
      <text x={LEFT - 8} y={ageingY + 4} className={classes.scale}>
        {FRESHNESS_FROM_S.ageing} s
      </text>
      <text x={LEFT - 8} y={staleY + 4} className={classes.scale}>
        {FRESHNESS_FROM_S.stale} s
      </text>
      <text x={wordsX} y={TOP + 14}>
        stale
      </text>
      <text x={wordsX} y={staleY + 15}>
        ageing
      </text>
      <text x={right - 8} y={BOTTOM - 7} className={classes.band}>
        fresh
      </text>
      <path d={`M${path}`} className={classes.curve} />
      {curve.ageingH !== null && <TurnMark atX={x(curve.ageingH)} atY={ageingY} />}
      {curve.staleH !== null && <TurnMark atX={x(curve.staleH)} atY={staleY} />}
      <DayMarks curve={curve} x={x} right={right} />
      <NowMark atX={x(ageH)} atY={y(errorS)} errorS={errorS} right={right} />
    </svg>
  );
}

/** Where the curve passes a limit: a diamond with a line down to its day. */
function TurnMark({ atX, atY }: { readonly atX: number; readonly atY: number }) {
  return (
    <g>
      <path d={`M${atX} ${atY} V${BOTTOM}`} className={classes.drop} />
      <path
        d={`M${atX} ${atY - 5} l5 5 l-5 5 l-5 -5 Z`}
        fill="var(--sk-sheet)"
        stroke="var(--sk-ink)"
        strokeWidth="1.7"
      />
    </g>
  );
}

interface DayMarksProps {
  readonly curve: TrustCurve;
  readonly x: (atH: number) => number;
  readonly right: number;
}

function DayMarks({ curve, x, right }: DayMarksProps) {
  const step = dayStep(curve.endH, Math.max(2, Math.floor((right - LEFT) / DAY_MARK_PX)));
  const days = Array.from({ length: Math.floor(curve.endH / 24 / step) + 1 }, (_, index) => index * step);
  return (
    <g>
      <path d={`M${LEFT} ${BOTTOM + 0.5} H${right}`} stroke="var(--sk-ink)" strokeWidth="1.5" />
      {days.map((day) => (
        <g key={day}>
          <path d={`M${x(day * 24)} ${BOTTOM} v5`} stroke="var(--sk-ink)" strokeWidth="1.5" />
          <text x={x(day * 24)} y={BOTTOM + 18} className={classes.day} data-first={day === 0 || undefined}>
            {day === 0 ? 'epoch' : `${day} d`}
          </text>
        </g>
      ))}
    </g>
  );
}

interface NowMarkProps {
  readonly atX: number;
  readonly atY: number;
  readonly errorS: number;
  readonly right: number;
}

const PLATE_PX = 112;

function NowMark({ atX, atY, errorS, right }: NowMarkProps) {
  const plateX = Math.min(Math.max(atX - PLATE_PX / 2, 0), right - PLATE_PX);
  return (
    <g>
      <path d={`M${atX} 20 V${BOTTOM}`} stroke="var(--sk-brass)" strokeWidth="2.4" />
      <path d={`M${atX + 1.7} 20 V${BOTTOM}`} stroke="var(--sk-ink)" strokeWidth="1" />
      <circle cx={atX} cy={atY} r="4.6" fill="var(--sk-sheet)" stroke="var(--sk-ink)" strokeWidth="2" />
      <rect x={plateX} y="0" width={PLATE_PX} height="20" rx="3" className={classes.plate} />
      <text x={plateX + PLATE_PX / 2} y="14" className={classes.plateWords}>
        now, {errorWords(errorS)}
      </text>
    </g>
  );
}
