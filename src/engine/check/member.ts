import { regionsOf } from '../combination/index';
import type { Beam } from '../model/index';
import { formatFor, type UnitSystemName } from '../quantity/index';
import type { Criteria } from './criteria';
import { deflectionChecks } from './deflection';
import { bendingCheck, shearCheck } from './elastic';
import { placeOf } from './place';
import type { Arrangement, ElasticSection, MemberChecks, ServiceArrangement } from './types';
import { upliftFindings } from './uplift';

/**
 * The elastic checks of a member: bending and shear stress over the strength combinations, deflection limits per span
 * and overhang, and supports that are pulled up. What the criteria do not cover is said with the result.
 */
export function checkMember(member: {
  readonly beam: Beam;
  readonly section: ElasticSection;
  readonly criteria: Criteria;
  readonly strength: readonly Arrangement[];
  readonly service: readonly ServiceArrangement[];
  readonly system: UnitSystemName;
}): MemberChecks {
  const { beam, section, criteria, strength, service, system } = member;
  const place = (x: number) => placeOf(beam, x, (at) => formatFor(at, 'position', system));
  const rows = [
    bendingCheck(strength, section, criteria, place, system),
    shearCheck(strength, section, criteria, place, system),
    ...deflectionChecks(service, regionsOf(beam), system),
  ].sort((a, b) => b.ratio - a.ratio);
  return {
    rows,
    findings: upliftFindings(beam, strength, (newtons) => formatFor(newtons, 'reaction', system)),
    notChecked: criteria.not_checked,
  };
}
