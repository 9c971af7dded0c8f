/** A field of a form: label above, help below, the fault in words beside it. */
import { useId } from 'react';
import type { InputHTMLAttributes, ReactNode, Ref, TextareaHTMLAttributes } from 'react';
import { classes } from './classes.ts';

interface Around {
  readonly label: string;
  readonly help?: ReactNode;
  /** What is wrong with it, in words; absent while nothing is. */
  readonly fault?: string | undefined;
}

const BOX =
  'block w-full rounded border bg-sheet px-10 py-6 font-mono text-label text-ink aria-invalid:border-cinnabar border-ink-3';

function describedBy(id: string, help: ReactNode, fault: string | undefined): string | undefined {
  const ids = [fault && `${id}-fault`, help !== undefined && `${id}-help`].filter(Boolean);
  return ids.length > 0 ? ids.join(' ') : undefined;
}

function Frame({
  id,
  label,
  help,
  fault,
  children,
}: Around & { readonly id: string; readonly children: ReactNode }) {
  return (
    <div className="mb-18">
      <label htmlFor={id} className="text-label text-ink-2 mb-4 block font-mono">
        {label}
      </label>
      {children}
      {fault && (
        <p id={`${id}-fault`} className="text-note text-cinnabar mt-4">
          {fault}
        </p>
      )}
      {help !== undefined && (
        <p id={`${id}-help`} className="text-note text-ink-3 mt-4">
          {help}
        </p>
      )}
    </div>
  );
}

interface FieldProps extends Around, Omit<InputHTMLAttributes<HTMLInputElement>, 'id'> {
  readonly ref?: Ref<HTMLInputElement>;
}

export function Field({ label, help, fault, className, ...rest }: FieldProps) {
  const id = useId();
  return (
    <Frame id={id} label={label} help={help} fault={fault}>
      <input
        id={id}
        aria-invalid={fault ? true : undefined}
        aria-describedby={describedBy(id, help, fault)}
        className={classes(BOX, className)}
        {...rest}
      />
    </Frame>
  );
}

interface TextFieldProps extends Around, Omit<TextareaHTMLAttributes<HTMLTextAreaElement>, 'id'> {
  readonly ref?: Ref<HTMLTextAreaElement>;
}

/** A field of several lines. */
export function TextField({ label, help, fault, className, ...rest }: TextFieldProps) {
  const id = useId();
  return (
    <Frame id={id} label={label} help={help} fault={fault}>
      <textarea
        id={id}
        aria-invalid={fault ? true : undefined}
        aria-describedby={describedBy(id, help, fault)}
        className={classes(BOX, 'min-h-[120px] leading-[1.6]', className)}
        {...rest}
      />
    </Frame>
  );
}

/** What is wrong with a form as a whole; read out as it appears. */
export function FormFault({ children }: { readonly children: ReactNode }) {
  return (
    <div role="alert">
      {children && (
        <div className="border-cinnabar text-note text-cinnabar mb-18 border-l-2 pl-14">
          {children}
        </div>
      )}
    </div>
  );
}
