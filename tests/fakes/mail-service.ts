/** The hosted mail service as tests need it: the local service, told to fail when a test wants it to. */
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { hostedService } from '@/lib/mail/hosted-service';
import type { MailService } from '@/lib/mail/mail-service';
import { startLocalService, type ToldAnswer } from '@/worker/mail/local-service';
import type { KeptLetter } from '@/worker/mail/kept-letters';

export interface FakeMailService {
  readonly url: string;
  readonly key: string;
  /** The product's own client of it. */
  readonly client: MailService;
  /** What was delivered, each letter once, in order. */
  readonly delivered: readonly KeptLetter[];
  /** Requests that reached it, repetitions and refusals included. */
  readonly requests: () => number;
  /** Answers so many of the next requests with a refusal. */
  readonly fail: (times: number, answer: ToldAnswer) => void;
  readonly close: () => Promise<void>;
}

export const down: ToldAnswer = { status: 503, body: 'upstream is away' };

export async function fakeMailService(): Promise<FakeMailService> {
  const folder = mkdtempSync(join(tmpdir(), 'tallyframe-letters-'));
  const told: ToldAnswer[] = [];
  const delivered: KeptLetter[] = [];
  let requests = 0;
  const { url, key, close } = await startLocalService({
    folder,
    instead: () => {
      requests++;
      return told.shift() ?? null;
    },
    onKept: (letter) => delivered.push(letter),
  });
  return {
    url,
    key,
    client: hostedService({ key, url, from: 'Tallyframe <letters@frames.example>' }),
    delivered,
    requests: () => requests,
    fail: (times, answer) => void told.push(...Array.from({ length: times }, () => answer)),
    close: async () => {
      await close();
      rmSync(folder, { recursive: true, force: true });
    },
  };
}
