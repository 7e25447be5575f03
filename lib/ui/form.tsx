import clsx from 'clsx';
import { type InputHTMLAttributes, type ReactNode, type SelectHTMLAttributes, type TextareaHTMLAttributes, useId } from 'react';

const BOX =
  'w-full min-h-11 lg:min-h-9 border border-ink/40 bg-white px-3 py-1.5 text-ink placeholder:text-mute aria-invalid:border-rust aria-invalid:border-2';

interface FieldProps {
  label: ReactNode;
  hint?: ReactNode;
  error?: string | null;
  /** Shown inside the box at its right end: in, bu/ac, %. */
  unit?: string;
  className?: string;
}

function Frame({ id, label, hint, error, className, children }: FieldProps & { id: string; children: ReactNode }) {
  return (
    <div className={clsx('flex flex-col gap-1', className)}>
      <label htmlFor={id} className="font-semibold">
        {label}
      </label>
      {hint ? (
        <p id={`${id}-hint`} className="text-mute text-[0.92em]">
          {hint}
        </p>
      ) : null}
      {children}
      {error ? (
        <p id={`${id}-error`} className="text-rust-deep font-semibold" role="alert">
          {error}
        </p>
      ) : null}
    </div>
  );
}

function describedBy(id: string, hint: unknown, error: unknown): string | undefined {
  return [hint ? `${id}-hint` : '', error ? `${id}-error` : ''].filter(Boolean).join(' ') || undefined;
}

/** Label above, unit inside the box, error under it. */
export function TextField({
  label,
  hint,
  error,
  unit,
  className,
  ...rest
}: FieldProps & Omit<InputHTMLAttributes<HTMLInputElement>, 'className'>) {
  const fallback = useId();
  const id = rest.id ?? fallback;
  return (
    <Frame id={id} label={label} hint={hint} error={error} className={className}>
      <div className="relative">
        <input
          {...rest}
          id={id}
          aria-invalid={error ? true : undefined}
          aria-describedby={describedBy(id, hint, error)}
          className={clsx(BOX, unit && 'pr-16')}
        />
        {unit ? <span className="pointer-events-none absolute inset-y-0 right-3 flex items-center text-mute">{unit}</span> : null}
      </div>
    </Frame>
  );
}

/** A native select: it works everywhere and on every phone. */
export function SelectField({
  label,
  hint,
  error,
  className,
  children,
  ...rest
}: FieldProps & Omit<SelectHTMLAttributes<HTMLSelectElement>, 'className'>) {
  const fallback = useId();
  const id = rest.id ?? fallback;
  return (
    <Frame id={id} label={label} hint={hint} error={error} className={className}>
      <select
        {...rest}
        id={id}
        aria-invalid={error ? true : undefined}
        aria-describedby={describedBy(id, hint, error)}
        className={BOX}
      >
        {children}
      </select>
    </Frame>
  );
}

/** Several lines of text. */
export function TextAreaField({
  label,
  hint,
  error,
  className,
  ...rest
}: FieldProps & Omit<TextareaHTMLAttributes<HTMLTextAreaElement>, 'className'>) {
  const fallback = useId();
  const id = rest.id ?? fallback;
  return (
    <Frame id={id} label={label} hint={hint} error={error} className={className}>
      <textarea
        rows={3}
        {...rest}
        id={id}
        aria-invalid={error ? true : undefined}
        aria-describedby={describedBy(id, hint, error)}
        className={BOX}
      />
    </Frame>
  );
}

/** A check box with its words beside it. */
export function CheckField({
  label,
  hint,
  className,
  ...rest
}: Omit<FieldProps, 'error' | 'unit'> & Omit<InputHTMLAttributes<HTMLInputElement>, 'className' | 'type'>) {
  return (
    <label className={clsx('flex min-h-11 items-start gap-3 py-2 lg:min-h-8 lg:py-1', className)}>
      <input {...rest} type="checkbox" className="mt-0.5 size-5 accent-bloom lg:size-4" />
      <span>
        {label}
        {hint ? <span className="block text-mute text-[0.92em]">{hint}</span> : null}
      </span>
    </label>
  );
}
