/** The fields of a spacecraft, for a new one and for a change. */
import { Button, NumberInput, TextInput } from '@mantine/core';
import { type UseFormReturnType, useForm } from '@mantine/form';
import { useEffect, useRef } from 'react';
import { useLocation } from 'react-router-dom';
import { newIdempotencyKey } from '../../lib/api-client.js';
import { fieldErrors, sentenceOf } from '../../lib/problem-fields.js';
import { useLeaveGuard } from '../../lib/use-leave-guard.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { RadioFields } from './radio-fields.js';
import classes from './spacecraft.module.css';
import formClasses from './spacecraft-form.module.css';
import {
  emptyRadio,
  radioLike,
  type SpacecraftInputValues,
  type SpacecraftValues,
  spacecraftInput,
  spacecraftRules,
} from './spacecraft-values.js';

interface SpacecraftFormProps {
  readonly initial: SpacecraftValues;
  readonly submitLabel: string;
  /** Resolves when saved; a refusal is shown with its fields. */
  readonly onSave: (input: SpacecraftInputValues) => Promise<unknown>;
  /** Called after `onSave`, when leaving no longer loses anything. */
  readonly onSaved: () => void;
  readonly onCancel: () => void;
}

const MOST_RADIOS = 20;
const newKey = newIdempotencyKey;

export function SpacecraftForm({ initial, submitLabel, onSave, onSaved, onCancel }: SpacecraftFormProps) {
  const form = useForm<SpacecraftValues>({
    initialValues: initial,
    validate: spacecraftRules,
    validateInputOnBlur: true,
  });
  useLeaveGuard(form.isDirty() && !form.submitting, 'this spacecraft');
  const submit = form.onSubmit(
    async (values) => {
      try {
        await onSave(spacecraftInput(values));
        form.resetDirty();
        form.setErrors({});
        queueMicrotask(onSaved);
      } catch (error) {
        form.setErrors({ ...fieldErrors(error), '': sentenceOf(error) });
      }
    },
    (errors) => form.getInputNode(Object.keys(errors)[0] ?? '')?.focus(),
  );
  return (
    <form onSubmit={submit} noValidate className={formClasses.form}>
      {form.errors[''] && <ProblemNotice title="The spacecraft was not saved">{form.errors['']}</ProblemNotice>}
      <fieldset className={formClasses.group}>
        <legend>The spacecraft</legend>
        <TextInput label="Name" required {...form.getInputProps('name')} />
        <TextInput
          label="Short name"
          description="At most 6 characters, for the board"
          maxLength={6}
          required
          {...form.getInputProps('shortName')}
        />
        <NumberInput
          label="Catalogue number"
          description="Elements are matched by it"
          allowDecimal={false}
          allowNegative={false}
          {...form.getInputProps('catalogNumber')}
        />
        <TextInput
          label="International designator"
          description="Such as 2026-101A"
          maxLength={16}
          {...form.getInputProps('internationalDesignator')}
        />
      </fieldset>
      <RadiosPart form={form} />
      <div className={classes.acts}>
        <Button type="submit" size="md" loading={form.submitting}>
          {submitLabel}
        </Button>
        <Button variant="default" size="md" onClick={onCancel}>
          Cancel
        </Button>
      </div>
    </form>
  );
}

interface RadiosPartProps {
  readonly form: Pick<
    UseFormReturnType<SpacecraftValues>,
    'values' | 'getInputProps' | 'insertListItem' | 'removeListItem'
  >;
}

function RadiosPart({ form }: RadiosPartProps) {
  const { hash } = useLocation();
  const part = useRef<HTMLElement>(null);
  const { radios } = form.values;
  useEffect(() => {
    if (hash === '#radios') part.current?.scrollIntoView({ block: 'start' });
  }, [hash]);
  return (
    <section ref={part} id="radios" aria-labelledby="radios-title" className={classes.stack}>
      <div>
        <h2 id="radios-title" className={classes.heading}>
          Radios
        </h2>
        <p className={classes.help}>
          One for each direction and band. Antennas are matched by band, frequency and polarisation; the figures say
          whether the link closes.
        </p>
      </div>
      {radios.map((radio, index) => (
        <RadioFields
          key={radio.key}
          index={index}
          radio={radio}
          field={(name) => form.getInputProps(`radios.${index}.${name}`)}
          onCopy={() => form.insertListItem('radios', radioLike(radio, newKey()), index + 1)}
          onRemove={() => form.removeListItem('radios', index)}
          canCopy={radios.length < MOST_RADIOS}
        />
      ))}
      <div className={classes.acts}>
        {(['downlink', 'uplink'] as const).map((direction) => (
          <Button
            key={direction}
            variant="default"
            disabled={radios.length >= MOST_RADIOS}
            onClick={() => form.insertListItem('radios', emptyRadio(newKey(), direction))}
          >
            {direction === 'downlink' ? 'Add a downlink' : 'Add an uplink'}
          </Button>
        ))}
      </div>
    </section>
  );
}
