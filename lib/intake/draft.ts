import type { Batch, FrameEntry } from '@/lib/intake/batch';
import type { Reading } from '@/lib/intake/reader';
import type { FrameCases } from '@/lib/intake/sheets/load-cases';
import type { Row } from '@/lib/intake/table';
import type { FrameNode, Material, Member, MemberLoad, NodeLoad, Section, Settlement, Support } from '@/lib/model/frame';

/** A frame while its rows are read. Index −1 stands for a node or member whose row is wrong (told). */
export interface Draft {
  readonly batch: Batch;
  readonly entry: FrameEntry;
  readonly reading: Reading;
  readonly cases: FrameCases;
  readonly nodes: FrameNode[];
  readonly nodeRows: Row[];
  readonly nodeIndex: Map<string, number>;
  readonly members: Member[];
  readonly memberRows: Row[];
  readonly memberIndex: Map<string, number>;
  /** m, by member. */
  readonly lengths: number[];
  readonly sections: Section[];
  /** Row of the Sections sheet by section of the frame; null = straight from the library. */
  readonly sectionRows: (Row | null)[];
  readonly materials: Material[];
  /** Row of the Materials sheet by material of the frame; null = a grade by its name. */
  readonly materialRows: (Row | null)[];
  readonly supports: Support[];
  readonly supportRows: Row[];
  /** True where a row of its nodes or members is wrong (told): what seems loose may not be. */
  shapeTrouble: boolean;
  /** True where a row of its supports is wrong (told). */
  supportTrouble: boolean;
  readonly nodeLoads: NodeLoad[];
  readonly memberLoads: MemberLoad[];
  readonly settlements: Settlement[];
  /** Names of its combinations, for limits that name one. */
  readonly combinationNames: string[];
}

export function newDraft(batch: Batch, entry: FrameEntry): Draft {
  return {
    batch,
    entry,
    reading: entry.reading,
    cases: batch.cases.for(entry),
    nodes: [],
    nodeRows: [],
    nodeIndex: new Map(),
    members: [],
    memberRows: [],
    memberIndex: new Map(),
    lengths: [],
    sections: [],
    sectionRows: [],
    materials: [],
    materialRows: [],
    supports: [],
    supportRows: [],
    shapeTrouble: false,
    supportTrouble: false,
    nodeLoads: [],
    memberLoads: [],
    settlements: [],
    combinationNames: [],
  };
}
