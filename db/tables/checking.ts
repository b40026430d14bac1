/** Tables of checking, for Kysely. Each row of a mark names the input and the engine that it was made on. */
import type { Generated } from 'kysely';
import type { ListPart } from '@/lib/checking/sample-rule';

interface MadeOn {
  input_sha256: string;
  engine: string;
}

export interface CheckingTables {
  /** Sent, returned, passed: only added to. */
  checking_act: MadeOn & {
    id: Generated<number>;
    office: number;
    revision: number;
    what: 'sent' | 'returned' | 'passed';
    person: number;
    at: string;
    note: string;
  };
  /** The frames that had to be seen, as the rule gave them when the revision was sent (lib/checking/sample-rule.ts). */
  checking_list: {
    revision: number;
    frame: number;
    ordinal: number;
    part: ListPart;
    /** ReasonToSee[] as JSON. */
    reasons: string;
    /** Why something of the frame is not checked that no row of its checks says; it is accepted for the frame as a whole. */
    whole: string | null;
  };
  checking_seen: MadeOn & { revision: number; frame: number; person: number; at: string; frame_hash: string };
  checking_query: MadeOn & {
    id: Generated<number>;
    office: number;
    revision: number;
    frame: number;
    /** Member, span or node; null = the frame. */
    subject: string | null;
    check_name: string | null;
    raised_by: number;
    raised_at: string;
    closed_by: number | null;
    closed_at: string | null;
  };
  checking_message: { id: Generated<number>; query: number; person: number; at: string; text: string };
  checking_acceptance: MadeOn & {
    id: Generated<number>;
    office: number;
    revision: number;
    frame: number;
    /** Ordinal of its row in check_row; −1 = the frame as a whole. */
    item: number;
    subject: string | null;
    check_name: string;
    combination: string | null;
    verdict: 'over' | 'not checked';
    ratio: number | null;
    reason: string;
    person: number;
    at: string;
    /** Taken back, or given anew with another reason. */
    ended_by: number | null;
    ended_at: string | null;
  };
  checking_own_value: MadeOn & {
    id: Generated<number>;
    office: number;
    revision: number;
    frame: number;
    /** Which of ours (lib/checking/figure.ts) as JSON, and in words. */
    figure: string;
    label: string;
    quantity: string;
    /** SI. */
    ours: number;
    theirs: number;
    /** As it was typed. */
    typed: string;
    note: string;
    person: number;
    at: string;
  };
}
