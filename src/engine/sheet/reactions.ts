import type { Reaction } from '../beam/index';
import { type LetteredSupport, letteredSupports } from '../model/index';
import type { Figures } from './figures';
import { figureColumn } from './results';
import type { Cell, SheetBlock, SheetColumn, SheetInput, SheetRow } from './types';

/** One component that a support may hold. */
type Held = {
  readonly tex: string;
  readonly unit: string;
  readonly of: (reactions: readonly Reaction[]) => number;
  readonly text: (value: number) => string;
};

/** Reactions by group, unfactored, to hand on; then their range over the strength combinations. */
export function reactionBlocks({ result }: SheetInput, figures: Figures): SheetBlock[] {
  const { beam, groups, total, strength, checks } = result;
  const held = letteredSupports(beam).flatMap((support) => heldBy(support, figures));
  const columns: SheetColumn[] = [
    { title: 'Reaction' },
    { title: 'Unit' },
    ...groups.map(({ group }) => figureColumn(group === 'movements' ? 'Movements' : group, '')),
    figureColumn('All together', ''),
  ];
  const rows = held.map(({ tex, unit, of, text }): SheetRow => {
    const values = [...groups.map(({ solution }) => of(solution.reactions)), of(total.reactions)];
    return { cells: [{ tex }, unit, ...values.map(text)] };
  });
  return [
    { kind: 'table', name: 'Reactions by group, unfactored', columns, rows },
    {
      kind: 'text',
      tone: 'note',
      text: 'Unfactored, to be handed on by group. Up and anticlockwise on the beam are positive; uplift is negative and named.',
    },
    ...(strength.length === 0 ? [] : [rangeTable(held, strength)]),
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
    of: (reactions) => reactions[index]?.vertical ?? 0,
    text: (value) => {
      const text = figures.value(value, 'reaction');
      return value < 0 && /[1-9]/.test(text) ? `${text}\u00a0uplift` : text;
    },
  };
  const moment: Held = {
    tex: `M_{${letter}}`,
    unit: figures.unit('moment'),
    of: (reactions) => reactions[index]?.moment ?? 0,
    text: (value) => figures.value(value, 'moment'),
  };
  return [...(vertical.kind === 'free' ? [] : [force]), ...(rotation.kind === 'free' ? [] : [moment])];
}

function rangeTable(held: readonly Held[], strength: SheetInput['result']['strength']): SheetBlock {
  const rows = held.map(({ tex, unit, of, text }): SheetRow => {
    const all = strength.map(({ combination, reactions }) => ({
      name: combination.name,
      value: of(reactions),
    }));
    const by = (better: (a: number, b: number) => boolean) =>
      all.reduce((best, one) => (better(one.value, best.value) ? one : best));
    const cellsOf = ({ name, value }: { name: string; value: number }): Cell[] => [text(value), name];
    return { cells: [{ tex }, unit, ...cellsOf(by((a, b) => a > b)), ...cellsOf(by((a, b) => a < b))] };
  });
  const columns: SheetColumn[] = [
    { title: 'Factored' },
    { title: 'Unit' },
    figureColumn('Most', ''),
    { title: 'under' },
    figureColumn('Least', ''),
    { title: 'under' },
  ];
  return { kind: 'table', name: 'Factored reactions, strength combinations', columns, rows };
}
