/** Elevation, Doppler, margin and the like over one time axis, crossed by one brass line. */
import { useEffect, useId, useRef, useState } from 'react';
import { formatDuration, formatTime } from '../../ui/format.js';
import classes from './contact-curves.module.css';
import type { ContactCurvesProps, CurvePhase } from './curves-types.js';
import { Panel } from './panel.js';
import { TimeBar } from './time-bar.js';

/** Room for numbers at the left and for half a time label at the right. */
export const PLOT_LEFT_PX = 40;
export const PLOT_RIGHT_PX = 22;
const PHASES_PX = 22;
const FIRST_WIDTH_PX = 640;

/** Draws the stack at the width it is given. Pointing anywhere reads every panel at that instant. */
export function ContactCurves(props: ContactCurvesProps) {
  const { fromMs, toMs, nowMs, panels, phases = [] } = props;
  const box = useRef<HTMLElement>(null);
  const widthPx = useWidth(box);
  const [pointedMs, setPointedMs] = useState<number | null>(null);
  const plotPx = Math.max(60, widthPx - PLOT_LEFT_PX - PLOT_RIGHT_PX);
  const x = (atMs: number) => PLOT_LEFT_PX + ((atMs - fromMs) / (toMs - fromMs)) * plotPx;
  const lineMs = pointedMs ?? (nowMs !== undefined && nowMs >= fromMs && nowMs <= toMs ? nowMs : null);
  const titleId = useId();
  const point = (event: React.PointerEvent) => {
    const left = box.current?.getBoundingClientRect().left ?? 0;
    const atMs = fromMs + ((event.clientX - left - PLOT_LEFT_PX) / plotPx) * (toMs - fromMs);
    setPointedMs(atMs < fromMs || atMs > toMs ? null : atMs);
  };
  return (
    <figure
      ref={box}
      className={classes.curves}
      aria-labelledby={titleId}
      onPointerMove={point}
      onPointerLeave={() => setPointedMs(null)}
    >
      <figcaption id={titleId} className="sk-hidden">
        {props.label}
      </figcaption>
      {phases.length > 0 && <Phases phases={phases} x={x} widthPx={widthPx} />}
      {panels.map((panel) => (
        <Panel
          key={panel.id}
          panel={panel}
          chart={props}
          x={x}
          widthPx={widthPx}
          lineMs={lineMs}
          isPointed={pointedMs !== null}
        />
      ))}
      <TimeBar fromMs={fromMs} toMs={toMs} x={x} widthPx={widthPx} lineMs={lineMs} isPointed={pointedMs !== null} />
    </figure>
  );
}

/** What the dish does when: set-up, contact, tear-down. */
function Phases({
  phases,
  x,
  widthPx,
}: {
  phases: readonly CurvePhase[];
  x: (atMs: number) => number;
  widthPx: number;
}) {
  return (
    <div className={classes.phases} style={{ height: PHASES_PX, width: widthPx }}>
      {phases.map((phase) => {
        const left = x(phase.fromMs);
        const words =
          phase.kind === 'contact' ? `${phase.label}, ${formatDuration(phase.toMs - phase.fromMs)}` : phase.label;
        return (
          <div
            key={phase.label}
            className={classes.phase}
            data-kind={phase.kind}
            style={{ left, width: x(phase.toMs) - left }}
            title={`${words}: ${formatTime(phase.fromMs)} to ${formatTime(phase.toMs)}`}
          >
            {words}
          </div>
        );
      })}
    </div>
  );
}

function useWidth(box: React.RefObject<HTMLElement | null>): number {
  const [widthPx, setWidthPx] = useState(FIRST_WIDTH_PX);
  useEffect(() => {
    const element = box.current;
    if (!element) return;
    const measure = () => setWidthPx(element.clientWidth);
    measure();
    const observer = new ResizeObserver(measure);
    observer.observe(element);
    return () => observer.disconnect();
  }, [box]);
  return widthPx;
}
