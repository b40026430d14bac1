'use client';
import { useEffect, useId, useRef, useState, type KeyboardEvent } from 'react';

export interface Option {
  readonly value: string;
  readonly label: string;
  readonly count?: number;
}

interface ChoiceProps {
  /** Accessible name: what is being chosen ("filter column", "role"). */
  readonly label: string;
  readonly options: readonly Option[];
  readonly value: readonly string[];
  readonly onChange: (value: readonly string[]) => void;
  /** Several values may be taken; closes on Escape or a press outside. */
  readonly several?: boolean;
  /** What stands in the sentence; default the chosen labels. */
  readonly text?: string;
  /** Called when the list opens, so that values can be fetched then. */
  readonly onOpen?: () => void;
  readonly loading?: boolean;
}

/** A choice inside a sentence: blue, dashed underline, small triangle; opens a listbox in place, all by keyboard. */
export function Choice({ label, options, value, onChange, several = false, text, onOpen, loading = false }: ChoiceProps) {
  const id = useId();
  const [open, setOpen] = useState(false);
  const [at, setAt] = useState(0);
  const root = useRef<HTMLSpanElement>(null);
  const list = useRef<HTMLSpanElement>(null);
  const button = useRef<HTMLButtonElement>(null);
  const typed = useRef({ text: '', time: 0 });
  const chosen = options.filter((option) => value.includes(option.value)).map((option) => option.label);
  const shown = text ?? (chosen.length > 0 ? chosen.join(', ') : value.length > 0 ? value.join(', ') : 'choose');

  const show = () => {
    setAt(
      Math.max(
        0,
        options.findIndex((option) => value.includes(option.value)),
      ),
    );
    setOpen(true);
    onOpen?.();
  };
  const close = (back = true) => {
    setOpen(false);
    if (back) button.current?.focus();
  };
  useEffect(() => {
    if (!open) return;
    list.current?.focus();
    const outside = (event: PointerEvent) => {
      if (event.target instanceof Node && !root.current?.contains(event.target)) setOpen(false);
    };
    document.addEventListener('pointerdown', outside);
    return () => document.removeEventListener('pointerdown', outside);
  }, [open]);
  useEffect(() => {
    if (open) list.current?.children[at]?.scrollIntoView?.({ block: 'nearest' });
  }, [open, at]);

  const take = (option: Option | undefined) => {
    if (!option) return;
    if (!several) {
      onChange([option.value]);
      close();
      return;
    }
    onChange(value.includes(option.value) ? value.filter((v) => v !== option.value) : [...value, option.value]);
  };
  const onKeyDown = (event: KeyboardEvent) => {
    const last = options.length - 1;
    const moves: Record<string, number> = { ArrowDown: Math.min(at + 1, last), ArrowUp: Math.max(at - 1, 0), Home: 0, End: last };
    const to = moves[event.key];
    if (to !== undefined) setAt(to);
    else if (event.key === 'Enter' || event.key === ' ') take(options[at]);
    else if (event.key === 'Escape') close();
    else if (event.key === 'Tab') return close(false);
    else if (event.key.length === 1) {
      const now = event.timeStamp;
      typed.current = { text: (now - typed.current.time < 700 ? typed.current.text : '') + event.key.toLowerCase(), time: now };
      const found = options.findIndex((option) => option.label.toLowerCase().startsWith(typed.current.text));
      if (found >= 0) setAt(found);
    } else return;
    event.preventDefault();
    event.stopPropagation();
  };

  return (
    <span className="choice" ref={root}>
      <button
        ref={button}
        type="button"
        className="choice-button"
        aria-haspopup="listbox"
        aria-expanded={open}
        aria-label={`${label}: ${shown}`}
        onClick={() => (open ? close() : show())}
        onKeyDown={(event) => {
          if (event.key === 'ArrowDown' && !open) {
            event.preventDefault();
            show();
          }
        }}
      >
        {shown}
        <svg width="7" height="5" viewBox="0 0 7 5" aria-hidden="true">
          <path d="M0 .5h7L3.5 5z" />
        </svg>
      </button>
      {open && (
        <span
          ref={list}
          className="choice-list"
          role="listbox"
          tabIndex={-1}
          aria-label={label}
          aria-multiselectable={several || undefined}
          aria-activedescendant={options[at] ? `${id}-${at}` : undefined}
          onKeyDown={onKeyDown}
        >
          {options.map((option, index) => (
            <span
              key={option.value}
              id={`${id}-${index}`}
              role="option"
              aria-selected={value.includes(option.value)}
              className={index === at ? 'choice-at' : undefined}
              onPointerMove={() => setAt(index)}
              onClick={() => take(option)}
            >
              <span>{option.label}</span>
              {option.count !== undefined && <span className="choice-count">{option.count.toLocaleString('en-GB')}</span>}
            </span>
          ))}
          {options.length === 0 && (
            <span role="option" aria-selected={false} aria-disabled="true" className="choice-none">
              {loading ? 'reading the values' : 'no values here'}
            </span>
          )}
        </span>
      )}
    </span>
  );
}
