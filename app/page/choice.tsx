import { type ReactNode, useId } from 'react';
import styles from './choice.module.css';

interface ChoiceOption<Value> {
  readonly value: Value;
  readonly content: ReactNode;
  /** What it means, shown on pointing. */
  readonly title?: string;
  /** How a formula is called in words; without it the content names the option. */
  readonly name?: string;
}

interface ChoiceProps<Value extends string | number> {
  readonly label: string;
  /** Whether the label is shown or only heard. */
  readonly shown?: boolean;
  readonly options: readonly ChoiceOption<Value>[];
  readonly value: Value;
  readonly onChange: (value: Value) => void;
}

/** One of a few, side by side; a native radio group underneath, so the arrow keys move in it. */
export function Choice<Value extends string | number>({ label, shown, options, value, onChange }: ChoiceProps<Value>) {
  const name = useId();
  return (
    <fieldset className={styles.choice}>
      <legend className={shown ? styles.legend : 'heard'}>{label}</legend>
      <div className={styles.row}>
        {options.map((option) => (
          <label key={option.value} className={styles.option} title={option.title}>
            <input
              type="radio"
              name={name}
              aria-label={option.name}
              checked={option.value === value}
              onChange={() => onChange(option.value)}
            />
            <span>{option.content}</span>
          </label>
        ))}
      </div>
    </fieldset>
  );
}
