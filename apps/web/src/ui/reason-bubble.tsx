import type { ReactNode } from 'react';
import classes from './blocks.module.css';
import { RefusedSign } from './signs.js';

/** Props of `ReasonBubble`. */
export interface ReasonBubbleProps {
  /** `Whimbrel 5 at 16:07:50: not for sale as a whole` */
  readonly title: string;
  /** The sentence, with figures. */
  readonly children: ReactNode;
  /** A link to the part that could be sold. */
  readonly action?: ReactNode;
}

/** Why a pass can't be sold, and what could be. The board draws the tail. */
export function ReasonBubble({ title, children, action }: ReasonBubbleProps) {
  return (
    <div className={classes.reason}>
      <div className={classes.reasonTitle}>
        <RefusedSign />
        <strong>{title}</strong>
      </div>
      <div>{children}</div>
      {action && <div>{action}</div>}
    </div>
  );
}
