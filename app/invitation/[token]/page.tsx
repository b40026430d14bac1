import type { Metadata } from 'next';
import { LinkForm } from '@/app/_client/link-form';
import { SignInFrame } from '@/app/_server/sign-in-frame';
import { SignInRow } from '@/components/sign-in/sign-in-sheet';
import { Notice } from '@/components/ui/notice';
import { db } from '@/db/client';
import { findInvitation } from '@/db/queries/invitations';

// The address is a secret: it goes nowhere with what the page asks for.
export const metadata: Metadata = { title: 'Invitation', referrer: 'no-referrer' };

/** Where an invitation’s link leads. Looking at it uses nothing up, since mail programs look too. */
export default async function InvitationPage({ params }: { readonly params: Promise<{ readonly token: string }> }) {
  const { token } = await params;
  const invitation = await findInvitation(db(), token);
  if (!invitation) {
    return (
      <SignInFrame sheet="invitation">
        <SignInRow>
          <Notice kind="error">This invitation was used, revoked or has expired. Ask the office’s lead for another.</Notice>
        </SignInRow>
      </SignInFrame>
    );
  }
  const { email, role, officeName, by } = invitation;
  return (
    <SignInFrame sheet="invitation">
      <SignInRow>
        <p>
          {by} invites you to <b>{officeName}</b> as {role === 'analyst' ? 'an' : 'a'} {role}.
        </p>
      </SignInRow>
      <LinkForm token={token} email={email} />
    </SignInFrame>
  );
}
