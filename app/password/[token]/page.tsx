import type { Metadata } from 'next';
import Link from 'next/link';
import { LinkForm } from '@/app/_client/link-form';
import { SignInFrame } from '@/app/_server/sign-in-frame';
import { SignInRow } from '@/components/sign-in/sign-in-sheet';
import { Notice } from '@/components/ui/notice';
import { db } from '@/db/client';
import { isResetOpen } from '@/db/queries/password-resets';
import { pages } from '@/lib/api/addresses';

export const metadata: Metadata = { title: 'New password', referrer: 'no-referrer' };

/** Where the link for a new password leads. */
export default async function NewPasswordPage({ params }: { readonly params: Promise<{ readonly token: string }> }) {
  const { token } = await params;
  return (
    <SignInFrame sheet="new password">
      {(await isResetOpen(db(), token)) ? (
        <>
          <SignInRow>
            <p>Setting it signs you out everywhere and ends your personal tokens.</p>
          </SignInRow>
          <LinkForm token={token} email={null} />
        </>
      ) : (
        <SignInRow>
          <Notice kind="error">
            This link was used or has expired.{' '}
            <Link className="link" href={pages.forgotten}>
              Ask for another
            </Link>
            .
          </Notice>
        </SignInRow>
      )}
    </SignInFrame>
  );
}
