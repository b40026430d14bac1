import 'server-only';
import type { ReactNode } from 'react';
import { QueryProvider } from '@/app/_client/query-provider';
import { SignInSheet } from '@/components/sign-in/sign-in-sheet';
import { engineVersion } from '@/lib/analysis/engine-version';

/** Pages before one is signed in: the blank drawing with a form, or a sentence, in its title block. */
export function SignInFrame({ sheet, children }: { readonly sheet?: string; readonly children: ReactNode }) {
  return (
    <QueryProvider>
      <SignInSheet version={engineVersion.split(' ').at(-1) ?? engineVersion} sheet={sheet}>
        {children}
      </SignInSheet>
    </QueryProvider>
  );
}
