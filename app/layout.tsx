import type { Metadata } from 'next';
import { headers } from 'next/headers';
import type { ReactNode } from 'react';
import { fontVariables } from './fonts';
import './globals.css';

export const metadata: Metadata = {
  title: { default: 'Tallyframe', template: '%s · Tallyframe' },
  description: 'Bulk checks of plane steel frames, from spreadsheet to result workbook',
  robots: { index: false, follow: false },
};

/** Reading the headers keeps every page out of the build: each answer carries its own nonce. */
export default async function RootLayout({ children }: { readonly children: ReactNode }) {
  await headers();
  return (
    <html lang="en-GB" className={fontVariables}>
      <body>{children}</body>
    </html>
  );
}
