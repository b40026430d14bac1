/** The invented office's projects and what was brought in for them, by the names of the files in samples/. */
import type { SeedIssues } from './issue';
import type { SeedPerson } from './people';

interface SeedRevision {
  /** A workbook of samples/, or a folder of CSV. */
  readonly source: string;
  readonly run: boolean;
  /** Sent to check afterwards, and how far the checker got. */
  readonly check?: 'begun' | 'passed';
  /** Issued once it is passed, and again after a change. */
  readonly issues?: SeedIssues;
}

export interface SeedProject {
  readonly name: string;
  readonly number: string;
  readonly client: SeedPerson['key'];
  readonly batches: readonly {
    readonly name: string;
    readonly by: SeedPerson['key'];
    readonly revisions: readonly SeedRevision[];
  }[];
}

const ran = (source: string): SeedRevision => ({ source, run: true });

export const seedProjects: readonly SeedProject[] = [
  {
    name: 'Tarnwick depots',
    number: '2604',
    client: 'client',
    batches: [
      { name: 'Portal sheds, first phase', by: 'analyst', revisions: [{ ...ran('portal-sheds-240.xlsx'), check: 'begun' }] },
      { name: 'Portal sheds, catalogue', by: 'secondAnalyst', revisions: [ran('portal-sheds-1000.xlsx')] },
      { name: 'Sheds on pinned bases', by: 'analyst', revisions: [ran('slender-sheds-24.xlsx')] },
      { name: 'Sheds by EN 1993-1-1', by: 'analyst', revisions: [ran('code-sheds-24.xlsx')] },
    ],
  },
  {
    name: 'Ostrel works',
    number: '2611',
    client: 'secondClient',
    batches: [
      { name: 'Pipe rack, line 1', by: 'analyst', revisions: [{ ...ran('pipe-rack-12.xlsx'), check: 'passed' }] },
      { name: 'Pipe rack, lines 2 and 3', by: 'analyst', revisions: [ran('pipe-rack-24.xlsx')] },
      {
        name: 'Bents braced by rods',
        by: 'analyst',
        revisions: [
          {
            ...ran('braced-bents-12.xlsx'),
            check: 'passed',
            issues: {
              note: 'For ordering steel.',
              next: {
                nearLimit: '0.7',
                reason: 'The client wants to see whatever is worked above 0.7.',
                note: 'For fabrication. Frames above 0.7 are marked near, as asked.',
              },
            },
          },
        ],
      },
      { name: 'Equipment brackets', by: 'secondAnalyst', revisions: [ran('brackets-150.xlsx')] },
    ],
  },
  {
    name: 'Fennmoor park',
    number: '2617',
    client: 'secondClient',
    batches: [
      { name: 'Walkway brackets', by: 'secondAnalyst', revisions: [ran('walkways-csv')] },
      { name: 'Canopies', by: 'analyst', revisions: [ran('canopies-us-36.xlsx')] },
      { name: 'Halls with leaning columns', by: 'secondAnalyst', revisions: [ran('direct-analysis-us-9.xlsx')] },
      { name: 'Halls by AISC 360-22', by: 'secondAnalyst', revisions: [ran('code-halls-us-9.xlsx')] },
      // Revision A shows what slips look like; B is the same file mended.
      {
        name: 'Cutter Row bents',
        by: 'analyst',
        revisions: [{ source: 'messy.xlsx', run: false }, ran('messy-mended.xlsx')],
      },
    ],
  },
];
