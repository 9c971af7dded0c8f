/** A choice of one among few, side by side: forms of a formula, kinds of a plot. */
import { classes } from './classes.ts';

interface SegmentedProps<Value extends string> {
  /** What is chosen, for those who do not see the control. */
  readonly label: string;
  readonly options: readonly { readonly value: Value; readonly label: string }[];
  readonly value: Value;
  readonly onChange: (value: Value) => void;
  readonly className?: string;
}

export function Segmented<Value extends string>({
  label,
  options,
  value,
  onChange,
  className,
}: SegmentedProps<Value>) {
  return (
    <div
      role="group"
      aria-label={label}
      className={classes('border-rule inline-flex flex-wrap rounded border', className)}
    >
      {options.map((option) => (
        <button
          key={option.value}
          type="button"
          aria-pressed={option.value === value}
          onClick={() => onChange(option.value)}
          className="text-label text-ink-2 aria-pressed:bg-ink aria-pressed:text-sheet min-h-28 px-8 py-4"
        >
          {option.label}
        </button>
      ))}
    </div>
  );
}
