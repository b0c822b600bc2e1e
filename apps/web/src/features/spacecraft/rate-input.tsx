import { NumberInput, type NumberInputProps } from '@mantine/core';
import { rateWords } from './craft-words.js';

interface RateInputProps extends Omit<NumberInputProps, 'value' | 'defaultValue' | 'onChange' | 'suffix'> {
  /** Bits per second, the form's own value; '' while the field is empty. */
  readonly rateBps: number | '';
  readonly onChange?: (rateBps: number | '') => void;
}

const BPS_PER_KBPS = 1_000;

/** A data rate: typed in kbit/s, kept in whole bit/s; a large one is read back in its larger unit. */
export function RateInput({ rateBps, onChange, ...rest }: RateInputProps) {
  const { value: _value, ...props } = rest as NumberInputProps;
  return (
    <NumberInput
      {...props}
      description={typeof rateBps === 'number' && rateBps >= 1_000_000 ? rateWords(rateBps) : undefined}
      value={typeof rateBps === 'number' ? rateBps / BPS_PER_KBPS : ''}
      onChange={(next) =>
        onChange?.(next === '' || !Number.isFinite(Number(next)) ? '' : Math.round(Number(next) * BPS_PER_KBPS))
      }
      decimalScale={3}
      thousandSeparator=" "
      suffix=" kbit/s"
    />
  );
}
