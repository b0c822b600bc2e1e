import classes from './antenna.module.css';
import { DAYS } from './hours-words.js';

interface WeekdayPickerProps {
  readonly label: string;
  /** 1 is Monday. */
  readonly value: readonly number[];
  readonly onChange: (days: number[]) => void;
  readonly readOnly?: boolean;
}

/** Seven days that are pressed or not. */
export function WeekdayPicker({ label, value, onChange, readOnly = false }: WeekdayPickerProps) {
  const toggle = (day: number) =>
    onChange(value.includes(day) ? value.filter((one) => one !== day) : [...value, day].sort((a, b) => a - b));
  return (
    // biome-ignore lint/a11y/useSemanticElements: a fieldset cannot be a flex row beside other fields
    <div role="group" aria-label={label} className={classes.days}>
      {DAYS.map((name, index) => (
        <button
          key={name}
          type="button"
          aria-pressed={value.includes(index + 1)}
          disabled={readOnly}
          onClick={() => toggle(index + 1)}
        >
          {name}
        </button>
      ))}
    </div>
  );
}
