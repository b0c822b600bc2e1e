import { formatHourMinute, formatTime } from '../../ui/format.js';
import { axisStep, multiplesInView } from '../tide-board/view.js';
import classes from './contact-curves.module.css';

const BAR_PX = 6;
const LABEL_GAP_PX = 74;

/** Instants of the labels between two times. */
export function timeMarks(fromMs: number, toMs: number, plotPx: number): number[] {
  const { labelMs } = axisStep({ fromMs, toMs }, plotPx, LABEL_GAP_PX);
  return multiplesInView({ fromMs, toMs }, labelMs).filter((atMs) => atMs >= fromMs && atMs <= toMs);
}

interface TimeBarProps {
  readonly fromMs: number;
  readonly toMs: number;
  readonly x: (atMs: number) => number;
  readonly widthPx: number;
  readonly lineMs: number | null;
  readonly isPointed: boolean;
}

/** The shared axis: a scale bar, its labels, and the time at the brass line while pointing. */
export function TimeBar({ fromMs, toMs, x, widthPx, lineMs, isPointed }: TimeBarProps) {
  const plotPx = x(toMs) - x(fromMs);
  const { barMs, labelMs } = axisStep({ fromMs, toMs }, plotPx, LABEL_GAP_PX);
  const pieces = multiplesInView({ fromMs, toMs }, barMs).filter((atMs) => Math.round(atMs / barMs) % 2 === 0);
  const cut = (atMs: number) => Math.max(x(fromMs), Math.min(x(toMs), x(atMs)));
  const write = labelMs < 60_000 ? formatTime : formatHourMinute;
  return (
    <svg width={widthPx} height="34" className={classes.plot} role="presentation">
      <rect x={x(fromMs)} y="4" width={plotPx} height={BAR_PX} fill="var(--sk-sheet)" stroke="var(--sk-ink)" />
      {pieces.map((atMs) => (
        <rect
          key={atMs}
          x={cut(atMs)}
          y="4"
          width={Math.max(0, cut(atMs + barMs) - cut(atMs))}
          height={BAR_PX}
          fill="var(--sk-ink)"
        />
      ))}
      {timeMarks(fromMs, toMs, plotPx).map((atMs) => (
        <text key={atMs} x={x(atMs)} y="27" className={classes.time}>
          {write(atMs)}
        </text>
      ))}
      {lineMs !== null && <path d={`M${x(lineMs)} 0 V12`} className={isPointed ? classes.pointed : classes.now} />}
    </svg>
  );
}
