import { Button, Modal, Skeleton } from '@mantine/core';
import type { DisputeReason } from '@skyberth/shared';
import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { sentenceOf } from '../../lib/problem-fields.js';
import { DayTime } from '../../ui/day-time.js';
import { formatDuration } from '../../ui/format.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { disputeQueries } from './dispute-queries.js';
import { REASON_WORDS, shareText } from './dispute-words.js';
import classes from './disputes.module.css';

/** Earlier decisions for the same reason, without names, so that like is decided alike. */
export function Precedents({ reason }: { readonly reason: DisputeReason }) {
  const [isOpen, setOpen] = useState(false);
  const { data, error } = useQuery({ ...disputeQueries.precedents(reason), enabled: isOpen });
  return (
    <>
      <Button variant="default" onClick={() => setOpen(true)}>
        Earlier decisions
      </Button>
      <Modal
        opened={isOpen}
        onClose={() => setOpen(false)}
        title={`Earlier decisions: ${REASON_WORDS[reason]}`}
        size="lg"
      >
        {error && <ProblemNotice title="They could not be read">{sentenceOf(error)}</ProblemNotice>}
        {!data && !error && <Skeleton height={160} />}
        {data?.items.length === 0 && <p>No dispute with this reason was decided before.</p>}
        <ul className={classes.statements}>
          {data?.items.map((one) => (
            <li key={`${one.number} ${one.appealed}`}>
              <strong>
                Dispute {one.number}
                {one.appealed ? ', on appeal' : ''}: {shareText(one.refundBasisPoints)} back, borne by{' '}
                {one.borneBy === 'owner' ? 'the station' : 'the marketplace'}
              </strong>
              <div className={classes.by}>
                <DayTime atMs={Date.parse(one.decidedUtc)} show="day" />
                {one.gapS !== null && `, ${formatDuration(one.gapS * 1000)} without data`}
              </div>
              <p>{one.text}</p>
            </li>
          ))}
        </ul>
      </Modal>
    </>
  );
}
