import type { Generated } from 'kysely';
import type { OfficeRole } from '@/db/schema';

/** Letters on their way, who wants which, invitations, and the links that work once. */
export interface MailTables {
  outbox: {
    id: Generated<number>;
    office: number;
    recipient: string;
    kind: string;
    /** The MailMessage as JSON: facts, never a secret. */
    payload: string;
    state: 'waiting' | 'sent' | 'failed';
    /** The service delivers one letter for a key, however often it is asked. */
    idempotency_key: string;
    attempts: Generated<number>;
    /** Not tried before this instant: an attempt in hand, or one that failed, puts it off. */
    due_at: string;
    last_error: string | null;
    /** The service's own name for the letter. */
    message_id: string | null;
    created_at: string;
    sent_at: string | null;
  };
  /** What a person said of a kind of letter; without a row they get it. */
  mail_choice: { office: number; person: number; kind: string; wanted: number };
  invitation: {
    id: Generated<number>;
    office: number;
    email: string;
    role: OfficeRole;
    invited_by: number;
    created_at: string;
    ended_at: string | null;
    ended_as: 'accepted' | 'revoked' | null;
  };
  invitation_project: { invitation: number; project: number };
  single_use_link: {
    id: Generated<number>;
    purpose: 'invitation' | 'password reset';
    office: number;
    invitation: number | null;
    person: number | null;
    /** With the server's secret it gives the link's own (lib/access/link-secret.ts), which is kept nowhere. */
    nonce: string;
    /** SHA-256 of the secret. */
    hash: string;
    created_at: string;
    expires_at: string;
    ended_at: string | null;
  };
  /** Asked by whoever knows the sign-in page; whether such a person exists is looked up later. */
  reset_request: { id: Generated<number>; email: string; address: string; at: string; done_at: string | null };
}
