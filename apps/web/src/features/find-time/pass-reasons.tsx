import { Anchor } from '@mantine/core';
import type { FoundPass, SearchResult } from '@skyberth/shared';
import { Link } from 'react-router-dom';
import { paths } from '../../lib/paths.js';
import { formatDuration, formatMoney, formatTime } from '../../ui/format.js';
import { ReasonBubble } from '../../ui/reason-bubble.js';
import classes from './find-time.module.css';

interface PassReasonsProps {
  readonly pass: FoundPass;
  readonly names: SearchResult['spacecraft'];
  readonly onPart: (index: number) => void;
}

/** Why a pass cannot be had as a whole, what would make it possible, and the parts that can. */
export function PassReasons({ pass, names, onPart }: PassReasonsProps) {
  const name = names.find((one) => one.id === pass.spacecraftId)?.name ?? 'This pass';
  const isPart = pass.state === 'part for sale';
  return (
    <ReasonBubble
      title={`${name} at ${formatTime(Date.parse(pass.geometry.aosUtc))}: not for sale${isPart ? ' as a whole' : ''}`}
      action={isPart ? <PartLinks pass={pass} onPart={onPart} /> : undefined}
    >
      <ReasonSentences pass={pass} />
    </ReasonBubble>
  );
}

export function ReasonSentences({
  pass,
}: {
  readonly pass: Pick<FoundPass, 'reasons' | 'antennaId' | 'spacecraftId'>;
}) {
  return pass.reasons.map((reason) => (
    <p key={reason.code + reason.sentence} className={classes.reason}>
      {reason.sentence}
      {reason.remedy && <span className={classes.remedy}> {reason.remedy}</span>}{' '}
      {reason.code === 'clearance' && (
        <Anchor
          component={Link}
          to={paths.clearanceFor(pass.spacecraftId, pass.antennaId)}
          onClick={(event) => event.stopPropagation()}
        >
          Ask for a clearance
        </Anchor>
      )}
    </p>
  ));
}

/** `Show that part, 7 min 34 s from 16:09:41, €50.12` */
export function PartLinks({ pass, onPart }: Pick<PassReasonsProps, 'pass' | 'onPart'>) {
  return (
    <span className={classes.parts}>
      {pass.parts.map((part, index) => (
        <button
          key={part.aosUtc}
          type="button"
          className={classes.link}
          onClick={(event) => {
            // The board below would take the click for one on the pass.
            event.stopPropagation();
            onPart(index);
          }}
        >
          Show {pass.parts.length > 1 ? 'the' : 'that'} part,{' '}
          {formatDuration(Date.parse(part.losUtc) - Date.parse(part.aosUtc))} from {formatTime(Date.parse(part.aosUtc))}
          {pass.currency && `, ${formatMoney({ amountMinor: part.totalMinor, currency: pass.currency })}`}
        </button>
      ))}
    </span>
  );
}
