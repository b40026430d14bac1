/** Numbers of issues: the project's number and a running one, "2604-03". */

/**
 * What an issue's number begins with: the project's number with nothing in it that can't stand in a file's name, or "P"
 * with the project’s row where it has none.
 */
export function numberStem(project: { readonly id: number; readonly number: string | null }): string {
  const stem = (project.number ?? '')
    .trim()
    .replace(/[^\p{L}\p{N}.]+/gu, '-')
    .replace(/^[-.]+|[-.]+$/g, '');
  return stem === '' ? `P${project.id}` : stem;
}

/** @param running from 1, counted over all issues of the office that begin with the stem: two projects may share a number */
export function issueNumber(stem: string, running: number): string {
  if (!Number.isInteger(running) || running < 1) throw new RangeError(`Expected a running number from 1, got ${running}`);
  return `${stem}-${String(running).padStart(2, '0')}`;
}
