/** Checking through the application's own API, as its pages do: for tests that need a revision sent, seen or passed. */
import { revisionAddress, type Brought } from './bring';
import type { Visitor } from './visitor';

export interface CheckingTold {
  readonly state: string;
  readonly whyNotCheck: string | null;
  readonly whyNotPass: readonly string[];
  readonly progress: { readonly listed: number; readonly seen: number; readonly openQueries: number; readonly toAccept: number; readonly accepted: number }; // prettier-ignore
  readonly list: readonly { readonly number: number; readonly id: string; readonly part: string; readonly why: readonly string[]; readonly seen: boolean; readonly toAccept: number }[]; // prettier-ignore
  readonly queries: readonly { readonly id: number; readonly closed: unknown; readonly messages: readonly { readonly text: string }[] }[]; // prettier-ignore
  readonly acts: readonly { readonly what: string; readonly by: string; readonly note: string }[];
}

interface FrameTold {
  readonly toAccept: readonly { readonly item: number; readonly accepted: unknown }[];
}

export const checkingAddress = (brought: Brought): string => `${revisionAddress(brought)}/checking`;

export async function checkingOf(visitor: Visitor, brought: Brought): Promise<CheckingTold> {
  return (await visitor.json<{ checking: CheckingTold }>(checkingAddress(brought))).checking;
}

export async function send(visitor: Visitor, brought: Brought, note = 'Please check.'): Promise<CheckingTold> {
  const answer = await visitor.send(checkingAddress(brought), { note });
  if (!answer.ok) throw new Error(`Sending to check was answered ${answer.status}: ${await answer.text()}`);
  return ((await answer.json()) as { checking: CheckingTold }).checking;
}

/** Sees every frame of the list and accepts all that is over or not checked, with one reason. */
export async function seeAndAccept(checker: Visitor, brought: Brought, reason = 'Held by hand.'): Promise<void> {
  for (const { number, toAccept } of (await checkingOf(checker, brought)).list) {
    const frame = `${checkingAddress(brought)}/frames/${number}`;
    await checker.json(`${frame}/seen`, { method: 'POST' });
    if (toAccept === 0) continue;
    const { frame: told } = await checker.json<{ frame: FrameTold }>(frame);
    const checks = told.toAccept.filter(({ accepted }) => accepted === null).map(({ item }) => item);
    if (checks.length > 0) await checker.send(`${frame}/acceptances`, { checks, reason });
  }
}

/** Passes it. @throws {Error} where something stands against it */
export async function pass(checker: Visitor, brought: Brought, note = ''): Promise<void> {
  const answer = await checker.send(`${checkingAddress(brought)}/pass`, { note });
  if (!answer.ok) throw new Error(`Passing was answered ${answer.status}: ${await answer.text()}`);
}
