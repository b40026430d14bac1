import Link from 'next/link';
import { Notice } from '@/components/ui/notice';
import type { IssueState } from '@/lib/issuing/issue-states';

interface IssueStandingProps {
  readonly state: IssueState;
  readonly number: string;
  /** The issue that took its place; without an address for who does not have that one. */
  readonly later: { readonly number: string; readonly href: string | null } | null;
  readonly withdrawn: { readonly by: string; readonly at: string; readonly reason: string } | null;
}

/** What an issue is no longer, in red and first of all; nothing where it is in force. */
export function IssueStanding({ state, number, later, withdrawn }: IssueStandingProps) {
  if (state === 'withdrawn' && withdrawn) {
    return (
      <Notice kind="error">
        <b className="issue-withdrawn">{number} is withdrawn. Don’t build from it.</b> {withdrawn.by} withdrew it on{' '}
        {withdrawn.at}: {withdrawn.reason}
        {later && <> {named(later)} took its place.</>}
      </Notice>
    );
  }
  if (state === 'superseded') {
    return (
      <Notice kind="error">
        <b className="issue-withdrawn">{number} is superseded. Don’t build from it.</b>{' '}
        {later && <>{named(later)} took its place.</>}
      </Notice>
    );
  }
  return null;
}

const named = ({ number, href }: { readonly number: string; readonly href: string | null }) =>
  href === null ? number : <Link href={href}>{number}</Link>;
