/** Takes letters out of the outbox and hands them to the service, one after another, as they fall due. */
import type { Db } from '@/db/open';
import { findLinkSecret } from '@/db/queries/links';
import { mayReach, takeDueLetter, updateLetterRefused, updateLetterSent, type LetterInHand } from '@/db/queries/outbox';
import { answerResetRequests } from '@/db/queries/password-resets';
import { waitAfter } from '@/lib/mail/back-off';
import { writeLetter } from '@/lib/mail/letter';
import type { MailService } from '@/lib/mail/mail-service';
import type { Log } from '../queue';

export interface MailPumpOptions {
  readonly db: Db;
  readonly service: MailService;
  /** Where links lead: `https://frames.example`. */
  readonly site: string;
  /** Of the server, from which links' secrets are derived. */
  readonly secret: string;
  readonly log: Log;
  /** Milliseconds between looks into the outbox. */
  readonly every_ms?: number;
  /** Told between the service's answer and its record: for tests that kill the process there. */
  readonly onAnswered?: () => void | Promise<void>;
}

/** The service's answer is waited for so long: less than an attempt is held for. */
const answer_ms = 20_000;

export class MailPump {
  private timer: NodeJS.Timeout | null = null;
  private pumping: Promise<void> | null = null;
  private closed = false;

  constructor(private readonly options: MailPumpOptions) {}

  /** Looks into the outbox now, and again and again. */
  start(): void {
    if (this.closed || this.timer !== null) return;
    this.timer = setInterval(() => void this.look(), this.options.every_ms ?? 1000);
    this.timer.unref();
    void this.look();
  }

  /** Sends what is due; settles when nothing is. */
  look(): Promise<void> {
    return (this.pumping ??= this.pump()
      .catch((error: unknown) => this.options.log('the outbox met a fault and is looked into again', { error }))
      .finally(() => (this.pumping = null)));
  }

  /** Takes nothing more in hand; settles when the letter in hand is recorded. */
  async close(): Promise<void> {
    this.closed = true;
    if (this.timer !== null) clearInterval(this.timer);
    await this.pumping;
  }

  private async pump(): Promise<void> {
    const { db, secret } = this.options;
    await answerResetRequests(db, secret);
    while (!this.closed) {
      const letter = await takeDueLetter(db);
      if (letter === undefined) return;
      await this.send(letter);
    }
  }

  private async send(letter: LetterInHand): Promise<void> {
    const { db, service, site, secret, log, onAnswered } = this.options;
    const { id, office, officeName, recipient, message, idempotencyKey, attempts } = letter;
    if (!(await mayReach(db, office, recipient, message.kind))) {
      return updateLetterRefused(db, id, 'They were disabled, or declined such letters, before it was sent.', null);
    }
    let linkSecret: string | null = null;
    if ('link' in message) {
      const found = await findLinkSecret(db, message.link, secret);
      if (found === undefined) return updateLetterRefused(db, id, 'The link in it had ended before it was sent.', null);
      linkSecret = found;
    }
    const written = writeLetter(message, { site, officeName, secret: linkSecret });
    const addressed = { to: recipient, office, kind: message.kind, ...written };
    const outcome = await service.send(addressed, idempotencyKey, AbortSignal.timeout(answer_ms));
    await onAnswered?.();
    if (outcome.sent) return updateLetterSent(db, id, outcome.id);
    const wait = outcome.lasting ? null : waitAfter(attempts);
    log('a letter was not taken', { letter: id, kind: message.kind, attempts, reason: outcome.reason, wait_ms: wait });
    await updateLetterRefused(db, id, outcome.reason, wait === null ? null : new Date(Date.now() + wait).toISOString());
  }
}
