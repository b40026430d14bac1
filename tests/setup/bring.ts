/** Brings a file in and runs it through the application's own API, as its pages do. */
import { readFileSync } from 'node:fs';
import { basename } from 'node:path';
import type { Visitor } from './visitor';

export interface Brought {
  readonly batch: number;
  readonly revision: string;
}

interface Answer {
  readonly batch: { readonly id: number };
  readonly revision: string;
}

export const revisionAddress = ({ batch, revision }: Brought): string => `/api/batches/${batch}/revisions/${revision}`;

export async function bring(visitor: Visitor, to: string, ...paths: string[]): Promise<Brought> {
  const form = new FormData();
  for (const path of paths) form.append('files', new Blob([readFileSync(path)]), basename(path));
  const answer = await visitor.json<Answer>(to, { method: 'POST', body: form });
  const brought = { batch: answer.batch.id, revision: answer.revision };
  await stateBecomes(visitor, brought, (state) => state !== 'reading');
  return brought;
}

export async function run(visitor: Visitor, brought: Brought): Promise<void> {
  await visitor.json(`${revisionAddress(brought)}/run`, { method: 'POST' });
  await stateBecomes(visitor, brought, (state) => state !== 'running');
}

export async function stateBecomes(visitor: Visitor, brought: Brought, enough: (state: string) => boolean): Promise<string> {
  for (let tries = 0; tries < 600; tries++) {
    const { run: told } = await visitor.json<{ run: { revisionState: string } }>(`${revisionAddress(brought)}/progress`);
    if (enough(told.revisionState)) return told.revisionState;
    await new Promise((resolve) => setTimeout(resolve, 200));
  }
  throw new Error('The revision did not move on within two minutes');
}
