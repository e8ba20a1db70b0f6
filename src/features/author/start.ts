/** What a new template begins with: a beam with its parameters and a uniform load. */
import type { Written } from '@/features/review/draft';
import { type Added, addLine, addOverhang, addSpan } from './add';
import { redescribe } from './describe';
import { DraftSteps } from './draft-steps';
import { FREE_LENGTH, quantity, SPAN, STIFFNESS } from './entries';
import { renameEdits } from './rename';

export const STARTS = {
  'simple-span': 'Simple span',
  cantilever: 'Cantilever',
  propped: 'Propped cantilever',
  'fixed-ends': 'Fixed at both ends',
  overhang: 'Span with an overhang',
  'double-overhang': 'Span with two overhangs',
  'two-spans': 'Two spans',
  'two-spans-overhang': 'Two spans with an overhang',
  spans: 'Several spans',
} as const;
export type Start = keyof typeof STARTS;

export const MOST_SPANS = 6;

const ENDS: Readonly<Record<'simple-span' | 'propped' | 'fixed-ends', readonly [string, string]>> = {
  'simple-span': ['pin', 'roller'],
  propped: ['fixed', 'roller'],
  'fixed-ends': ['fixed', 'fixed'],
};

/** A whole beam with a uniform load; what only its author can say is left for them to write. */
export function startDocument(title: string, start: Start, spans = 3): Written {
  const steps = new DraftSteps(blank(title, start));
  const take = (add: (document: Written) => Added) => {
    for (const edit of add(steps.document).edits) steps.do(edit);
  };
  const more = { 'two-spans': 1, 'two-spans-overhang': 1, spans: spans - 1 }[start as string] ?? 0;
  for (let span = 0; span < more; span++) take(addSpan);
  if (more > 0) numberFirst(steps);
  if (start.includes('overhang')) take((document) => addOverhang(document, 'right'));
  if (start === 'double-overhang') take((document) => addOverhang(document, 'left'));
  take((document) => addLine(document, 'uniform', null));
  return steps.document;
}

/** The first of several spans is the first by name too. */
function numberFirst(steps: DraftSteps): void {
  const before = steps.document;
  for (const edit of renameEdits(before, '/parameters/0', 'L', 'L1')) steps.do(edit);
  steps.set('/parameters/0/name', 'Span 1');
  redescribe(steps, before);
}

function blank(title: string, start: Start): Written {
  const isCantilever = start === 'cantilever';
  const [left, right] = ENDS[start as keyof typeof ENDS] ?? ENDS['simple-span'];
  const supports = [
    { at: '0', kind: isCantilever ? 'fixed' : left },
    ...(isCantilever ? [] : [{ at: 'L', kind: right }]),
  ];
  return {
    name: title,
    tags: [],
    summary: '',
    you_give: '',
    you_get: '',
    use: [],
    do_not_use: [],
    method: '',
    parameters: [quantity('L', isCantilever ? FREE_LENGTH : SPAN)],
    derived: [],
    beam: {
      length: 'L',
      supports,
      loads: [],
      redundants: [],
      dimensions: [{ from: '0', to: 'L', symbol: 'L' }],
    },
    stiffness: STIFFNESS,
    rules: [],
    results: [],
    sources: [],
    proof_cases: [],
  };
}

/** An address for a title: "Two spans, uniform load" as two-spans-uniform-load; '' where nothing of it can be one. */
export const addressOf = (title: string): string =>
  title
    .normalize('NFKD')
    .toLowerCase()
    .replaceAll(/[^a-z0-9]+/g, '-')
    .replace(/^[^a-z]+/, '')
    .slice(0, 80)
    .replace(/-+$/, '');
