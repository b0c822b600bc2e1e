import type { ComponentType, ReactNode } from 'react';

/** One page in the head line. */
export interface ShellItem {
  readonly label: string;
  readonly to: string;
  /** How many things wait there. */
  readonly count?: number;
  /** What the count means, read aloud: `3 requests wait`. */
  readonly countLabel?: string;
  /** A short urgent line under the word in the phone's bar: `held 7:42`. */
  readonly note?: string;
}

/** A router's link; a plain anchor by default. */
export type ShellLink = ComponentType<{
  to: string;
  className?: string | undefined;
  children?: ReactNode;
  'aria-current'?: 'page' | undefined;
  'aria-label'?: string | undefined;
  onClick?: (() => void) | undefined;
}>;

/** Who is looking. */
export interface ShellPerson {
  readonly name: string;
  /** `planner`, `manager`, `finance` */
  readonly roleText: string;
  readonly organisationName: string;
  readonly initials: string;
}

/** Props of `Shell`. */
export interface ShellProps {
  readonly items: readonly ShellItem[];
  /** Path of the page now open; the longest item that begins it has the hump. */
  readonly currentPath: string;
  /** Where the mark leads. Default `/`. */
  readonly homeTo?: string;
  /** Reads the clock in UTC milliseconds, each second. */
  readonly clock: () => number;
  readonly link?: ShellLink;
  /** Not given: nobody is signed in, and `guest` stands at the right. */
  readonly person?: ShellPerson;
  /** Contents of the person's menu, as `Menu.Item`s. */
  readonly personMenu?: ReactNode;
  readonly guest?: ReactNode;
  /** Small tools left of the clock, such as search. */
  readonly tools?: ReactNode;
  /** A line under the head: no network, e-mail not verified. */
  readonly banner?: ReactNode;
  /** Stays at the foot of every page while something is held. */
  readonly tray?: ReactNode;
  /** Title beside the mark on the phone. Default: label of the open item. */
  readonly phoneTitle?: string;
  readonly children: ReactNode;
}
