'use client';
import { useEffect, useId, useMemo, useRef, useState, type KeyboardEvent } from 'react';

export interface FinderOption {
  readonly value: string;
  readonly label: string;
  /** Heading that it stands under; options of one group stand together. */
  readonly group: string;
  /** Beside the label: what tells it apart. */
  readonly note?: string | null;
  /** Why it can't be taken; it is listed all the same. */
  readonly unavailable?: string | null;
}

interface FinderProps {
  readonly label: string;
  readonly options: readonly FinderOption[];
  readonly value: string;
  readonly onChange: (value: string) => void;
  /** Adds buttons for the one before and the one after. */
  readonly steps?: boolean;
}

/**
 * One of many, found by typing a part of its name: a button with the one taken, and a list that opens under it with a field
 * to narrow it. Arrow keys, Home, End, Page Up and Down move, Enter takes, Escape leaves things as they were.
 */
export function Finder({ label, options, value, onChange, steps = true }: FinderProps) {
  const id = useId();
  const [open, setOpen] = useState(false);
  const [text, setText] = useState('');
  const [at, setAt] = useState(0);
  const root = useRef<HTMLDivElement>(null);
  const button = useRef<HTMLButtonElement>(null);
  const field = useRef<HTMLInputElement>(null);
  const list = useRef<HTMLDivElement>(null);
  const found = useMemo(() => narrowed(options, text), [options, text]);
  const taken = options.find((option) => option.value === value);
  const free = options.filter((option) => !option.unavailable);
  const place = free.findIndex((option) => option.value === value);

  const show = () => {
    setText('');
    setAt(Math.max(0, options.findIndex((option) => option.value === value))); // prettier-ignore
    setOpen(true);
  };
  const close = (back = true) => {
    setOpen(false);
    if (back) button.current?.focus();
  };
  const take = (option: FinderOption | undefined) => {
    if (!option || option.unavailable) return;
    close();
    if (option.value !== value) onChange(option.value);
  };
  useEffect(() => {
    if (!open) return;
    field.current?.focus();
    const outside = (event: PointerEvent) => {
      if (event.target instanceof Node && !root.current?.contains(event.target)) setOpen(false);
    };
    document.addEventListener('pointerdown', outside);
    return () => document.removeEventListener('pointerdown', outside);
  }, [open]);
  useEffect(() => {
    if (open) list.current?.querySelector('.choice-at')?.scrollIntoView?.({ block: 'nearest' });
  }, [open, at, found]);

  const onKeyDown = (event: KeyboardEvent) => {
    const last = found.length - 1;
    const moves: Record<string, number> = {
      ArrowDown: at + 1, ArrowUp: at - 1, PageDown: at + 8, PageUp: at - 8, ...(text === '' ? { Home: 0, End: last } : {}),
    }; // prettier-ignore
    const to = moves[event.key];
    if (to !== undefined) setAt(Math.max(0, Math.min(to, last)));
    else if (event.key === 'Enter') take(found[at]);
    else if (event.key === 'Escape') close();
    else {
      if (event.key === 'Tab') close(false);
      return;
    }
    event.preventDefault();
    event.stopPropagation();
  };
  const step = (by: number, word: string) => {
    const to = free[place + by];
    return (
      <button type="button" className="finder-step" disabled={!to || place < 0} onClick={() => to && onChange(to.value)}>
        <span aria-hidden="true">{by < 0 ? '‹' : '›'}</span>
        <span className="sr-only">
          {word}
          {to && place >= 0 ? `, ${to.label}` : ''}
        </span>
      </button>
    );
  };

  return (
    <div className="finder" ref={root} role="group" aria-label={label}>
      {steps && step(-1, 'One before')}
      <button
        ref={button}
        type="button"
        className="finder-button"
        aria-haspopup="listbox"
        aria-expanded={open}
        aria-label={`${label}: ${taken?.label ?? value}`}
        onClick={() => (open ? close() : show())}
        onKeyDown={(event) => {
          if ((event.key === 'ArrowDown' || event.key === 'ArrowUp') && !open) {
            event.preventDefault();
            show();
          }
        }}
      >
        {taken?.label ?? value}
        <svg width="7" height="5" viewBox="0 0 7 5" aria-hidden="true">
          <path d="M0 .5h7L3.5 5z" />
        </svg>
      </button>
      {steps && step(1, 'One after')}
      {open && (
        <div className="finder-panel" onKeyDown={onKeyDown}>
          <input
            ref={field}
            type="text"
            role="combobox"
            aria-label={`Find ${label.toLowerCase()}`}
            aria-expanded="true"
            aria-controls={`${id}-list`}
            aria-autocomplete="list"
            aria-activedescendant={found[at] ? `${id}-${at}` : undefined}
            placeholder="type a part of its name"
            autoComplete="off"
            value={text}
            onChange={(event) => {
              setText(event.target.value);
              setAt(0);
            }}
          />
          <div ref={list} id={`${id}-list`} role="listbox" aria-label={label} className="finder-list" tabIndex={-1}>
            {grouped(found).map(({ name, from, options: some }) => (
              <div key={name} role="group" aria-label={name}>
                <div className="finder-group" aria-hidden="true">
                  {name}
                </div>
                {some.map((option, i) => (
                  <div
                    key={option.value}
                    id={`${id}-${from + i}`}
                    role="option"
                    aria-selected={option.value === value}
                    aria-disabled={option.unavailable ? true : undefined}
                    className={from + i === at ? 'choice-at' : undefined}
                    onPointerMove={() => setAt(from + i)}
                    onClick={() => take(option)}
                  >
                    <span>{option.label}</span> <span className="finder-note">{option.unavailable ?? option.note ?? ''}</span>
                  </div>
                ))}
              </div>
            ))}
          </div>
          <p className="finder-count" role="status">
            {found.length === 0 ? `nothing has “${text}” in its name` : `${found.length} of ${options.length}`}
          </p>
        </div>
      )}
    </div>
  );
}

/** Options with every word that was typed in their name or note, in their own order. */
function narrowed(options: readonly FinderOption[], text: string): readonly FinderOption[] {
  const words = text.toLowerCase().split(/\s+/).filter(Boolean);
  if (words.length === 0) return options;
  return options.filter(({ label, note, group }) => {
    const whole = `${label} ${note ?? ''} ${group}`.toLowerCase();
    return words.every((word) => whole.includes(word));
  });
}

interface Group {
  readonly name: string;
  /** Place of its first option in the whole list. */
  readonly from: number;
  readonly options: FinderOption[];
}

function grouped(options: readonly FinderOption[]): Group[] {
  const groups: Group[] = [];
  options.forEach((option, i) => {
    const last = groups.at(-1);
    if (last?.name === option.group) last.options.push(option);
    else groups.push({ name: option.group, from: i, options: [option] });
  });
  return groups;
}
