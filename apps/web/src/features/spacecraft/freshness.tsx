/** Age and trust of element sets, in one look. */
import type { ElementFreshness, ElementSummary } from '@skyberth/shared';
import { StateBadge } from '../../ui/state-badge.js';
import { ageWords, errorWords, FRESHNESS_BADGES } from './element-words.js';
import classes from './spacecraft.module.css';

/** `Fresh`, `Ageing`, `Stale`, `No elements` */
export function FreshnessBadge({ freshness }: { readonly freshness: ElementFreshness }) {
  const { tone, text } = FRESHNESS_BADGES[freshness];
  return <StateBadge tone={tone}>{text}</StateBadge>;
}

interface ElementAgeProps {
  readonly freshness: ElementFreshness;
  readonly elements: Pick<ElementSummary, 'ageH' | 'timingErrorS'> | null;
}

/** The badge, the age, and by how much AOS and LOS may be off. */
export function ElementAge({ freshness, elements }: ElementAgeProps) {
  return (
    <div className={classes.age}>
      <FreshnessBadge freshness={freshness} />
      <span className={classes.quiet}>
        {elements ? `${ageWords(elements.ageH)}, ${errorWords(elements.timingErrorS)}` : 'no pass can be computed'}
      </span>
    </div>
  );
}
