import { idKey } from '@/lib/intake/ids';
import type { Limit } from '@/lib/model/frame';
import type { OfficeLimit } from '@/lib/model/office-limit';
import type { Settings } from '@/lib/model/settings';

/**
 * The office's limits that hold beside those of the sheets. The sheet wins: whatever it says for everything (a `*` row, a
 * ratio in Setup, `none`) leaves no room for the office's, and for one role its own row does.
 *
 * @param given the limits that the sheets give, Setup's ratios among them
 */
export function officeLimits(
  office: readonly OfficeLimit[],
  given: readonly Limit[],
  settings: Pick<Settings, 'deflectionRatio' | 'swayRatio'>,
): Limit[] {
  const whole = given.filter(({ combination }) => combination === null);
  return office.flatMap(({ appliesTo, measure, ratio, source }): Limit[] => {
    const own = whole.filter((limit) => limit.measure === measure);
    const declared = measure === 'deflection' ? settings.deflectionRatio : settings.swayRatio;
    if (declared !== null || own.some(({ target }) => target === 'all')) return [];
    if (own.some(({ target, name }) => target === 'role' && idKey(name) === idKey(appliesTo))) return [];
    const target = appliesTo === '*' ? 'all' : 'role';
    const any = { direction: null, toNode: null, absolute_m: null, combination: null, namedFrame: false };
    return [{ target, name: appliesTo, measure, ratio, ...any, source: source === '' ? 'office' : `office (${source})` }];
  });
}
