import type { Description } from '@/lib/intake/families/built-in';

const dash = null;
const between = '{strut_at > 0 and strut_at < 1}';
const atTip = '{strut_at = 1}';
const strutted = '{strut_at > 0}';

/** The bracket as sheets (sheets §3): an arm from its root A to its tip C, with or without a strut from F. */
export const bracket: Description = {
  name: 'bracket',
  rules: [
    {
      when: '{root = "pinned" and strut_at = 0}',
      parameter: 'root',
      message: 'a pinned root with no strut lets the arm turn freely: write fixed, or give strut at',
    },
    {
      when: '{strut_at > 0 and drop = 0}',
      parameter: 'drop',
      message: "with drop 0 the strut's foot stands on the arm's own line, at the root: give the foot's depth below the root (negative: a tie from above)",
    },
    { when: '{strut_at > 0 and strut = "none"}', parameter: 'strut', message: 'strut at asks for a strut, so its section is needed' },
  ],
  sheets: {
    Families: [
      ['family', 'parameter', 'quantity', 'default', 'min', 'max', 'choices'],
      ['bracket', 'reach', 'length', dash, '> 0', dash, dash],
      ['bracket', 'rise', 'length', 0, dash, dash, dash],
      ['bracket', 'drop', 'length', 0, dash, dash, dash],
      ['bracket', 'strut at', 'number', 0, 0, 1, dash],
      ['bracket', 'arm restraint', 'length', 'none', '> 0', dash, dash],
      ['bracket', 'arm', 'section', dash, dash, dash, dash],
      ['bracket', 'strut', 'section', 'none', dash, dash, dash],
      ['bracket', 'material', 'material', 'none', dash, dash, dash],
      ['bracket', 'root', 'choice', 'fixed', dash, dash, 'fixed, pinned'],
      ['bracket', 'tip Fx', 'force', 0, dash, dash, dash],
      ['bracket', 'tip Fy', 'force', 0, dash, dash, dash],
      ['bracket', 'tip M', 'moment', 0, dash, dash, dash],
      ['bracket', 'line load', 'line load', 0, dash, dash, dash],
    ],
    Nodes: [
      ['frame', 'node', 'x', 'y', 'place', 'when'],
      ['bracket', 'A', 0, 0, dash, dash],
      ['bracket', 'B', '{strut_at*reach}', '{strut_at*rise}', dash, between],
      ['bracket', 'C', '{reach}', '{rise}', 'tip', dash],
      ['bracket', 'F', 0, '{-drop}', dash, strutted],
    ],
    Members: [
      ['frame', 'member', 'start', 'end', 'section', 'material', 'role', 'axial only', 'span', 'length minor', 'length LTB', 'when'],
      ['bracket', 'AB', 'A', 'B', '{arm}', '{material}', 'arm', dash, 'arm', '{arm_restraint}', '{arm_restraint}', between],
      ['bracket', 'BC', 'B', 'C', '{arm}', '{material}', 'arm', dash, 'arm', '{arm_restraint}', '{arm_restraint}', between],
      ['bracket', 'AC', 'A', 'C', '{arm}', '{material}', 'arm', dash, dash, '{arm_restraint}', '{arm_restraint}', '{not (strut_at > 0 and strut_at < 1)}'],
      ['bracket', 'FB', 'F', 'B', '{strut}', '{material}', 'strut', 'yes', dash, dash, dash, between],
      ['bracket', 'FC', 'F', 'C', '{strut}', '{material}', 'strut', 'yes', dash, dash, dash, atTip],
    ],
    Supports: [
      ['frame', 'node', 'ux', 'uy', 'rz', 'when'],
      ['bracket', 'A', 'fixed', 'fixed', '{root = "fixed" ? "fixed" : "free"}', dash],
      ['bracket', 'F', 'fixed', 'fixed', 'free', strutted],
    ],
    'Load cases': [
      ['frame', 'case', 'kind', 'self weight'],
      ['bracket', 'dead', 'dead', 1],
      ['bracket', 'tip', 'live', dash],
    ],
    'Node loads': [
      ['frame', 'case', 'node', 'Fx', 'Fy', 'Mz', 'when'],
      ['bracket', 'tip', 'C', '{tip_Fx}', '{tip_Fy}', '{tip_M}', '{tip_Fx != 0 or tip_Fy != 0 or tip_M != 0}'],
    ],
    'Member loads': [
      ['frame', 'case', 'member', 'load', 'axes', 'direction', 'value', 'when'],
      ['bracket', 'dead', 'AB', 'distributed', 'global', 'y', '{-line_load}', '{line_load != 0 and strut_at > 0 and strut_at < 1}'],
      ['bracket', 'dead', 'BC', 'distributed', 'global', 'y', '{-line_load}', '{line_load != 0 and strut_at > 0 and strut_at < 1}'],
      ['bracket', 'dead', 'AC', 'distributed', 'global', 'y', '{-line_load}', '{line_load != 0 and (strut_at = 0 or strut_at = 1)}'],
    ],
  },
}; // prettier-ignore
