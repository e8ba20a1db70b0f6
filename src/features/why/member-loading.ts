/** Which loads give what the views of a member show. Pure. */
import type { Governing } from '@/engine/envelope';
import type { Acting, Quantity } from '@/engine/why';
import type { MemberEvaluation } from '@/features/member/evaluate';
import { MOVEMENTS } from '@/features/member/solve';
import type { StripView } from '@/features/member/views';
import { always, type Loading, UNFACTORED } from './keys';

export const actingGroup = (group: string): Acting => ({
  kind: 'group',
  group: group === MOVEMENTS ? null : group,
});

/** The combination of a name, with the spans of its pattern. */
export function governingActing(
  { strength, service }: Pick<MemberEvaluation, 'strength' | 'service'>,
  { combination: name, pattern }: Pick<Governing, 'combination' | 'pattern'>,
): Acting | null {
  const found = [...strength, ...service].find(({ combination }) => combination.name === name);
  return found ? { kind: 'combination', combination: found.combination, pattern } : null;
}

/** What acts in a view of the member's drawing. */
export function loadingOf(evaluation: MemberEvaluation, view: StripView): Loading {
  if (view.of) return always({ kind: 'combination', ...view.of });
  const group = evaluation.groups.find((one) => view.id === `group ${one.group}`)?.group;
  if (group !== undefined) return always(actingGroup(group));
  return view.id === 'envelope' ? enveloped(evaluation) : UNFACTORED;
}

/** Of an envelope, what governs at a place. */
function enveloped(evaluation: MemberEvaluation): Loading {
  const { superposed, strength, service } = evaluation;
  const combinationsOf = (quantity: Quantity) =>
    (quantity === 'deflection' ? service : strength).map(({ combination }) => combination);
  return {
    at: (quantity, x, bound) => {
      const [station] = superposed.envelope(combinationsOf(quantity), [x]).stations;
      if (!station || bound === null) return null;
      return governingActing(evaluation, station[quantity][bound === 'upper' ? 'max' : 'min']);
    },
    reaction: (support, component) => {
      const most = strength.flatMap(({ reactions }) => reactions[support]?.max[component] ?? []);
      const [first, ...rest] = most;
      if (!first) return null;
      return governingActing(
        evaluation,
        rest.reduce((a, b) => (b.value > a.value ? b : a), first),
      );
    },
  };
}
