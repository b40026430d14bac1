/**
 * What the product writes to people about: one shape a kind, facts only. Words are made from them in one place
 * (lib/mail/letter.ts), and whoever causes a message hands it to the outbox in the transaction of its act.
 */

/** Where a message is about: names for people, numbers for the link. */
export interface AboutRevision {
  readonly project: string;
  readonly batch: number;
  readonly batchName: string;
  readonly letter: string;
}

export interface AboutIssue {
  readonly project: string;
  readonly batchName: string;
  readonly letter: string;
  /** Row id of the issue, for the link, and its number as printed. */
  readonly issue: number;
  readonly number: string;
}

export type MailMessage =
  /** `link` is the row id of a single-use link, never its secret: that is derived when the letter is written. */
  | {
      readonly kind: 'invitation';
      readonly by: string;
      readonly officeName: string;
      readonly role: string;
      readonly link: number;
    }
  | { readonly kind: 'password reset'; readonly link: number }
  | {
      readonly kind: 'run finished';
      readonly about: AboutRevision;
      readonly frames: number;
      readonly over: number;
      readonly near: number;
      readonly notChecked: number;
      readonly stopped: boolean;
    }
  | { readonly kind: 'sent to check'; readonly about: AboutRevision; readonly by: string; readonly note: string }
  | { readonly kind: 'returned'; readonly about: AboutRevision; readonly by: string; readonly note: string }
  | { readonly kind: 'passed'; readonly about: AboutRevision; readonly by: string }
  | {
      readonly kind: 'issued';
      readonly about: AboutIssue;
      readonly by: string;
      readonly note: string;
      readonly supersedes: string | null;
    }
  | { readonly kind: 'withdrawn'; readonly about: AboutIssue; readonly by: string; readonly reason: string }
  | {
      readonly kind: 'question';
      readonly about: AboutIssue;
      readonly by: string;
      readonly frame: string | null;
      readonly text: string;
    }
  | {
      readonly kind: 'answer';
      readonly about: AboutIssue;
      readonly by: string;
      readonly frame: string | null;
      readonly question: string;
      readonly text: string;
    };

export type MailKind = MailMessage['kind'];
