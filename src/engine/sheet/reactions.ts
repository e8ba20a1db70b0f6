import type { ArrangementNamer } from '../combination/index';
import type { Governing } from '../envelope/index';
import { type LetteredSupport, letteredSupports } from '../model/index';
import { namerOf } from './combinations';
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
  const { beam, groups, total, strength, checks } = result;
  const nameOf = namerOf(result);
  const held = letteredSupports(beam).flatMap((support) => heldBy(support, figures));
  const columns: SheetColumn[] = [
    { title: 'Reaction' },
    { title: 'Unit' },
    ...groups.map(({ group }) => figureColumn(group === 'movements' ? 'Movements' : group, '')),
    figureColumn('All together', ''),
  ];
  const rows = held.map(({ tex, unit, support, component, text }): SheetRow => {
    const values = [...groups.map(({ solution }) => solution), total].map(
      ({ reactions }) => reactions[support]?.[component] ?? 0,
    );
    return { cells: [{ tex }, unit, ...values.map(text)] };
  });
  return [
    { kind: 'table', name: 'Reactions by group, unfactored', columns, rows },
    {
      kind: 'text',
      tone: 'note',
      text: 'Unfactored, to be handed on by group. Up and anticlockwise on the beam are positive; uplift is negative and named.',
    },
    ...patternedTable(held, result),
    ...(strength.length === 0 ? [] : [rangeTable(held, strength, nameOf)]),
    ...(checks?.findings ?? []).map(
      ({ title, detail }): SheetBlock => ({ kind: 'text', tone: 'warning', text: `${title}: ${detail}` }),
    ),
  ];
}

/** Of the groups that act only where adverse: each support's most and least, with the other spans unloaded. */
function patternedTable(
  held: readonly Held[],
  { patterning, group_reactions: ranges }: SheetInput['result'],
): SheetBlock[] {
  const { groups } = patterning;
  if (groups.length === 0) return [];
  const rows = held.map(({ tex, unit, support, component, text }): SheetRow => {
    const values = groups.flatMap((group) => {
      const range = ranges[support]?.[group]?.[component];
      return typeof range === 'object' ? [range.max, range.min] : [0, 0];
    });
    return { cells: [{ tex }, unit, ...values.map(text)] };
  });
  const columns: SheetColumn[] = [
    { title: 'Adverse spans alone' },
    { title: 'Unit' },
    ...groups.flatMap((group) => [figureColumn(`${group} most`, ''), figureColumn(`${group} least`, '')]),
  ];
  return [{ kind: 'table', name: 'Reactions of groups that act where adverse, unfactored', columns, rows }];
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
