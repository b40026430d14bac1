import type { Description } from '@/lib/intake/families/built-in';

const dash = null;
const winds = ['left wall', 'left roof', 'right roof', 'right wall'] as const;
const members = ['AB', 'BC', 'CD', 'DE'] as const;
const name = (words: string): string => words.replaceAll(' ', '_');

/** Length minor of the rafters: the wider spacing of the two faces, and none where a face is not restrained. */
const rafterMinor =
  '{rafter_restraint_top = "none" or rafter_restraint_bottom = "none" ? "none" : max(rafter_restraint_top, rafter_restraint_bottom)}';

/**
 * The pitched portal as sheets (sheets §3): a chain A→B→C→D→E, so that local +y is outside and +M is tension inside
 * all round. Wind presses on a surface from outside, inside pressure outwards.
 */
export const portal: Description = {
  name: 'portal',
  rules: [],
  sheets: {
    Families: [
      ['family', 'parameter', 'quantity', 'default', 'min', 'choices'],
      ['portal', 'span', 'length', dash, '> 0', dash],
      ['portal', 'eaves', 'length', dash, '> 0', dash],
      ['portal', 'rise', 'length', dash, 0, dash],
      ['portal', 'spacing', 'length', dash, '> 0', dash],
      ['portal', 'column', 'section', dash, dash, dash],
      ['portal', 'rafter', 'section', dash, dash, dash],
      ['portal', 'material', 'material', 'none', dash, dash],
      ['portal', 'base', 'choice', 'pinned', dash, 'fixed, pinned'],
      ...['wall dead', 'dead', 'live', 'snow'].map((each) => ['portal', each, 'area load', 0, dash, dash]),
      ...winds.map((each) => ['portal', `wind ${each}`, 'area load', 0, dash, dash]),
      ...winds.map((each) => ['portal', `wind 2 ${each}`, 'area load', 0, dash, dash]),
      ['portal', 'column restraint', 'length', 'none', '> 0', dash],
      ['portal', 'rafter restraint top', 'length', 'none', '> 0', dash],
      ['portal', 'rafter restraint bottom', 'length', 'none', '> 0', dash],
      ['portal', 'pressure inside', 'area load', 0, dash, dash],
    ],
    Nodes: [
      ['frame', 'node', 'x', 'y', 'place'],
      ['portal', 'A', 0, 0, 'base'],
      ['portal', 'B', 0, '{eaves}', 'eaves'],
      ['portal', 'C', '{span/2}', '{eaves + rise}', 'apex'],
      ['portal', 'D', '{span}', '{eaves}', 'eaves'],
      ['portal', 'E', '{span}', 0, 'base'],
    ],
    Members: [
      ['frame', 'member', 'start', 'end', 'section', 'material', 'role', 'span', 'length minor', 'length LTB top', 'length LTB bottom'],
      ...members.map((each) => {
        const column = each === 'AB' || each === 'DE';
        return [
          'portal', each, each[0] ?? '', each[1] ?? '', column ? '{column}' : '{rafter}', '{material}', column ? 'column' : 'rafter',
          column ? dash : '{rise = 0 ? "rafter" : ""}', column ? '{column_restraint}' : rafterMinor,
          column ? '{column_restraint}' : '{rafter_restraint_top}', column ? '{column_restraint}' : '{rafter_restraint_bottom}',
        ];
      }),
    ],
    Supports: [
      ['frame', 'node', 'ux', 'uy', 'rz'],
      ...['A', 'E'].map((node) => ['portal', node, 'fixed', 'fixed', '{base = "fixed" ? "fixed" : "free"}']),
    ],
    'Load cases': [
      ['frame', 'case', 'kind', 'self weight', 'alternative'],
      ['portal', 'dead', 'dead', 1, dash],
      ['portal', 'live', 'roof live', dash, dash],
      ['portal', 'snow', 'snow', dash, dash],
      ['portal', 'wind', 'wind', dash, 'wind'],
      ['portal', 'wind 2', 'wind', dash, 'wind'],
      ['portal', 'inside', 'wind', dash, dash],
    ],
    'Member loads': [
      ['frame', 'case', 'member', 'load', 'axes', 'direction', 'value', 'when'],
      ...['BC', 'CD'].map((m) => ['portal', 'dead', m, 'distributed', 'global', 'y', '{-dead*spacing}', '{dead != 0}']),
      ...['AB', 'DE'].map((m) => ['portal', 'dead', m, 'distributed', 'global', 'y', '{-wall_dead*spacing}', '{wall_dead != 0}']),
      ...['live', 'snow'].flatMap((load) =>
        ['BC', 'CD'].map((m) => ['portal', load, m, 'distributed', 'projected', 'y', `{-${load}*spacing}`, `{${load} != 0}`]),
      ),
      ...['wind', 'wind 2'].flatMap((load) =>
        winds.map((side, i) => {
          const parameter = name(`${load} ${side}`);
          return ['portal', load, members[i] ?? '', 'distributed', 'local', 'y', `{-${parameter}*spacing}`, `{${parameter} != 0}`];
        }),
      ),
      ...members.map((m) => ['portal', 'inside', m, 'distributed', 'local', 'y', '{pressure_inside*spacing}', '{pressure_inside != 0}']),
    ],
  },
}; // prettier-ignore
