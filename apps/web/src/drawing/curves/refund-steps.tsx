import type { RefundStep } from './curves-types.js';
import classes from './refund-steps.module.css';

const HIGHEST_PX = 21;

/** Falling steps of what comes back on cancelling; the step of this moment is dark and its words are strong. */
export function RefundSteps({ steps }: { readonly steps: readonly RefundStep[] }) {
  return (
    <ol className={classes.steps} style={{ gridTemplateColumns: `repeat(${steps.length}, minmax(0, 1fr))` }}>
      {steps.map((step) => (
        <li key={step.untilText} data-now={step.isNow || undefined} aria-current={step.isNow ? 'step' : undefined}>
          <span className={classes.water} style={{ height: HIGHEST_PX }}>
            <span style={{ height: `${step.percent}%` }} />
          </span>
          <b>
            {step.percent}&nbsp;%{step.isNow ? ', now' : ''}
          </b>
          <span className={classes.until}>{step.untilText}</span>
        </li>
      ))}
    </ol>
  );
}
