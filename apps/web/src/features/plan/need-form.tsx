/** What each spacecraft needs, within which limits: one line each, and the first copied to all at a click. */
import { Button, MultiSelect, NumberInput, Select, TextInput } from '@mantine/core';
import type { Spacecraft } from '@skyberth/shared';
import { useQuery } from '@tanstack/react-query';
import { type FormEvent, useState } from 'react';
import { MoneyInput } from '../../ui/money-input.js';
import { type CraftValues, freshCraft, type NeedValues } from './need-values.js';
import classes from './plan.module.css';
import { planQueries } from './plan-queries.js';

/** Explanations stand below, so that the fields of a row stand level. */
const BELOW = ['label', 'input', 'description', 'error'] as const;
const CURRENCIES = ['EUR', 'USD', 'GBP', 'NOK', 'SEK', 'CHF', 'CAD', 'AUD', 'NZD', 'JPY', 'ZAR'];

interface NeedFormProps {
  readonly initial: NeedValues;
  readonly fleet: readonly Pick<Spacecraft, 'id' | 'name'>[];
  readonly isBusy: boolean;
  readonly action: string;
  /** By dotted path, as the API names fields. */
  readonly errors: Readonly<Record<string, string>>;
  readonly onSubmit: (values: NeedValues) => void;
}

export function NeedForm({ initial, fleet, isBusy, action, errors, onSubmit }: NeedFormProps) {
  const [values, setValues] = useState(initial);
  const stations = useQuery(planQueries.stations());
  const names = new Map(fleet.map((each) => [each.id, each.name]));
  const places = (stations.data?.items ?? []).map((each) => ({ value: each.id, label: each.name }));
  const change = (part: Partial<NeedValues>) => setValues((old) => ({ ...old, ...part }));
  const changeCraft = (id: string, part: Partial<CraftValues>) =>
    change({ craft: values.craft.map((each) => (each.spacecraftId === id ? { ...each, ...part } : each)) });
  const choose = (ids: string[]) =>
    change({ craft: ids.map((id) => values.craft.find((each) => each.spacecraftId === id) ?? freshCraft(id)) });
  const copyToAll = (one: CraftValues) =>
    change({ craft: values.craft.map(({ spacecraftId }) => ({ ...one, spacecraftId })) });
  const submit = (event: FormEvent) => {
    event.preventDefault();
    onSubmit(values);
  };
  return (
    <form onSubmit={submit} className={classes.stack}>
      <div className={classes.fields}>
        <TextInput
          label="Name of the plan"
          required
          value={values.name}
          error={errors['name']}
          onChange={(event) => change({ name: event.currentTarget.value })}
        />
        <TextInput
          label="First day, UTC"
          type="date"
          required
          value={values.firstDay}
          error={errors['firstDay']}
          onChange={(event) => change({ firstDay: event.currentTarget.value })}
        />
        <NumberInput
          label="Days"
          required
          min={1}
          max={14}
          allowDecimal={false}
          value={values.days}
          error={errors['days']}
          onChange={(days) => change({ days: typed(days) })}
        />
        <Select
          label="Currency"
          description="Stations that sell in another are left out."
          inputWrapperOrder={[...BELOW]}
          data={CURRENCIES}
          value={values.currency}
          allowDeselect={false}
          onChange={(currency) => change({ currency: currency ?? values.currency })}
        />
        <MoneyInput
          label="Budget, with VAT"
          placeholder="none"
          currency={values.currency}
          value={values.budgetMinor}
          onChange={(budgetMinor) => change({ budgetMinor })}
        />
        <MultiSelect
          label="Preferred stations"
          description="Kept unless another is 10 % cheaper."
          inputWrapperOrder={[...BELOW]}
          data={places}
          searchable
          clearable
          value={[...values.preferredStationIds]}
          onChange={(preferredStationIds) => change({ preferredStationIds })}
        />
        <MultiSelect
          label="Banned stations"
          data={places}
          searchable
          clearable
          value={[...values.bannedStationIds]}
          error={errors['bannedStationIds']}
          onChange={(bannedStationIds) => change({ bannedStationIds })}
        />
      </div>
      <MultiSelect
        label="Spacecraft"
        required
        data={fleet.map((each) => ({ value: each.id, label: each.name }))}
        searchable
        value={values.craft.map((each) => each.spacecraftId)}
        onChange={choose}
      />
      {values.craft.map((each, place) => (
        <CraftFields
          key={each.spacecraftId}
          name={names.get(each.spacecraftId) ?? 'Spacecraft'}
          values={each}
          errorAt={(field) => errors[`craft.${place}.${field}`]}
          onChange={(part) => changeCraft(each.spacecraftId, part)}
          {...(place === 0 && values.craft.length > 1 ? { onCopy: () => copyToAll(each) } : {})}
        />
      ))}
      <div className={classes.acts}>
        <Button type="submit" loading={isBusy} disabled={values.craft.length === 0}>
          {action}
        </Button>
      </div>
    </form>
  );
}

interface CraftFieldsProps {
  readonly name: string;
  readonly values: CraftValues;
  readonly errorAt: (field: string) => string | undefined;
  readonly onChange: (part: Partial<CraftValues>) => void;
  readonly onCopy?: () => void;
}

const FIELDS: readonly {
  readonly key: Exclude<keyof CraftValues, 'spacecraftId'>;
  /** The field's name on the wire, where refusals point. */
  readonly wire: string;
  readonly label: string;
  readonly most: number;
}[] = [
  { key: 'contactsPerDay', wire: 'contactsPerDay', label: 'Contacts a day', most: 40 },
  { key: 'gbPerDay', wire: 'volumeBitsPerDay', label: 'Volume a day, GB', most: 1_000_000 },
  { key: 'deliverByH', wire: 'deliverByMs', label: 'Down by, h UTC', most: 24 },
  { key: 'longestGapH', wire: 'longestGapMs', label: 'Longest gap, h', most: 336 },
  { key: 'uplinkEveryH', wire: 'uplinkEveryMs', label: 'Uplink every, h', most: 336 },
  { key: 'lowestElevationDeg', wire: 'lowestElevationDeg', label: 'Rises above, °', most: 90 },
  { key: 'shortestMin', wire: 'shortestS', label: 'At least, min', most: 1_440 },
];

function CraftFields({ name, values, errorAt, onChange, onCopy }: CraftFieldsProps) {
  return (
    <fieldset className={classes.craft} style={{ border: 'none', margin: 0 }}>
      <legend>{name}</legend>
      <div className={classes.fields}>
        {FIELDS.map(({ key, wire, label, most }) => (
          <NumberInput
            key={key}
            label={label}
            min={0}
            max={most}
            placeholder="any"
            value={values[key]}
            error={errorAt(wire)}
            onChange={(next) => onChange({ [key]: typed(next) })}
          />
        ))}
      </div>
      {onCopy && (
        <div className={classes.acts}>
          <Button variant="default" size="xs" onClick={onCopy}>
            Ask the same for all
          </Button>
        </div>
      )}
    </fieldset>
  );
}

const typed = (value: string | number): number | '' => (typeof value === 'number' ? value : '');
