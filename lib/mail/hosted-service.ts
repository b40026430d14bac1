/** The hosted mail service, through its own SDK. Server-side only. */
import { Resend } from 'resend';
import type { MailService, SendOutcome } from './mail-service';

interface HostedOptions {
  readonly key: string;
  /** "Tallyframe <letters@office.example>", of a domain that the service knows as the office's. */
  readonly from: string;
  /** Where it answers, if not at its own address: the local service, or a test's. */
  readonly url?: string;
}

/** Names of refusals that no later attempt of the same letter can mend. */
const lasting: ReadonlySet<string> = new Set(['validation_error', 'invalid_parameter', 'missing_required_field', 'invalid_idempotent_request', 'invalid_idempotency_key']); // prettier-ignore

/** A wrong key, a sender that isn't allowed, a quota: mended by people within hours, so such letters are tried again. */
export function hostedService({ key, from, url }: HostedOptions): MailService {
  const client = new Resend(key, url === undefined ? undefined : { baseUrl: url });
  return {
    async send({ to, subject, text, html, office, kind }, idempotencyKey, signal): Promise<SendOutcome> {
      // Tags may hold letters, digits, dashes and underscores.
      const tags = [
        { name: 'office', value: String(office) },
        { name: 'kind', value: kind.replaceAll(' ', '-') },
      ];
      try {
        const request = { from, to, subject, text, html, tags };
        const { data, error } = await client.emails.send(request, { idempotencyKey, signal });
        if (error === null) return { sent: true, id: data.id };
        // A proxy between may answer JSON of another shape.
        const { name = 'refused', message = 'without a reason' }: { readonly name?: string; readonly message?: string } = error;
        return { sent: false, lasting: lasting.has(name), reason: `${name}: ${message}`.slice(0, 300) };
      } catch (cause) {
        return { sent: false, lasting: false, reason: cause instanceof Error ? cause.message.slice(0, 300) : 'no answer' };
      }
    },
  };
}
