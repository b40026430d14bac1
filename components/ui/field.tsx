import { useId, type InputHTMLAttributes, type ReactNode } from 'react';

interface FieldProps extends InputHTMLAttributes<HTMLInputElement> {
  readonly label: string;
  readonly unit?: string;
  /** What is wrong, where, and what to do; put back together with what was typed. */
  readonly error?: string | null;
  readonly hint?: ReactNode;
  /** A link at the right of the label ("Forgotten"). */
  readonly aside?: ReactNode;
}

/** Label above, unit inside at right, and an error that says what to do: wired once. */
export function Field({ label, unit, error, hint, aside, className, ...input }: FieldProps) {
  const id = useId();
  const described = [error ? `${id}-error` : null, hint ? `${id}-hint` : null].filter(Boolean).join(' ');
  return (
    <div className={`field ${error ? 'field-wrong' : ''} ${className ?? ''}`}>
      <div className="field-head">
        <label htmlFor={id}>{label}</label>
        {aside}
      </div>
      <div className="field-box">
        <input id={id} {...input} aria-invalid={error ? true : undefined} aria-describedby={described || undefined} />
        {unit && <span className="field-unit">{unit}</span>}
      </div>
      {error && (
        <p id={`${id}-error`} className="field-error">
          <svg width="10" height="10" viewBox="0 0 12 12" aria-hidden="true">
            <path d="M2 2 10 10M10 2 2 10" />
          </svg>
          {error}
        </p>
      )}
      {hint && (
        <p id={`${id}-hint`} className="field-hint">
          {hint}
        </p>
      )}
    </div>
  );
}
