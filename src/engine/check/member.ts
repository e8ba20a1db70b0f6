import { type ArrangementNamer, regionsOf } from '../combination/index';
import type { CombinationEnvelope, SuperposedBeam } from '../envelope/index';
import type { Beam } from '../model/index';
import { formatFor, type UnitSystemName } from '../quantity/index';
import type { Criteria, DeflectionLimit } from './criteria';
import { deflectionChecks } from './deflection';
import { bendingCheck, shearCheck } from './elastic';
import { placeOf } from './place';
import type { ElasticSection, MemberChecks } from './types';
import { upliftFindings } from './uplift';

/**
 * The elastic checks of a member: bending and shear stress over the strength combinations and their patterns, deflection
 * limits per span and overhang, and supports that are pulled up. What is not covered is said with the result.
 */
export function checkMember(member: {
  readonly beam: Beam;
  readonly superposed: SuperposedBeam;
  readonly section: ElasticSection;
  readonly criteria: Criteria;
  readonly strength: readonly CombinationEnvelope[];
  /** The limits with what acts of their combinations. */
  readonly limits: readonly DeflectionLimit[];
  readonly nameOf: ArrangementNamer;
  readonly system: UnitSystemName;
}): MemberChecks {
  const { beam, superposed, section, criteria, strength, limits, nameOf, system } = member;
  const words = {
    place: (x: number) => placeOf(beam, x, (at) => formatFor(at, 'position', system)),
    nameOf,
  };
  const rows = [
    bendingCheck(strength, section, criteria, words, system),
    shearCheck(strength, section, criteria, words, system),
    ...deflectionChecks(superposed, limits, regionsOf(beam), nameOf, system),
  ].sort((a, b) => b.ratio - a.ratio);
  return {
    rows,
    findings: upliftFindings(beam, strength, nameOf, (newtons) => formatFor(newtons, 'reaction', system)),
    notChecked: criteria.not_checked,
  };
}
