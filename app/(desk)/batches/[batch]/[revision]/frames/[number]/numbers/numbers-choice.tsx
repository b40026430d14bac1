'use client';
import { useRouter } from 'next/navigation';
import { useTransition } from 'react';
import type { ResultName } from '@/lib/drawing/drawing-data';
import { ResultChoice } from '@/components/drawing/result-choice';
import { Finder } from '@/components/ui/finder';
import { Segments } from '@/components/ui/segments';

interface NumbersChoiceProps {
  readonly members: readonly string[];
  readonly results: readonly ResultName[];
  readonly notApplicable: readonly string[];
  readonly member: string;
  readonly result: string;
  /** In N and m, as the engine has them, rather than in units that go with the batch. */
  readonly si: boolean;
  readonly units: 'metric' | 'us';
}

/** Member, result and units: all stand in the address. */
export function NumbersChoice({ members, results, notApplicable, member, result, si, units }: NumbersChoiceProps) {
  const router = useRouter();
  const [waiting, begin] = useTransition();
  const choose = (key: 'of' | 'show' | 'in', value: string) => {
    const params = new URLSearchParams(window.location.search);
    params.set(key, value);
    begin(() => router.replace(`?${params.toString()}`, { scroll: false }));
  };
  const memberOptions = members.map((id) => ({ value: id, label: id, group: 'Members' }));
  return (
    <div className="d-choices no-print" aria-busy={waiting}>
      <Finder label="Member" options={memberOptions} value={member} onChange={(id) => choose('of', id)} />
      <ResultChoice results={results} notApplicable={notApplicable} chosen={result} onChoose={(name) => choose('show', name)} />
      <Segments
        label="Units"
        options={[
          { value: 'batch', label: units === 'us' ? 'kip, in' : 'kN, m' },
          { value: 'si', label: 'N, m' },
        ]}
        value={si ? 'si' : 'batch'}
        onChange={(value) => choose('in', value)}
      />
    </div>
  );
}
