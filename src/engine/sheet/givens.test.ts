import { describe, expect, test } from 'vitest';
import { rowsIn, sheetOf, TEMPLATE, tableIn, textsIn } from '../../../tests/support/sheet';
import { shippedTemplate } from '../../../tests/support/templates';
import type { BeamDocument } from '../model/index';
import { buildFaultSheet } from './index';

describe('what the sheet covers', () => {
  test('names the template and says that no purpose is given', () => {
    const [text] = textsIn(sheetOf({ input: { purpose: '' } }));
    expect(text).toBe('No purpose is given. Made from Span 1, A span, revision 4.');
  });

  test('repeats the basis of the job, of a sheet without a result too', () => {
    const said = 'Basis of the job: Category B offices';
    const input = { purpose: 'Carries the roof.', basis: 'Category B offices', template: TEMPLATE };
    expect(textsIn(sheetOf({ input }))).toContain(said);
    expect(textsIn(buildFaultSheet({ ...input, cautions: [] }, 'Not proven.'))).toContain(said);
    expect(textsIn(sheetOf({})).join()).not.toContain('Basis of the job');
  });
});

describe('the basis', () => {
  test('says of each support what holds it, by which springs, and how it moves', () => {
    const supports: BeamDocument['supports'] = [
      { at: 0, kind: 'fixed', rotation: -0.002 },
      { at: 2, kind: 'roller', rise: -0.0125 },
      { at: 3, kind: 'pin', kr: 450e3, rotation: 0.001 },
      { at: 4, kind: 'free', kv: 2.5e6, rise: 0.004 },
      { at: 6, kind: 'guided' },
    ];
    const rows = rowsIn(sheetOf({ beam: { supports } }), 'Basis');
    expect(rows.slice(0, 5)).toEqual([
      ['Support A, 0.000 m from the left', 'Fixed: neither moves nor turns; turns clockwise by 2.00 mrad'],
      [
        'Support B, 2.000 m from the left',
        'Roller: does not move up or down, free to turn; settles by 12.5 mm',
      ],
      [
        'Support C, 3.000 m from the left',
        'Pinned: does not move, free to turn; rotational spring 450.0 kNm/rad; turns anticlockwise by 1.00 mrad',
      ],
      ['Support D, 4.000 m from the left', 'Free; vertical spring 2 500 kN/m; rises by 4.0 mm'],
      ['Support E, 6.000 m from the left', 'Guided: does not turn, free to move up and down'],
    ]);
  });

  test('says whether shear deformation is in it', () => {
    const shear = (ga: number | null) => rowsIn(sheetOf({ beam: { ga } }), 'Basis').at(-1);
    expect(shear(null)).toEqual(['Shear deformation', 'Left out']);
    expect(shear(8e8)).toEqual(['Shear deformation', 'Included']);
  });

  test('says that no weight acts as long as there is no section, even where it is asked for', () => {
    const rows = rowsIn(sheetOf({ input: { ownWeight: { acts: true, reason: '' } } }), 'Basis');
    expect(rows).toContainEqual(['Own weight', 'Left out: no section is chosen']);
  });

  test('shows how each limit of the template stands, what is broken in bold', () => {
    const rule = { severity: 'warn' as const, path: [] };
    const rules = [
      { ...rule, id: 'a', state: 'holds' as const, message: 'L/h is at most 30.' },
      { ...rule, id: 'b', state: 'broken' as const, message: 'The load is uplift.' },
      { ...rule, id: 'c', state: 'unknown' as const, message: 'The depth is not known.' },
    ];
    expect(tableIn(sheetOf({ result: { rules } }), 'Limits of the template')?.rows).toEqual([
      { cells: ['L/h is at most 30.', 'Holds'], strong: false },
      { cells: ['The load is uplift.', 'Broken'], strong: true },
      { cells: ['The depth is not known.', 'Not checked'], strong: false },
    ]);
    expect(tableIn(sheetOf({}), 'Limits of the template')).toBeUndefined();
  });
});

describe('the givens', () => {
  const givens = (slug: string, parameters: Readonly<Record<string, unknown>>) => {
    const { reference, name, parameters: known } = shippedTemplate(slug);
    const template = { reference, name, revision: 1, parameters: known };
    return rowsIn(sheetOf({ input: { template, parameters } }), 'Givens');
  };

  test('name a choice by what is chosen, and say where each value is from', () => {
    const rows = givens('propped-cantilever-triangle', { heavy: 'prop', L: 4.5 });
    expect(rows[0]?.slice(1)).toEqual(['L', '4.5', 'm', 'SI value']);
    expect(rows).toContainEqual(['Heavy end', '\\text{heavy end}', 'Prop', '', 'prop']);
    const usual = givens('propped-cantilever-triangle', {});
    expect(usual).toContainEqual(['Heavy end', '\\text{heavy end}', 'Fixed end', '', 'template']);
  });

  test('list every row of a list with its group, each as it was typed', () => {
    const loads = [
      { x: '1.2 m', P: '25 kN', group: 'Q' },
      { x: 2.5, P: '3 kN' },
    ];
    expect(givens('simple-span-points-uniform', { loads }).slice(-5, -1)).toEqual([
      ['Point loads 1 (Q): place', 'x_{1}', '1.2', 'm', '1.2 m'],
      ['Point loads 1 (Q): point load', 'P_{1}', '25', 'kN', '25 kN'],
      ['Point loads 2 (G): place', 'x_{2}', '2.5', 'm', 'SI value'],
      ['Point loads 2 (G): point load', 'P_{2}', '3', 'kN', '3 kN'],
    ]);
  });

  test('list the rows that the template begins with as its own', () => {
    const rows = givens('simple-span-points-uniform', {}).filter(([name]) => /^Point loads/.test(name!));
    expect(rows.length).toBeGreaterThan(0);
    expect(new Set(rows.map((cells) => cells.at(-1)))).toEqual(new Set(['template']));
  });

  test('give a load of one group no sum, and a group of the practice by its letter', () => {
    const rows = givens('simple-span-points-uniform', { w: { T: '2 kN/m' }, loads: [] });
    expect(rows[1]).toEqual(['Uniform load: T', 'w', '2', 'kN/m', '2 kN/m']);
    expect(rows).toHaveLength(3); // L, w and the bending stiffness
  });

  test('leave out what the template cannot read any more', () => {
    const rows = givens('simple-span-points-uniform', { gone: '1 m' });
    expect(rows.map(([name]) => name)).toEqual(['Bending stiffness']);
    expect(rows[0]?.slice(2)).toEqual(['20 000', 'kNm²', 'template’s usual value']);
  });
});
