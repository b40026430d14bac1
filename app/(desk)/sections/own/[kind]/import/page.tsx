import type { Metadata } from 'next';
import { pageOwnKind } from '@/app/_server/page-own';
import { Sheet, Zone } from '@/components/ui/sheet';
import { ImportTable } from '../../_own/import-table';

export const metadata: Metadata = { title: 'Bring a table in' };

/** A table of sections or grades of the office's own, from a sheet. */
export default async function ImportOwnPage({ params }: { readonly params: Promise<{ readonly kind: string }> }) {
  const { kind } = await pageOwnKind((await params).kind, 'change sections', 'import');
  return (
    <Sheet>
      <Zone title={kind === 'section' ? 'Bring a table of sections in' : 'Bring a table of steel grades in'} level={1} />
      <ImportTable kind={kind} />
    </Sheet>
  );
}
