import type { Extremes } from '../beam/index';
import type { ArrangementNamer } from '../combination/index';
import { namerOf } from './combinations';
import { type Figures, shareText } from './figures';
import { groupText } from './givens';
import type { SheetBlock, SheetColumn, SheetInput, SheetRow } from './types';

type Loaded = { readonly name: string; readonly extremes: Extremes; readonly strong?: boolean };

/** What the supports do by themselves is a group of its own. */
const loadsText = (group: string): string =>
  group === 'movements' ? 'Movements of supports' : groupText(group);

/** Forces and deflections of each group, of all together, and of the combinations. */
export function resultBlocks({ result, criteria }: SheetInput, figures: Figures): SheetBlock[] {
  const { groups, total, strength, service, proof } = result;
  const unfactored: Loaded[] = [
    ...groups.map(({ group, solution }) => ({ name: loadsText(group), extremes: solution.extremes })),
    { name: 'All together, unfactored', extremes: total.extremes, strong: true },
  ];
  const combined = (list: typeof strength): Loaded[] =>
    list.map(({ combination, extremes }) => ({ name: combination.name, extremes }));
  const nameOf = namerOf(result);
  return [
    forcesTable([...unfactored, ...combined(strength)], figures),
    ...(criteria
      ? [{ kind: 'text', tone: 'note', text: `Combinations: ${indexed(criteria.basis)}.` } as const]
      : []),
    deflectionTable([...unfactored, ...onlyOnce(combined(service))], figures),
    ...governingTable(result, nameOf, figures),
    {
      kind: 'text',
      tone: 'note',
      text: `Two methods, force method and direct stiffness, agree within ${shareText(proof.agreement)} of the largest value. Equilibrium closes within ${shareText(proof.equilibrium)} and compatibility within ${shareText(proof.compatibility)}: the worst of ${proof.arrangements} load cases solved.`,
    },
  ];
}

/** f_y and γ_M0 of a text with their indices marked: f_{y}, γ_{M0}. */
const indexed = (text: string): string => text.replaceAll(/(?<=\p{L})_(\w+)/gu, '_{$1}');

/** Several limits may be about one combination. */
const onlyOnce = (loaded: readonly Loaded[]): Loaded[] => [
  ...new Map(loaded.map((one) => [one.name, one])).values(),
];

const place = (at: readonly number[], figures: Figures): string =>
  at[0] === undefined ? '' : figures.value(at[0], 'position');

function forcesTable(loaded: readonly Loaded[], figures: Figures): SheetBlock {
  const moment = figures.unit('moment');
  const at = figureColumn('at', figures.unit('position'));
  return {
    kind: 'table',
    name: 'Shear and moment',
    columns: [
      { title: 'Loads' },
      figureColumn('Most shear', figures.unit('force')),
      figureColumn('Sagging', moment),
      at,
      figureColumn('Hogging', moment),
      at,
    ],
    rows: loaded.map(({ name, extremes: { shear, moment: m }, strong }): SheetRow => {
      const most = Math.max(Math.abs(shear.max.value), Math.abs(shear.min.value));
      const cells = [
        name,
        figures.value(most, 'force'),
        ...peak(m.max.value, m.max.at, 'moment', figures),
        ...peak(m.min.value, m.min.at, 'moment', figures, -1),
      ];
      return strong ? { cells, strong } : { cells };
    }),
  };
}

/** Down is positive on a sheet; the engine's deflections are positive up. */
function deflectionTable(loaded: readonly Loaded[], figures: Figures): SheetBlock {
  const unit = figures.unit('deflection');
  const at = figureColumn('at', figures.unit('position'));
  return {
    kind: 'table',
    name: 'Deflection',
    columns: [{ title: 'Loads' }, figureColumn('Most down', unit), at, figureColumn('Most up', unit), at],
    rows: loaded.map(({ name, extremes: { deflection }, strong }): SheetRow => {
      const cells = [
        name,
        ...peak(-deflection.min.value, deflection.min.at, 'deflection', figures),
        ...peak(deflection.max.value, deflection.max.at, 'deflection', figures),
      ];
      return strong ? { cells, strong } : { cells };
    }),
  };
}

/** What gives the greatest figures of all: the loads that act at once, over all combinations and patterns. */
function governingTable(
  { strength, service }: SheetInput['result'],
  nameOf: ArrangementNamer,
  figures: Figures,
): SheetBlock[] {
  const rowOf = (
    title: string,
    quantity: 'shear' | 'moment' | 'deflection',
    purpose: 'force' | 'moment' | 'deflection',
    sense: 1 | -1,
  ): SheetRow[] => {
    const side = sense > 0 ? 'max' : 'min';
    const all = (quantity === 'deflection' ? service : strength).map(
      ({ extremes }) => extremes[quantity][side],
    );
    const [first, ...others] = all;
    if (!first) return [];
    const most = others.reduce((a, b) => (sense * b.value > sense * a.value ? b : a), first);
    // Down is positive on a sheet.
    const shown = quantity === 'deflection' ? -most.value : most.value;
    const text = figures.value(shown, purpose);
    if (!(sense * most.value > 0 && /[1-9]/.test(text))) return [];
    return [{ cells: [title, text, figures.unit(purpose), place(most.at, figures), nameOf(most)] }];
  };
  const rows = [
    ...rowOf('Shear, most', 'shear', 'force', 1),
    ...rowOf('Shear, least', 'shear', 'force', -1),
    ...rowOf('Sagging', 'moment', 'moment', 1),
    ...rowOf('Hogging', 'moment', 'moment', -1),
    ...rowOf('Deflection down', 'deflection', 'deflection', -1),
    ...rowOf('Deflection up', 'deflection', 'deflection', 1),
  ];
  const columns = [
    { title: 'Governing' },
    figureColumn('Value', ''),
    { title: 'Unit' },
    figureColumn('at', figures.unit('position')),
    { title: 'under' },
  ];
  return rows.length > 0 ? [{ kind: 'table', name: 'Governing loads', columns, rows }] : [];
}

/** A peak of the sense asked for and its place; none where everything is of the other. */
function peak(
  value: number,
  at: readonly number[],
  purpose: 'moment' | 'deflection',
  figures: Figures,
  sense: 1 | -1 = 1,
): [string, string] {
  const text = figures.value(value, purpose);
  const is = sense * value > 0 && /[1-9]/.test(text);
  return is ? [text, place(at, figures)] : ['–', ''];
}

export const figureColumn = (title: string, unit: string): SheetColumn => ({ title, unit, figures: true });
