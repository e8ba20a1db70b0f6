import { describe, expect, test } from 'vitest';
import type { Solution } from '@/engine/beam/index';
import { prepareFast } from '@/engine/continuous/index';
import { printedBeamValues } from '../support/printed-tables';
import { quantityOf, readPrinted } from '../support/printed-value';
import { stableBeam } from '../support/stable-beam';

describe('the fast solver and the printed tables of data/published', () => {
  const values = printedBeamValues().map((value) => ({ ...value, beam: stableBeam(value.document) }));
  const solved = values.map((value) => ({ ...value, solution: prepareFast(value.beam).solve() }));
  const fast = solved.filter(({ solution }) => solution.by === 'doubles');

  test('all but the guided beams are solved in doubles', () => {
    const guided = solved.filter(({ document }) => document.supports.some(({ kind }) => kind === 'guided'));
    expect(guided.length).toBeGreaterThan(0);
    expect(fast.length).toBe(solved.length - guided.length);
    expect(fast.length).toBeGreaterThan(150);
  });

  test('every printed value is met to half a unit of its last digit', () => {
    const missed = fast.flatMap(({ source, title, beam, solution, quantity, printed, units }) => {
      const { want, tolerance } = readPrinted(printed, units);
      const value = quantityOf(quantity, beam, solution as unknown as Solution);
      return Math.abs(value - want) <= tolerance ? [] : [`${source}, ${title}: ${value}, printed ${printed}`];
    });
    expect(missed).toEqual([]);
  });
});
