import { expect, test } from 'vitest';
import { localPath, signInPath } from './paths';

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
