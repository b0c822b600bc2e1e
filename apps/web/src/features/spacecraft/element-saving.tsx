/** The consent and the button: nothing is saved that the person has not seen. */
import { Button, Checkbox } from '@mantine/core';
import type { ReadElement, Spacecraft } from '@skyberth/shared';
import { useState } from 'react';
import elementClasses from './elements.module.css';
import { countToSave, listWords, newCraftNames, saveBlock, saveLabel } from './reading-words.js';
import classes from './spacecraft.module.css';

export interface SaveChoice {
  readonly keepGoodOnes: boolean;
  readonly addSpacecraft: boolean;
}

interface ElementSavingProps {
  readonly good: readonly ReadElement[];
  readonly faultCount: number;
  /** The spacecraft that the set was attached to by hand. */
  readonly attachedTo: Spacecraft | null;
  readonly isSaving: boolean;
  readonly onSave: (choice: SaveChoice) => void;
}

export function ElementSaving({ good, faultCount, attachedTo, isSaving, onSave }: ElementSavingProps) {
  const [keepGoodOnes, setKeepGoodOnes] = useState(false);
  const [addSpacecraft, setAddSpacecraft] = useState(true);
  const names = newCraftNames(good);
  const block = saveBlock({ good, faultCount, keepGoodOnes, addSpacecraft });
  const count = countToSave(good, addSpacecraft);
  const choice = { keepGoodOnes: faultCount > 0 ? keepGoodOnes : !addSpacecraft, addSpacecraft };
  return (
    <div className={elementClasses.saving}>
      <NumberNote good={good} attachedTo={attachedTo} />
      {names.length > 0 && (
        <Checkbox
          checked={addSpacecraft}
          onChange={(event) => setAddSpacecraft(event.currentTarget.checked)}
          label={`Add ${listWords(names)} as ${names.length === 1 ? 'a new spacecraft' : 'new spacecraft'}`}
          description="Without it their sets are left out."
        />
      )}
      {faultCount > 0 && count > 0 && (
        <Checkbox
          checked={keepGoodOnes}
          onChange={(event) => setKeepGoodOnes(event.currentTarget.checked)}
          label={`Keep the good sets and leave out what is wrong (${faultCount})`}
        />
      )}
      <div className={classes.acts}>
        <Button
          size="md"
          loading={isSaving}
          disabled={block !== null}
          onClick={() => onSave(choice)}
          aria-describedby={block ? 'save-block' : undefined}
        >
          {count > 0 ? saveLabel(count) : 'Save'}
        </Button>
        {block && (
          <span id="save-block" className={classes.quiet}>
            {block}
          </span>
        )}
      </div>
    </div>
  );
}

/** A set attached by hand may carry the number of another object; that is said before it is saved. */
function NumberNote({ good, attachedTo }: Pick<ElementSavingProps, 'good' | 'attachedTo'>) {
  const other = good.find((each) => each.catalogNumber > 0 && each.catalogNumber !== attachedTo?.catalogNumber);
  if (!attachedTo || attachedTo.catalogNumber === null || !other) return null;
  return (
    <p className={classes.note} role="note">
      The set carries number {other.catalogNumber}, {attachedTo.name} has {attachedTo.catalogNumber}. Make sure that it
      is the same object: passes are computed from it.
    </p>
  );
}
