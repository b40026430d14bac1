/** Kinds of letters as people choose among them: what causes each, whom it may reach, and which nobody can decline. */
import type { PersonRole } from '@/lib/access/may';
import type { MailKind } from './message';

export interface KindWords {
  /** Completes "A letter when …". */
  readonly when: string;
  /** Roles that such letters go to. */
  readonly roles: readonly PersonRole[];
  /** Sent whatever the person chose, and also where their sign-in has ended since. */
  readonly always: boolean;
}

const staff = ['lead', 'analyst', 'checker'] as const;

export const mailKinds = {
  invitation: { when: 'you are invited to an office', roles: [], always: true },
  'password reset': { when: 'a new password was asked for', roles: [], always: true },
  'run finished': { when: 'a run that you started has ended', roles: ['lead', 'analyst'], always: false },
  'sent to check': { when: 'a revision is sent to you to check', roles: ['lead', 'checker'], always: false },
  returned: { when: 'a checker returns a revision that you prepared', roles: ['lead', 'analyst'], always: false },
  passed: { when: 'a checker passes a revision that you prepared', roles: ['lead', 'analyst'], always: false },
  issued: { when: 'results are issued to you', roles: ['lead', 'client'], always: false },
  // An error was found in what may be built from: no preference stands in its way.
  withdrawn: { when: 'something that was issued to you is withdrawn', roles: ['client'], always: true },
  question: { when: 'a client asks a question', roles: staff, always: false },
  answer: { when: 'your question is answered', roles: ['client'], always: false },
} as const satisfies Readonly<Record<MailKind, KindWords>>;

/** The kinds that someone of a role can choose among. */
export function choosable(role: PersonRole): MailKind[] {
  return (Object.keys(mailKinds) as MailKind[]).filter((kind) => {
    const { roles, always }: KindWords = mailKinds[kind];
    return !always && roles.includes(role);
  });
}
