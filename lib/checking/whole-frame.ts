/**
 * Why something of a frame was not checked that no "not checked" row of its checks says (a reason of its sheets, or a
 * combination that could not be checked beside one that is over): that is accepted for the frame as a whole.
 *
 * @param said everything that was not checked of the frame, "check: reason; check: reason …"; null = nothing
 * @param rows its rows of checks with verdict "not checked"
 * @returns null where the rows say it all
 */
export function wholeFrameReason(
  said: string | null,
  rows: readonly { readonly check: string; readonly reason: string | null }[],
): string | null {
  if (said === null || said.trim() === '') return null;
  let rest = `; ${said}; `;
  for (const { check, reason } of rows) rest = rest.replace(`; ${check}: ${reason ?? 'not a number'}; `, '; ');
  const left = rest.replace(/^[; ]+|[; ]+$/g, '');
  return left === '' ? null : left;
}
