/** What an influence line may be of, as a person chooses it. */
import type { AskedQuantity } from '@/engine/influence';
import { type Beam, letteredSupports } from '@/engine/model';

/** What a person may ask for: a reaction by its support, or an effect at the section that stands beside. */
export type Choice = { readonly value: string; readonly label: string };

/** Every reaction of the beam from the left, then what has a section. */
export function choicesFor(beam: Beam): Choice[] {
  const reactions = letteredSupports(beam).flatMap(({ support, index, letter }) => [
    ...(support.vertical.kind === 'free'
      ? []
      : [{ value: `vertical ${index}`, label: `Reaction at ${letter}` }]),
    ...(support.rotation.kind === 'free'
      ? []
      : [{ value: `rotation ${index}`, label: `Moment reaction at ${letter}` }]),
  ]);
  return [
    { value: 'moment', label: 'Moment at a section' },
    { value: 'shear', label: 'Shear at a section' },
    { value: 'deflection', label: 'Deflection at a section' },
    ...reactions,
  ];
}

export const hasSection = (choice: string): choice is 'moment' | 'shear' | 'deflection' =>
  choice === 'moment' || choice === 'shear' || choice === 'deflection';

export function askedFor(choice: string, at: number, side: 'left' | 'right'): AskedQuantity {
  if (hasSection(choice)) return choice === 'deflection' ? { kind: choice, at } : { kind: choice, at, side };
  const [component, support] = choice.split(' ');
  return {
    kind: 'reaction',
    component: component === 'rotation' ? 'rotation' : 'vertical',
    support: Number(support),
  };
}

/** Whether the two sides of a section differ: a support there takes a force, or a moment, out of the beam. */
export function hasSides({ supports, length }: Beam, choice: string, at: number): boolean {
  const held = choice === 'shear' ? 'vertical' : choice === 'moment' ? 'rotation' : null;
  const isInside = at > 0 && at < length;
  return (
    held !== null &&
    isInside &&
    supports.some((support) => Math.abs(support.at - at) < length * 1e-9 && support[held].kind !== 'free')
  );
}
