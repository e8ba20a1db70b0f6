import { type ArrangementNamer, arrangementNamer } from '../combination/index';
import type { Governing } from '../envelope/index';
import { type LetteredSupport, letteredSupports } from '../model/index';
import type { Figures } from './figures';
import { figureColumn } from './results';
import type { Cell, SheetBlock, SheetColumn, SheetInput, SheetRow } from './types';

/** One component that a support may hold. */
type Held = {
  readonly tex: string;
  readonly unit: string;
  readonly support: number;
  readonly component: 'vertical' | 'moment';
  readonly text: (value: number) => string;
};

/** Reactions by group, unfactored, to hand on; then their range over the strength combinations. */
export function reactionBlocks({ result }: SheetInput, figures: Figures): SheetBlock[] {
  const { beam, groups, group_reactions: ranges, total, strength, checks, patterning } = result;
  const nameOf = arrangementNamer(beam, patterning.groups);
  const held = letteredSupports(beam).flatMap((support) => heldBy(support, figures));
  const columns: SheetColumn[] = [
    { title: 'Reaction' },
    { title: 'Unit' },
    ...groups.flatMap(({ group }) => [
      figureColumn(group === 'movements' ? 'Movements' : group, ''),
      ...(patterning.groups.includes(group)
        ? [figureColumn(`${group} most`, ''), figureColumn(`${group} least`, '')]
        : []),
    ]),
    figureColumn('All together', ''),
  ];
  const rows = held.map(({ tex, unit, support, component, text }): SheetRow => {
    const values = groups.flatMap(({ group, solution }) => {
      const range = ranges[support]?.[group]?.[component];
      const whole = solution.reactions[support]?.[component] ?? 0;
      return typeof range === 'object' ? [whole, range.max, range.min] : [whole];
    });
    return { cells: [{ tex }, unit, ...[...values, total.reactions[support]?.[component] ?? 0].map(text)] };
  });
  return [
    { kind: 'table', name: 'Reactions by group, unfactored', columns, rows },
    {
      kind: 'text',
      tone: 'note',
      text: `Unfactored, to be handed on by group. Up and anticlockwise on the beam are positive; uplift is negative and named.${patterning.groups.length > 0 ? ' Most and least: of the adverse spans alone.' : ''}`,
    },
    ...(strength.length === 0 ? [] : [rangeTable(held, strength, nameOf)]),
    ...(checks?.findings ?? []).map(
      ({ title, detail }): SheetBlock => ({ kind: 'text', tone: 'warning', text: `${title}: ${detail}` }),
    ),
  ];
}

function heldBy({ support, letter, index }: LetteredSupport, figures: Figures): Held[] {
  const { vertical, rotation } = support;
  const force: Held = {
    tex: `R_{${letter}}`,
    unit: figures.unit('reaction'),
    support: index,
    component: 'vertical',
    text: (value) => {
      const text = figures.value(value, 'reaction');
      return value < 0 && /[1-9]/.test(text) ? `${text}\u00a0uplift` : text;
    },
  };
  const moment: Held = {
    tex: `M_{${letter}}`,
    unit: figures.unit('moment'),
    support: index,
    component: 'moment',
    text: (value) => figures.value(value, 'moment'),
  };
  return [...(vertical.kind === 'free' ? [] : [force]), ...(rotation.kind === 'free' ? [] : [moment])];
}

function rangeTable(
  held: readonly Held[],
  strength: SheetInput['result']['strength'],
  nameOf: ArrangementNamer,
): SheetBlock {
  const rows = held.map(({ tex, unit, support, component, text }): SheetRow => {
    const of = (side: 'max' | 'min') =>
      strength.flatMap(({ reactions }) => reactions[support]?.[side][component] ?? []);
    const cellsOf = (governing: Governing | undefined): Cell[] =>
      governing ? [text(governing.value), nameOf(governing)] : ['', ''];
    const most = of('max').reduce<Governing | undefined>(
      (a, b) => (a && a.value >= b.value ? a : b),
      undefined,
    );
    const least = of('min').reduce<Governing | undefined>(
      (a, b) => (a && a.value <= b.value ? a : b),
      undefined,
    );
    return { cells: [{ tex }, unit, ...cellsOf(most), ...cellsOf(least)] };
  });
  const columns: SheetColumn[] = [
    { title: 'Factored' },
    { title: 'Unit' },
    figureColumn('Most', ''),
    { title: 'under' },
    figureColumn('Least', ''),
    { title: 'under' },
  ];
  return { kind: 'table', name: 'Factored reactions, strength combinations and patterns', columns, rows };
}
