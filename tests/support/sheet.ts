import { prepareBeam, solveBeam } from '@/engine/beam';
import { type Combination, groupsOf, stillBeam, supportsMove } from '@/engine/combination';
import { arrangementCount, envelopeTask, SuperposedBeam, solveSources } from '@/engine/envelope';
import { type BeamDocument, readBeam } from '@/engine/model';
import { buildSheet, type SheetBlock, type SheetInput } from '@/engine/sheet';

type Result = SheetInput['result'];
export type Asked = {
  /** What the beam has besides SPAN. */
  readonly beam?: Partial<BeamDocument>;
  readonly combinations?: readonly Combination[];
  readonly patterned?: readonly string[];
  readonly input?: Partial<Omit<SheetInput, 'result'>>;
  readonly result?: Partial<Result>;
};

/** 6 m of 20 MNm² on a pin and a roller. */
const SPAN: BeamDocument = {
  length: 6,
  ei: 20e6,
  supports: [
    { at: 0, kind: 'pin' },
    { at: 6, kind: 'roller' },
  ],
};

export const TEMPLATE: SheetInput['template'] = {
  reference: 'Span 1',
  name: 'A span',
  revision: 4,
  parameters: [],
};

/** A member as it is stored, of which nothing is recorded but what is asked for. */
export const memberOf = ({ input, ...solved }: Asked): SheetInput => ({
  system: 'metric',
  purpose: 'Carries the roof.',
  basis: '',
  template: TEMPLATE,
  parameters: {},
  ownWeight: { acts: false, reason: 'Counted with the floor' },
  patterns: { act: true, reason: '' },
  section: null,
  criteria: null,
  cautions: [],
  ...input,
  result: resultOf(solved),
});

export const sheetOf = (asked: Asked): SheetBlock[] => buildSheet(memberOf(asked));

function resultOf({ beam: given, combinations = [], patterned = [], result }: Omit<Asked, 'input'>): Result {
  const reading = readBeam({ ...SPAN, ...given, horizontal: 'ignore' });
  if (!reading.ok) throw new Error(reading.faults[0]?.message);
  const beam = reading.value;
  const { beam: cut, sources } = envelopeTask(beam, { combinations: [], patterns: [...patterned] });
  const superposed = new SuperposedBeam(
    sources,
    solveSources(prepareBeam(cut), sources).map(({ solution }) => solution),
  );
  const groups = groupsOf(beam.loads).map((group) => {
    const loads = beam.loads.filter((load) => load.group === group);
    return { group, solution: solveBeam({ ...stillBeam(beam), loads }) };
  });
  const moved = { group: 'movements', solution: solveBeam({ ...beam, loads: [] }) };
  return {
    beam,
    ei: 20e6,
    section: null,
    lengths: [],
    load_names: [],
    total: solveBeam(beam),
    groups: supportsMove(beam) ? [...groups, moved] : groups,
    group_reactions: superposed.groupReactions(),
    strength: superposed.combined([...combinations]),
    service: [],
    patterning: {
      groups: patterned,
      arrangements: arrangementCount({ sources, combinations: [...combinations] }),
    },
    checks: null,
    rules: [],
    proof: { equilibrium: 0, compatibility: 0, agreement: 0, arrangements: 1 },
    ...result,
  };
}

type Of<K extends SheetBlock['kind']> = Extract<SheetBlock, { kind: K }>;

export const blocksOf = <K extends SheetBlock['kind']>(blocks: readonly SheetBlock[], kind: K): Of<K>[] =>
  blocks.filter((block): block is Of<K> => block.kind === kind);

export const textsIn = (blocks: readonly SheetBlock[]): string[] =>
  blocksOf(blocks, 'text').map(({ text }) => text);

export const tableIn = (blocks: readonly SheetBlock[], name: string): Of<'table'> | undefined =>
  blocksOf(blocks, 'table').find((one) => one.name === name);

/** The cells of a table's rows, letters as TeX, every space a common one. */
export const rowsIn = (blocks: readonly SheetBlock[], name: string): string[][] =>
  (tableIn(blocks, name)?.rows ?? []).map(({ cells }) =>
    cells.map((cell) => (typeof cell === 'string' ? cell.replaceAll(/[\u00a0\u202f]/g, ' ') : cell.tex)),
  );
