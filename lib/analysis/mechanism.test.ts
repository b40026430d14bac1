import { describe, expect, it } from 'vitest';
import type { Frame, Restraint, Support } from '@/lib/model/frame';
import { createAnalyser } from './analyser';
import { nodeAngles } from './assemble';
import { describeMovement } from './mechanism';
import { plainFrame, plainMember, plainSection } from './plain-frame';
import { buildTopology } from './topology';

const support = (node: number, ux: Restraint, uy: Restraint, rz: Restraint = 'free', angle_rad = 0): Support => ({
  node,
  ux,
  uy,
  rz,
  angle_rad,
});
const portalNodes = [['A', 0, 0], ['B', 0, 4], ['C', 6, 4], ['D', 6, 0]] as const; // prettier-ignore

function failureOf(frame: Frame): { code: string; node: string | null; message: string } {
  const analysis = createAnalyser().analyse(frame);
  if (analysis.ok) throw new Error('Expected no solution, got one');
  return analysis.failure;
}

describe('a frame that can move freely', () => {
  it('names the first of the nodes that slide sideways, and the pins that would hold it', () => {
    const failure = failureOf(
      plainFrame({
        nodes: portalNodes,
        members: [
          plainMember('AB', 0, 1),
          plainMember('BC', 1, 2, { startJoint: 'pin', endJoint: 'pin' }),
          plainMember('CD', 2, 3),
        ],
        supports: [support(0, 'fixed', 'fixed'), support(3, 'fixed', 'fixed')],
      }),
    );
    expect(failure).toMatchObject({ code: 'mechanism', node: 'B' });
    expect(failure.message).toBe(
      'Node B can freely slide horizontally together with node C, so the frame has no solution. Hold B in x, or make a pinned joint next to it rigid (BC at B, BC at C), or brace it.',
    );
  });

  it('names both ends of a beam that slides along on its rollers', () => {
    const failure = failureOf(
      plainFrame({ nodes: [['L', 0, 0], ['R', 5, 0]], members: [plainMember('M', 0, 1)], supports: [support(0, 'free', 'fixed'), support(1, 'free', 'fixed')] }), // prettier-ignore
    );
    expect(failure).toMatchObject({ code: 'mechanism', node: 'L' });
    expect(failure.message).toContain('Node L can freely slide horizontally together with node R');
    expect(failure.message).toContain('Hold L in x');
  });

  it('says that a beam on one pin turns about it', () => {
    const failure = failureOf(
      plainFrame({ nodes: [['A', 0, 0], ['B', 5, 0]], members: [plainMember('M', 0, 1)], supports: [support(0, 'fixed', 'fixed')] }), // prettier-ignore
    );
    expect(failure).toMatchObject({ code: 'mechanism', node: 'B' });
    expect(failure.message).toContain('Node B can freely move vertically as the whole frame turns about node A');
    expect(failure.message).toContain('Hold B in y');
  });

  it('names a middle hinge that drops', () => {
    const failure = failureOf(
      plainFrame({
        nodes: [['A', 0, 0], ['B', 3, 0], ['C', 6, 0]],
        members: [plainMember('AB', 0, 1, { startJoint: 'pin', endJoint: 'pin' }), plainMember('BC', 1, 2)],
        supports: [support(0, 'fixed', 'fixed'), support(2, 'free', 'fixed')],
      }), // prettier-ignore
    );
    expect(failure).toMatchObject({ code: 'mechanism', node: 'B' });
    expect(failure.message).toContain('Node B can freely move vertically');
    expect(failure.message).toContain('AB at A, AB at B');
  });

  it('names a joint between two bars in line that moves square to them, and gives the angle', () => {
    const failure = failureOf(
      plainFrame({
        nodes: [['A', 0, 0], ['B', 3, 3], ['C', 6, 6]],
        members: [plainMember('AB', 0, 1, { axialOnly: true }), plainMember('BC', 1, 2, { axialOnly: true })],
        supports: [support(0, 'fixed', 'fixed'), support(2, 'fixed', 'fixed')],
      }), // prettier-ignore
    );
    expect(failure).toMatchObject({ code: 'mechanism', node: 'B' });
    expect(failure.message).toContain('move along a line at 135° to the horizontal');
  });

  it('speaks of a turned support in that support’s own axes', () => {
    const failure = failureOf(
      plainFrame({
        nodes: [['A', 0, 0], ['B', 4, 4]],
        members: [plainMember('AB', 0, 1)],
        supports: [support(0, 'free', 'fixed', 'free', Math.PI / 4), support(1, 'free', 'fixed', 'free', Math.PI / 4)],
      }), // prettier-ignore
    );
    expect(failure).toMatchObject({ code: 'mechanism', node: 'A' });
    expect(failure.message).toContain('slide along ux of its support turned 45° together with node B');
    expect(failure.message).toContain('Hold A in ux of that support');
  });

  it('says turn where nothing but a rotation is loose', () => {
    const frame = plainFrame({ nodes: [['A', 0, 0], ['B', 4, 0]], members: [plainMember('AB', 0, 1)], supports: [support(0, 'fixed', 'fixed')] }); // prettier-ignore
    const t = buildTopology(frame);
    const z = new Float64Array(3 * t.size);
    z[3 * t.positionOf[0]! + 2] = 1;
    expect(describeMovement(frame, t, nodeAngles(frame), z)).toEqual({
      node: 'A',
      how: 'turn',
      remedy: 'Hold A against turning (rz)',
    });
  });

  it('is found whatever the units’ size: the same shape a thousand times smaller and softer', () => {
    for (const size of [1e-3, 1, 1e3]) {
      const failure = failureOf(
        plainFrame({
          nodes: portalNodes.map(([id, x, y]) => [id, x * size, y * size]),
          members: ['AB', 'BC', 'CD'].map((id, i) =>
            plainMember(id, i, i + 1, i === 1 ? { startJoint: 'pin', endJoint: 'pin' } : {}),
          ),
          supports: [support(0, 'fixed', 'fixed'), support(3, 'fixed', 'fixed')],
        }),
      );
      expect(failure).toMatchObject({ code: 'mechanism', node: 'B' });
    }
  });

  it('is found when it stands askew, where no stiffness is exactly nought', () => {
    for (const angle of [0.1, 0.7, 1.3, 2.9]) {
      const failure = failureOf(
        plainFrame({
          nodes: portalNodes.map(([id, x, y]) => [
            id,
            x * Math.cos(angle) - y * Math.sin(angle),
            x * Math.sin(angle) + y * Math.cos(angle),
          ]),
          members: ['AB', 'BC', 'CD'].map((id, i) =>
            plainMember(id, i, i + 1, i === 1 ? { startJoint: 'pin', endJoint: 'pin' } : {}),
          ),
          supports: [support(0, 'fixed', 'fixed'), support(3, 'fixed', 'fixed')],
        }),
      );
      expect(failure.code).toBe('mechanism');
      expect(['B', 'C']).toContain(failure.node);
    }
  });

  it('is found where axial strain is made negligible by an area of 1000 m²', () => {
    const frame = plainFrame({
      nodes: portalNodes,
      members: ['AB', 'BC', 'CD'].map((id, i) =>
        plainMember(id, i, i + 1, i === 1 ? { startJoint: 'pin', endJoint: 'pin' } : {}),
      ),
      supports: [support(0, 'fixed', 'fixed'), support(3, 'fixed', 'fixed')],
    });
    const stiff = { ...frame, sections: frame.sections.map((s) => ({ ...s, properties: { ...s.properties, A_m2: 1000 } })) };
    expect(failureOf(stiff)).toMatchObject({ code: 'mechanism', node: 'B' });
  });
});

describe('a frame that is not one', () => {
  const held = [support(0, 'fixed', 'fixed', 'fixed')];

  it('names the nodes of a part that neither hangs together with the rest nor has a support', () => {
    const failure = failureOf(
      plainFrame({
        nodes: [['A', 0, 0], ['B', 0, 4], ['X', 3, 0], ['Y', 3, 4]],
        members: [plainMember('AB', 0, 1), plainMember('XY', 2, 3)],
        supports: held,
      }), // prettier-ignore
    );
    expect(failure).toMatchObject({ code: 'not-connected', node: 'X' });
    expect(failure.message).toContain('The part with nodes X and Y is not connected to the rest and has no support');
  });

  it('names a node that no member reaches', () => {
    const failure = failureOf(
      plainFrame({ nodes: [['A', 0, 0], ['B', 0, 4], ['lone', 9, 9]], members: [plainMember('AB', 0, 1)], supports: held }), // prettier-ignore
    );
    expect(failure).toMatchObject({ code: 'not-connected', node: 'lone' });
  });

  it('says so when nothing is supported', () => {
    const failure = failureOf(plainFrame({ nodes: [['A', 0, 0], ['B', 0, 4]], members: [plainMember('AB', 0, 1)] })); // prettier-ignore
    expect(failure).toMatchObject({ code: 'not-connected' });
    expect(failure.message).toContain('Nothing holds the frame');
  });

  it('solves two parts that are each held', () => {
    const frame = plainFrame({
      nodes: [['A', 0, 0], ['B', 0, 4], ['X', 3, 0], ['Y', 3, 4]],
      members: [plainMember('AB', 0, 1), plainMember('XY', 2, 3)],
      supports: [...held, support(2, 'fixed', 'fixed', 'fixed')],
    }); // prettier-ignore
    expect(createAnalyser().analyse(frame).ok).toBe(true);
  });
});

it('a sound frame with a stub far stiffer than the rest is no mechanism: what makes it so is named', () => {
  const frame = plainFrame({
    nodes: [['A', 0, 0], ['B', 15, 2], ['B2', 15.001, 2], ['C', 30, 0]],
    sections: [plainSection('HE 1000 B', 400e-4, 644_700e-8), plainSection('IPE 80', 7.64e-4, 80.1e-8)],
    members: [plainMember('AB', 0, 1, { section: 1 }), plainMember('BB', 1, 2), plainMember('BC', 2, 3, { section: 1 })],
    supports: [
      { node: 0, ux: 'fixed', uy: 'fixed', rz: 'fixed', angle_rad: 0 },
      { node: 3, ux: 'free', uy: 'fixed', rz: 'fixed', angle_rad: 0 },
    ],
  }); // prettier-ignore
  const analysis = createAnalyser().analyse(frame);
  if (analysis.ok) throw new Error('solved');
  expect(analysis.failure.code).toBe('not-solved');
  expect(analysis.failure.message).toContain('Member BB is 1 mm long, far stiffer than the rest: make its nodes B and B2 one');
});
