'use client';
import { useRef } from 'react';
import { useKeys } from './use-keys';

export interface KeyWord {
  readonly keys: readonly string[];
  readonly does: string;
}

/** The keys of this page, shown by `?` (a dialog that Escape closes). */
export function KeysHelp({ keys }: { readonly keys: readonly KeyWord[] }) {
  const dialog = useRef<HTMLDialogElement>(null);
  const open = () => dialog.current?.showModal();
  useKeys({ '?': open });
  return (
    <div className="keys-help">
      <button type="button" className="choice-plain" onClick={open}>
        Keys <kbd>?</kbd>
      </button>
      <dialog ref={dialog} className="keys-dialog" aria-label="Keys of this page">
        <h2>Keys of this page</h2>
        <dl>
          {keys.map((word) => (
            <div key={word.does}>
              <dt>
                {word.keys.map((key) => (
                  <kbd key={key}>{key}</kbd>
                ))}
              </dt>
              <dd>{word.does}</dd>
            </div>
          ))}
        </dl>
        <form method="dialog">
          <button className="btn btn-outline">Close</button>
        </form>
      </dialog>
    </div>
  );
}
