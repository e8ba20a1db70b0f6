import { describe, expect, test } from 'vitest';
import { type Action, may, requirePermission, type Subject } from './permission';
import { ROLES, type Role } from './roles';

const ME = 'me';
const OTHER = 'somebody else';
const OPEN: Subject = { access: 'practice' };

/** Every action against every role, once with the subject that suits it best: who may at all. */
const TABLE: Record<Action, [subject: Subject, allowed: string]> = {
  'beam.solve': [{}, 'reader engineer checker librarian principal administrator'],
  'library.read': [{}, 'reader engineer checker librarian principal administrator'],
  'library.propose': [{}, 'engineer librarian'],
  'library.edit': [{ authorId: ME }, 'engineer librarian'],
  'library.submit': [{ authorId: ME }, 'engineer librarian'],
  'library.review': [{ authorId: OTHER }, 'checker librarian'],
  'library.prove': [{}, 'engineer checker librarian'],
  'library.withdraw': [{}, 'librarian principal'],
  'library.comment': [{}, 'engineer checker librarian principal'],
  'library.confirm': [{}, 'librarian'],
  'library.set-review': [{}, 'librarian'],
  'library.import': [{}, 'librarian'],
  'stock.edit': [{}, 'librarian'],
  'library.trace': [{}, 'librarian principal'],
  'search.save': [{}, 'reader engineer checker librarian principal administrator'],
  'search.share': [{}, 'engineer librarian'],
  'search.change': [{ authorId: ME }, 'reader engineer checker librarian principal administrator'],
  'search.remove': [{ authorId: ME }, 'reader engineer checker librarian principal administrator'],
  'recall.decide': [OPEN, 'engineer principal'],
  'recall.close': [{}, 'librarian principal'],
  'request.raise': [{}, 'reader engineer checker librarian principal administrator'],
  'request.read': [{ authorId: ME }, 'reader engineer checker librarian principal administrator'],
  'request.answer': [{}, 'librarian'],
  'job.create': [{}, 'engineer'],
  'job.read': [OPEN, 'reader engineer checker librarian principal administrator'],
  'job.edit': [OPEN, 'engineer'],
  'job.set-access': [{ ...OPEN, authorId: ME }, 'engineer principal'],
  'job.set-check-category': [OPEN, 'principal'],
  'job.issue': [OPEN, 'principal'],
  'member.read': [OPEN, 'reader engineer checker librarian principal administrator'],
  'member.edit': [OPEN, 'engineer'],
  'member.submit': [OPEN, 'engineer'],
  'member.comment': [OPEN, 'engineer checker librarian principal'],
  'member.check': [{ ...OPEN, authorId: OTHER }, 'checker'],
  'people.manage': [{}, 'administrator'],
  'practice.manage': [{}, 'administrator'],
  'audit.read': [{}, 'principal administrator'],
};

const ACTIONS = Object.entries(TABLE).map(([action, row]) => [action as Action, ...row] as const);

describe('the permission table', () => {
  test.each(ACTIONS)('%s: each role is allowed or refused as listed', (action, subject, allowed) => {
    const granted = ROLES.filter((role) => may({ personId: ME, roles: [role] }, action, subject));
    expect(granted.join(' ')).toBe(allowed);
  });

  test.each(ACTIONS)('%s: nobody without a role', (action, subject) => {
    expect(may({ personId: ME, roles: [] }, action, subject)).toBe(false);
  });

  test.each(ACTIONS)('%s: several roles allow what any one of them allows', (action, subject, allowed) => {
    expect(may({ personId: ME, roles: ROLES }, action, subject)).toBe(allowed !== '');
  });

  test.each(ACTIONS.filter(([action]) => /^(job|member)\.(?!create)/.test(action)))(
    '%s: of a job with named people, refused to the rest but principals and administrators',
    (action, subject, allowed) => {
      const closed = { ...subject, access: [OTHER] };
      const granted = ROLES.filter((role) => may({ personId: ME, roles: [role] }, action, closed));
      expect(granted.join(' ')).toBe((allowed.match(/principal|administrator/g) ?? []).join(' '));
      expect(may({ personId: ME, roles: ROLES }, action, { authorId: OTHER })).toBe(false);
    },
  );
});

describe('conditions', () => {
  const mayAs = (role: Role, action: Action, subject?: Subject) =>
    may({ personId: ME, roles: [role] }, action, subject);

  test('a named person has access to a job, in the part their role gives', () => {
    expect(mayAs('reader', 'job.read', { access: [OTHER, ME] })).toBe(true);
    expect(mayAs('reader', 'member.edit', { access: [OTHER, ME] })).toBe(false);
  });

  test('an engineer changes their own draft only, a librarian any', () => {
    expect(mayAs('engineer', 'library.edit', { authorId: OTHER })).toBe(false);
    expect(mayAs('librarian', 'library.edit', { authorId: OTHER })).toBe(true);
  });

  test('the author neither reviews nor checks, whatever their roles', () => {
    const all = { personId: ME, roles: ROLES };
    expect(may(all, 'library.review', { authorId: ME })).toBe(false);
    expect(may(all, 'member.check', { access: 'practice', authorId: ME })).toBe(false);
  });

  test('whoever changed a draft does not review it', () => {
    const changed = { authorId: OTHER, editorIds: ['a third person', ME] };
    expect(may({ personId: ME, roles: ROLES }, 'library.review', changed)).toBe(false);
    expect(mayAs('checker', 'library.review', { authorId: OTHER, editorIds: ['a third person'] })).toBe(true);
  });

  test('a condition whose field was forgotten refuses', () => {
    expect(mayAs('checker', 'library.review')).toBe(false);
    expect(mayAs('engineer', 'library.edit')).toBe(false);
  });
});

test('a refusal states the rule', () => {
  expect(() => requirePermission({ personId: ME, roles: ['reader'] }, 'people.manage')).toThrow(
    'People and their roles are managed by an administrator.',
  );
});
