import type { CaseRow, ChartCase, Formulas, ReleasedKind } from './case';
import { CASES } from './cases';
import type { Expression } from './expression';
import { formula } from './formula';

/** A formula is read when it is first asked for: one derivation needs few of them. */
function curve([deflection, slope]: Formulas): ChartCase['within'] {
  const read: { deflection?: Expression; slope?: Expression } = {};
  return {
    get deflection() {
      read.deflection ??= formula(deflection);
      return read.deflection;
    },
    get slope() {
      read.slope ??= formula(slope);
      return read.slope;
    },
  };
}

const read = ({ within, beyond, ...row }: CaseRow): ChartCase => ({
  ...row,
  released: row.id.slice(0, row.id.indexOf('-')) as ReleasedKind,
  within: curve(within),
  beyond: beyond ? curve(beyond) : null,
});

/** The register, in the order of the printed tables: cantilevers, simple spans, spans with a guided end. */
export const CHART: readonly ChartCase[] = CASES.map(read);

const BY_ID: ReadonlyMap<string, ChartCase> = new Map(CHART.map((entry) => [entry.id, entry]));

/** A case by its id. Fails with RangeError for an id that is not in the register. */
export function chart(id: string): ChartCase {
  const found = BY_ID.get(id);
  if (!found) throw new RangeError(`no chart case is called ${id}`);
  return found;
}
