import { useId, type ReactNode, type TextareaHTMLAttributes } from 'react';

interface AreaProps extends TextareaHTMLAttributes<HTMLTextAreaElement> {
  readonly label: string;
  /** What is wrong and what to do; put back together with what was typed. */
  readonly error?: string | null;
  readonly hint?: ReactNode;
}

/** A field for some lines of text, its label above and its error below. */
export function Area({ label, error, hint, ...rest }: AreaProps) {
  const id = useId();
  const described = [error ? `${id}-error` : null, hint ? `${id}-hint` : null].filter(Boolean).join(' ');
  return (
    <div className={`field ${error ? 'field-wrong' : ''}`}>
      <div className="field-head">
        <label htmlFor={id}>{label}</label>
      </div>
      <textarea
        id={id}
        className="area"
        rows={3}
        {...rest}
        aria-invalid={error ? true : undefined}
        aria-describedby={described || undefined}
      />
      {error && (
        <p id={`${id}-error`} className="field-error">
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
