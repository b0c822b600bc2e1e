import { Popover } from '@mantine/core';
import { type ReactNode, useId, useState } from 'react';
import classes from './filter-sentence.module.css';

/** The filter as one sentence that is also the page's title: words around, controls within. */
export function FilterSentence({
  children,
  asTitle = true,
}: {
  readonly children: ReactNode;
  readonly asTitle?: boolean;
}) {
  return asTitle ? <h1 className={classes.sentence}>{children}</h1> : <p className={classes.sentence}>{children}</p>;
}

/** Props of `FilterPart`. */
export interface FilterPartProps {
  /** What the part is about, for a screen reader: `Spacecraft`. */
  readonly name: string;
  /** The present choice, as words of the sentence: `4 spacecraft`. */
  readonly value: string;
  /** The control. A function receives `close`. */
  readonly children: ReactNode | ((close: () => void) => ReactNode);
  /** Width of the popover in px. Default 300. */
  readonly widthPx?: number;
}

/** An underlined part of the sentence; a click opens its control below. */
export function FilterPart({ name, value, children, widthPx = 300 }: FilterPartProps) {
  const [isOpen, setOpen] = useState(false);
  const titleId = useId();
  const close = () => setOpen(false);
  return (
    <Popover
      opened={isOpen}
      onChange={setOpen}
      width={widthPx}
      position="bottom-start"
      offset={8}
      trapFocus
      returnFocus
    >
      <Popover.Target>
        <button
          type="button"
          className={classes.part}
          aria-label={`${name}: ${value}`}
          onClick={() => setOpen(!isOpen)}
        >
          {value}
          <svg width="9" height="6" viewBox="0 0 9 6" aria-hidden="true" focusable="false">
            <path d="M1 1 L4.5 4.5 L8 1" fill="none" stroke="var(--sk-deep)" strokeWidth="1.9" />
          </svg>
        </button>
      </Popover.Target>
      <Popover.Dropdown aria-labelledby={titleId}>
        <div className={classes.partTitle} id={titleId}>
          {name}
        </div>
        {typeof children === 'function' ? children(close) : children}
      </Popover.Dropdown>
    </Popover>
  );
}
