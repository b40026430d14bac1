import 'server-only';
import type { RevisionRecord } from '@/db/queries/revisions';
import type { Act, Person } from '@/lib/access/may';
import type { Params } from './door';
import { requirePerson } from './person';
import { requireRevision } from './things';

interface AtRevision<K extends string> {
  readonly request: Request;
  readonly person: Person;
  readonly revision: RevisionRecord;
  readonly params: Readonly<Record<K | 'batch' | 'revision', string>>;
}

/** The first steps of every route below a revision: who, may they, and is it there for them. */
export function atRevision<K extends string = never>(act: Act, then: (at: AtRevision<K>) => Promise<Response>) {
  return async (request: Request, context: Params<K | 'batch' | 'revision'>): Promise<Response> => {
    const person = await requirePerson(request, act);
    const params: Record<K | 'batch' | 'revision', string> = await context.params;
    return then({ request, person, params, revision: await requireRevision(person, params.batch, params.revision) });
  };
}
