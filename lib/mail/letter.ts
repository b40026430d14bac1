/** The words of every letter, in one place: a message's facts → subject, plain text and HTML. */
import { letterHtml, type LetterParts } from './letter-html';
import type { AboutIssue, AboutRevision, MailMessage } from './message';

export interface Letter {
  readonly subject: string;
  readonly text: string;
  readonly html: string;
}

export interface LetterPlace {
  /** Where the product is reached, without a slash at its end: `https://frames.example`. */
  readonly site: string;
  readonly officeName: string;
  /** The secret of the link that works once, for the kinds that carry one. */
  readonly secret: string | null;
}

/**
 * Writes a letter. The same facts give the same bytes, so that an attempt can be repeated.
 *
 * @throws {RangeError} where an invitation or a password reset is written without its link's secret
 */
export function writeLetter(message: MailMessage, place: LetterPlace): Letter {
  const parts = { ...partsOf(message, place), office: place.officeName };
  return { subject: parts.subject, text: plainText(parts), html: letterHtml(parts) };
}

type Parts = Omit<LetterParts, 'office'>;

const chosen = 'Which letters you get is up to you: choose under “Your page”, at the top of every page.';

function partsOf(message: MailMessage, { site, officeName, secret }: LetterPlace): Parts {
  const revision = ({ batch, letter }: AboutRevision, sheet: string) => `${site}/batches/${batch}/${letter}${sheet}`;
  switch (message.kind) {
    case 'invitation':
      return {
        ...plain(`${message.by} invites you to ${message.officeName}`),
        paragraphs: [
          `${message.by} of ${message.officeName} invites you to Tallyframe as ${article(message.role)} ${message.role}. Choose your name and a password to begin.`,
          'The link works once, for seven days.',
        ],
        action: { words: 'Accept the invitation', address: `${site}/invitation/${needed(secret)}` },
        foot: 'If you did not expect this, leave it: without the link nothing happens.',
      };
    case 'password reset':
      return {
        ...plain('A new password for Tallyframe'),
        paragraphs: [
          'Someone asked for a new password for this address. Choose it by the link, which works once, for one hour.',
          'Setting it signs you out everywhere and ends your personal tokens.',
        ],
        action: { words: 'Choose a new password', address: `${site}/password/${needed(secret)}` },
        foot: 'If it was not you, leave it: the password stays as it is.',
      };
    case 'run finished': {
      const { about, frames, over, near, notChecked, stopped } = message;
      const how = stopped ? 'stopped before its end' : 'has finished';
      return {
        ...plain(`${about.batchName}, revision ${about.letter}: the run ${how}`),
        paragraphs: [
          stopped
            ? 'The run that you started stopped before its end. What is solved is kept; start it again to do the rest.'
            : 'The run that you started has finished. Its results are to be reviewed before anything is built from them.',
        ],
        facts: [
          ...ofRevision(about),
          ['Frames', count(frames)],
          ['Over', count(over)],
          ['Near', count(near)],
          ['Not checked', count(notChecked)],
        ],
        action: { words: 'See the results', address: revision(about, stopped ? '/run' : '/glance') },
        foot: chosen,
      };
    }
    case 'sent to check':
      return {
        ...plain(`To check: ${message.about.batchName}, revision ${message.about.letter}`),
        paragraphs: [`${message.by} sends you a revision to check.`],
        facts: ofRevision(message.about),
        quotes: noted(message.by, message.note),
        action: { words: 'Open the check', address: revision(message.about, '/checking') },
        foot: chosen,
      };
    case 'returned':
      return {
        ...plain(`Returned: ${message.about.batchName}, revision ${message.about.letter}`),
        paragraphs: [`${message.by} checked the revision and returns it. Mend it in the next revision.`],
        facts: ofRevision(message.about),
        quotes: noted(message.by, message.note),
        action: { words: 'See what to mend', address: revision(message.about, '/checking') },
        foot: chosen,
      };
    case 'passed':
      return {
        ...plain(`Passed: ${message.about.batchName}, revision ${message.about.letter}`),
        paragraphs: [`${message.by} checked the revision and passes it. It can be issued.`],
        facts: ofRevision(message.about),
        action: { words: 'Open the revision', address: revision(message.about, '') },
        foot: chosen,
      };
    case 'issued':
      return {
        ...plain(`Issued to you: ${message.about.number}, ${message.about.batchName}`),
        paragraphs: [
          `${officeName} issues results to you. Sign in to read them and to download the result workbook and the report.`,
          ...(message.supersedes === null ? [] : [`It supersedes ${message.supersedes}: do not build from that any more.`]),
        ],
        facts: [...ofIssue(message.about), ['Approved by', message.by]],
        quotes: noted(message.by, message.note),
        action: { words: 'See what was issued', address: `${site}/issued/${message.about.issue}` },
        foot: chosen,
      };
    case 'withdrawn':
      return {
        ...plain(`Withdrawn, do not build from it: ${message.about.number}, ${message.about.batchName}`),
        paragraphs: [`${officeName} withdraws ${message.about.number}. Do not build from it, whatever you have downloaded.`],
        facts: ofIssue(message.about),
        quotes: [[`Why, by ${message.by}`, message.reason]],
        action: { words: 'See what it says now', address: `${site}/issued/${message.about.issue}` },
        foot: 'You get this because it was issued to you; such letters are always sent.',
      };
    case 'question':
      return {
        ...plain(`A question on ${message.about.number}${message.frame === null ? '' : `, frame ${message.frame}`}`),
        paragraphs: [`${message.by} asks about what was issued.`],
        facts: [...ofIssue(message.about), ...ofFrame(message.frame)],
        quotes: [[message.by, message.text]],
        action: { words: 'Answer it', address: `${site}/issues/${message.about.issue}` },
        foot: chosen,
      };
    case 'answer':
      return {
        ...plain(`An answer on ${message.about.number}${message.frame === null ? '' : `, frame ${message.frame}`}`),
        paragraphs: [`${message.by} answers your question.`],
        facts: [...ofIssue(message.about), ...ofFrame(message.frame)],
        quotes: [
          ['You asked', message.question],
          [message.by, message.text],
        ],
        action: { words: 'Open the issue', address: `${site}/issued/${message.about.issue}` },
        foot: chosen,
      };
  }
}

const plain = (subject: string): Pick<Parts, 'subject' | 'facts' | 'quotes'> => ({
  // A header is one line.
  subject: subject.replaceAll(/\s+/g, ' '),
  facts: [],
  quotes: [],
});
const count = (n: number): string => n.toLocaleString('en-GB');
const article = (role: string): string => (/^[aeiou]/.test(role) ? 'an' : 'a');
const noted = (by: string, note: string): Parts['quotes'] => (note.trim() === '' ? [] : [[`Note by ${by}`, note]]);
const ofFrame = (frame: string | null): Parts['facts'] => (frame === null ? [] : [['Frame', frame]]);
const ofRevision = ({ project, batchName, letter }: AboutRevision): Parts['facts'] => [
  ['Project', project],
  ['Batch', batchName],
  ['Revision', letter],
];
const ofIssue = ({ project, batchName, letter, number }: AboutIssue): Parts['facts'] => [
  ['Issue', number],
  ...ofRevision({ project, batchName, letter, batch: 0 }),
];

function needed(secret: string | null): string {
  if (secret === null) throw new RangeError('Expected the secret of the letter’s link, got none');
  return secret;
}

function plainText({ subject, office, paragraphs, facts, quotes, action, foot }: LetterParts): string {
  const widest = Math.max(0, ...facts.map(([label]) => label.length));
  const blocks = [
    subject,
    ...paragraphs,
    facts.map(([label, value]) => `${label.padEnd(widest)}  ${value}`).join('\n'),
    ...quotes.map(([from, words]) => `${from}:\n${words.replaceAll(/^/gm, '> ')}`),
    action === null ? '' : `${action.words}:\n${action.address}`,
    `-- \nTallyframe, ${office}\n${foot}`,
  ];
  return `${blocks.filter((block) => block !== '').join('\n\n')}\n`;
}
