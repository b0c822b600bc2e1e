import type { ReactNode } from 'react';
import classes from './blocks.module.css';

/** Props of `PageTitle`. */
export interface PageTitleProps {
  readonly title: ReactNode;
  /** A badge beside the title. */
  readonly badge?: ReactNode;
  /** A sentence or two below. */
  readonly children?: ReactNode;
  /** Buttons or tabs at the right. */
  readonly actions?: ReactNode;
}

/** The head of a page. The heading can take focus, so that a change of page is read aloud. */
export function PageTitle({ title, badge, children, actions }: PageTitleProps) {
  return (
    <header className={classes.pageTitle}>
      <div className={classes.pageTitleWords}>
        <div className={classes.pageTitleLine}>
          <h1 tabIndex={-1}>{title}</h1>
          {badge}
        </div>
        {children && <div className={classes.pageTitleText}>{children}</div>}
      </div>
      {actions && <div className={classes.pageTitleActions}>{actions}</div>}
    </header>
  );
}
