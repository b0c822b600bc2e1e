/** The fields of one radio, with their units. */
import { Button, Input, NumberInput, SegmentedControl, Select, TextInput } from '@mantine/core';
import { BANDS, POLARISATIONS } from '@skyberth/shared';
import { Caution } from '../../ui/caution.js';
import { polarisationWords } from './craft-words.js';
import { RateInput } from './rate-input.js';
import classes from './spacecraft.module.css';
import formClasses from './spacecraft-form.module.css';
import type { RadioValues } from './spacecraft-values.js';

interface RadioFieldsProps {
  readonly index: number;
  readonly radio: RadioValues;
  /** Input props of one field of this radio. */
  readonly field: (name: keyof RadioValues) => object;
  readonly canCopy: boolean;
  readonly onCopy: () => void;
  readonly onRemove: () => void;
}

export function RadioFields({ index, radio, field, canCopy, onCopy, onRemove }: RadioFieldsProps) {
  const title = radio.name.trim() || `Radio ${index + 1}`;
  return (
    <fieldset className={`${formClasses.group} ${formClasses.radioGroup}`} aria-label={title}>
      <div className={formClasses.radioHead}>
        <h3 className={classes.radioName}>
          {title}
          <span className={classes.quiet}>
            {radio.band} band {radio.direction}
          </span>
        </h3>
        <div className={classes.acts}>
          <Button variant="default" size="xs" onClick={onCopy} disabled={!canCopy} aria-label={`Copy ${title}`}>
            Copy
          </Button>
          <Button variant="default" size="xs" onClick={onRemove} aria-label={`Remove ${title}`}>
            Remove
          </Button>
        </div>
      </div>
      <Input.Wrapper className={formClasses.two} label="Direction" labelElement="div">
        <SegmentedControl
          fullWidth
          aria-label={`Direction of ${title}`}
          data={[
            { value: 'downlink', label: 'Downlink: it sends' },
            { value: 'uplink', label: 'Uplink: it hears' },
          ]}
          {...field('direction')}
        />
      </Input.Wrapper>
      <TextInput className={formClasses.two} label="Name" required {...field('name')} />
      <SignalFields field={field} rateBps={radio.dataRateBps} />
      {radio.direction === 'downlink' ? <DownlinkFields field={field} /> : <UplinkFields field={field} />}
      <NumberInput
        label="Pointing loss"
        description="Of its own antenna"
        suffix=" dB"
        decimalScale={2}
        {...field('pointingLossDb')}
      />
      {radio.direction === 'uplink' && <UplinkCaution />}
    </fieldset>
  );
}

type FieldOf = Pick<RadioFieldsProps, 'field'>;

function SignalFields({ field, rateBps }: FieldOf & { readonly rateBps: RadioValues['dataRateBps'] }) {
  return (
    <>
      <Select label="Band" data={[...BANDS]} allowDeselect={false} {...field('band')} />
      <NumberInput
        label="Centre frequency"
        suffix=" MHz"
        thousandSeparator=" "
        decimalScale={6}
        required
        {...field('centreFrequencyMhz')}
      />
      <NumberInput
        label="Bandwidth"
        suffix=" kHz"
        thousandSeparator=" "
        decimalScale={3}
        required
        {...field('bandwidthKhz')}
      />
      <Select
        label="Polarisation"
        data={POLARISATIONS.map((value) => ({ value, label: polarisationWords(value) }))}
        allowDeselect={false}
        {...field('polarisation')}
      />
      <TextInput label="Modulation" description="Such as OQPSK" required {...field('modulation')} />
      <TextInput label="Coding" description="Such as CCSDS convolutional 1/2" required {...field('coding')} />
      <RateInput label="Data rate" required rateBps={rateBps} {...field('dataRateBps')} />
    </>
  );
}

function DownlinkFields({ field }: FieldOf) {
  return (
    <>
      <NumberInput
        label="EIRP"
        description="Empty: no link margin"
        suffix=" dBW"
        decimalScale={2}
        {...field('eirpDbw')}
      />
      <NumberInput
        label="Eb/N0 needed"
        description="At the demodulator"
        suffix=" dB"
        decimalScale={2}
        {...field('requiredEbN0Db')}
      />
    </>
  );
}

function UplinkFields({ field }: FieldOf) {
  return (
    <NumberInput
      label="EIRP needed"
      description="The least it must hear"
      suffix=" dBW"
      decimalScale={2}
      {...field('requiredEirpDbw')}
    />
  );
}

function UplinkCaution() {
  return (
    <div className={formClasses.wide}>
      <Caution title="Only what your licence allows">
        <p>
          Frequency, bandwidth and power of an uplink stand in your licence and its coordination. No uplink is sold
          without a clearance of this spacecraft at the station; Skyberth does not replace the licence.
        </p>
      </Caution>
    </div>
  );
}
