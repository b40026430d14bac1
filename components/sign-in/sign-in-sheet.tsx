import type { ReactNode } from 'react';
import { Mark } from '../ui/mark';
import { SignInDrawing } from './sign-in-drawing';

interface SignInSheetProps {
  /** The form: E-mail, Password (components/ui/field), a filled button. It is the drawing's title block. */
  readonly children: ReactNode;
  readonly version: string;
  /** Which sheet it is, as its title block names it. */
  readonly sheet?: string;
}

/** Sign-in: a blank drawing sheet with zone marks, the mark as a dimensioned drawing, and the form as its title block. */
export function SignInSheet({ children, version, sheet = 'sign in' }: SignInSheetProps) {
  return (
    <div className="si-page">
      <div className="si-columns-marks" aria-hidden="true">
        {[1, 2, 3, 4, 5, 6, 7, 8].map((n) => (
          <span key={n}>{n}</span>
        ))}
      </div>
      <div className="si-row-marks" aria-hidden="true">
        {['A', 'B', 'C', 'D', 'E'].map((letter) => (
          <span key={letter}>{letter}</span>
        ))}
      </div>
      <main className="si-sheet" id="content">
        <div className="si-drawing">
          <SignInDrawing />
        </div>
        <div className="si-side">
          <div className="si-notes">
            <h1>
              Hundreds of plane frames, <br />
              checked from their spreadsheets.
            </h1>
            <div className="si-general">
              <h2>Notes</h2>
              <ol>
                <li>Every cell is read. What cannot be read is said, at its cell.</li>
                <li>Every number opens its working: formula, numbers put in, clause.</li>
                <li>No revision leaves the office on one person’s word.</li>
                <li>Do not scale from this drawing.</li>
              </ol>
            </div>
          </div>
          <div className="si-block">
            <div className="si-name">
              <Mark size={38} />
              <div>
                <b>Tallyframe</b>
                <span>bulk checks of plane steel frames</span>
              </div>
            </div>
            {children}
            <div className="si-cells">
              <div>
                <div className="tb-label">Sheet</div>
                <b>{sheet}</b>
              </div>
              <div>
                <div className="tb-label">Version</div>
                <span className="mono">{version}</span>
              </div>
              <div>
                <div className="tb-label">Scale</div>
                <b>as stated</b>
              </div>
            </div>
          </div>
        </div>
      </main>
    </div>
  );
}

/** One ruled row of the form-as-title-block. */
export function SignInRow({ children }: { readonly children: ReactNode }) {
  return <div className="si-form-row">{children}</div>;
}
