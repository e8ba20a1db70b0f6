import type { CheckRow } from '../check/index';
import { formatUtilisation, type Purpose } from '../quantity/index';
import type { Figures } from './figures';
import type { SheetBlock, SheetInput } from './types';

const purposeOf = ({ kind, dimension }: CheckRow): Purpose =>
  kind === 'deflection' ? 'deflection' : dimension;

/** The checks, governing first, each with its working; what is not checked is said with them. */
export function checkBlocks({ result, section, criteria }: SheetInput, figures: Figures): SheetBlock[] {
  const { checks } = result;
  if (!checks) return [{ kind: 'text', tone: 'warning', text: nothingChecked(section, criteria) }];
  const source = criteria ? `criteria rev ${criteria.revision}` : '';
  const governing = checks.rows[0];
  return [
    {
      kind: 'checks',
      source,
      results: governing ? [{ value: formatUtilisation(governing.ratio), unit: '' }] : [],
      rows: checks.rows.map((row) => {
        const { title, place, clause, demand, capacity, ratio } = row;
        const purpose = purposeOf(row);
        const [d, c] = [figures.value(demand, purpose), figures.whole(capacity, purpose)];
        return { title, place, clause, demand: d, capacity: c, ratio };
      }),
    },
    // A deflection and its limit stand in the table; a stress has a working of its own.
    ...checks.rows.filter(({ kind }) => kind !== 'deflection').map(workingOf),
    { kind: 'text', text: 'Not checked on this sheet:' },
    { kind: 'list', items: checks.not_checked },
  ];
}

/** Fractions at their full size, although they stand in a line. */
const displayed = (tex: string): string => tex.replaceAll('\\frac', '\\dfrac');

const workingOf = ({ title, place, clause, symbols, numbers, ratio }: CheckRow): SheetBlock => ({
  kind: 'formula',
  title: `${title}: ${place}`,
  origin: clause,
  symbols: displayed(symbols),
  numbers: displayed(numbers),
  results: [{ value: formatUtilisation(ratio), unit: ratio <= 1 ? 'passes' : 'fails' }],
});

function nothingChecked(section: unknown, criteria: unknown): string {
  if (!section && !criteria) return 'Nothing is checked: no section and no criteria are chosen.';
  return section
    ? 'Nothing is checked: no criteria are chosen.'
    : 'Nothing is checked: no section is chosen.';
}
