import { letteredSupports, type Restraint, type Support, type SupportKind } from '../model/index';
import type { RuleOutcome } from '../template/index';
import type { Figures } from './figures';
import type { SheetBlock, SheetInput, SheetRow } from './types';

const HOLDS: Record<SupportKind, string> = {
  fixed: 'Fixed: neither moves nor turns',
  pin: 'Pinned: does not move, free to turn',
  roller: 'Roller: does not move up or down, free to turn',
  guided: 'Guided: does not turn, free to move up and down',
  free: 'Free',
};

function supportText({ kind, vertical, rotation }: Support, figures: Figures): string {
  const spring = (restraint: Restraint, purpose: 'spring' | 'rotational_spring', word: string) =>
    restraint.kind === 'spring' ? [`${word} spring ${figures.whole(restraint.stiffness, purpose)}`] : [];
  const moved = (restraint: Restraint, purpose: 'deflection' | 'slope', words: readonly [string, string]) => {
    const movement = restraint.kind === 'free' ? 0 : restraint.movement;
    if (movement === 0) return [];
    return [`${movement > 0 ? words[0] : words[1]} by ${figures.whole(Math.abs(movement), purpose)}`];
  };
  return [
    HOLDS[kind],
    ...spring(vertical, 'spring', 'vertical'),
    ...spring(rotation, 'rotational_spring', 'rotational'),
    ...moved(vertical, 'deflection', ['rises', 'settles']),
    ...moved(rotation, 'slope', ['turns anticlockwise', 'turns clockwise']),
  ].join('; ');
}

const STATES: Record<RuleOutcome['state'], string> = {
  holds: 'Holds',
  broken: 'Broken',
  unknown: 'Not checked',
};

function weightText({ ownWeight, section, result }: SheetInput, figures: Figures): string {
  if (!ownWeight.acts) return `Left out: ${ownWeight.reason}`;
  if (!section || !result.section) return 'Left out: no section is chosen';
  return `Included, ${figures.whole(result.section.selfWeight, 'line_load')} in group G`;
}

/** Supports, own weight and stability as they are taken, then the template's limits with how each stands. */
export function basisBlocks(input: SheetInput, figures: Figures): SheetBlock[] {
  const { result } = input;
  const row = (...cells: string[]): SheetRow => ({ cells });
  const shear = result.beam.segments.every(({ ga }) => ga === null);
  const table = (name: string, title: string, second: string, rows: SheetRow[]): SheetBlock[] =>
    rows.length === 0 ? [] : [{ kind: 'table', name, columns: [{ title }, { title: second }], rows }];
  return [
    ...table('Basis', 'Basis', 'Taken as', [
      ...letteredSupports(result.beam).map(({ support, letter }) =>
        row(
          `Support ${letter}, ${figures.whole(support.at, 'position')} from the left`,
          supportText(support, figures),
        ),
      ),
      row('Restraint against moving sideways', 'None is recorded; buckling sideways is not checked'),
      row('Own weight', weightText(input, figures)),
      row('Shear deformation', shear ? 'Left out' : 'Included'),
    ]),
    ...table(
      'Limits of the template',
      'Limit of the template',
      'State',
      result.rules.map(({ state, message }) => ({
        cells: [message, STATES[state]],
        strong: state === 'broken',
      })),
    ),
  ];
}
