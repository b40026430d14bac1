import { describe, expect, it } from 'vitest';
import { createAnalyser } from '@/lib/analysis/analyser';
import { defaultSettings } from '@/lib/model/settings';
import { cantileverFrame } from '@/lib/results/cantilever-frame';
import { evaluateFrame } from '@/lib/results/evaluate';
import type { NumbersData } from '@/components/numbers/numbers-data';
import { numberUnits } from './number-units';
import { numbersData } from './numbers-data';

const frame = cantileverFrame('F1');
const settings = { ...defaultSettings, analysis: 'second order' as const };
const first = evaluateFrame(createAnalyser(), frame, defaultSettings, { second: false, all: false });
const second = evaluateFrame(createAnalyser(), frame, settings, { second: false, all: false });

const table = ({ steps, frame: whole }: NumbersData, id: string) => {
  const found = [...steps, whole].flatMap(({ tables }) => tables).find((one) => one.id === id);
  if (!found) throw new Error(`There is no table ${id}`);
  return found;
};
const numbers = (data: NumbersData, id: string): number[][] =>
  table(data, id).rows.map(({ cells }) => cells.filter((cell) => typeof cell === 'number'));
const times = (matrix: number[][], vector: number[]) =>
  matrix.map((row) => row.reduce((sum, value, i) => sum + value * vector[i]!, 0));

describe('the numbers behind a member, laid out', () => {
  it.each(['si', 'metric', 'us'] as const)('multiply out in %s units: k u + q_F = q, and u = T d', (name) => {
    const units = numberUnits(name === 'si' ? 'si' : null, name === 'us' ? 'us' : 'metric');
    for (const evaluation of [first, second])
      for (const state of evaluation.states) {
        const data = numbersData(frame, state, 0, units);
        const d = numbers(data, 'd').flat();
        const u = times(numbers(data, 'T'), d);
        numbers(data, 'u').flat().forEach((value, i) => expect(value).toBeCloseTo(u[i]!, 12)); // prettier-ignore
        const ku = times(numbers(data, 'k'), u);
        const q = numbers(data, 'q');
        const size = Math.max(...q.flat().map(Math.abs));
        q.forEach(([byMovement, held, sum, stored], i) => {
          expect(Math.abs(byMovement! - ku[i]!) / size, `${state.name} row ${i}`).toBeLessThan(1e-9);
          expect(Math.abs(byMovement! + held! - sum!) / size).toBeLessThan(1e-12);
          expect(Math.abs(sum! - stored!) / size, `${state.name} row ${i}`).toBeLessThan(1e-9);
        });
      }
  });

  it('name the unit of every force and movement', () => {
    const { states } = first;
    const us = numbersData(frame, states[0]!, 0, numberUnits(null, 'us'));
    expect(table(us, 'k').rows.map(({ unit }) => unit)).toEqual(['kip', 'kip', 'kip·in', 'kip', 'kip', 'kip·in']);
    expect(table(us, 'k').columns.map(({ unit }) => unit)).toEqual(['in', 'in', 'rad', 'in', 'in', 'rad']);
    const si = numbersData(frame, states[0]!, 0, numberUnits('si', 'us'));
    expect(table(si, 'internal').rows.map(({ unit }) => unit)).toEqual(['N', 'N', 'N·m']);
  });

  it('show stability-function terms in second order and none in first', () => {
    const symbols = (evaluation: typeof first) => {
      const state = evaluation.states.find(({ kind }) => kind === 'combination')!;
      return table(numbersData(frame, state, 0, numberUnits('si', 'metric')), 'member-terms').rows.map(({ label }) => label);
    };
    expect(symbols(first)).not.toContain('φ');
    expect(symbols(second)).toEqual(expect.arrayContaining(['φ', 's', 's c']));
  });
});
