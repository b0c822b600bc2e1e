import { useId } from 'react';
import { formatNumber, formatTime } from '../../ui/format.js';
import { type Point, pathThrough } from '../common/rose.js';
import classes from './contact-curves.module.css';
import type { ContactCurvesProps, CurvePanel } from './curves-types.js';
import { panelScale, valueAtShare } from './panel-scale.js';
import { timeMarks } from './time-bar.js';

const DEFAULT_PX = 104;
const PAD_PX = 5;
/** Grid lines stand about this far apart. */
const STEP_PX = 36;

interface PanelProps {
  readonly panel: CurvePanel;
  readonly chart: ContactCurvesProps;
  readonly x: (atMs: number) => number;
  readonly widthPx: number;
  readonly lineMs: number | null;
  readonly isPointed: boolean;
}

/** One quantity: title and reading above, curve below. What has been flown is solid, what is to come dashed. */
export function Panel({ panel, chart, x, widthPx, lineMs, isPointed }: PanelProps) {
  const { fromMs, toMs, aosMs, losMs, nowMs } = chart;
  const heightPx = panel.heightPx ?? DEFAULT_PX;
  const scale = panelScale(panel.values, {
    min: panel.minValue,
    max: panel.maxValue,
    mostSteps: Math.max(2, Math.round(heightPx / STEP_PX)),
  });
  const y = (value: number) => PAD_PX + (1 - (value - scale.min) / (scale.max - scale.min)) * (heightPx - 2 * PAD_PX);
  const share = (atMs: number) => (atMs - fromMs) / (toMs - fromMs);
  const flownMs = nowMs === undefined ? losMs : Math.max(aosMs, Math.min(losMs, nowMs));
  const between = (a: number, b: number) =>
    samples(panel.values, share(a), share(b)).map(({ at, value }) => ({
      x: x(fromMs + at * (toMs - fromMs)),
      y: y(value),
    }));
  const value = lineMs === null ? Number.NaN : valueAtShare(panel.values, share(lineMs));
  const reading = isPointed && lineMs !== null ? `${valueText(panel, value)} at ${formatTime(lineMs)}` : panel.reading;
  const [left, right] = [x(fromMs), x(toMs)];
  return (
    <div className={classes.panel}>
      <div className={classes.head}>
        <strong>{panel.title}</strong>
        {panel.note && <span>{panel.note}</span>}
        {reading && <b>{reading}</b>}
      </div>
      <svg width={widthPx} height={heightPx} className={classes.plot} role="img" aria-label={panelWords(panel, chart)}>
        <rect x={left} y={0} width={right - left} height={heightPx} fill="var(--sk-sheet)" />
        <rect x={x(aosMs)} y={0} width={x(losMs) - x(aosMs)} height={heightPx} fill="var(--sk-sea)" />
        <Grid {...{ x, y, left, right, heightPx }} ticks={scale.ticks} marks={timeMarks(fromMs, toMs, right - left)} />
        {panel.land && (
          <Land land={panel.land} x={x} y={y} fromMs={fromMs} toMs={toMs} bottom={y(Math.max(scale.min, 0))} />
        )}
        {panel.floor && <Floor floor={panel.floor} {...{ y, left, right, bottom: heightPx }} />}
        {panel.filled && <Water curve={between(aosMs, flownMs)} panel={panel} {...{ x, y, share, fromMs, toMs }} />}
        {panel.filled && <path d={pathThrough([...between(fromMs, toMs)])} className={classes.beyond} />}
        <path d={pathThrough(between(aosMs, flownMs))} className={classes.flown} />
        <path d={pathThrough(between(flownMs, losMs))} className={classes.ahead} />
        {lineMs !== null && (
          <path d={`M${x(lineMs)} 0 V${heightPx}`} className={isPointed ? classes.pointed : classes.now} />
        )}
        {lineMs !== null && !Number.isNaN(value) && (
          <circle cx={x(lineMs)} cy={y(value)} r="4.6" className={classes.dot} />
        )}
      </svg>
    </div>
  );
}

function samples(values: Float32Array, from: number, to: number): { at: number; value: number }[] {
  const last = values.length - 1;
  const inside: { at: number; value: number }[] = [];
  for (let index = Math.ceil(from * last); index <= Math.floor(to * last); index += 1)
    inside.push({ at: index / last, value: values[index] ?? Number.NaN });
  const ends = [from, to].map((at) => ({ at: Math.max(0, Math.min(1, at)), value: valueAtShare(values, at) }));
  return [ends[0], ...inside, ends[1]].filter(
    (one): one is { at: number; value: number } => !!one && !Number.isNaN(one.value),
  );
}

function valueText(panel: CurvePanel, value: number): string {
  if (Number.isNaN(value)) return 'no value';
  return `${formatNumber(value, panel.decimals ?? 1)}${panel.unit === '°' ? '' : '\u00a0'}${panel.unit}`;
}

function panelWords(panel: CurvePanel, { fromMs, toMs, aosMs, losMs }: ContactCurvesProps): string {
  const read = (atMs: number) => valueText(panel, valueAtShare(panel.values, (atMs - fromMs) / (toMs - fromMs)));
  const middleMs = (aosMs + losMs) / 2;
  const note = panel.note ? `, ${panel.note}` : '';
  return `${panel.title}${note}: ${read(aosMs)} at AOS, ${read(middleMs)} halfway, ${read(losMs)} at LOS. ${panel.reading ?? ''}`;
}

interface GridProps {
  readonly x: (atMs: number) => number;
  readonly y: (value: number) => number;
  readonly left: number;
  readonly right: number;
  readonly heightPx: number;
  readonly ticks: readonly number[];
  readonly marks: readonly number[];
}

function Grid({ x, y, left, right, heightPx, ticks, marks }: GridProps) {
  return (
    <>
      {marks.map((atMs) => (
        <path key={atMs} d={`M${x(atMs)} 0 V${heightPx}`} className={classes.grid} />
      ))}
      {ticks.map((tick) => (
        <g key={tick}>
          <path d={`M${left} ${y(tick)} H${right}`} className={tick === 0 ? classes.zero : classes.grid} />
          <text x={left - 8} y={y(tick)} className={classes.number}>
            {formatNumber(tick, Number.isInteger(tick) ? 0 : 1)}
          </text>
        </g>
      ))}
    </>
  );
}

function Land({
  land,
  x,
  y,
  fromMs,
  toMs,
  bottom,
}: {
  land: Float32Array;
  x: (atMs: number) => number;
  y: (value: number) => number;
  fromMs: number;
  toMs: number;
  bottom: number;
}) {
  const points = samples(land, 0, 1).map(
    ({ at, value }): Point => ({ x: x(fromMs + at * (toMs - fromMs)), y: y(value) }),
  );
  const first = points[0];
  const last = points.at(-1);
  if (!first || !last) return null;
  return <path d={`${pathThrough(points)} L${last.x} ${bottom} L${first.x} ${bottom} Z`} className={classes.land} />;
}

interface WaterProps {
  readonly curve: readonly Point[];
  readonly panel: CurvePanel;
  readonly x: (atMs: number) => number;
  readonly y: (value: number) => number;
  readonly share: (atMs: number) => number;
  readonly fromMs: number;
  readonly toMs: number;
}

/** Water between the flown curve and the land under it. */
function Water({ curve, panel, x, y, share, fromMs, toMs }: WaterProps) {
  if (curve.length < 2) return null;
  const span = x(toMs) - x(fromMs);
  const bed = [...curve].reverse().map((point) => {
    const atMs = fromMs + ((point.x - x(fromMs)) / span) * (toMs - fromMs);
    const ground = panel.land ? valueAtShare(panel.land, share(atMs)) : 0;
    return { x: point.x, y: Math.max(point.y, y(Number.isNaN(ground) ? 0 : ground)) };
  });
  return <path d={pathThrough([...curve, ...bed], true)} className={classes.water} />;
}

function Floor({
  floor,
  y,
  left,
  right,
  bottom,
}: {
  floor: { value: number; text: string };
  y: (value: number) => number;
  left: number;
  right: number;
  bottom: number;
}) {
  const id = useId();
  const top = y(floor.value);
  return (
    <>
      <pattern id={id} width="7" height="7" patternUnits="userSpaceOnUse">
        <path d="M-1 -1 L8 8" stroke="var(--sk-buoy)" strokeWidth="0.9" strokeOpacity="0.75" />
      </pattern>
      <rect
        x={left}
        y={top}
        width={right - left}
        height={Math.max(0, Math.min(bottom, y(0)) - top)}
        fill={`url(#${id})`}
      />
      <path d={`M${left} ${top} H${right}`} stroke="var(--sk-buoy)" strokeWidth="1" strokeDasharray="4 3" />
      <text x={right - 6} y={top - 6} className={classes.floorText}>
        {floor.text}
      </text>
    </>
  );
}
