import type { Metadata } from 'next';
import { pageOwnKind } from '@/app/_server/page-own';
import { Sheet, Zone } from '@/components/ui/sheet';
import { GradeForm } from '../../_own/grade-form';
import { SectionForm } from '../../_own/section-form';

export const metadata: Metadata = { title: 'New' };

/** A section or grade of the office's own: its first version. */
export default async function NewOwnPage({ params }: { readonly params: Promise<{ readonly kind: string }> }) {
  const { kind } = await pageOwnKind((await params).kind, 'change sections', 'new');
  const start = { id: null, name: '', units: 'metric' as const, cells: {}, note: '', next: 1 };
  return (
    <Sheet>
      <Zone title={kind === 'section' ? 'New section' : 'New steel grade'} level={1} note="of the office’s own" />
      {kind === 'section' ? <SectionForm start={start} /> : <GradeForm start={start} />}
    </Sheet>
  );
}
