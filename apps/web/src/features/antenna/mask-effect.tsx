/** What a changed mask does: to the sky, and to contacts that are sold already. */
import { Anchor, Paper } from '@mantine/core';
import type { ReactNode } from 'react';
import { Link } from 'react-router-dom';
import type { EditableMaskPoint } from '../../drawing/mask-editor/mask-editor-types.js';
import { paths } from '../../lib/paths.js';
import { formatDayTime, formatDegrees, formatDuration, formatNumber } from '../../ui/format.js';
import { Figure, Figures } from '../../ui/values.js';
import { largestChange, skyAbovePercent } from './mask-draft.js';
import classes from './mask-tab.module.css';
import { type MaskTouch, touchOf } from './sold-contacts.js';
import type { SoldContacts } from './use-sold-tracks.js';

interface MaskEffectProps {
  readonly before: readonly EditableMaskPoint[];
  readonly now: readonly EditableMaskPoint[];
  readonly isPublished: boolean;
  readonly sold: SoldContacts;
  /** Why the mask in force was published. */
  readonly reason: string;
  readonly children: ReactNode;
}

export function MaskEffect({ before, now, isPublished, sold, reason, children }: MaskEffectProps) {
  const nowPercent = skyAbovePercent(now);
  const change = nowPercent - skyAbovePercent(before);
  const { azimuthDeg, changeDeg } = largestChange(before, now);
  return (
    <Paper component="section" withBorder className={classes.effect} aria-labelledby="effect-title">
      <h2 id="effect-title" className={classes.title}>
        {isPublished ? 'What this change does' : 'The first mask'}
      </h2>
      <div aria-live="polite">
        <Figures columns={1}>
          <Figure
            label="Sky above the mask"
            value={formatNumber(nowPercent, 1)}
            unit="%"
            size="effect"
            note={<Change percent={change} azimuthDeg={azimuthDeg} changeDeg={changeDeg} isPublished={isPublished} />}
          />
        </Figures>
      </div>
      {isPublished && reason && (
        <p className={classes.small}>
          In force because: <strong>{reason}</strong>
        </p>
      )}
      <Touched before={before} now={now} sold={sold} />
      {children}
      <p className={classes.small}>The mask bounds what is sold; it is no safety limit for dish or people.</p>
    </Paper>
  );
}

interface ChangeProps {
  readonly percent: number;
  readonly azimuthDeg: number;
  readonly changeDeg: number;
  readonly isPublished: boolean;
}

function Change({ percent, azimuthDeg, changeDeg, isPublished }: ChangeProps) {
  if (!isPublished) return 'A flat mask is fine where the horizon is; drag it to the hills and masts you have.';
  if (changeDeg === 0) return 'Nothing is changed yet.';
  const points = `${formatNumber(Math.abs(percent), 2)} points ${percent < 0 ? 'less' : 'more'} than the mask in force`;
  return (
    <span className={percent < 0 ? classes.lost : classes.gained}>
      {points}; most at azimuth {formatDegrees(azimuthDeg)}, by {changeDeg > 0 ? '+' : ''}
      {formatDegrees(changeDeg)}.
    </span>
  );
}

function Touched({ before, now, sold }: Pick<MaskEffectProps, 'before' | 'now' | 'sold'>) {
  if (sold.isPending) return <p className={classes.small}>Reading the sold contacts ...</p>;
  if (sold.total === 0) return <p className={classes.small}>No contact is sold here for the time to come.</p>;
  const touched = sold.tracks.flatMap(({ booking, sold: track }) => {
    const touch = touchOf(track, before, now);
    return touch ? [{ booking, touch }] : [];
  });
  const looked = sold.tracks.length;
  return (
    <div>
      <h3 className={classes.subtitle}>Sold contacts it touches</h3>
      {touched.length === 0 ? (
        <p className={classes.small}>None of the next {looked}.</p>
      ) : (
        <ul className={classes.touched}>
          {touched.map(({ booking, touch }) => (
            <li key={booking.id} data-lost={touch.isLost || undefined}>
              <Anchor component={Link} to={paths.booking(booking.id)}>
                {booking.spacecraftName}, {formatDayTime(Date.parse(booking.aosUtc))}
              </Anchor>
              <strong>{touchWords(touch)}</strong>
            </li>
          ))}
        </ul>
      )}
      <p className={classes.small}>
        {looked < sold.total && `Looked at the next ${looked} of ${sold.total}. `}
        Publishing does not move or cancel what is sold: write to the buyer, or cancel with a full refund.
      </p>
    </div>
  );
}

/** Less would be written as 0 s. */
const LEAST_MS = 500;

function touchWords({ startsLaterMs, endsSoonerMs, cutOutMs, isLost }: MaskTouch): string {
  if (isLost) return 'falls below the mask';
  const words = [
    startsLaterMs > LEAST_MS ? `starts ${formatDuration(startsLaterMs)} later` : '',
    cutOutMs > LEAST_MS ? `loses ${formatDuration(cutOutMs)} between` : '',
    endsSoonerMs > LEAST_MS ? `ends ${formatDuration(endsSoonerMs)} sooner` : '',
  ];
  return words.filter(Boolean).join(', ');
}
