/** One message of each kind, of an invented office: for tests. */
import type { MailMessage } from './message';

const about = { project: '2614 Saltings sheds', batch: 7, batchName: 'Portal sheds', letter: 'B' } as const;
const issue = {
  project: about.project,
  batchName: about.batchName,
  letter: about.letter,
  issue: 31,
  number: '2614-003',
} as const;

export const sampleMessages = [
  { kind: 'invitation', by: 'Orla Fenwhistle', officeName: 'Fenwick & Daughters', role: 'analyst', link: 5 },
  { kind: 'password reset', link: 6 },
  { kind: 'run finished', about, frames: 1000, over: 11, near: 42, notChecked: 3, stopped: false },
  { kind: 'sent to check', about, by: 'Ivo Tarrabrook', note: 'Grid D is new.' },
  { kind: 'returned', about, by: 'Bram Kettlesedge', note: 'The purlins of F12 are short.\nSee sheet Members, row 14.' },
  { kind: 'passed', about, by: 'Bram Kettlesedge' },
  { kind: 'issued', about: issue, by: 'Orla Fenwhistle', note: 'For fabrication.', supersedes: '2614-002' },
  { kind: 'withdrawn', about: issue, by: 'Orla Fenwhistle', reason: 'Snow was left out.' },
  { kind: 'question', about: issue, by: 'Pia Lindmarrish', frame: 'F12', text: 'Is the base pinned?' },
  { kind: 'answer', about: issue, by: 'Ivo Tarrabrook', frame: 'F12', question: 'Is the base pinned?', text: 'Yes, as drawn.' },
] as const satisfies readonly MailMessage[];
