import type { ReactNode } from 'react';

/** One line of a list of facts (`dl.facts`): what, and its value at the right. */
export function Fact({ name, children }: { readonly name: string; readonly children: ReactNode }) {
  return (
    <div className="border-hair flex justify-between gap-4 border-b py-1">
      <dt className="text-ink2">{name}</dt>
      <dd>{children}</dd>
    </div>
  );
}
