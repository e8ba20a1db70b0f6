import { expect, test } from 'vitest';
import { beginProof, proofReport, proveFurther } from '@/engine/template/proof-run';
import { shippedTemplate } from '../../../tests/support/templates';
import { proofRows } from './passport';

test('a passport says how much was proven, by what, and what the worst was', () => {
  const template = shippedTemplate('overhang-loads-in-span');
  const subject = { template, issued: null };
  const progress = proveFurther(subject, beginProof(subject), beginProof(subject).total);
  const rows = proofRows(template, proofReport(subject, progress));
  const text = (name: string) => rows.find((row) => row.name === name)?.text;
  expect(rows.map(({ name }) => name)).toEqual([
    ...['Sweep', 'Two methods', 'Closed forms', 'Ends', 'a → 0', 'c → 0', 'Mirror', 'Scaling'],
    ...['As issued before', 'Worst point'],
  ]);
  expect(text('Sweep')).toMatch(/^240 points .* of \d+ kept out .*; every choice at \d+ points or more$/);
  expect(text('Two methods')).toMatch(/^Force method and direct stiffness within \d\.\d×10⁻¹[⁰¹²³⁴⁵⁶⁷⁸⁹] /);
  expect(text('Ends')).toMatch(/^13 of 13 ends and choices proven$/);
  expect(text('As issued before')).toBe('Nothing was issued before it.');
  // In the order of the template, whatever JSON made of it.
  expect(text('Worst point')).toMatch(/^L = .*, a = .*, w = .*, P = .*, c = .*, loading = .*, EI = /);
}, 30_000);
