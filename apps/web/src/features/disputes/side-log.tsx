import { placeWords, scaleOf, yOf } from '../../drawing/evidence/evidence-scale.js';
import { formatTime } from '../../ui/format.js';
import { Sign } from '../../ui/signs.js';
import type { LogEntry } from './dispute-words.js';
import classes from './disputes.module.css';

const GAP_PX = 36;
const SIGNS = { heard: 'circle', stopped: 'square', note: 'diamond' } as const;

interface SideLogProps {
  readonly title: string;
  readonly by: string;
  readonly entries: readonly LogEntry[];
  readonly aosMs: number;
  readonly losMs: number;
  readonly gap: { readonly fromMs: number; readonly toMs: number } | null;
  readonly heightPx: number;
}

/** What one side noticed, each thing beside its instant on the scale that the picture has too. */
export function SideLog({ title, by, entries, aosMs, losMs, gap, heightPx }: SideLogProps) {
  const scale = scaleOf(aosMs, losMs, heightPx);
  return (
    <section className={classes.log} aria-label={title}>
      <h2>{title}</h2>
      <p className={classes.by}>{by}</p>
      <div className={classes.logBody} style={{ height: heightPx }}>
        {gap && (
          <div
            className={classes.logGap}
            style={{ top: yOf(scale, gap.fromMs), height: Math.max(1, yOf(scale, gap.toMs) - yOf(scale, gap.fromMs)) }}
          />
        )}
        <div className={classes.logLine} />
        {entries.length === 0 && <p className={classes.nothing}>Nothing was noted.</p>}
        <ol>
          {placeWords(entries, scale, GAP_PX).map(({ item, y, wordsY }) => (
            <li key={item.key}>
              <span className={classes.logSign} style={{ top: y }}>
                <Sign shape={SIGNS[item.kind]} sizePx={13} />
              </span>
              <span className={classes.logWords} style={{ top: wordsY }}>
                <strong>{formatTime(item.atMs)}</strong> {item.words}
              </span>
            </li>
          ))}
        </ol>
      </div>
    </section>
  );
}
