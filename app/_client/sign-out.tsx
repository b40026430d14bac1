'use client';
import { signOut } from './credentials';

export function SignOut() {
  return (
    <button
      type="button"
      className="choice-plain"
      onClick={() => {
        void signOut().finally(() => window.location.assign('/sign-in'));
      }}
    >
      Sign out
    </button>
  );
}
