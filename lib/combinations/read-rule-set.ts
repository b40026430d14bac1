/**
 * The value of Setup's `combination set` → a rule set: its name, and after commas what is given in place of the recommended
 * values: `EN 1990 6.10, live B, snow to 1000 m, psi wind 0.6/0.2/0, gamma G 1.35/1.0, gamma Q 1.5, xi 0.85, service characteristic`;
 * in every set `kinds together`.
 */
import { asdForms, type AsceEdition, lrfdForms } from '@/lib/combinations/asce-7';
import {
  enForms,
  type EnFactors,
  type EnService,
  enServices,
  type EnVariable,
  enVariable,
  psiOfCategory,
  psiOfSnow,
  recommended,
} from '@/lib/combinations/en-1990';
import type { RuleSet } from '@/lib/combinations/rule-set';

export const ruleSetNames = [
  'ASCE 7-22 LRFD',
  'ASCE 7-22 ASD',
  'ASCE 7-16 LRFD',
  'ASCE 7-16 ASD',
  'EN 1990 6.10',
  'EN 1990 6.10a/b',
] as const;
export type RuleSetName = (typeof ruleSetNames)[number];

const aliases: Readonly<Record<string, RuleSetName>> = {
  'asce722lrfd2.3.1': 'ASCE 7-22 LRFD',
  'asce7222.3.1': 'ASCE 7-22 LRFD',
  'asce722asd2.4.1': 'ASCE 7-22 ASD',
  'asce7222.4.1': 'ASCE 7-22 ASD',
  'asce7162.3.1': 'ASCE 7-16 LRFD',
  'asce7162.4.1': 'ASCE 7-16 ASD',
  // of the two of EN 1990, 6.10 is never the lesser
  en1990: 'EN 1990 6.10',
  'en1990(6.10)': 'EN 1990 6.10',
  'en1990eq.6.10': 'EN 1990 6.10',
  'en19906.10aand6.10b': 'EN 1990 6.10a/b',
  'en19906.10a6.10b': 'EN 1990 6.10a/b',
  'en19906.10ab': 'EN 1990 6.10a/b',
  'en19906.10a/6.10b': 'EN 1990 6.10a/b',
  'en1990(6.10a/b)': 'EN 1990 6.10a/b',
};

const keyOf = (text: string): string =>
  text
    .normalize('NFC')
    .toLowerCase()
    .replace(/^(asce)\/?sei/, '$1')
    .replace(/[\s\u00a0_\-‐‑–—:]+/g, '');

const byKey = new Map<string, RuleSetName>([
  ...ruleSetNames.map((name) => [keyOf(name), name] as const),
  ...Object.entries(aliases),
]);

/** `wrong`: a sentence that says what is not known, and what may be written. */
export type RuleSetReading = { readonly set: RuleSet; readonly wrong: null } | { readonly set: null; readonly wrong: string };

const known = new Map<string, RuleSetReading>();

/** Reads a set's text; the same text gives the same set. */
export function readRuleSet(text: string): RuleSetReading {
  const before = known.get(text);
  if (before) return before;
  const read = readAfresh(text);
  if (known.size > 200) known.clear();
  known.set(text, read);
  return read;
}

const wrong = (sentence: string): RuleSetReading => ({ set: null, wrong: sentence });

function readAfresh(text: string): RuleSetReading {
  const [first = '', ...words] = text.split(/;|,(?=\s|$)/).map((word) => word.trim());
  const name = byKey.get(keyOf(first));
  if (name === undefined)
    return wrong(
      `“${first}” is no combination set. Known are ${ruleSetNames.join(', ')}, and as listed. A set of an office’s own is chosen on a revision’s settings page, which lists its combinations in the sheet`,
    );
  const given = words.filter((word) => word !== '');
  const together = given.some((word) => keyOf(word) === 'kindstogether');
  const others = given.filter((word) => keyOf(word) !== 'kindstogether');
  const tail = together ? ['kinds together'] : [];
  if (name.startsWith('ASCE')) {
    if (others.length > 0)
      return wrong(`${name} takes no “${others[0] ?? ''}”: its factors are the standard’s. List combinations that are others`);
    return { set: asce(name, together, tail), wrong: null };
  }
  return en(name, others, together, tail);
}

function asce(name: RuleSetName, together: boolean, tail: readonly string[]): RuleSet {
  const edition: AsceEdition = name.includes('7-22') ? '7-22' : '7-16';
  const lrfd = name.endsWith('LRFD');
  return {
    name: [name, ...tail].join(', '),
    level: lrfd ? 'factored' : 'allowable',
    forms: lrfd ? lrfdForms(edition) : asdForms(edition),
    together,
    said: [
      {
        kinds: ['seismic'],
        words:
          'seismic cases are taken as E as they are given; −0.2 S_DS D beside the low dead load and overstrength are not made',
      },
      ...(edition === '7-22'
        ? [{ kinds: ['snow' as const], words: 'snow is taken as the strength-level snow of ASCE 7-22' }]
        : []),
      { kinds: ['snow', 'wind'], words: 'service combinations hold snow and wind in full' },
      { kinds: ['crane'], words: 'crane loads are taken as live loads' },
    ],
  };
}

function en(name: RuleSetName, words: readonly string[], together: boolean, tail: readonly string[]): RuleSetReading {
  let factors: EnFactors = { ...recommended, expression: name === 'EN 1990 6.10a/b' ? '6.10a/b' : '6.10' };
  const written: string[] = [];
  const set = new Set<string>();
  for (const word of words) {
    const read = parameter(factors, word);
    if (typeof read === 'string') return wrong(read);
    if (set.has(read.what)) return wrong(`${read.what} is given twice. Keep one`);
    set.add(read.what);
    factors = read.factors;
    written.push(read.written);
  }
  if (factors.gammaGInf > factors.gammaGSup) return wrong('gamma G is written high/low, like 1.35/1.0');
  const liveGiven = set.has('psi live');
  const snowGiven = set.has('psi snow');
  return {
    set: {
      name: [name, ...written, ...tail].join(', '),
      level: 'factored',
      forms: enForms(factors),
      together,
      said: [
        ...(liveGiven
          ? []
          : [{ kinds: ['live' as const], words: 'live loads are taken as category E, the largest ψ (1.0/0.9/0.8); “live B” after the set’s name gives the category' }]), // prettier-ignore
        ...(snowGiven
          ? []
          : [{ kinds: ['snow' as const], words: 'snow is taken as above 1000 m, the larger ψ (0.7/0.5/0.2); “snow to 1000 m” after the set’s name gives 0.5/0.2/0' }]), // prettier-ignore
        { kinds: ['roof live'], words: 'roof live loads are category H and act with neither snow nor wind' },
        { kinds: ['crane'], words: 'cranes have γ and ψ of EN 1991-3 annex A, ψ2 taken as 0.9' },
      ],
    },
    wrong: null,
  };
}

interface Parameter {
  readonly what: string;
  readonly written: string;
  readonly factors: EnFactors;
}

const psiWords = 'psi live 0.7/0.5/0.3';
const taken = `After the set’s name may stand live A to G, snow to 1000 m, snow above 1000 m, ${psiWords}, gamma G 1.35/1.0, gamma Q 1.5, xi 0.85, service characteristic, kinds together`;

/** One thing given in place of a recommended value, or a sentence that says what is wrong with it. */
function parameter(factors: EnFactors, word: string): Parameter | string {
  const text = word
    .toLowerCase()
    .replace(/\s+/g, ' ')
    .replace('γ', 'gamma ')
    .replace('ψ', 'psi ')
    .replace('ξ', 'xi ')
    .replace(/\s+/g, ' ');
  const psiIs = (kind: EnVariable, psi: EnFactors['psi'][EnVariable], written: string): Parameter => ({
    what: `psi ${kind}`,
    written,
    factors: { ...factors, psi: { ...factors.psi, [kind]: psi } },
  });
  const category = /^live (?:category )?([a-g])$/.exec(text)?.[1]?.toUpperCase() as keyof typeof psiOfCategory | undefined;
  if (category) return psiIs('live', psiOfCategory[category], `live ${category}`);
  const site = /^snow (to|below|up to|above) 1 ?000 ?m$/.exec(text)?.[1];
  if (site)
    return psiIs('snow', site === 'above' ? psiOfSnow.high : psiOfSnow.low, `snow ${site === 'above' ? 'above' : 'to'} 1000 m`);
  const ofPsi = /^psi ([a-z ]+?) ([\d./ ]+)$/.exec(text);
  if (ofPsi) {
    const kind = enVariable.find((each) => each === ofPsi[1]);
    const psi = figures(ofPsi[2]);
    if (!kind) return `ψ is of ${enVariable.join(', ')}, not of “${ofPsi[1] ?? ''}”`;
    const [psi0, psi1, psi2] = psi;
    if (
      psi.length !== 3 ||
      psi0 === undefined ||
      psi1 === undefined ||
      psi2 === undefined ||
      psi.some((each) => !(each >= 0 && each <= 1))
    )
      return `ψ0, ψ1 and ψ2 are written like ${psiWords}, each from 0 to 1`;
    return psiIs(kind, [psi0, psi1, psi2], `psi ${kind} ${psi.join('/')}`);
  }
  const ofGamma = /^gamma ?(g|q|[a-z ]+?) ([\d./ ]+)$/.exec(text);
  if (ofGamma) return gamma(factors, ofGamma[1] ?? '', figures(ofGamma[2]));
  const xi = /^xi ([\d.]+)$/.exec(text)?.[1];
  if (xi) {
    const value = Number(xi);
    if (!(value > 0 && value <= 1)) return 'xi is above 0 and at most 1, like 0.85';
    if (factors.expression === '6.10') return 'xi belongs to EN 1990 6.10a/b';
    return { what: 'xi', written: `xi ${value}`, factors: { ...factors, xi: value } };
  }
  const service = /^service (.+)$/.exec(text)?.[1];
  if (service) {
    const which = service.split(/\+| and /).map((each) => enServices.find((own) => keyOf(own) === keyOf(each)));
    const found = which.filter((each): each is EnService => each !== undefined);
    if (found.length < which.length) return `service combinations are ${enServices.join(', ')}`;
    const inOrder = enServices.filter((each) => found.includes(each));
    return { what: 'service', written: `service ${inOrder.join(' + ')}`, factors: { ...factors, service: inOrder } };
  }
  return `“${word}” says nothing to a set of EN 1990. ${taken}`;
}

function gamma(factors: EnFactors, of: string, values: readonly number[]): Parameter | string {
  if (values.length === 0 || values.some((each) => !(each > 0 && each <= 3))) return 'γ is above 0 and at most 3';
  const [high = 0, low] = values;
  if (of === 'g') {
    if (low === undefined || values.length !== 2) return 'gamma G is written high/low, like 1.35/1.0';
    return { what: 'gamma G', written: `gamma G ${high}/${low}`, factors: { ...factors, gammaGSup: high, gammaGInf: low } };
  }
  if (values.length !== 1) return 'gamma Q is one figure, like 1.5';
  const kinds = of === 'q' ? enVariable : enVariable.filter((each) => each === of);
  if (kinds.length === 0) return `γ is of G, Q, ${enVariable.join(', ')}, not of “${of}”`;
  const gammaQ = { ...factors.gammaQ, ...Object.fromEntries(kinds.map((kind) => [kind, high])) };
  const what = of === 'q' ? 'gamma Q' : `gamma ${of}`;
  return { what, written: `${what} ${high}`, factors: { ...factors, gammaQ } };
}

const figures = (text: string | undefined): number[] =>
  (text ?? '').split('/').map((each) => (each.trim() === '' ? Number.NaN : Number(each)));
