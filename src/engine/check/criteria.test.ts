import { describe, expect, test } from 'vitest';
import { shippedCriteria, shippedSet } from '../../../tests/support/criteria';
import own from '../../../tests/support/criteria-schema-1.json';
import { actingCombinations, type Categories, type Combination, LOAD_GROUPS } from '../combination/index';
import { type Criteria, type CriteriaOfSet, criteriaDocument, resolveCriteria, unfitting } from './index';

/** Every choice of the groups that may be on a beam. */
const CHOICES = Array.from({ length: 2 ** LOAD_GROUPS.length }, (_, bits) =>
  LOAD_GROUPS.filter((_group, index) => (bits >> index) & 1),
);

const acting = (combinations: readonly Combination[], { letters }: Criteria) =>
  CHOICES.map((groups) => actingCombinations(combinations, groups, letters));

const actingLimits = (criteria: Criteria) =>
  criteria.deflection.map(({ combination, ...limit }) => ({
    ...limit,
    acts: acting([combination], criteria),
  }));

/** Criteria as they were issued before there were combination sets, which members pin still. */
describe.each(Object.entries(own))('%s of schema 1', (slug, written) => {
  const old = resolveCriteria(criteriaDocument.parse(written), null);
  const now = shippedCriteria(slug);

  test('is read as it was issued', () => {
    expect(old.strength.combinations).toEqual(written.strength.combinations);
    expect(old.patterns).toEqual(written.patterns);
  });

  test('judges as the one that refers to a set, whatever groups are on the beam', () => {
    const [is, was] = [acting(now.strength.combinations, now), acting(old.strength.combinations, old)];
    // The timber criteria left out two of ASCE 7's combinations with wind; the set has all of them.
    const isAlike = ({ length }: readonly Combination[], choice: number) =>
      slug !== 'timber-elastic-us' || !CHOICES[choice]?.includes('W') || length === 0;
    expect(is.filter(isAlike)).toEqual(was.filter(isAlike));
    was.forEach((combinations, choice) => {
      expect(is[choice]).toEqual(expect.arrayContaining(combinations));
    });
    expect(actingLimits(now)).toEqual(actingLimits(old));
    expect([now.strength.bending, now.strength.shear]).toEqual([old.strength.bending, old.strength.shear]);
    expect([now.patterns, now.letters]).toEqual([old.patterns, old.letters]);
  });
});

const { patterns: _, deflection, strength, ...named } = own['timber-elastic-en'];
const document = criteriaDocument.parse({
  ...named,
  schema_version: 2,
  limit_state: 'strength',
  combinations: { set: 'en-1990-6-10', revision: 1 },
  strength: { basis: 'b', bending: 1, shear: 1, source: strength.source },
  deflection: [
    {
      ...deflection[0],
      combination: { id: 'characteristic-q' },
    },
  ],
}) as CriteriaOfSet;

describe('criteria held against a set', () => {
  test('fit one that is made for their limit state, and equilibrium', () => {
    expect(unfitting(document, shippedSet('en-1990-6-10ab-uk'))).toEqual([]);
    expect(unfitting(document, shippedSet('en-1990-equ'))).toEqual([]);
    expect(unfitting(document, shippedSet('asce-7-16-allowable')).map(({ path }) => path)).toEqual([
      ['limit_state'],
      ['deflection', 0, 'combination', 'id'],
    ]);
  });

  test('name categories that the set has', () => {
    const wrong = { ...document, categories: { Q: 'z' } };
    expect(unfitting(wrong, shippedSet('en-1990-6-10'))).toMatchObject([{ path: ['categories', 'Q'] }]);
  });

  // Table A1.1, from memory: storage has ψ0 = 1.0, offices 0.7.
  test('take the categories that are chosen, and say which', () => {
    const set = shippedSet('en-1990-6-10');
    const basis = (chosen: Categories) => resolveCriteria(document, set, chosen).strength.basis;
    expect(basis({})).toContain('Q as B: offices');
    expect(basis({ Q: 'e' })).toContain('Q as E: storage');
    const names = resolveCriteria(document, set, { Q: 'e' }).strength.combinations.map(({ name }) => name);
    expect(names).toContain('1.35 G + 1.5 Q + 1.5 S + 0.9 W');
  });

  test('are not held against nothing', () => {
    expect(() => resolveCriteria(document, null)).toThrow(RangeError);
  });
});
