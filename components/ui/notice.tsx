import type { ReactNode } from 'react';
import { Mark } from './mark';

/** The cautions of every page and sheet with results, in full. */
const cautions =
  'Results are of a linear-elastic plane model of what the sheets say; they don’t check connections, foundations, out-of-plane ' +
  'stability beyond the lengths given, fatigue, fire or erection. They must be reviewed by a competent engineer, licensed where the ' +
  'law asks for it; local codes, national annexes and the authority having jurisdiction come first. An over or not checked is not ' +
  'to be built from, unless a checker accepted it with the reason printed beside it. A pass here is not a signature or a seal.';

interface CautionsProps {
  /** "normal, shear and equivalent stress, stability screening, deflection, sway" */
  readonly checked?: string | null;
  readonly notChecked?: string | null;
}

/** Cautions, once a page, plainly: what was checked, what was not, and what no result here is. */
export function Cautions({ checked, notChecked }: CautionsProps) {
  return (
    <aside className="cautions" id="cautions" aria-label="Cautions">
      {checked && (
        <p>
          <b>Checked:</b> {checked}.
          {notChecked && (
            <>
              {' '}
              <b>Not checked:</b> {notChecked}.
            </>
          )}
        </p>
      )}
      <p>{cautions}</p>
    </aside>
  );
}

/** At the head of a page of one frame: what was checked and what was not, with the way to the cautions in full at its foot. */
export function CheckedAtOnce({ checked, notChecked }: CautionsProps) {
  return (
    <p className="checked-at-once">
      {checked ? (
        <>
          <b>Checked:</b> {checked}. <b>Not checked:</b> {notChecked}.{' '}
        </>
      ) : (
        'Nothing was checked. '
      )}
      A linear-elastic plane model of what the sheets say.{' '}
      <a className="link" href="#cautions">
        Cautions
      </a>
    </p>
  );
}

/** A state of the whole zone, said in a sentence: what happened, where, and what to do. */
export function Notice({ kind = 'note', children }: { readonly kind?: 'note' | 'near' | 'error'; readonly children: ReactNode }) {
  return (
    <div className={`notice notice-${kind}`} role={kind === 'error' ? 'alert' : 'status'}>
      {children}
    </div>
  );
}

/** Nothing here yet: the mark with only its first strokes drawn, a sentence, and what to do. */
export function Empty({ children, strokes = 2 }: { readonly children: ReactNode; readonly strokes?: 1 | 2 | 3 | 4 }) {
  return (
    <div className="empty">
      <Mark size={40} strokes={strokes} />
      <div>{children}</div>
    </div>
  );
}
