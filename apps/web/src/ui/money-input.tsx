import { NumberInput, type NumberInputProps } from '@mantine/core';
import { currencyDecimals } from './format.js';

/** Props of `MoneyInput`. */
export interface MoneyInputProps
  extends Omit<NumberInputProps, 'value' | 'defaultValue' | 'onChange' | 'decimalScale' | 'suffix'> {
  /** Whole minor units; '' while the field is empty. */
  readonly value?: number | '';
  readonly onChange?: (amountMinor: number | '') => void;
  readonly currency: string;
}

/** An amount of money: typed in the currency's own units, kept as whole minor units. */
export function MoneyInput({ value, onChange, currency, ...rest }: MoneyInputProps) {
  const decimals = currencyDecimals(currency);
  const perUnit = 10 ** decimals;
  return (
    <NumberInput
      {...rest}
      value={typeof value === 'number' ? value / perUnit : ''}
      onChange={(next) =>
        onChange?.(next === '' || !Number.isFinite(Number(next)) ? '' : Math.round(Number(next) * perUnit))
      }
      decimalScale={decimals}
      fixedDecimalScale
      min={0}
      suffix={` ${currency}`}
    />
  );
}
