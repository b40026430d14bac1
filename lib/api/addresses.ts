/** Addresses of pages and of the API, written once. Revisions are named by their letter within a batch. */
import type { TableName, View } from '@/lib/tables/view';
import { viewToSearch } from './view-address';

const e = encodeURIComponent;

export const pages = {
  signIn: '/sign-in',
  projects: '/projects',
  people: '/people',
  issued: '/issued',
  project: (project: string) => `/projects/${e(project)}`,
  bring: (project: string) => `/projects/${e(project)}/bring`,
  revision: (batch: string, letter: string) => `/batches/${e(batch)}/${e(letter)}`,
  sheet: (batch: string, letter: string, sheet: 'read' | 'run' | 'glance' | TableName) =>
    `/batches/${e(batch)}/${e(letter)}/${sheet}`,
  next: (batch: string, letter: string) => `/batches/${e(batch)}/${e(letter)}/bring`,
  table: (batch: string, letter: string, view: View) => `/batches/${e(batch)}/${e(letter)}/${view.table}${viewToSearch(view)}`,
  /** A frame within the list that the view gives; its number is its place in sheet order, from 1. */
  frame: (batch: string, letter: string, number: number, list?: View) =>
    `/batches/${e(batch)}/${e(letter)}/frames/${number}${list === undefined ? '' : viewToSearch({ ...list, columns: null })}`,
} as const;

export const api = {
  ping: '/api/ping',
  template: '/api/template',
  people: '/api/people',
  projects: '/api/projects',
  project: (project: string) => `/api/projects/${e(project)}`,
  assigned: (project: string) => `/api/projects/${e(project)}/people`,
  batches: (project: string) => `/api/projects/${e(project)}/batches`,
  batch: (batch: string) => `/api/batches/${e(batch)}`,
  revisions: (batch: string) => `/api/batches/${e(batch)}/revisions`,
  revision: (batch: string, letter: string) => `/api/batches/${e(batch)}/revisions/${e(letter)}`,
  part: (
    batch: string,
    letter: string,
    part: 'run' | 'progress' | 'summary' | 'cell' | 'marked-copy' | 'workbook' | 'json' | 'csv',
  ) => `/api/batches/${e(batch)}/revisions/${e(letter)}/${part}`,
  table: (batch: string, letter: string, view: View, more: Readonly<Record<string, string | number>> = {}) =>
    tableAddress(batch, letter, view, '', more),
  facets: (batch: string, letter: string, view: View) => tableAddress(batch, letter, view, '/facets', {}),
  exported: (batch: string, letter: string, view: View, format: 'csv' | 'xlsx') =>
    tableAddress(batch, letter, view, '/export', { format }),
  frame: (batch: string, letter: string, number: number) => `/api/batches/${e(batch)}/revisions/${e(letter)}/frames/${number}`,
} as const;

function tableAddress(
  batch: string,
  letter: string,
  view: View,
  part: '' | '/facets' | '/export',
  more: Readonly<Record<string, string | number>>,
): string {
  const search = viewToSearch(view);
  const rest = Object.entries(more).map(([key, value]) => `${e(key)}=${e(String(value))}`);
  const query = [search.slice(1), ...rest].filter((piece) => piece !== '').join('&');
  return `/api/batches/${e(batch)}/revisions/${e(letter)}/tables/${view.table}${part}${query === '' ? '' : `?${query}`}`;
}
