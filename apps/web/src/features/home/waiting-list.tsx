import { Anchor, Button } from '@mantine/core';
import type { HomeView } from '@skyberth/shared';
import { useState } from 'react';
import { Link } from 'react-router-dom';
import { DayTime } from '../../ui/day-time.js';
import { StateBadge } from '../../ui/state-badge.js';
import classes from './home.module.css';

type Waiting = HomeView['waiting'][number];

/** What a person reads at once; the rest on request. */
const FIRST = 8;
const DUE_WORDS: Readonly<Record<string, string>> = {
  hold: 'held until',
  request: 'answer by',
  contact: 'at',
  offer: 'offered until',
};

/** What needs the person now, the pressing things first (the server's order). */
export function WaitingList({ waiting }: { readonly waiting: readonly Waiting[] }) {
  const [isAll, setAll] = useState(false);
  const shown = isAll ? waiting : waiting.slice(0, FIRST);
  return (
    <section aria-labelledby="waiting">
      <h2 id="waiting">Needs you now</h2>
      {waiting.length === 0 && <p className={classes.calm}>Nothing waits for you. Calm water.</p>}
      <ul className={classes.waiting}>
        {shown.map((one) => (
          <li key={`${one.kind} ${one.path} ${one.sentence}`} data-urgent={one.urgent || undefined}>
            <div className={classes.waitingLine}>
              <Anchor component={Link} to={one.path}>
                {one.sentence}
              </Anchor>
              {one.urgent && <StateBadge tone="bad">pressing</StateBadge>}
            </div>
            <div className={classes.quiet}>
              {one.detail}
              {one.dueUtc && (
                <>
                  {one.detail ? ' · ' : ''}
                  {DUE_WORDS[one.kind] ?? 'by'} <DayTime atMs={Date.parse(one.dueUtc)} />
                </>
              )}
            </div>
          </li>
        ))}
      </ul>
      {waiting.length > FIRST && (
        <Button variant="subtle" onClick={() => setAll(!isAll)}>
          {isAll ? 'Show fewer' : `Show all ${waiting.length}`}
        </Button>
      )}
    </section>
  );
}
