/** What the covers of an issue's files say beyond the results: the same facts for the workbook and the calculation report. */

/** A person's name with the instant (ISO 8601, UTC) of what they did. */
export interface Signature {
  readonly name: string;
  readonly at: string;
}

/** An "over" or "not checked" that a checker accepted, with the reason that must be printed beside it. */
export interface Acceptance {
  readonly frame: string;
  /** Member or node; null = the whole frame. */
  readonly subject: string | null;
  readonly check: string;
  readonly verdict: 'over' | 'not checked';
  readonly reason: string;
  readonly by: Signature;
}

export interface IssueCover {
  /** As printed, `P-1042-03`; null in a draft, which says so on every page. */
  readonly number: string | null;
  readonly office: string;
  readonly project: string;
  readonly projectNumber: string | null;
  readonly batch: string;
  readonly revision: string;
  readonly prepared: Signature | null;
  readonly checked: Signature | null;
  readonly approved: Signature | null;
  readonly issued: { readonly at: string; readonly to: readonly string[] } | null;
  /** Number of the issue this one takes the place of. */
  readonly supersedes: string | null;
  readonly note: string | null;
  readonly acceptances: readonly Acceptance[];
  /** Frames that have no solution or were stopped: not issued, with why. */
  readonly notIssued: readonly { readonly frame: string; readonly reason: string }[];
}
