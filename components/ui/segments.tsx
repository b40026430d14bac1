'use client';

interface SegmentsProps {
  readonly label: string;
  readonly options: readonly { readonly value: string; readonly label: string }[];
  readonly value: string;
  readonly onChange: (value: string) => void;
}

/** One of a few, all in sight: N V M, or the load cases and combinations. */
export function Segments({ label, options, value, onChange }: SegmentsProps) {
  return (
    <div className="segments" role="radiogroup" aria-label={label}>
      {options.map((option, index) => (
        <button
          key={option.value}
          type="button"
          role="radio"
          aria-checked={option.value === value}
          tabIndex={option.value === value ? 0 : -1}
          onClick={() => onChange(option.value)}
          onKeyDown={(event) => {
            const step =
              event.key === 'ArrowRight' || event.key === 'ArrowDown'
                ? 1
                : event.key === 'ArrowLeft' || event.key === 'ArrowUp'
                  ? -1
                  : 0;
            if (step === 0) return;
            event.preventDefault();
            const to = (index + step + options.length) % options.length;
            const next = options[to];
            if (next) onChange(next.value);
            (event.currentTarget.parentElement?.children[to] as HTMLElement | undefined)?.focus();
          }}
        >
          {option.label}
        </button>
      ))}
    </div>
  );
}
