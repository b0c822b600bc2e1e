/** The fields of a station, for a new one and for a change. */
import { Button, Group, NumberInput, Select, Textarea, TextInput } from '@mantine/core';
import { useForm } from '@mantine/form';
import { StationInput } from '@skyberth/shared';
import { type ReactNode, useMemo } from 'react';
import { formRules } from '../../lib/form-rules.js';
import { fieldErrors, sentenceOf } from '../../lib/problem-fields.js';
import { serverNowMs } from '../../lib/server-clock.js';
import { useLeaveGuard } from '../../lib/use-leave-guard.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { currencyChoices, type StationValues, timeZoneChoices } from './station-values.js';
import { countryName } from './station-words.js';
import classes from './stations.module.css';

interface StationFormProps {
  readonly initial: StationValues;
  readonly submitLabel: string;
  /** Resolves when saved; a refusal is shown with its fields. */
  readonly onSave: (input: StationInputValues) => Promise<unknown>;
  /** Called after `onSave`, when leaving no longer loses anything. */
  readonly onSaved: () => void;
  readonly onCancel: () => void;
  /** A caution or note that depends on what is typed. */
  readonly note?: (values: StationValues) => ReactNode;
}

export type StationInputValues = ReturnType<typeof StationInput.parse>;

const rules = formRules(StationInput);

export function StationForm({ initial, submitLabel, onSave, onSaved, onCancel, note }: StationFormProps) {
  const form = useForm<StationValues>({ initialValues: initial, validate: rules, validateInputOnBlur: true });
  const zones = useMemo(() => timeZoneChoices(serverNowMs(), initial.timeZone), [initial.timeZone]);
  const currencies = useMemo(currencyChoices, []);
  useLeaveGuard(form.isDirty() && !form.submitting, 'this station');
  const submit = form.onSubmit(
    async (values) => {
      try {
        await onSave(StationInput.parse(values));
        form.resetDirty();
        form.setErrors({});
        queueMicrotask(onSaved);
      } catch (error) {
        form.setErrors({ ...fieldErrors(error), '': sentenceOf(error) });
      }
    },
    (errors) => form.getInputNode(Object.keys(errors)[0] ?? '')?.focus(),
  );
  const country = form.values.country;
  return (
    <form onSubmit={submit} noValidate className={classes.form}>
      {form.errors[''] && <ProblemNotice title="The station was not saved">{form.errors['']}</ProblemNotice>}
      <fieldset className={classes.group}>
        <legend>The station</legend>
        <TextInput
          className={classes.wide}
          label="Name"
          description="Buyers read it."
          required
          {...form.getInputProps('name')}
        />
        <Textarea
          className={classes.wide}
          label="Description"
          description="What a buyer should know: surroundings, crew, links to the outside."
          autosize
          minRows={3}
          {...form.getInputProps('description')}
        />
      </fieldset>
      <PositionFields field={(path) => form.getInputProps(path)} />
      <fieldset className={classes.group}>
        <legend>Clock and money</legend>
        <TextInput
          label="Country"
          description={/^[A-Z]{2}$/.test(country) ? countryName(country) : 'Two letters, ISO 3166'}
          maxLength={2}
          required
          {...form.getInputProps('country')}
          onChange={(event) => form.setFieldValue('country', event.currentTarget.value.toUpperCase())}
        />
        <Select
          label="Time zone"
          description="Opening hours and busy hours follow this clock."
          data={zones}
          searchable
          required
          allowDeselect={false}
          nothingFoundMessage="No zone has that in its name"
          limit={100}
          {...form.getInputProps('timeZone')}
        />
        <Select
          label="Currency"
          description="Prices of all its antennas; fixed once one has a price."
          data={currencies}
          searchable
          required
          allowDeselect={false}
          limit={60}
          {...form.getInputProps('currency')}
        />
      </fieldset>
      <fieldset className={classes.group}>
        <legend>Who answers</legend>
        <TextInput label="Contact person" autoComplete="off" {...form.getInputProps('contactName')} />
        <TextInput label="Telephone" type="tel" autoComplete="off" {...form.getInputProps('contactPhone')} />
      </fieldset>
      {note?.(form.values)}
      <Group>
        <Button type="submit" size="md" loading={form.submitting}>
          {submitLabel}
        </Button>
        <Button variant="default" size="md" onClick={onCancel}>
          Cancel
        </Button>
      </Group>
    </form>
  );
}

function PositionFields({ field }: { readonly field: (path: string) => object }) {
  const angle = { decimalScale: 6, suffix: '°', allowedDecimalSeparators: ['.', ','], required: true };
  return (
    <fieldset className={classes.group}>
      <legend>Where it stands</legend>
      <NumberInput label="Latitude" description="WGS84 degrees, north positive" {...angle} {...field('latitudeDeg')} />
      <NumberInput label="Longitude" description="WGS84 degrees, east positive" {...angle} {...field('longitudeDeg')} />
      <NumberInput
        label="Altitude"
        description="Metres above the ellipsoid"
        suffix=" m"
        decimalScale={1}
        required
        {...field('altitudeM')}
      />
      <p className={classes.help}>
        Every pass is computed from here: 0.001° is about 110 m on the ground. A surveyor's sheet gives height above sea
        level; the ellipsoid can lie up to about 100 m away from it.
      </p>
    </fieldset>
  );
}
