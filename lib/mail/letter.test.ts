import { describe, expect, it } from 'vitest';
import { choosable, type mailKinds } from './kinds';
import { writeLetter } from './letter';
import { sampleMessages } from './sample-messages';

const place = { site: 'https://frames.example', officeName: 'Fenwick & Daughters', secret: 'the-secret-of-the-link' };

/** What each kind must say, and where its link goes. */
const says: Readonly<Record<keyof typeof mailKinds, { readonly words: readonly string[]; readonly link: string }>> = {
  invitation: { words: ['invites you', 'an analyst', 'works once'], link: '/invitation/the-secret-of-the-link' },
  'password reset': { words: ['works once', 'signs you out everywhere'], link: '/password/the-secret-of-the-link' },
  'run finished': { words: ['1,000', 'Over', '11', 'has finished'], link: '/batches/7/B/glance' },
  'sent to check': { words: ['sends you a revision to check', 'Grid D is new.'], link: '/batches/7/B/checking' },
  returned: { words: ['returns it', 'The purlins of F12 are short.'], link: '/batches/7/B/checking' },
  passed: { words: ['passes it', 'can be issued'], link: '/batches/7/B' },
  issued: { words: ['2614-003', 'supersedes 2614-002', 'download'], link: '/issued/31' },
  withdrawn: { words: ['Do not build from it', 'Snow was left out.'], link: '/issued/31' },
  question: { words: ['frame F12', 'Is the base pinned?'], link: '/issues/31' },
  answer: { words: ['Is the base pinned?', 'Yes, as drawn.'], link: '/issued/31' },
};

describe('a letter', () => {
  for (const message of sampleMessages) {
    it(`of kind ${message.kind} says it in plain text and in HTML, with its one link`, () => {
      const { subject, text, html } = writeLetter(message, place);
      expect(subject).not.toMatch(/\n/);
      expect(subject.length).toBeLessThan(120);
      const shown = html.replaceAll(/<style>.*?<\/style>/gs, '').replaceAll('&amp;', '&');
      for (const words of says[message.kind].words) {
        expect(text, 'plain text').toContain(words);
        expect(shown, 'HTML').toContain(words);
      }
      const link = `https://frames.example${says[message.kind].link}`;
      expect(text.match(/https?:\/\/\S+/g)).toEqual([link]);
      expect([...html.matchAll(/href="([^"]*)"/g)].map((found) => found[1])).toEqual([link, link]);
      expect(html, 'nothing is fetched from elsewhere').not.toMatch(/<img|<script|<link|url\(|src=/);
      expect(html, 'mail programs clip at some 100 kB').toSatisfy((all: string) => all.length < 60_000);
    });
  }

  it('takes nobody’s words for markup, nor a line break into its subject', () => {
    const hostile = '<b onclick="x">&\r\nBcc: everybody';
    const about = { project: hostile, batch: 7, batchName: hostile, letter: 'B' };
    const { subject, html } = writeLetter({ kind: 'returned', about, by: hostile, note: hostile }, place);
    expect(html).not.toContain('<b onclick');
    expect(html).toContain('&lt;b onclick=&quot;x&quot;&gt;&amp;');
    expect(subject).not.toMatch(/[\r\n]/);
  });

  it('says that a stopped run is not whole', () => {
    const run = sampleMessages.find((one) => one.kind === 'run finished')!;
    const { text } = writeLetter({ ...run, stopped: true }, place);
    expect(text).toContain('stopped before its end');
    expect(text).toContain('/batches/7/B/run');
  });

  it('of an invitation is never written without the secret of its link', () => {
    expect(() => writeLetter({ kind: 'password reset', link: 1 }, { ...place, secret: null })).toThrow(RangeError);
  });

  it('is the same, byte for byte, when it is written again', () => {
    for (const message of sampleMessages) expect(writeLetter(message, place)).toEqual(writeLetter(message, place));
  });
});

describe('kinds of letters', () => {
  it('lets nobody decline invitations, new passwords and withdrawals', () => {
    for (const role of ['lead', 'analyst', 'checker', 'client'] as const) {
      expect(choosable(role)).not.toContain('invitation');
      expect(choosable(role)).not.toContain('password reset');
      expect(choosable(role)).not.toContain('withdrawn');
    }
  });

  it('offers each role what reaches it', () => {
    expect(choosable('client')).toEqual(['issued', 'answer']);
    expect(choosable('checker')).toEqual(['sent to check', 'question']);
  });
});
