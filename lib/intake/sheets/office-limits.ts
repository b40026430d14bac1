import { idKey } from '@/lib/intake/ids';
import type { Limit } from '@/lib/model/frame';
import { namesCombination, type OfficeLimit, ofNodes } from '@/lib/model/office-limit';
import type { Settings } from '@/lib/model/settings';

/** What of a frame an office's limits may name. */
export interface LimitedFrame {
  readonly roles: ReadonlySet<string>;
  /** Places of nodes as typed, by key. */
  readonly places: ReadonlyMap<string, string>;
  /** Names of its service combinations. */
  readonly services: readonly string[];
}

/**
 * The office's limits that hold beside those of the sheets. The sheet wins: whatever it says for everything (a `*` row, a
 * ratio in Setup, `none`) leaves no room for the office's of that measure, and for one role or place its own row does.
 * One for named combinations holds in those of them that the frame has.
 *
 * @param given the limits that the sheets give, Setup's ratios among them
 */
export function officeLimits(
  office: readonly OfficeLimit[],
  given: readonly Limit[],
  settings: Pick<Settings, 'deflectionRatio' | 'swayRatio'>,
  frame: LimitedFrame,
): Limit[] {
  return office.flatMap((limit): Limit[] => {
    const { measure, ratio, source } = limit;
    const thing = thingOf(limit, frame);
    if (!thing) return [];
    const own = given.filter((each) => each.measure === measure);
    const whole = own.filter(({ combination }) => combination === null);
    const declared = measure === 'deflection' ? settings.deflectionRatio : measure === 'sway' ? settings.swayRatio : null;
    if (declared !== null || whole.some(({ target }) => target === 'all')) return [];
    const sameThing = (each: Limit) => each.target === thing.target && idKey(each.name) === idKey(thing.name);
    if (whole.some(sameThing)) return [];
    const toNode = measure === 'spread' ? (frame.places.get(idKey(limit.toPlace ?? '')) ?? null) : null;
    if (measure === 'spread' && toNode === null) return [];
    const named = limit.combination ?? null;
    const combinations = named === null ? [null] : frame.services.filter((name) => namesCombination(named, name));
    const said = own.filter(sameThing).map(({ combination }) => idKey(combination ?? ''));
    const direction = measure === 'displacement' ? (limit.direction ?? null) : null;
    const any = { ...thing, measure, direction, toNode, ratio, absolute_m: limit.absolute_m ?? null, namedFrame: false };
    return combinations
      .filter((combination) => combination === null || !said.includes(idKey(combination)))
      .map((combination) => ({ ...any, combination, source: source === '' ? 'office' : `office (${source})` }));
  });
}

/** What an office's limit is of in a frame; null = nothing there. */
function thingOf({ appliesTo, measure }: OfficeLimit, { roles, places }: LimitedFrame): Pick<Limit, 'target' | 'name'> | null {
  if (appliesTo === '*') return { target: 'all', name: '*' };
  const place = ofNodes(measure) ? places.get(idKey(appliesTo)) : undefined;
  if (place !== undefined) return { target: 'place', name: place };
  return roles.has(appliesTo) ? { target: 'role', name: appliesTo } : null;
}
