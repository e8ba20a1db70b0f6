import { supportLetter } from '../model/index';
import { expressionFaults, type TemplateFault } from './check-expression';
import type { Kinds } from './dimension';
import type { Template } from './document';
import { loadSymbols } from './loads';
import type { Path } from './measured';
import { columnKinds, kindsOf } from './scope';

type Beam = Template['beam'];
type LoadTemplate = Beam['loads'][number];
type Written = LoadTemplate['when'];
type Wanted = Parameters<typeof expressionFaults>[1];

type Part = readonly [key: string, expression: Written, wanted: Wanted];

/** Faults of the beam's expressions, and of what they speak of. */
export function checkBeam(template: Template): TemplateFault[] {
  const kinds = kindsOf(template);
  const { beam } = template;
  const faults = (path: Path, parts: readonly Part[], scope: Kinds = kinds): TemplateFault[] =>
    parts.flatMap(([key, expression, wanted]) =>
      expressionFaults(expression, wanted, scope, ['beam', ...path, key]),
    );
  const span = ({ from, to }: Beam['dimensions'][number] | NonNullable<Beam['segments']>[number]): Part[] => [
    ['from', from, 'length'],
    ['to', to, 'length'],
  ];
  return [
    ...faults(
      [],
      [
        ['length', beam.length, 'length'],
        ['own_weight', beam.own_weight, 'ratio'],
      ],
    ),
    ...beam.supports.flatMap((support, index) => faults(['supports', index], partsOfSupport(support))),
    ...(beam.hinges ?? []).flatMap(({ at, when }, index) =>
      faults(
        ['hinges', index],
        [
          ['at', at, 'length'],
          ['when', when, 'condition'],
        ],
      ),
    ),
    ...(beam.segments ?? []).flatMap((segment, index) =>
      faults(['segments', index], [...span(segment), ['ei', segment.ei, 'ratio']]),
    ),
    ...beam.loads.flatMap((load, index) => [
      ...faults(['loads', index], partsOf(load), scopeOfLoad(template, kinds, load)),
      ...loadFaults(template, load, ['beam', 'loads', index]),
    ]),
    ...redundantFaults(beam, kinds),
    ...beam.dimensions.flatMap((dimension, index) => [
      ...faults(['dimensions', index], [...span(dimension), ['when', dimension.when, 'condition']]),
      ...(kinds.get(dimension.symbol)?.is === 'number'
        ? []
        : [unknownSymbol(dimension.symbol, ['beam', 'dimensions', index, 'symbol'])]),
    ]),
  ];
}

const partsOfSupport = ({ at, kv, kr, rise, rotation, when }: Beam['supports'][number]): Part[] => [
  ['at', at, 'length'],
  ['kv', kv, 'spring'],
  ['kr', kr, 'rotational_spring'],
  ['rise', rise, 'length'],
  ['rotation', rotation, 'rotation'],
  ['when', when, 'condition'],
];

function partsOf(load: LoadTemplate): Part[] {
  const when: Part = ['when', load.when, 'condition'];
  switch (load.kind) {
    case 'point':
      return [['at', load.at, 'length'], ['p', load.p, 'force'], when];
    case 'line':
      return [
        ['from', load.from, 'length'],
        ['to', load.to, 'length'],
        ['w0', load.w0, 'line_load'],
        ['w1', load.w1, 'line_load'],
        when,
      ];
    case 'couple':
      return [['at', load.at, 'length'], ['m', load.m, 'moment'], when];
    case 'curvature':
      return [
        ['from', load.from, 'length'],
        ['to', load.to, 'length'],
        ['kappa', load.kappa, 'curvature'],
        when,
      ];
  }
}

const rowsOfLoad = (template: Template, load: LoadTemplate) => {
  const parameter = template.parameters.find(({ symbol }) => symbol === load.repeat);
  return parameter?.kind === 'rows' ? parameter : undefined;
};

const scopeOfLoad = (template: Template, kinds: Kinds, load: LoadTemplate): Kinds =>
  new Map([...kinds, ...columnKinds(rowsOfLoad(template, load)?.columns ?? [])]);

/** A load must be sized by a load parameter, or nobody could say which group it belongs to. */
function loadFaults(template: Template, load: LoadTemplate, path: Path): TemplateFault[] {
  if (load.repeat !== undefined && !rowsOfLoad(template, load))
    return [unknownSymbol(load.repeat, [...path, 'repeat'])];
  const own = rowsOfLoad(template, load)?.columns ?? template.parameters;
  const all = [...loadSymbols(template, load)];
  const symbols = all.filter((symbol) => own.some((one) => one.symbol === symbol));
  if (symbols.length === 0)
    return [{ path, code: 'no_group', message: 'Size this load by a parameter that has a load group.' }];
  if (symbols.length === all.length) return [];
  const message =
    load.repeat === undefined
      ? 'Size this load without the columns of a list. Repeat another over the list.'
      : 'Size a repeated load by the columns of its list alone.';
  return [{ path, code: 'mixed', message }];
}

function redundantFaults(beam: Beam, kinds: Kinds): TemplateFault[] {
  const letters = beam.supports.map((_, index) => supportLetter(index));
  return beam.redundants.flatMap((redundant, index) => {
    const path = ['beam', 'redundants', index];
    const when = expressionFaults(redundant.when, 'condition', kinds, [...path, 'when']);
    if ('at' in redundant)
      return [...when, ...expressionFaults(redundant.at, 'length', kinds, [...path, 'at'])];
    if (letters.includes(redundant.support)) return when;
    const message = `There is no support ${redundant.support}. Use ${letters.join(', ')}.`;
    return [...when, { path: [...path, 'support'], code: 'unknown_support', message }];
  });
}

const unknownSymbol = (symbol: string, path: Path): TemplateFault => ({
  path,
  code: 'unknown_symbol',
  message: `There is no “${symbol}” that fits here. Name a parameter or derived value.`,
});
