/** Changing what stands on a beam: its place, its kind, and taking it away. */
import { type SupportKind, supportLetter } from '@/engine/model';
import { toUnit } from '@/engine/quantity';
import { limitsOf, type Template, type Tree, unitOf } from '@/engine/template';
import type { Written } from '@/features/review/draft';
import { affectAll, parameter } from '../add';
import type { DraftSteps } from '../draft-steps';
import { type Edit, keysOf, listAt, type Pointer, type StatedValues, textAt, valueAt } from '../edit';
import { type NewParameter, SETTLEMENT } from '../entries';
import { isNew, placed, ruleOf, SPRING, type Target } from './add';
import { changing } from './beam-reading';
import { mentionsOf, relettered } from './letters';
import { linearOf } from './linear';
import type { Sketch } from './sketch';

const isOnBeam = (pointer: Pointer): boolean =>
  /^\/beam\/(supports|hinges|segments|loads)\/\d+$/.test(pointer);
const isSupport = (pointer: Pointer): boolean => /^\/beam\/supports\/\d+$/.test(pointer);
const indexOf = (pointer: Pointer): number => Number(keysOf(pointer).at(-1));

/** Why a part cannot be taken away; undefined where it can. */
export function whyKept(document: Written, pointer: Pointer): string | undefined {
  if (!isSupport(pointer)) return undefined;
  const letter = supportLetter(indexOf(pointer));
  return mentionsOf(document, letter).length === 0
    ? undefined
    : `Support ${letter} stays: results, rules or proof cases speak of its reaction. Change those first.`;
}

/** Takes a part away; of the beam, with the parameters that only it spoke of and, of a support, its release. */
export function removal(document: Written, pointer: Pointer): Edit[] {
  if (!isOnBeam(pointer)) return [{ do: 'remove', at: pointer }];
  return changing(document, (steps) => {
    const spoken = wordsOf(valueAt(document, pointer));
    if (isSupport(pointer)) releaseNoMore(steps, indexOf(pointer));
    steps.do({ do: 'remove', at: pointer });
    dropIdle(steps, spoken);
  });
}

const wordsOf = (value: unknown): ReadonlySet<string> =>
  new Set(JSON.stringify(value ?? '').match(/[A-Za-z][A-Za-z0-9]*/g));

/** Before the support goes: its releases go, and those behind it move up a letter. */
function releaseNoMore(steps: DraftSteps, index: number): void {
  const letter = supportLetter(index);
  removeWhere(steps, '/beam/redundants', '/support', letter);
  const count = listAt(steps.document, '/beam/supports').length;
  const letters = new Map(
    Array.from({ length: count }, (_, k) => [supportLetter(k), supportLetter(k > index ? k - 1 : k)]),
  );
  for (const edit of relettered(steps.document, letters)) steps.do(edit);
}

/** Parameters among these that nothing in the document speaks of any more, each with its own rule and dimension. */
function dropIdle(steps: DraftSteps, symbols: ReadonlySet<string>): void {
  for (const symbol of symbols) {
    const index = listAt(steps.document, '/parameters').findIndex((one) => textAt(one, '/symbol') === symbol);
    if (index < 0 || isSpokenOf(steps.document, symbol)) continue;
    removeWhere(steps, '/beam/dimensions', '/symbol', symbol);
    removeWhere(steps, '/rules', '/id', ruleOf(symbol));
    steps.do({ do: 'remove', at: `/parameters/${index}` });
  }
}

/** Whether anything but its own rule and dimension speaks of the symbol. */
function isSpokenOf(document: Written, symbol: string): boolean {
  const { beam, derived, results, proof_cases } = document;
  const dimensions = listAt(beam, '/dimensions').filter((one) => textAt(one, '/symbol') !== symbol);
  const rules = listAt(document, '/rules').filter((rule) => textAt(rule, '/id') !== ruleOf(symbol));
  return wordsOf([{ ...Object(beam), dimensions }, derived, rules, results, proof_cases]).has(symbol);
}

function removeWhere(steps: DraftSteps, list: Pointer, key: Pointer, text: string): void {
  for (const [index, one] of [...listAt(steps.document, list).entries()].reverse())
    if (textAt(one, key) === text) steps.do({ do: 'remove', at: `${list}/${index}` });
}

export type PlaceKey = 'at' | 'from' | 'to';

/** Puts a part, or one end of it, at a place. Supports keep their order from the left; none is put on another. */
export function movedTo(
  document: Written,
  sketch: Sketch,
  pointer: Pointer,
  key: PlaceKey,
  target: Target,
): Edit[] {
  const { supports, length } = sketch.instance.beam;
  const isInOrder = isSupport(pointer) && supports.length === listAt(document, '/beam/supports').length;
  const index = indexOf(pointer);
  const x = isNew(target) ? target.bay.from.x + target.offset : target.x;
  if (isInOrder && supports.some(({ at }, k) => k !== index && Math.abs(at - x) < 1e-9 * length)) return [];
  return changing(document, (steps) => {
    steps.set(`${pointer}/${key}`, placed(steps, target).text);
    if (isInOrder) reorder(steps, index, supports.filter(({ at }, k) => k !== index && at < x).length);
  });
}

/** Puts an entry elsewhere in its list. Supports take their letters along. */
export const reordering = (document: Written, pointer: Pointer, to: number): Edit[] =>
  isSupport(pointer)
    ? changing(document, (steps) => reorder(steps, indexOf(pointer), to))
    : [{ do: 'move', at: pointer, to }];

function reorder(steps: DraftSteps, from: number, to: number): void {
  if (from === to) return;
  const order = listAt(steps.document, '/beam/supports')
    .map((_, k) => k)
    .toSpliced(from, 1)
    .toSpliced(to, 0, from);
  const letters = new Map(order.map((before, after) => [supportLetter(before), supportLetter(after)]));
  for (const edit of relettered(steps.document, letters)) steps.do(edit);
  steps.do({ do: 'move', at: `/beam/supports/${from}`, to });
}

export const SUPPORT_CHOICES = ['fixed', 'pin', 'roller', 'guided', 'free', 'spring', 'turning'] as const;
export type SupportChoice = (typeof SUPPORT_CHOICES)[number];

/** How a support holds: its kind, or the spring that holds where the kind does not. */
export function choiceOf(support: unknown): SupportChoice {
  const kind = textAt(support, '/kind');
  if (textAt(support, '/kr') !== '') return 'turning';
  if (textAt(support, '/kv') !== '') return 'spring';
  return SUPPORT_CHOICES.find((one) => one === kind) ?? 'pin';
}

const KINDS: Readonly<Record<SupportChoice, SupportKind>> = {
  fixed: 'fixed',
  pin: 'pin',
  roller: 'roller',
  guided: 'guided',
  free: 'free',
  spring: 'free',
  turning: 'pin',
};

const TURNING: NewParameter = {
  name: 'Rotational stiffness',
  help: 'Moment for one radian of turn of the support, calculated or tested.',
  dimension: 'rotational_spring',
  default: '6000 kNm/rad',
  min: '1 kNm/rad',
  max: '10000000 kNm/rad',
  step: '100 kNm/rad',
};

/** Makes a support hold in another way; what it moves by goes on where the new kind still holds it. */
export const supportEdits = (document: Written, pointer: Pointer, choice: SupportChoice): Edit[] =>
  changing(document, (steps) => {
    const { kv, kr, rotation, rise, ...support } = Object(valueAt(document, pointer));
    const kind = KINDS[choice];
    const holdsTurning = kind === 'fixed' || kind === 'guided' || choice === 'turning';
    const holdsLifting = kind !== 'guided' && choice !== 'free';
    if (choice === 'spring' || choice === 'turning') affectAll(steps);
    steps.set(pointer, {
      ...support,
      kind,
      ...(choice === 'spring' && { kv: parameter(steps, 'k', SPRING) }),
      ...(choice === 'turning' && { kr: parameter(steps, 'k', TURNING) }),
      ...(holdsLifting && rise && { rise }),
      ...(holdsTurning && rotation && { rotation }),
    });
    dropIdle(steps, wordsOf([kv, kr]));
  });

/** Lets a support settle by a parameter of its own, or not any more. */
export const settlementEdits = (document: Written, pointer: Pointer): Edit[] =>
  changing(document, (steps) => {
    const rise = textAt(document, `${pointer}/rise`);
    if (rise === '') {
      affectAll(steps);
      const name = `Settlement of ${supportLetter(indexOf(pointer))}`;
      steps.set(`${pointer}/rise`, `-${parameter(steps, 's', { ...SETTLEMENT, name })}`);
      return;
    }
    steps.do({ do: 'remove', at: `${pointer}/rise` });
    dropIdle(steps, wordsOf(rise));
  });

export interface Handle {
  /** The length that moves the part when it is dragged. */
  readonly symbol: string;
  readonly value: number;
  readonly min: number;
  readonly max: number;
  readonly step: number;
}

/** The parameter that a place ends with, where it is one: c of "L1 + c". Its shown value follows the hand. */
export function handleOf({ template, values }: Sketch, at: Tree): Handle | null {
  const last = [...(linearOf(at) ?? [])].at(-1);
  if (last?.[1] !== 1) return null;
  const [symbol] = last;
  const parameter = template.parameters.find((one) => one.symbol === symbol);
  const value = values[symbol];
  if (parameter?.kind !== 'quantity' || typeof value !== 'number') return null;
  const { min, max, step } = limitsOf(parameter);
  return { symbol, value, min, max, step };
}

/** The values with this length moved by `by` metres, to its step and within its range. */
export function draggedTo(
  template: Pick<Template, 'parameters'>,
  values: StatedValues,
  { symbol, value, min, max, step }: Handle,
  by: number,
): StatedValues {
  const parameter = template.parameters.find((one) => one.symbol === symbol);
  if (parameter?.kind !== 'quantity') return values;
  const stepped = step > 0 ? Math.round((value + by) / step) * step : value + by;
  const held = Math.min(max, Math.max(min, stepped));
  const unit = unitOf(parameter, 'metric');
  const figure = Number(toUnit(held, unit).toPrecision(12));
  return { ...values, [symbol]: `${figure} ${unit}` };
}
