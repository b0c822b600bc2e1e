/** The quiet frame of the pages before the sign-in. */
import { Paper } from '@mantine/core';
import type { ReactNode } from 'react';
import { serverNowMs } from '../../lib/server-clock.js';
import { useTitle } from '../../lib/use-title.js';
import { Shell } from '../../theme/shell/shell.js';
import classes from './auth.module.css';

interface AuthFrameProps {
  readonly title: string;
  readonly lead?: ReactNode;
  readonly wide?: boolean;
  readonly children: ReactNode;
  readonly foot?: ReactNode;
}

export function AuthFrame({ title, lead, wide, children, foot }: AuthFrameProps) {
  useTitle(title);
  return (
    <Shell items={[]} currentPath="" clock={serverNowMs} phoneTitle="Skyberth">
      <div className={classes.frame} data-wide={wide || undefined}>
        <h1 className={classes.title}>{title}</h1>
        {lead && <p className={classes.lead}>{lead}</p>}
        <Paper className={classes.card}>{children}</Paper>
        {foot && <div className={classes.foot}>{foot}</div>}
      </div>
    </Shell>
  );
}
