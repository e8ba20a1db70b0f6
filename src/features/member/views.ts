/** Which loads the member's drawing shows: all of them unfactored, a group alone, or a combination at once. */
import type { Solution } from '@/engine/beam';
import { factoredLoads, LOAD_GROUP_NAMES, LOAD_GROUPS } from '@/engine/combination';
import type { Beam, Load } from '@/engine/model';
import type { NamedLoad } from '@/engine/template';
import { type MemberEvaluation, MOVEMENTS } from './evaluate';

export interface StripView {
  readonly id: string;
  readonly name: string;
  readonly beam: Beam;
  readonly solution: Solution;
  readonly loadNames: readonly NamedLoad[];
}

export function groupName(group: string): string {
  if (group === MOVEMENTS) return 'supports moving';
  const known = LOAD_GROUPS.find((one) => one === group);
  return known ? `${known}, ${LOAD_GROUP_NAMES[known]}` : group;
}

/** The loads that `keep` keeps, with the names that they have on the whole beam. */
function part(beam: Beam, names: readonly NamedLoad[], keep: (load: Load) => boolean) {
  const kept = beam.loads
    .map((load, index) => ({ load, name: names[index] }))
    .filter(({ load }) => keep(load));
  return {
    loads: kept.map(({ load }) => load),
    loadNames: kept.flatMap(({ name }) => (name ? [name] : [])),
  };
}

/** A load that is given by its groups is drawn once for each: "w G". */
const withGroup = (name: NamedLoad): NamedLoad =>
  name.symbol === '' ? name : { ...name, tex: `${name.tex}\\text{ ${name.group}}` };

export function stripViews({
  beam,
  instance,
  total,
  groups,
  strength,
  service,
}: MemberEvaluation): StripView[] {
  const loadNames = instance.loadNames.map(withGroup);
  const byGroup = groups.map(({ group, solution }): StripView => {
    const { loads, loadNames: names } = part(beam, loadNames, (load) => load.group === group);
    return {
      id: `group ${group}`,
      name: groupName(group),
      beam: { ...beam, loads },
      solution,
      loadNames: names,
    };
  });
  const combined = [
    ...strength.map(({ combination, solution }) => ({ kind: 'Strength', combination, solution })),
    ...service.map(({ limit, solution }) => ({ kind: limit.name, combination: limit.combination, solution })),
  ].map(({ kind, combination, solution }): StripView => {
    const acts = (load: Load) => factoredLoads([load], combination).length > 0;
    const { loads, loadNames: names } = part(beam, loadNames, acts);
    return {
      id: `${kind} ${combination.name}`,
      name: `${kind}: ${combination.name}`,
      beam: { ...beam, loads: factoredLoads(loads, combination) },
      solution,
      // A factored load is no longer what its parameter says, so that it is not edited there.
      loadNames: names.map((name) => ({ ...name, symbol: '', tex: '' })),
    };
  });
  return [
    { id: 'total', name: 'All loads, unfactored', beam, solution: total, loadNames },
    ...byGroup,
    ...combined,
  ];
}
