import { Anchor } from '@mantine/core';
import type { SearchResult } from '@skyberth/shared';
import { Link } from 'react-router-dom';
import { paths } from '../../lib/paths.js';
import { formatNumber } from '../../ui/format.js';
import { Sign } from '../../ui/signs.js';
import classes from './find-time.module.css';
import { ageWords } from './pass-words.js';

/** Spacecraft whose passes cannot be computed, or whose elements are old: one line each, with the way to mend it. */
export function CraftWarnings({ spacecraft }: Pick<SearchResult, 'spacecraft'>) {
  const doubtful = spacecraft.filter(
    (one) => one.fault !== null || one.freshness === 'none' || one.freshness === 'stale',
  );
  if (doubtful.length === 0) return null;
  return (
    <ul className={classes.warnings}>
      {doubtful.map((one) => (
        <li key={one.id}>
          <Sign shape="diamond" sizePx={12} />
          <span>
            {one.fault ??
              `${one.name}: elements ${ageWords(one.ageH ?? 0)}, AOS and LOS are uncertain by about ±${formatNumber(one.timingErrorS ?? 0, 1)} s.`}{' '}
            <Anchor component={Link} to={`${paths.addElements}?craft=${one.id}`}>
              Give newer elements
            </Anchor>
          </span>
        </li>
      ))}
    </ul>
  );
}
