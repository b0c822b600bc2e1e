/** The horizon of an antenna, changed by dragging its points on the rose or by the arrow keys. */
import { type KeyboardEvent, type PointerEvent, useId, useRef } from 'react';
import { formatDegrees } from '../../ui/format.js';
import { maskElevationAt, maskOutline, pathThrough, type Rose, toDirection, toPoint } from '../common/rose.js';
import { RoseRim, RoseWater } from '../common/rose-ground.js';
import classes from './mask-editor.module.css';
import type { EditableMaskPoint, MaskEditorProps, MaskNote } from './mask-editor-types.js';
import { addPoint, azimuthAfter, isChanged, keyMove, movePoint, removePoint } from './mask-points.js';
import { MinuteBars } from './minute-bars.js';
import { PointPlate } from './point-plate.js';

const BOX_PX = 480;
const ROSE: Rose = { centreX: BOX_PX / 2, centreY: BOX_PX / 2, radiusPx: 168 };
const HANDLE_PX = 9;
/** A finger is wider than a handle. */
const TARGET_PX = 34;

/** Draws and edits. The table with the same points stands beside it and belongs to the caller. */
export function MaskEditor(props: MaskEditorProps) {
  const { points, before = [], pickedId = null, readOnly = false } = props;
  const svg = useRef<SVGSVGElement>(null);
  const lostId = useId();
  const wordsId = useId();
  const picked = points.find((point) => point.id === pickedId);
  const { place, addAt, grab, drag, drop, key } = useMaskActs(props, svg);
  return (
    // biome-ignore lint/a11y/useSemanticElements: a drawing with handles cannot be a fieldset
    <svg
      ref={svg}
      viewBox={`0 0 ${BOX_PX} ${BOX_PX}`}
      className={classes.rose}
      onDoubleClick={(event) => !readOnly && addAt(place(event).azimuthDeg)}
      role="group"
      aria-label={props.label}
      aria-describedby={wordsId}
    >
      <LostPattern id={lostId} />
      <g>
        <desc id={wordsId}>{groundWords(props)}</desc>
        <RoseWater rose={ROSE} mask={points} isLarge />
        {before.length > 0 && <Difference points={points} before={before} lostId={lostId} />}
        <path d={pathThrough(maskOutline(ROSE, points), true)} className={classes.shore} />
        {props.notes?.map((note) => (
          <Note key={note.text} note={note} />
        ))}
        <RoseRim rose={ROSE} isLarge />
        {props.minutes && <MinuteBars rose={ROSE} minutes={props.minutes} lostId={lostId} />}
      </g>
      {picked && !readOnly && <Ray point={picked} />}
      {!readOnly &&
        points.map((point) => (
          <Handle
            key={point.id}
            point={point}
            isChanged={before.length > 0 && isChanged(point, before)}
            isPicked={point.id === pickedId}
            onPointerDown={(event) => grab(event, point.id)}
            onPointerMove={drag}
            onPointerUp={drop}
            onFocus={() => props.onPick(point.id)}
            onKeyDown={(event) => key(event, point)}
          />
        ))}
      {picked && !readOnly && (
        <PointPlate
          rose={ROSE}
          point={picked}
          wasDeg={before.length > 0 ? maskElevationAt(before, picked.azimuthDeg) : null}
        />
      )}
    </svg>
  );
}

/** Dragging, keys and adding; each tells the whole new list. */
function useMaskActs(props: MaskEditorProps, svg: React.RefObject<SVGSVGElement | null>) {
  const { points, readOnly = false } = props;
  const dragged = useRef<string | null>(null);
  const place = (event: { clientX: number; clientY: number }) => {
    const box = svg.current?.getBoundingClientRect();
    const scale = BOX_PX / (box?.width || BOX_PX);
    return toDirection(ROSE, {
      x: (event.clientX - (box?.left ?? 0)) * scale,
      y: (event.clientY - (box?.top ?? 0)) * scale,
    });
  };
  const addAt = (azimuthDeg: number) => {
    const id = crypto.randomUUID();
    const more = addPoint(points, azimuthDeg, id);
    if (more === points) return;
    props.onChange(more, true);
    props.onPick(id);
  };
  const grab = (event: PointerEvent, id: string) => {
    if (readOnly) return;
    dragged.current = id;
    event.currentTarget.setPointerCapture(event.pointerId);
    props.onPick(id);
  };
  const drag = (event: PointerEvent) => {
    if (dragged.current) props.onChange(movePoint(points, dragged.current, place(event)), false);
  };
  const drop = (event: PointerEvent) => {
    if (!dragged.current) return;
    props.onChange(movePoint(points, dragged.current, place(event)), true);
    dragged.current = null;
  };
  const key = (event: KeyboardEvent, point: EditableMaskPoint) => {
    const to = keyMove(event.key, event.shiftKey, point);
    if (to) props.onChange(movePoint(points, point.id, to), true);
    else if (event.key === 'Delete' || event.key === 'Backspace') remove(props, point.id);
    else if (event.key === 'Insert' || event.key === 'Enter') addAt(azimuthAfter(points, point.id) ?? 0);
    else if (event.key === 'Escape') props.onPick(null);
    else return;
    event.preventDefault();
  };
  return { place, addAt, grab, drag, drop, key };
}

function remove(props: MaskEditorProps, id: string): void {
  const fewer = removePoint(props.points, id);
  if (fewer === props.points) return;
  const at = props.points.findIndex((point) => point.id === id);
  props.onChange(fewer, true);
  props.onPick(fewer[Math.min(at, fewer.length - 1)]?.id ?? null);
}

function groundWords({ points, minutes }: MaskEditorProps): string {
  const highest = points.reduce<EditableMaskPoint | null>(
    (best, one) => (!best || one.elevationDeg > best.elevationDeg ? one : best),
    null,
  );
  const lost = (minutes ?? []).reduce((sum, bar) => sum + bar.minutesBefore - bar.minutesNow, 0);
  return [
    `${points.length} points`,
    highest ? `highest ${formatDegrees(highest.elevationDeg)} at azimuth ${formatDegrees(highest.azimuthDeg)}` : '',
    minutes ? `${Math.round(Math.abs(lost))} minutes ${lost >= 0 ? 'fewer' : 'more'} than before` : '',
  ]
    .filter(Boolean)
    .join(', ');
}

interface HandleProps extends Omit<React.SVGProps<SVGRectElement>, 'points'> {
  readonly point: EditableMaskPoint;
  readonly isChanged: boolean;
  readonly isPicked: boolean;
}

/** A square handle; the ring round the picked one is a shape, not only a colour. */
function Handle({ point, isChanged: changed, isPicked, ...events }: HandleProps) {
  const { x, y } = toPoint(ROSE, point.azimuthDeg, point.elevationDeg);
  return (
    <g transform={`rotate(${point.azimuthDeg} ${x} ${y})`}>
      {isPicked && <circle cx={x} cy={y} r="13" className={classes.ring} />}
      <rect
        x={x - HANDLE_PX / 2}
        y={y - HANDLE_PX / 2}
        width={HANDLE_PX}
        height={HANDLE_PX}
        className={classes.handle}
        data-changed={changed || undefined}
      />
      <rect
        x={x - TARGET_PX / 2}
        y={y - TARGET_PX / 2}
        width={TARGET_PX}
        height={TARGET_PX}
        className={classes.target}
        role="slider"
        tabIndex={0}
        aria-label={`Point at azimuth ${formatDegrees(point.azimuthDeg)}`}
        aria-valuemin={0}
        aria-valuemax={90}
        aria-valuenow={point.elevationDeg}
        aria-valuetext={`azimuth ${formatDegrees(point.azimuthDeg)}, elevation ${formatDegrees(point.elevationDeg)}`}
        aria-orientation="vertical"
        {...events}
      />
    </g>
  );
}

/** Water lost slanted in red, the old line dashed. */
function Difference({
  points,
  before,
  lostId,
}: {
  points: readonly EditableMaskPoint[];
  before: readonly EditableMaskPoint[];
  lostId: string;
}) {
  const azimuths = Array.from({ length: 720 }, (_, index) => index / 2);
  const outline = (elevationAt: (azimuthDeg: number) => number) =>
    pathThrough(
      azimuths.map((azimuthDeg) => toPoint(ROSE, azimuthDeg, Math.max(0, elevationAt(azimuthDeg)))),
      true,
    );
  const old = outline((azimuthDeg) => maskElevationAt(before, azimuthDeg));
  const higher = outline((azimuthDeg) =>
    Math.max(maskElevationAt(before, azimuthDeg), maskElevationAt(points, azimuthDeg)),
  );
  return (
    <>
      <path d={`${old} ${higher}`} fillRule="evenodd" fill="var(--sk-buoy-wash)" />
      <path d={`${old} ${higher}`} fillRule="evenodd" fill={`url(#${lostId})`} />
      <path d={old} fill="none" stroke="var(--sk-ink)" strokeWidth="1.2" strokeDasharray="4 3" />
    </>
  );
}

function LostPattern({ id }: { readonly id: string }) {
  return (
    <defs>
      <pattern id={id} width="6" height="6" patternUnits="userSpaceOnUse">
        <path d="M-1 -1 L7 7 M-1 5 L1 7 M5 -1 L7 1" stroke="var(--sk-buoy)" strokeWidth="1" />
      </pattern>
    </defs>
  );
}

function Ray({ point }: { readonly point: EditableMaskPoint }) {
  const { x, y } = toPoint(ROSE, point.azimuthDeg, point.elevationDeg);
  const rim = toPoint(ROSE, point.azimuthDeg, 0);
  return <path d={`M${ROSE.centreX} ${ROSE.centreY} L${x} ${y} L${rim.x} ${rim.y}`} className={classes.ray} />;
}

function Note({ note }: { readonly note: MaskNote }) {
  const { x, y } = toPoint(ROSE, note.azimuthDeg, note.elevationDeg);
  return (
    <text
      x={x + (x > ROSE.centreX ? -9 : 9)}
      y={y}
      textAnchor={x > ROSE.centreX ? 'end' : 'start'}
      dominantBaseline="central"
      className={classes.note}
    >
      {note.text}
    </text>
  );
}
