/** Addresses of pages and of the API, written once. Revisions are named by their letter within a batch. */
import { ownPaths } from '@/lib/api/own-paths';
import type { OwnKind } from '@/lib/intake/own/own-thing';
import type { System } from '@/lib/units/quantity';
import type { TableName, View } from '@/lib/tables/view';
import type { SectionChange } from '@/lib/changes/change';
import { listToSearch, viewToSearch } from './view-address';

const e = encodeURIComponent;

export interface CompareChosen {
  readonly with?: string;
  readonly list?: string;
  readonly show?: string;
  readonly by?: number;
  readonly page?: number;
}

function searchOf(chosen: CompareChosen): string {
  const pieces = Object.entries(chosen).flatMap(([key, value]) => (value === undefined ? [] : `${key}=${e(String(value))}`));
  return pieces.length === 0 ? '' : `?${pieces.join('&')}`;
}

/** What of an address asks for members: those named one by one are of one frame, others a view of the members table. */
function askedSearch({ members, ...criteria }: SectionChange['what']): string {
  if (members) return `?frame=${e(members[0]?.frame ?? '')}${members.map(({ member }) => `&member=${e(member)}`).join('')}`;
  const filters = Object.entries(criteria).map(([column, value]) => ({ column, op: 'in' as const, values: [value] }));
  return viewToSearch({ table: 'members', filters, sort: null, columns: null });
}

export const pages = {
  signIn: '/sign-in',
  projects: '/projects',
  people: '/people',
  person: (person: number) => `/people/${person}`,
  me: '/me',
  letters: '/letters',
  letter: (letter: string) => `/letters/${e(letter)}`,
  forgotten: '/password',
  activity: (project: number) => `/projects/${project}/activity`,
  officeActivity: '/activity',
  sections: '/sections',
  own: '/sections/own',
  ownNew: (kind: OwnKind) => `/sections/own/${ownPaths[kind]}/new`,
  ownImport: (kind: OwnKind) => `/sections/own/${ownPaths[kind]}/import`,
  ownPart: (kind: OwnKind, part: number) => `/sections/own/${ownPaths[kind]}/${part}`,
  issued: '/issued',
  /** One issue as its client reads it, and as the office does. */
  issuedOne: (issue: number) => `/issued/${issue}`,
  issue: (issue: number) => `/issues/${issue}`,
  issues: (project?: number) => `/issues${project === undefined ? '' : `?project=${project}`}`,
  /** Where a revision is issued from. */
  toIssue: (batch: number, letter: string) => `/batches/${batch}/${e(letter)}/issue`,
  combinationSets: '/combinations',
  combinationSet: (set: number, version?: number) => `/combinations/${set}${version === undefined ? '' : `?version=${version}`}`,
  project: (project: number) => `/projects/${project}`,
  bring: (project: number) => `/projects/${project}/bring`,
  revision: (batch: number, letter: string) => `/batches/${batch}/${e(letter)}`,
  sheet: (batch: number, letter: string, sheet: 'read' | 'settings' | 'change' | 'run' | 'glance' | TableName) =>
    `/batches/${batch}/${e(letter)}/${sheet}`,
  /** Two revisions compared; what is left out of `chosen` is as the page has it by itself. */
  compare: (batch: number, letter: string, chosen: CompareChosen = {}) =>
    `/batches/${batch}/${e(letter)}/compare${searchOf(chosen)}`,
  toCheck: '/to-check',
  /** The checker's list of a revision, at one of its frames (its place in sheet order, from 1). */
  checking: (batch: number, letter: string, number?: number) =>
    `/batches/${batch}/${e(letter)}/checking${number === undefined ? '' : `?frame=${number}`}`,
  next: (batch: number, letter: string) => `/batches/${batch}/${e(letter)}/bring`,
  /** The lightest sections of groups of members; one sizing, or the newest. */
  size: (batch: number, letter: string, sizing?: number) =>
    `/batches/${batch}/${e(letter)}/size${sizing === undefined ? '' : `?sizing=${sizing}`}`,
  /** Other sections tried on a frame; `of` a member of it, or what else members are asked for by. */
  tryOn: (batch: number, letter: string, number: number, of?: string) =>
    `/batches/${batch}/${e(letter)}/frames/${number}/try${of === undefined ? '' : `?of=${e(of)}`}`,
  /** Other sections for members: those of a view, of a frame, or one of its members. */
  change: (batch: number, letter: string, of: View | { readonly frame: string; readonly member?: string }) =>
    `/batches/${batch}/${e(letter)}/change${
      'table' in of
        ? viewToSearch({ ...of, sort: null, columns: null })
        : `?frame=${e(of.frame)}${of.member === undefined ? '' : `&member=${e(of.member)}`}`
    }`,
  /** The same with the section that they take filled in. */
  changeTo: (batch: number, letter: string, { what, to }: SectionChange) =>
    `/batches/${batch}/${e(letter)}/change${askedSearch(what)}&to=${e(to)}`,
  table: (batch: number, letter: string, view: View) => `/batches/${batch}/${e(letter)}/${view.table}${viewToSearch(view)}`,
  /** A frame within the list that the view gives; its number is its place in sheet order, from 1. */
  frame: (batch: number, letter: string, number: number, list?: View) =>
    `/batches/${batch}/${e(letter)}/frames/${number}${list === undefined ? '' : listToSearch(list)}`,
  /** The numbers behind a member of it in one result; `search` is kept of the frame's page, so that one comes back to its list. */
  numbers: (
    batch: number,
    letter: string,
    number: number,
    chosen: { readonly of?: string; readonly show?: string; readonly in?: string },
    search = '',
  ) => {
    const params = new URLSearchParams(search);
    for (const [key, value] of Object.entries(chosen)) params.set(key, value);
    const text = params.toString();
    return `/batches/${batch}/${e(letter)}/frames/${number}/numbers${text === '' ? '' : `?${text}`}`;
  },
} as const;

export const api = {
  ping: '/api/ping',
  template: '/api/template',
  people: '/api/people',
  person: (person: number) => `/api/people/${person}`,
  transfer: (person: number) => `/api/people/${person}/transfer`,
  invitations: '/api/people/invitations',
  oneInvitation: (invitation: number) => `/api/people/invitations/${invitation}`,
  /** Where someone invited begins; the link’s secret is sent, never part of the address. */
  invitation: '/api/invitation',
  passwordReset: '/api/password-reset',
  ownPassword: '/api/me/password',
  ownLetters: '/api/me/letters',
  tokens: '/api/me/tokens',
  token: (token: number) => `/api/me/tokens/${token}`,
  letterAgain: (letter: number) => `/api/letters/${letter}/again`,
  officeActivityExport: (search = '') => `/api/activity/export${search}`,
  activityExport: (project: number, search = '') => `/api/projects/${project}/activity/export${search}`,
  sections: '/api/sections',
  own: (kind: OwnKind) => `/api/own/${ownPaths[kind]}`,
  ownPart: (kind: OwnKind, part: number) => `/api/own/${ownPaths[kind]}/${part}`,
  ownImport: (kind: OwnKind, units: System, keep: boolean) =>
    `/api/own/${ownPaths[kind]}/import?units=${units}&keep=${keep ? 'yes' : 'no'}`,
  ownTemplate: (kind: OwnKind, units: System, format: 'xlsx' | 'csv') =>
    `/api/own/${ownPaths[kind]}/template?units=${units}&format=${format}`,
  limits: '/api/limits',
  combinationSets: '/api/combination-sets',
  combinationSet: (set: number) => `/api/combination-sets/${set}`,
  projects: '/api/projects',
  project: (project: number) => `/api/projects/${project}`,
  assigned: (project: number) => `/api/projects/${project}/people`,
  batches: (project: number) => `/api/projects/${project}/batches`,
  batch: (batch: number) => `/api/batches/${batch}`,
  revisions: (batch: number) => `/api/batches/${batch}/revisions`,
  toIssue: (batch: number, letter: string) => `/api/batches/${batch}/revisions/${e(letter)}/issue`,
  whoIssues: '/api/issues/who',
  issuePart: (issue: number, part: 'withdraw' | 'clients' | 'engine') => `/api/issues/${issue}/${part}`,
  issueFile: (issue: number, file: string) => `/api/issues/${issue}/files/${file}`,
  answer: (issue: number, question: number) => `/api/issues/${issue}/questions/${question}`,
  issuedFile: (issue: number, file: string) => `/api/issued/${issue}/files/${file}`,
  receipt: (issue: number) => `/api/issued/${issue}/receipt`,
  issuedQuestions: (issue: number) => `/api/issued/${issue}/questions`,
  issuedQuestion: (issue: number, question: number) => `/api/issued/${issue}/questions/${question}`,
  revision: (batch: number, letter: string) => `/api/batches/${batch}/revisions/${e(letter)}`,
  part: (
    batch: number,
    letter: string,
    part: 'changes' | 'input' | 'run' | 'progress' | 'summary' | 'cell' | 'marked-copy' | 'report' | 'workbook' | 'json' | 'csv',
  ) => `/api/batches/${batch}/revisions/${e(letter)}/${part}`,
  toCheck: '/api/to-check',
  checking: (batch: number, letter: string, part?: 'return' | 'pass') =>
    `/api/batches/${batch}/revisions/${e(letter)}/checking${part === undefined ? '' : `/${part}`}`,
  query: (batch: number, letter: string, query: number) =>
    `/api/batches/${batch}/revisions/${e(letter)}/checking/queries/${query}`,
  checkingFrame: (batch: number, letter: string, number: number, part?: 'seen' | 'queries' | 'acceptances' | 'own-values') =>
    `/api/batches/${batch}/revisions/${e(letter)}/checking/frames/${number}${part === undefined ? '' : `/${part}`}`,
  changesSheet: (batch: number, letter: string, search = '') =>
    `/api/batches/${batch}/revisions/${e(letter)}/changes/sheet${search}`,
  preview: (batch: number, letter: string) => `/api/batches/${batch}/revisions/${e(letter)}/changes/preview`,
  table: (batch: number, letter: string, view: View, more: Readonly<Record<string, string | number>> = {}) =>
    tableAddress(batch, letter, view, '', more),
  facets: (batch: number, letter: string, view: View) => tableAddress(batch, letter, view, '/facets', {}),
  exported: (batch: number, letter: string, view: View, format: 'csv' | 'xlsx') =>
    tableAddress(batch, letter, view, '/export', { format }),
  frame: (batch: number, letter: string, number: number) => `/api/batches/${batch}/revisions/${e(letter)}/frames/${number}`,
  compared: (batch: number, letter: string, chosen: CompareChosen, format?: 'xlsx') =>
    `/api/batches/${batch}/revisions/${e(letter)}/compare${format === undefined ? '' : '/export'}${searchOf(chosen)}`,
  sizings: (batch: number, letter: string) => `/api/batches/${batch}/revisions/${e(letter)}/size`,
  sizing: (batch: number, letter: string, sizing: number, part: '' | '/export' = '') =>
    `/api/batches/${batch}/revisions/${e(letter)}/size/${sizing}${part}`,
  /** A frame's model as it is analysed, with its settings. */
  model: (batch: number, letter: string, number: number) => `/api/batches/${batch}/revisions/${e(letter)}/frames/${number}/model`,
  /** A section as members of the batch would have it, of each of these materials. */
  section: (batch: number, letter: string, name: string, of: readonly string[]) =>
    `/api/batches/${batch}/revisions/${e(letter)}/section?name=${e(name)}${of.map((one) => `&of=${e(one)}`).join('')}`,
  buckled: (batch: number, letter: string, number: number, result: string) =>
    `/api/batches/${batch}/revisions/${e(letter)}/frames/${number}/buckled?result=${e(result)}`,
} as const;

function tableAddress(
  batch: number,
  letter: string,
  view: View,
  part: '' | '/facets' | '/export',
  more: Readonly<Record<string, string | number>>,
): string {
  const search = viewToSearch(view);
  const rest = Object.entries(more).map(([key, value]) => `${e(key)}=${e(String(value))}`);
  const query = [search.slice(1), ...rest].filter((piece) => piece !== '').join('&');
  return `/api/batches/${batch}/revisions/${e(letter)}/tables/${view.table}${part}${query === '' ? '' : `?${query}`}`;
}
