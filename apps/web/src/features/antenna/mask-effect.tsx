/** What a changed mask does: to the sky, and to contacts that are sold already. */
import { Paper } from '@mantine/core';
import type { ReactNode } from 'react';
import type { EditableMaskPoint } from '../../drawing/mask-editor/mask-editor-types.js';
import { ChangeEffect } from '../../ui/change-effect.js';
import { formatDegrees, formatNumber } from '../../ui/format.js';
import { Figure, Figures } from '../../ui/values.js';
import { largestChange, maskOf, skyAbovePercent } from './mask-draft.js';
import classes from './mask-tab.module.css';

interface MaskEffectProps {
  readonly before: readonly EditableMaskPoint[];
  readonly now: readonly EditableMaskPoint[];
  readonly isPublished: boolean;
  readonly antennaId: string;
  readonly isChanged: boolean;
  /** Why the mask in force was published. */
  readonly reason: string;
  readonly children: ReactNode;
}

export function MaskEffect({ before, now, isPublished, antennaId, isChanged, reason, children }: MaskEffectProps) {
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
      <ChangeEffect antennaId={antennaId} change={isChanged ? { mask: maskOf(now) } : null} />
      {isChanged && (
        <p className={classes.small}>
          Publishing does not move or cancel what is sold: write to the buyer, or cancel with a full refund.
        </p>
      )}
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
