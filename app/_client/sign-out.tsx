'use client';
import { signOut } from './credentials';

export function SignOut() {
  return (
    <button
      type="button"
      className="choice-plain"
      onClick={() => {
        // A whole new page, so that nothing read before stays in memory.
        void signOut().finally(() => window.location.replace(new URL('/sign-in', window.location.href)));
      }}
    >
      Sign out
    </button>
  );
}
