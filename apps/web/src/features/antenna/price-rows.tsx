/** The lists of a price card: busy hours, volume, and the steps of a cancellation. */
import { Anchor, Button, NumberInput, TextInput } from '@mantine/core';
import type { ReactNode } from 'react';
import classes from './antenna.module.css';
import type { PriceValues } from './price-values.js';
import { WeekdayPicker } from './weekday-picker.js';

type ListName = 'busyHours' | 'volume' | 'ladder';
type ListItem = PriceValues[ListName][number];

/** The part of the form that its sections use. */
export interface PriceForm {
  readonly values: PriceValues;
  readonly field: (path: string) => { readonly disabled: boolean };
  readonly error: (path: string) => ReactNode;
  readonly set: (path: string, value: unknown) => void;
  readonly add: (list: ListName, item: ListItem) => void;
  readonly remove: (list: ListName, index: number) => void;
  readonly mayWrite: boolean;
}

interface RowsProps {
  readonly form: PriceForm;
  readonly list: ListName;
  readonly title: string;
  readonly note: string;
  readonly addLabel: string;
  readonly item: ListItem;
  readonly children: (index: number) => ReactNode;
}

function Rows({ form, list, title, note, addLabel, item, children }: RowsProps) {
  const rows = form.values[list];
  return (
    <section className={classes.part} aria-labelledby={`${list}-title`}>
      <header>
        <h2 id={`${list}-title`} className={classes.cardTitle}>
          {title}
        </h2>
        <span className={classes.quiet}>{note}</span>
      </header>
      {rows.map((_row, index) => (
        // biome-ignore lint/suspicious/noArrayIndexKey: rows have no name of their own; their fields are named by place
        <div key={index} className={classes.listRow}>
          {children(index)}
          {form.mayWrite && (
            <Anchor
              component="button"
              type="button"
              onClick={() => form.remove(list, index)}
              aria-label={`Remove row ${index + 1} of ${title.toLowerCase()}`}
              pb={8}
            >
              Remove
            </Anchor>
          )}
          {form.error(`${list}.${index}`) && (
            <p className={classes.fieldError} role="alert">
              {form.error(`${list}.${index}`)}
            </p>
          )}
        </div>
      ))}
      {form.error(list) && (
        <p className={classes.fieldError} role="alert">
          {form.error(list)}
        </p>
      )}
      {form.mayWrite && (
        <div>
          <Button variant="default" onClick={() => form.add(list, structuredClone(item))}>
            {addLabel}
          </Button>
        </div>
      )}
    </section>
  );
}

export function BusyRows({ form, timeZone }: { readonly form: PriceForm; readonly timeZone: string }) {
  return (
    <Rows
      form={form}
      list="busyHours"
      title="Busy and quiet hours"
      note={`On the station's clock, ${timeZone.replaceAll('_', ' ')}. Below zero makes it cheaper.`}
      addLabel="Add hours"
      item={{ days: [1, 2, 3, 4, 5], fromLocal: '17:00', toLocal: '21:00', percent: 20 }}
    >
      {(index) => (
        <>
          <WeekdayPicker
            label={`Days of row ${index + 1}`}
            value={form.values.busyHours[index]?.days ?? []}
            onChange={(days) => form.set(`busyHours.${index}.days`, days)}
            readOnly={!form.mayWrite}
          />
          <TextInput label="From" w={72} {...form.field(`busyHours.${index}.fromLocal`)} />
          <TextInput label="To" w={72} {...form.field(`busyHours.${index}.toLocal`)} />
          <NumberInput label="Changes the time by" suffix=" %" w={140} {...form.field(`busyHours.${index}.percent`)} />
          {form.error(`busyHours.${index}.days`) && (
            <p className={classes.fieldError}>{form.error(`busyHours.${index}.days`)}</p>
          )}
        </>
      )}
    </Rows>
  );
}

export function VolumeRows({ form }: { readonly form: PriceForm }) {
  return (
    <Rows
      form={form}
      list="volume"
      title="Volume"
      note="For one buyer, counted over the month."
      addLabel="Add a tier"
      item={{ overMinutesInMonth: 300, percent: 10 }}
    >
      {(index) => (
        <>
          <NumberInput label="After" suffix=" min" w={140} {...form.field(`volume.${index}.overMinutesInMonth`)} />
          <NumberInput label="Taken off the time" suffix=" %" w={160} {...form.field(`volume.${index}.percent`)} />
        </>
      )}
    </Rows>
  );
}

export function LadderRows({ form }: { readonly form: PriceForm }) {
  return (
    <Rows
      form={form}
      list="ladder"
      title="Cancellation by the buyer"
      note="From many hours to few, never rising. If you cancel, the buyer gets all of it back."
      addLabel="Add a step"
      item={{ hoursBeforeAos: '', refundPercent: '' }}
    >
      {(index) => (
        <>
          <NumberInput label="Until" suffix=" h before AOS" w={170} {...form.field(`ladder.${index}.hoursBeforeAos`)} />
          <NumberInput label="Brings back" suffix=" %" w={140} {...form.field(`ladder.${index}.refundPercent`)} />
        </>
      )}
    </Rows>
  );
}
