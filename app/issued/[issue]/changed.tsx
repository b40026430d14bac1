import type { ChangedSince } from '@/app/_server/issued-view';
import { RatioText } from '@/components/ui/ratio-text';
import { VerdictMark } from '@/components/ui/verdict-mark';
import type { ComparedFrame } from '@/lib/results/compare';

const count = (n: number, noun: string): string => `${n.toLocaleString('en-GB')} ${noun}${n === 1 ? '' : 's'}`;

/** What changed since the issue before: what of the sheets, then frame by frame, those that moved. */
export function Changed({ changed, nearLimit }: { readonly changed: ChangedSince; readonly nearLimit: number }) {
  const { frames, moved, matching, inputs, settings } = changed;
  return (
    <>
      <p className="issue-said">
        {matching === 0
          ? `No verdict is another and no ratio moved in ${count(frames.after, 'frame')}.`
          : `${count(matching, 'frame')} moved to another verdict or ratio, came or went. All others stand as they did.`}
      </p>
      {inputs.length + settings.length > 0 && (
        <ul className="mb-2">
          {settings.map(({ setting, before, after }) => (
            <li key={setting}>
              Setting, {setting}: <s>{before}</s> → <b>{after}</b>
            </li>
          ))}
          {inputs.map(({ sheet, what, before, after, cells, where }) => (
            <li key={`${sheet} ${what} ${before} ${after} ${where[0]}`}>
              {sheet}, {what ?? 'row'}: <s>{before ?? 'none'}</s> → <b>{after ?? 'none'}</b>{' '}
              <span className="text-ink2">
                {where.slice(0, 3).join('; ')}
                {cells > 3 && ` and ${cells - 3} more`}
              </span>
            </li>
          ))}
        </ul>
      )}
      {moved.length > 0 && (
        <div className="tbl-wrap" tabIndex={0} role="region" aria-label="Frames that moved">
          <table className="tbl issue-list">
            <caption className="sr-only">Frames that moved</caption>
            <thead>
              <tr>
                <th scope="col">Frame</th>
                <th scope="col">Before</th>
                <th scope="col">Now</th>
                <th scope="col" className="issue-wide">
                  Section that governs
                </th>
              </tr>
            </thead>
            <tbody>
              {moved.map(({ id, before, after }) => (
                <tr key={id}>
                  <th scope="row">{id}</th>
                  <td>{standing(before, nearLimit)}</td>
                  <td>{standing(after, nearLimit)}</td>
                  <td className="issue-wide">
                    {before?.section && after?.section && before.section !== after.section && <s>{before.section}</s>}{' '}
                    {after?.section}
                  </td>
                </tr>
              ))}
            </tbody>
          </table>
        </div>
      )}
      {matching > moved.length && <p className="text-ink2">{moved.length} of them are shown, those that moved most.</p>}
    </>
  );
}

function standing(frame: ComparedFrame | null, nearLimit: number) {
  if (frame === null) return <span className="text-ink3">not in it</span>;
  return (
    <>
      <RatioText ratio={frame.ratio} verdict={frame.verdict} nearLimit={nearLimit} /> <VerdictMark verdict={frame.verdict} word />
    </>
  );
}
