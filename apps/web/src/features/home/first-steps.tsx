import { Anchor } from '@mantine/core';
import type { HomeView } from '@skyberth/shared';
import { Link } from 'react-router-dom';
import classes from './home.module.css';

/** How to begin, in order; what is done is struck off in words as well as by its mark. */
export function FirstSteps({ steps }: { readonly steps: HomeView['firstSteps'] }) {
  const next = steps.find(({ done }) => !done);
  return (
    <section aria-labelledby="first-steps" className={classes.steps}>
      <h2 id="first-steps">First steps</h2>
      <ol>
        {steps.map((step) => (
          <li key={step.sentence} data-done={step.done || undefined} aria-current={step === next ? 'step' : undefined}>
            {step.done ? (
              <span>
                {step.sentence} <span className={classes.quiet}>done</span>
              </span>
            ) : (
              <Anchor component={Link} to={step.path} fw={step === next ? 800 : 600}>
                {step.sentence}
              </Anchor>
            )}
          </li>
        ))}
      </ol>
    </section>
  );
}
