/** A letter as it is handed to a service that delivers it. */
export interface AddressedLetter {
  readonly to: string;
  readonly subject: string;
  readonly text: string;
  readonly html: string;
  /** Which office's and of what kind, for whoever looks at the service's own list. */
  readonly office: number;
  readonly kind: string;
}

export type SendOutcome =
  | { readonly sent: true; readonly id: string }
  /** `lasting`: the service will never take this letter, so it isn't tried again by itself. */
  | { readonly sent: false; readonly lasting: boolean; readonly reason: string };

/** Whoever delivers letters. A letter sent twice under one key is delivered once. Never throws: what went wrong is an outcome. */
export interface MailService {
  send(letter: AddressedLetter, idempotencyKey: string, signal?: AbortSignal): Promise<SendOutcome>;
}
