/**
 * Who may do what: one table. Pages, route handlers and navigation all ask here, and nowhere else.
 *
 * Lead, analysts and checkers reach every project of their office. A client reaches what was issued to projects that
 * they are assigned to, and nothing else: the queries of issues take the person besides the office. What a script's
 * token may do of it: token-scopes.ts. Every address by role, office and project: tests/integration/web/access.test.ts.
 */
export const personRoles = ['lead', 'analyst', 'checker', 'client'] as const;
export type PersonRole = (typeof personRoles)[number];

/** Whoever stands behind a request: a session row's person with the role they hold in that session's office. */
export interface Person {
  readonly id: number;
  readonly name: string;
  readonly email: string;
  readonly role: PersonRole;
  readonly office: number;
  readonly officeName: string;
}

const staff = ['lead', 'analyst', 'checker'] as const;

const table = {
  'read projects': staff,
  'read sections': staff,
  'change sections': ['lead'],
  'read limits': staff,
  'change limits': ['lead'],
  'read combination sets': staff,
  'change combination sets': ['lead'],
  'add a project': ['lead', 'analyst'],
  'read a batch': staff,
  'bring sheets in': ['lead', 'analyst'],
  'change a revision': ['lead', 'analyst'],
  run: ['lead', 'analyst'],
  'size sections': ['lead', 'analyst'],
  'send to check': ['lead', 'analyst'],
  check: ['lead', 'checker'],
  'answer a query': staff,
  'take results away': staff,
  'read people': ['lead'],
  'add people': ['lead'],
  'assign people': ['lead'],
  'change people': ['lead'],
  'read letters': ['lead'],
  'read activity': staff,
  'read the office’s activity': ['lead'],
  'be oneself': personRoles,
  'read issues': staff,
  issue: ['lead', 'checker'],
  'choose who issues': ['lead'],
  'answer questions': staff,
  'test issued numbers': staff,
  'read what was issued': ['client'],
  'ask about an issue': ['client'],
} as const satisfies Readonly<Record<string, readonly PersonRole[]>>;

export type Act = keyof typeof table;
export const acts = Object.keys(table) as Act[];

/**
 * Whether a person may do something, and to a thing of which office.
 *
 * @param of what it would be done to; leave out for things the person's own office is the whole of
 * @returns false for everything of another office, whatever the role
 */
export function may(person: Pick<Person, 'role' | 'office'>, act: Act, of?: { readonly office: number }): boolean {
  const roles: readonly PersonRole[] = table[act];
  return roles.includes(person.role) && (of === undefined || of.office === person.office);
}

/** The page each role starts from. */
export function homeOf(role: PersonRole): '/projects' | '/issued' {
  return role === 'client' ? '/issued' : '/projects';
}
