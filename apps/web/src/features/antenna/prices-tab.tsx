/** The price card: what a contact costs, what a cancellation gives back, and an example worked out while it is typed. */
import { Button, Group, NumberInput, Paper, Switch } from '@mantine/core';
import { useForm } from '@mantine/form';
import { type BodyInput, PriceCardInput, routes } from '@skyberth/shared';
import { useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { RefundSteps } from '../../drawing/curves/refund-steps.js';
import { call } from '../../lib/api-client.js';
import { type AntennaChange, availabilityQueries } from '../../lib/availability-queries.js';
import { formRules } from '../../lib/form-rules.js';
import { fieldErrors, sentenceOf } from '../../lib/problem-fields.js';
import { useLeaveGuard } from '../../lib/use-leave-guard.js';
import { instantOfText } from '../../lib/zone-time.js';
import { ChangeEffect } from '../../ui/change-effect.js';
import { MoneyInput } from '../../ui/money-input.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import classes from './antenna.module.css';
import { PriceCards, ValidFrom } from './price-cards.js';
import { PriceExample } from './price-example-card.js';
import { BusyRows, LadderRows, type PriceForm, VolumeRows } from './price-rows.js';
import { drawnSteps, type PriceValues, priceValues } from './price-values.js';
import type { TabProps } from './tab-props.js';
import { useAntennaChange } from './use-antenna-change.js';

const rules = formRules(PriceCardInput);

export function PricesTab({ antenna, station, mayWrite }: TabProps) {
  const form = useForm<PriceValues>({ initialValues: priceValues(antenna.price) });
  const client = useQueryClient();
  const currency = antenna.price?.currency ?? station.currency;
  const [validFrom, setValidFrom] = useState<string | null>(null);
  useLeaveGuard(form.isDirty() && !form.submitting, 'these prices', true);
  const save = useAntennaChange(
    (body: BodyInput<typeof routes.setPrice>) => call(routes.setPrice, { params: { id: antenna.id }, body }),
    'The prices are published. Quotes already given keep theirs.',
  );
  const submit = form.onSubmit(async (values) => {
    const faults = rules(values);
    if (Object.keys(faults).length > 0) {
      form.setErrors({ ...faults, '': 'Some fields below need another look.' });
      return;
    }
    try {
      const card = PriceCardInput.parse(values);
      const fromMs = validFrom === null ? null : instantOfText(validFrom, station.timeZone);
      const next = await save.mutateAsync(
        fromMs === null ? card : { ...card, validFromUtc: new Date(fromMs).toISOString() },
      );
      setValidFrom(null);
      void client.invalidateQueries({ queryKey: availabilityQueries.priceCards(antenna.id).queryKey });
      form.setInitialValues(priceValues(next.price));
      form.setValues(priceValues(next.price));
      form.resetDirty(priceValues(next.price));
    } catch (error) {
      form.setErrors({ ...fieldErrors(error), '': sentenceOf(error) });
    }
  });
  const priceForm: PriceForm = {
    values: form.values,
    field: (path) => ({ ...form.getInputProps(path), disabled: !mayWrite }),
    error: (path) => form.errors[path],
    set: (path, value) => form.setFieldValue(path, value),
    add: (list, item) => form.insertListItem(list, item),
    remove: (list, index) => form.removeListItem(list, index),
    mayWrite,
  };
  return (
    <form onSubmit={submit} noValidate className={classes.columns}>
      <div className={classes.form}>
        {form.errors[''] && <ProblemNotice title="The prices were not published">{form.errors['']}</ProblemNotice>}
        <BaseFields form={priceForm} currency={currency} />
        <BusyRows form={priceForm} timeZone={station.timeZone} />
        <ShortNotice form={priceForm} />
        <VolumeRows form={priceForm} />
        <LadderRows form={priceForm} />
        {mayWrite && <ValidFrom value={validFrom} onChange={setValidFrom} timeZone={station.timeZone} />}
        {mayWrite && (
          <Group>
            <Button type="submit" size="md" loading={form.submitting} disabled={!form.isDirty()}>
              {form.isDirty() || !antenna.price ? 'Publish these prices' : 'Nothing to publish'}
            </Button>
            {form.isDirty() && (
              <Button variant="default" size="md" onClick={() => form.reset()}>
                Put it back
              </Button>
            )}
          </Group>
        )}
        <PriceCards antennaId={antenna.id} currency={currency} />
      </div>
      <div className={`${classes.stack} ${classes.sticky}`}>
        <PriceExample antennaId={antenna.id} card={form.values} />
        <Paper component="section" withBorder className={classes.card} aria-labelledby="price-effect-title">
          <h2 id="price-effect-title" className={classes.cardTitle}>
            What these prices would do
          </h2>
          <ChangeEffect
            antennaId={antenna.id}
            change={mayWrite && form.isDirty() ? triedPrice(form.values) : null}
            idle="Change a price to see the coming week and the last month by it."
          />
        </Paper>
        <Paper component="section" withBorder className={classes.card} aria-labelledby="refund-title">
          <h2 id="refund-title" className={classes.cardTitle}>
            What a cancellation brings back
          </h2>
          <RefundSteps steps={drawnSteps(form.values.ladder)} />
        </Paper>
      </div>
    </form>
  );
}

/** The card as it is typed, as a change to try; null while it is incomplete. */
function triedPrice(values: PriceValues): AntennaChange | null {
  const price = PriceCardInput.safeParse(values);
  return price.success ? { price: price.data } : null;
}

function BaseFields({ form, currency }: { readonly form: PriceForm; readonly currency: string }) {
  return (
    <fieldset className={classes.group}>
      <legend>Base</legend>
      <MoneyInput label="Each minute" currency={currency} required {...form.field('perMinuteMinor')} />
      <MoneyInput label="Set-up, once a contact" currency={currency} required {...form.field('setupMinor')} />
      <MoneyInput label="Least charge of a contact" currency={currency} required {...form.field('minimumMinor')} />
    </fieldset>
  );
}

function ShortNotice({ form }: { readonly form: PriceForm }) {
  const notice = form.values.shortNotice;
  return (
    <section className={classes.part} aria-label="Short notice">
      <Switch
        label="Short notice costs more"
        checked={notice !== null}
        disabled={!form.mayWrite}
        onChange={(event) =>
          form.set('shortNotice', event.currentTarget.checked ? { underHours: 2, percent: 10 } : null)
        }
      />
      {notice && (
        <div className={classes.listRow}>
          <NumberInput label="Bought less than" suffix=" h before AOS" {...form.field('shortNotice.underHours')} />
          <NumberInput label="Added to the time" suffix=" %" {...form.field('shortNotice.percent')} />
        </div>
      )}
    </section>
  );
}
