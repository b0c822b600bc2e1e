import { Button } from '@mantine/core';
import type { ReactNode } from 'react';
import classes from './blocks.module.css';
import { RefusedSign } from './signs.js';

/** One rejected field or line. */
export interface ProblemItem {
  /** Where: `line 3, checksum` or the field's label. */
  readonly where?: string;
  readonly message: string;
}

/** Props of `ProblemNotice`. */
export interface ProblemNoticeProps {
  /** What happened, to what: `The element set wasn't saved`. */
  readonly title: string;
  /** What to do about it. */
  readonly children?: ReactNode;
  readonly items?: readonly ProblemItem[];
  readonly onRetry?: () => void;
  readonly retryLabel?: string;
  /** A number that support can find in the log. */
  readonly reference?: string;
}

/** Something went wrong: said in a sentence, announced at once, with the next act beside it. */
export function ProblemNotice({
  title,
  children,
  items = [],
  onRetry,
  retryLabel = 'Try again',
  reference,
}: ProblemNoticeProps) {
  return (
    <div className={classes.problem} role="alert">
      <RefusedSign />
      <div className={classes.problemBody}>
        <strong>{title}</strong>
        {children && <div>{children}</div>}
        {items.length > 0 && (
          <ul>
            {items.map((item) => (
              <li key={`${item.where ?? ''} ${item.message}`}>
                {item.where && <strong>{item.where}: </strong>}
                {item.message}
              </li>
            ))}
          </ul>
        )}
        {reference && <div className={classes.quiet}>Reference {reference}</div>}
        {onRetry && (
          <Button variant="default" size="sm" onClick={onRetry}>
            {retryLabel}
          </Button>
        )}
      </div>
    </div>
  );
}
