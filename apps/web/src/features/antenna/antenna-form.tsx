/** Size, mount, limits and booking rules of an antenna, for a new one and for a change. */
import { Button, Group, NumberInput, SegmentedControl, Select, Switch, TextInput } from '@mantine/core';
import { useForm } from '@mantine/form';
import { AntennaInput } from '@skyberth/shared';
import type { ReactNode } from 'react';
import { formRules } from '../../lib/form-rules.js';
import { fieldErrors, sentenceOf } from '../../lib/problem-fields.js';
import { useLeaveGuard } from '../../lib/use-leave-guard.js';
import { formatDuration } from '../../ui/format.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import classes from './antenna.module.css';
import { type AntennaValues, MOUNT_WORDS } from './antenna-values.js';

const rules = formRules(AntennaInput);
export type AntennaInputValues = ReturnType<typeof AntennaInput.parse>;
type FieldOf = (path: keyof AntennaValues) => object;

interface AntennaFormProps {
  readonly initial: AntennaValues;
  readonly submitLabel: string;
  readonly onSave: (input: AntennaInputValues) => Promise<unknown>;
  /** Called after `onSave`, when leaving no longer loses anything. */
  readonly onSaved?: () => void;
  readonly readOnly?: boolean;
  readonly beside?: ReactNode;
}

export function AntennaForm({ initial, submitLabel, onSave, onSaved, readOnly = false, beside }: AntennaFormProps) {
  const form = useForm<AntennaValues>({ initialValues: initial, validate: rules, validateInputOnBlur: true });
  useLeaveGuard(form.isDirty() && !form.submitting, 'this antenna', true);
  const field: FieldOf = (path) => ({ ...form.getInputProps(path), disabled: readOnly });
  const submit = form.onSubmit(
    async (values) => {
      try {
        await onSave(AntennaInput.parse(values));
        form.resetDirty();
        if (onSaved) queueMicrotask(onSaved);
      } catch (error) {
        form.setErrors({ ...fieldErrors(error), '': sentenceOf(error) });
      }
    },
    (errors) => form.getInputNode(Object.keys(errors)[0] ?? '')?.focus(),
  );
  return (
    <form onSubmit={submit} noValidate className={classes.form}>
      {form.errors[''] && <ProblemNotice title="The antenna was not saved">{form.errors['']}</ProblemNotice>}
      <DishFields field={field} isTilted={form.values.mount === 'tilted az-el'} />
      <LimitFields field={field} />
      <BookingFields field={field} values={form.values} readOnly={readOnly} />
      {!readOnly && (
        <Group>
          <Button type="submit" loading={form.submitting} disabled={!form.isDirty()}>
            {submitLabel}
          </Button>
          {beside}
          {form.isDirty() && !onSaved && (
            <Button variant="default" onClick={() => form.reset()}>
              Put it back
            </Button>
          )}
        </Group>
      )}
    </form>
  );
}

function DishFields({ field, isTilted }: { readonly field: FieldOf; readonly isTilted: boolean }) {
  return (
    <fieldset className={classes.group}>
      <legend>The dish</legend>
      <TextInput label="Name" description="Buyers read it." required {...field('name')} />
      <NumberInput label="Diameter" suffix=" m" decimalScale={2} required {...field('diameterM')} />
      <NumberInput label="Beams at once" description="Contacts it can serve together" required {...field('beams')} />
      <Select
        label="Mount"
        data={Object.entries(MOUNT_WORDS).map(([value, label]) => ({ value, label }))}
        allowDeselect={false}
        {...field('mount')}
      />
      {isTilted && <NumberInput label="Tilt" suffix="°" decimalScale={1} {...field('tiltDeg')} />}
      <NumberInput label="Turns in azimuth" suffix=" °/s" decimalScale={2} required {...field('slewAzimuthDegPerS')} />
      <NumberInput
        label="Turns in elevation"
        suffix=" °/s"
        decimalScale={2}
        required
        {...field('slewElevationDegPerS')}
      />
    </fieldset>
  );
}

function LimitFields({ field }: { readonly field: FieldOf }) {
  return (
    <fieldset className={classes.group}>
      <legend>Limits of the sky</legend>
      <NumberInput
        label="Lowest to receive"
        description="Elevation; the mask may be higher"
        suffix="°"
        decimalScale={1}
        required
        {...field('lowestReceiveDeg')}
      />
      <NumberInput
        label="Lowest to transmit"
        description="Often higher, by licence or for people nearby"
        suffix="°"
        decimalScale={1}
        required
        {...field('lowestTransmitDeg')}
      />
      <NumberInput label="Set-up before AOS" suffix=" s" required {...field('setupS')} />
      <NumberInput label="Clearing away after LOS" suffix=" s" required {...field('teardownS')} />
    </fieldset>
  );
}

const NOT_A_NUMBER = '';
const lengthOf = (value: number | '', unitMs: number): string =>
  value === NOT_A_NUMBER ? '' : formatDuration(value * unitMs);

interface BookingFieldsProps {
  readonly field: FieldOf;
  readonly values: AntennaValues;
  readonly readOnly: boolean;
}

function BookingFields({ field, values, readOnly }: BookingFieldsProps) {
  const { checked, ...parts } = { checked: values.partsAllowed, ...field('partsAllowed') };
  return (
    <fieldset className={classes.group}>
      <legend>Booking rules</legend>
      <NumberInput
        label="Least notice"
        {...(Number(values.minNoticeMin) >= 60 ? { description: lengthOf(values.minNoticeMin, 60_000) } : {})}
        suffix=" min"
        required
        {...field('minNoticeMin')}
      />
      <NumberInput label="Bookable ahead" suffix=" days" required {...field('horizonDays')} />
      <NumberInput
        label="Shortest contact"
        description={lengthOf(values.minContactS, 1000)}
        suffix=" s"
        required
        {...field('minContactS')}
      />
      <NumberInput
        label="Longest contact"
        description={lengthOf(values.maxContactS, 1000)}
        suffix=" s"
        required
        {...field('maxContactS')}
      />
      <Switch label="Parts of a pass can be bought" checked={checked} {...parts} className={classes.switch} />
      <div className={classes.wide}>
        <div className={classes.fieldLabel} id="acceptance-label">
          How a booking is confirmed
        </div>
        <SegmentedControl
          aria-labelledby="acceptance-label"
          data={[
            { value: 'instant', label: 'At once' },
            { value: 'owner', label: 'After you accept' },
          ]}
          readOnly={readOnly}
          {...field('acceptance')}
        />
      </div>
      {values.acceptance === 'owner' && (
        <NumberInput
          label="You answer within"
          description={`${lengthOf(values.answerWithinMin, 60_000)}, and before the set-up; then the request lapses`}
          suffix=" min"
          required
          {...field('answerWithinMin')}
        />
      )}
    </fieldset>
  );
}
