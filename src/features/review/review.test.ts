import { describe, expect, test } from 'vitest';
import type { Role } from '@/features/account/roles';
import { REVISION_STATES, REVISION_STEPS, type RevisionState, stepsFor } from './review';

const AUTHOR = 'author';

const steps = (state: RevisionState, personId: string, ...roles: Role[]) =>
  stepsFor({ personId, roles }, { state, authorId: AUTHOR });

describe('the steps offered', () => {
  test('of a draft: the author or a librarian submits it', () => {
    expect(steps('draft', AUTHOR, 'engineer')).toEqual(['submit']);
    expect(steps('draft', 'other', 'librarian')).toEqual(['submit']);
    expect(steps('draft', 'other', 'engineer')).toEqual([]);
  });

  test('of a revision in review: a checker or librarian who did not write it returns or issues it', () => {
    expect(steps('in_review', 'other', 'checker')).toEqual(['return', 'issue']);
    expect(steps('in_review', 'other', 'librarian')).toEqual(['return', 'issue']);
    expect(steps('in_review', AUTHOR, 'librarian', 'checker')).toEqual([]);
    expect(steps('in_review', 'other', 'engineer', 'principal')).toEqual([]);
  });

  test('of what is or was in force: a librarian or principal withdraws it', () => {
    for (const state of ['issued', 'superseded'] as const) {
      expect(steps(state, AUTHOR, 'librarian')).toEqual(['withdraw']);
      expect(steps(state, 'other', 'principal')).toEqual(['withdraw']);
      expect(steps(state, 'other', 'checker')).toEqual([]);
    }
  });

  test('of a withdrawn revision: none, whoever asks', () => {
    expect(steps('withdrawn', AUTHOR, 'librarian', 'checker', 'principal', 'administrator')).toEqual([]);
  });
});

test('every state is reached by a step, and every step leads on', () => {
  const moves = Object.values(REVISION_STEPS);
  const reached = new Set<RevisionState>(moves.map(({ to }) => to));
  expect(REVISION_STATES.filter((state) => !reached.has(state))).toEqual([]);
  for (const { from, to } of moves) expect(from).not.toContain(to);
});
