/** How far a run has come: gathered, reviewed, approved by a second person, sent. */
import type { PayoutRun } from '@skyberth/shared';
import { Sign } from '../../ui/signs.js';
import classes from './payouts.module.css';

const STEPS = ['Gathered', 'Review', 'Second person', 'Sent'] as const;
/** The step that a run in each state stands at; past the last one all is done. */
const AT: Readonly<Record<PayoutRun['state'], number>> = { draft: 1, reviewed: 2, paying: 3, done: 4, dropped: -1 };

export function RunSteps({ state }: { readonly state: PayoutRun['state'] }) {
  if (state === 'dropped') return null;
  return (
    <ol className={classes.steps} aria-label="How far the run has come">
      {STEPS.map((step, index) => (
        <li key={step} aria-current={index === AT[state] ? 'step' : undefined}>
          <Sign shape={index < AT[state] ? 'check' : index === AT[state] ? 'circle' : 'dashed'} />
          {step}
        </li>
      ))}
    </ol>
  );
}
