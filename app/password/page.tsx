import type { Metadata } from 'next';
import { SignInFrame } from '@/app/_server/sign-in-frame';
import { AskForPassword } from './ask-for-password';

export const metadata: Metadata = { title: 'Forgotten password' };

/** For whoever has forgotten their password. */
export default function ForgottenPage() {
  return (
    <SignInFrame sheet="new password">
      <AskForPassword />
    </SignInFrame>
  );
}
