/** A revision checked and issued through the application's own API, as its pages do. */
import { bring, revisionAddress, run, type Brought } from './bring';
import { pass, seeAndAccept, send } from './check';
import type { TestOffice } from './people';
import type { Visitor } from './visitor';

export interface Desk {
  readonly url: string;
  readonly office: TestOffice;
  readonly analyst: Visitor;
  readonly checker: Visitor;
  readonly lead: Visitor;
}

export interface Making {
  readonly issue: number;
  readonly number: string;
  readonly state: string;
  readonly failure: string | null;
}

/** A batch of the office's project, run, and passed by its checker. */
export async function checked({ office, analyst, checker }: Desk, sample = 'samples/pipe-rack-12.xlsx'): Promise<Brought> {
  const brought = await bring(analyst, `/api/projects/${office.project}/batches`, sample);
  await run(analyst, brought);
  await passed({ analyst, checker }, brought);
  return brought;
}

/** A revision that was run, sent to check, seen, accepted where it has to be, and passed. */
export async function passed({ analyst, checker }: Pick<Desk, 'analyst' | 'checker'>, brought: Brought): Promise<void> {
  await send(analyst, brought);
  await seeAndAccept(checker, brought, 'Held by hand for the steps in between.');
  await pass(checker, brought);
}

/** Issues it, and waits until its files are there and its clients told. */
export async function issued(by: Visitor, brought: Brought, to: readonly number[], more: object = {}): Promise<Making> {
  const address = `${revisionAddress(brought)}/issue`;
  const answer = await by.send(address, { clients: to, frames: 'flagged', ...more });
  if (!answer.ok) throw new Error(`Issuing was answered ${answer.status}: ${await answer.text()}`);
  for (let tries = 0; tries < 300; tries++) {
    const { issue } = await by.json<{ issue: Making }>(address);
    if (issue.state !== 'making') return issue;
    await new Promise((resolve) => setTimeout(resolve, 200));
  }
  throw new Error('The issue was not made within a minute');
}
