import { expect, test } from 'vitest';
import { DEMO_PASSWORD, DEMO_PEOPLE, demoAccounts } from './demo';
import { weakness } from './password';
import { ROLES } from './roles';

test('every role but reading alone is somebody’s in the demo', () => {
  const held = new Set(DEMO_PEOPLE.flatMap(({ roles }) => roles));
  expect(ROLES.filter((role) => !held.has(role))).toEqual(['reader']);
});

test('the demo’s accounts are such as could be chosen', () => {
  for (const { name, email } of demoAccounts()) {
    expect(email).toMatch(/^[a-z]+\.[a-z]+@quillmere\.example$/);
    expect(weakness(DEMO_PASSWORD, { name, email })).toBeNull();
  }
});
