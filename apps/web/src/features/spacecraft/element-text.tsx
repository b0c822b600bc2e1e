/** The text of element sets with its line numbers; lines with a fault are marked, and one can be shown. */
import { type Ref, useImperativeHandle, useMemo, useRef, useState } from 'react';
import classes from './element-text.module.css';

/** What the page may ask of the text. */
export interface ElementTextHandle {
  /** Selects a line, from 1, and brings it into view. */
  readonly showLine: (line: number) => void;
}

/** Props of `ElementText`. */
export interface ElementTextProps {
  readonly ref?: Ref<ElementTextHandle>;
  readonly id: string;
  readonly describedBy: string;
  readonly value: string;
  readonly onChange: (text: string) => void;
  /** Called with the whole text once something was pasted into it. */
  readonly onPasted: (text: string) => void;
  readonly faultyLines: ReadonlySet<number>;
}

/** The style sheet's own line height and upper padding. */
const LINE_PX = 20;
const PADDING_PX = 10;
const VIEW_LINES = 14;

/** Line numbers are drawn only where they are seen: a file of a whole catalogue has hundreds of thousands. */
export function ElementText({ ref, id, describedBy, value, onChange, onPasted, faultyLines }: ElementTextProps) {
  const area = useRef<HTMLTextAreaElement>(null);
  const isPaste = useRef(false);
  const [topPx, setTopPx] = useState(0);
  const lineCount = useMemo(() => countLines(value), [value]);
  useImperativeHandle(ref, () => ({ showLine: (line) => showLine(area.current, line) }), []);
  const first = Math.max(0, Math.floor((topPx - PADDING_PX) / LINE_PX));
  const shown = Array.from({ length: VIEW_LINES + 2 }, (_, index) => first + index + 1).filter(
    (line) => line <= lineCount,
  );
  return (
    <div className={classes.frame}>
      <div className={classes.gutter} aria-hidden="true">
        {shown.map((line) => (
          <span
            key={line}
            className={classes.lineNumber}
            data-bad={faultyLines.has(line) || undefined}
            style={{ top: PADDING_PX + (line - 1) * LINE_PX - topPx }}
          >
            {line}
          </span>
        ))}
      </div>
      <textarea
        ref={area}
        className={classes.area}
        id={id}
        aria-describedby={describedBy}
        aria-invalid={faultyLines.size > 0}
        value={value}
        rows={VIEW_LINES}
        wrap="off"
        spellCheck={false}
        autoComplete="off"
        onScroll={(event) => setTopPx(event.currentTarget.scrollTop)}
        onPaste={() => {
          isPaste.current = true;
        }}
        onChange={(event) => {
          const text = event.currentTarget.value;
          onChange(text);
          if (isPaste.current) onPasted(text);
          isPaste.current = false;
        }}
      />
    </div>
  );
}

function countLines(text: string): number {
  let count = 1;
  for (let at = text.indexOf('\n'); at >= 0; at = text.indexOf('\n', at + 1)) count += 1;
  return count;
}

function showLine(area: HTMLTextAreaElement | null, line: number): void {
  if (!area) return;
  let start = 0;
  for (let passed = 1; passed < line; passed += 1) {
    const end = area.value.indexOf('\n', start);
    if (end < 0) break;
    start = end + 1;
  }
  const end = area.value.indexOf('\n', start);
  area.focus();
  area.setSelectionRange(start, end < 0 ? area.value.length : end);
  area.scrollTop = Math.max(0, (line - VIEW_LINES / 2) * LINE_PX);
  area.scrollLeft = 0;
  area.scrollIntoView({ block: 'nearest' });
}
