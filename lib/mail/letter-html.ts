/** A letter's HTML: a white sheet on the pad with one ink border, as the product's pages. No picture from elsewhere, no script. */
import { letterMark } from './letter-mark';

export interface LetterParts {
  readonly subject: string;
  /** Who writes: the office. */
  readonly office: string;
  readonly paragraphs: readonly string[];
  /** What it is about, as a title block: project, batch, revision … */
  readonly facts: readonly (readonly [label: string, value: string])[];
  /** Someone's own words: a note, a reason, a question. */
  readonly quotes: readonly (readonly [from: string, words: string])[];
  readonly action: { readonly words: string; readonly address: string } | null;
  /** Why it reached the reader, and how to have no more of them. */
  readonly foot: string;
}

const escape = (text: string): string =>
  text.replaceAll('&', '&amp;').replaceAll('<', '&lt;').replaceAll('>', '&gt;').replaceAll('"', '&quot;');
const lines = (text: string): string => escape(text).replaceAll('\n', '<br>');

const sans = "font-family:'Fira Sans','Segoe UI',Helvetica,Arial,sans-serif";
const table = 'role="presentation" cellpadding="0" cellspacing="0" border="0"';

/** Colours for mail programs that show the dark page; the light ones stand in the elements themselves. */
const dark = `@media (prefers-color-scheme: dark) {
.p { background: #0d151a !important } .s { background: #142027 !important; border-color: #e3ebe6 !important }
.i { color: #e3ebe6 !important } .g { color: #b2c1c0 !important } .h { border-color: #2b3c44 !important }
.b { background: #1a2830 !important } .a { background: #7ec3ec !important; border-color: #7ec3ec !important }
.a a { color: #0a1a24 !important } .l { color: #7ec3ec !important } .m { background: #e3ebe6 !important } }`;

export function letterHtml(parts: LetterParts): string {
  const { subject, office, paragraphs, facts, quotes, action, foot } = parts;
  const pieces = [
    ...paragraphs.map((text) => `<p class="i" style="margin:0 0 14px;${sans};font-size:15px;line-height:23px;color:#12212d">${lines(text)}</p>`), // prettier-ignore
    facts.length === 0 ? '' : factTable(facts),
    ...quotes.map(([from, words]) => quote(from, words)),
    action === null ? '' : button(action),
  ].join('\n');
  return `<!doctype html>
<html lang="en-GB"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width">
<meta name="color-scheme" content="light dark"><meta name="supported-color-schemes" content="light dark">
<title>${escape(subject)}</title><style>${dark}</style></head>
<body class="p" style="margin:0;padding:0;background:#e6ede5">
<table ${table} width="100%" class="p" style="background:#e6ede5"><tr><td align="center" style="padding:24px 10px">
<table ${table} width="100%" class="s" style="max-width:600px;background:#fdfefc;border:1.5px solid #12212d">
<tr><td class="h" style="padding:14px 20px;border-bottom:1px solid #cbd6cd"><table ${table}><tr>
<td style="padding-right:12px">${letterMark()}</td>
<td class="i" style="${sans};font-size:17px;line-height:20px;font-weight:600;color:#12212d">Tallyframe<br>
<span class="g" style="font-size:13px;font-weight:400;color:#3f515a">${escape(office)}</span></td>
</tr></table></td></tr>
<tr><td style="padding:20px 20px 8px"><h1 class="i" style="margin:0 0 14px;${sans};font-size:19px;line-height:26px;font-weight:600;color:#12212d">${escape(subject)}</h1>
${pieces}</td></tr>
<tr><td class="g h" style="padding:12px 20px 14px;border-top:1px solid #cbd6cd;${sans};font-size:12.5px;line-height:19px;color:#3f515a">${lines(foot)}</td></tr>
</table></td></tr></table></body></html>
`;
}

function factTable(facts: LetterParts['facts']): string {
  const rows = facts.map(
    ([label, value]) =>
      `<tr><td class="g h" style="padding:6px 12px;border-bottom:1px solid #cbd6cd;${sans};font-size:12.5px;line-height:19px;color:#3f515a;white-space:nowrap" valign="top">${escape(label)}</td>` +
      `<td class="i h" width="100%" style="padding:6px 12px;border-bottom:1px solid #cbd6cd;${sans};font-size:14px;line-height:19px;color:#12212d">${escape(value)}</td></tr>`,
  );
  return `<table ${table} width="100%" class="h" style="margin:0 0 18px;border:1px solid #cbd6cd;border-bottom:0">${rows.join('')}</table>`;
}

function quote(from: string, words: string): string {
  return (
    `<table ${table} width="100%" style="margin:0 0 18px"><tr><td class="b" style="padding:10px 14px;background:#f0f4ef">` +
    `<div class="g" style="${sans};font-size:12.5px;line-height:19px;color:#3f515a">${escape(from)}</div>` +
    `<div class="i" style="${sans};font-size:15px;line-height:23px;color:#12212d">${lines(words)}</div></td></tr></table>`
  );
}

function button({ words, address }: { readonly words: string; readonly address: string }): string {
  return (
    `<table ${table} style="margin:4px 0 10px"><tr><td class="a" style="background:#0b598a;border:1px solid #0b598a;border-radius:2px">` +
    `<a href="${escape(address)}" style="display:inline-block;padding:9px 18px;${sans};font-size:14px;line-height:20px;font-weight:500;color:#ffffff;text-decoration:none">${escape(words)}</a></td></tr></table>` +
    `<p class="g" style="margin:0 0 14px;${sans};font-size:12.5px;line-height:19px;color:#3f515a">or open <a class="l" href="${escape(address)}" style="color:#0b598a;word-break:break-all">${escape(address)}</a></p>`
  );
}
