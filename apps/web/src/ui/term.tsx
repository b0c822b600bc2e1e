import { Tooltip } from '@mantine/core';
import type { ReactNode } from 'react';
import { TERMS, type TermName } from './terms.js';
import classes from './values.module.css';

/** A word of the trade with its meaning on hover, focus and touch. `children` replaces the word, such as `G/T, dB/K`. */
export function Term({ name, children }: { readonly name: TermName; readonly children?: ReactNode }) {
  const term = TERMS[name];
  const label = 'long' in term ? `${term.long}. ${term.meaning}` : term.meaning;
  return (
    <Tooltip label={label} multiline maw={340} events={{ hover: true, focus: true, touch: true }}>
      <button type="button" className={classes.term}>
        {children ?? term.word}
      </button>
    </Tooltip>
  );
}
