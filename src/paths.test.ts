import { expect, test } from 'vitest';
import { designationKey } from '@/engine/section';
import { localPath, paths, signInPath } from './paths';

test.each([
  ['/templates/prop-3?L=7.2#derivation', '/templates/prop-3?L=7.2#derivation'],
  ['/', '/'],
  ['/jobs/../jobs/Q-2417', '/jobs/Q-2417'],
])('localPath(%j) stays here', (next, path) => {
  expect(localPath(next)).toBe(path);
});

test.each([
  null,
  undefined,
  '',
  'jobs',
  '//elsewhere.example/jobs',
  '/\\elsewhere.example',
  '/\t/elsewhere.example',
  '/..//elsewhere.example',
  'https://elsewhere.example/',
  'javascript:alert(1)',
  '/sign-in?next=/jobs',
])('localPath(%j) goes home', (next) => {
  expect(localPath(next)).toBe('/');
});

test('the sign-in page remembers where the person wanted to go', () => {
  expect(signInPath('/jobs?q=a b')).toBe('/sign-in?next=%2Fjobs%3Fq%3Da%20b');
  expect(signInPath('/')).toBe('/sign-in');
});

test('the address of a section whose name has a slash is one part, and means the same section', () => {
  const parts = paths.section('american-angles', 'L8x8x1-1/8').split('/');
  expect(parts).toHaveLength(4);
  expect(designationKey(decodeURIComponent(parts[3] ?? ''))).toBe(designationKey('L8x8x1-1/8'));
});
