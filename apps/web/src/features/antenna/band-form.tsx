import { Button, Chip, Group, NumberInput, SegmentedControl, Select, Stack } from '@mantine/core';
import { useForm } from '@mantine/form';
import { type AntennaBand, AntennaBandInput, BANDS, POLARISATIONS } from '@skyberth/shared';
import { formRules, type NumberOrEmpty } from '../../lib/form-rules.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { Caution } from '../../ui/caution.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import classes from './antenna.module.css';

export type BandInput = ReturnType<typeof AntennaBandInput.parse>;

interface BandValues {
  direction: AntennaBand['direction'];
  band: AntennaBand['band'];
  fromMhz: NumberOrEmpty;
  toMhz: NumberOrEmpty;
  polarisations: string[];
  gOverTDbK: NumberOrEmpty;
  eirpDbw: NumberOrEmpty;
  lowestElevationDeg: NumberOrEmpty;
}

const valuesOf = (band: AntennaBand | null): BandValues => ({
  direction: band?.direction ?? 'receive',
  band: band?.band ?? 'S',
  fromMhz: band?.fromMhz ?? '',
  toMhz: band?.toMhz ?? '',
  polarisations: band?.polarisations ?? [],
  gOverTDbK: band?.gOverTDbK ?? '',
  eirpDbw: band?.eirpDbw ?? '',
  lowestElevationDeg: band?.lowestElevationDeg ?? '',
});

/** Only the figure that belongs to the direction is sent; an empty one is none. */
const bandOf = (values: BandValues): unknown => ({
  ...values,
  gOverTDbK: values.direction === 'receive' && values.gOverTDbK !== '' ? values.gOverTDbK : null,
  eirpDbw: values.direction === 'transmit' && values.eirpDbw !== '' ? values.eirpDbw : null,
  lowestElevationDeg: values.lowestElevationDeg === '' ? null : values.lowestElevationDeg,
});

const check = formRules(AntennaBandInput);
const rules = (values: BandValues): Record<string, string> => {
  const { gOverTDbK, ...errors } = check(bandOf(values));
  if (gOverTDbK === undefined) return errors;
  return { ...errors, [values.direction === 'receive' ? 'gOverTDbK' : 'eirpDbw']: gOverTDbK };
};

interface BandFormProps {
  readonly band: AntennaBand | null;
  readonly onKeep: (band: BandInput) => Promise<void>;
}

export function BandForm({ band, onKeep }: BandFormProps) {
  const form = useForm<BandValues>({ initialValues: valuesOf(band), validate: rules });
  const isTransmit = form.values.direction === 'transmit';
  const submit = form.onSubmit(async (values) => {
    try {
      await onKeep(AntennaBandInput.parse(bandOf(values)));
    } catch (error) {
      form.setErrors({ '': sentenceOf(error) });
    }
  });
  return (
    <form onSubmit={submit} noValidate>
      <Stack>
        {form.errors[''] && <ProblemNotice title="The band was not saved">{form.errors['']}</ProblemNotice>}
        <SegmentedControl
          aria-label="Direction"
          data={[
            { value: 'receive', label: 'Receive' },
            { value: 'transmit', label: 'Transmit' },
          ]}
          {...form.getInputProps('direction')}
        />
        <div className={classes.group}>
          <Select label="Band" data={[...BANDS]} allowDeselect={false} {...form.getInputProps('band')} />
          <NumberInput label="From" suffix=" MHz" decimalScale={3} required {...form.getInputProps('fromMhz')} />
          <NumberInput label="To" suffix=" MHz" decimalScale={3} required {...form.getInputProps('toMhz')} />
          {isTransmit ? (
            <NumberInput
              label="EIRP"
              description="The most you would send"
              suffix=" dBW"
              decimalScale={2}
              required
              {...form.getInputProps('eirpDbw')}
            />
          ) : (
            <NumberInput
              label="G/T"
              description="At 5° in clear sky, as measured"
              suffix=" dB/K"
              decimalScale={2}
              required
              {...form.getInputProps('gOverTDbK')}
            />
          )}
          <NumberInput
            label="Lowest elevation"
            description="Empty: the antenna's own limit"
            suffix="°"
            decimalScale={1}
            {...form.getInputProps('lowestElevationDeg')}
          />
        </div>
        <div>
          <div className={classes.fieldLabel} id="polarisation-label">
            Polarisations it can {isTransmit ? 'send' : 'take'}
          </div>
          <Chip.Group multiple {...form.getInputProps('polarisations')}>
            <Group gap={8} role="group" aria-labelledby="polarisation-label">
              {POLARISATIONS.map((one) => (
                <Chip key={one} value={one} size="sm" radius="sm" variant="outline">
                  {one}
                </Chip>
              ))}
            </Group>
          </Chip.Group>
          {form.errors['polarisations'] && (
            <p className={classes.fieldError} role="alert">
              {form.errors['polarisations']}
            </p>
          )}
        </div>
        {isTransmit && (
          <Caution title="Only what your licence allows">
            <p>
              Transmitting outside it is unlawful and can harm other users. Exposure of people near the beam stays with
              your licence, local rules and the interlock; Skyberth replaces none of them.
            </p>
          </Caution>
        )}
        <Button type="submit" loading={form.submitting}>
          {band ? 'Save the band' : 'Add the band'}
        </Button>
      </Stack>
    </form>
  );
}
