/** Changing what stands on a beam: its place, its kind, and taking it away. */
import { type SupportKind, supportLetter } from '@/engine/model';
import { toUnit } from '@/engine/quantity';
import { limitsOf, type Template, unitOf } from '@/engine/template';
import type { Written } from '@/features/review/draft';
import {
  applyEdits,
  type Edit,
  keysOf,
  listAt,
  type Pointer,
  type StatedValues,
  textAt,
  valueAt,
} from '../edit';
import { resolved, type Target } from './add';
import { mentionsOf, relettered } from './letters';
import { linearOf } from './linear';
import { newParameter } from './parameters';
import { withReleases } from './releases';
import type { Sketch } from './sketch';

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

/** Takes a part away, with the parameters that only it spoke of and, of a support, its release. */
export function removal(document: Written, pointer: Pointer): Edit[] {
  const own: Edit = { do: 'remove', at: pointer };
  const spoken = new Set(JSON.stringify(valueAt(document, pointer))?.match(/[A-Za-z][A-Za-z0-9]*/g));
  const left = applyEdits(document, [own]).document;
  const idle = idleParameters(left, spoken);
  if (!isSupport(pointer)) return withReleases(document, [own, ...idle]);
  const index = indexOf(pointer);
  const count = listAt(document, '/beam/supports').length;
  const released: Edit[] = listAt(document, '/beam/redundants')
    .flatMap((one, k) => (textAt(one, '/support') === supportLetter(index) ? [k] : []))
    .reverse()
    .map((k) => ({ do: 'remove', at: `/beam/redundants/${k}` }));
  const bare = applyEdits(document, released).document;
  const letters = new Map(
    Array.from({ length: count }, (_, k) => [supportLetter(k), supportLetter(k > index ? k - 1 : k)]),
  );
  return withReleases(document, [...released, ...relettered(bare, letters), own, ...idle]);
}

/** Those of the symbols that nothing in the document speaks of any more, last first, each with its own rule and dimension. */
function idleParameters(document: Written, symbols: ReadonlySet<string>): Edit[] {
  const { beam, derived, rules, results, proof_cases } = document;
  const ownRule = (symbol: string) => `${symbol.toLowerCase()}-within`;
  return listAt(document, '/parameters')
    .flatMap((one, index) => {
      const symbol = textAt(one, '/symbol');
      if (!symbols.has(symbol)) return [];
      const others = {
        ...Object(beam),
        dimensions: listAt(beam, '/dimensions').filter((each) => textAt(each, '/symbol') !== symbol),
      };
      const said = JSON.stringify([
        others,
        derived,
        listAt({ rules }, '/rules').filter((rule) => textAt(rule, '/id') !== ownRule(symbol)),
        results,
        proof_cases,
      ]);
      return new RegExp(`\\b${symbol}\\b`).test(said) ? [] : [{ symbol, index }];
    })
    .reverse()
    .flatMap(({ symbol, index }): Edit[] => [
      ...removedWhere(document, '/beam/dimensions', '/symbol', symbol),
      ...removedWhere(document, '/rules', '/id', ownRule(symbol)),
      { do: 'remove', at: `/parameters/${index}` },
    ]);
}

const removedWhere = (document: Written, list: Pointer, key: Pointer, text: string): Edit[] =>
  listAt(document, list)
    .flatMap((one, index) => (textAt(one, key) === text ? [index] : []))
    .reverse()
    .map((index) => ({ do: 'remove', at: `${list}/${index}` }));

export type PlaceKey = 'at' | 'from' | 'to';

/** Puts a part, or one end of it, at a place. Supports keep their order from the left. */
export function movedTo(
  document: Written,
  sketch: Sketch,
  pointer: Pointer,
  key: PlaceKey,
  target: Target,
): Edit[] {
  const { text, x, edits } = resolved(document, target);
  const set: Edit = { do: 'set', at: `${pointer}/${key}`, value: text };
  const { supports, length } = sketch.instance.beam;
  const count = listAt(document, '/beam/supports').length;
  const index = indexOf(pointer);
  if (!isSupport(pointer) || supports.length !== count) return withReleases(document, [...edits, set]);
  const isTaken = supports.some(({ at }, k) => k !== index && Math.abs(at - x) < 1e-9 * length);
  if (isTaken) return [];
  const to = supports.filter(({ at }, k) => k !== index && at < x).length;
  if (to === index) return withReleases(document, [...edits, set]);
  const order = supports
    .map((_, k) => k)
    .toSpliced(index, 1)
    .toSpliced(to, 0, index);
  const letters = new Map(order.map((before, after) => [supportLetter(before), supportLetter(after)]));
  return withReleases(document, [
    ...edits,
    set,
    ...relettered(document, letters),
    { do: 'move', at: pointer, to },
  ]);
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

/** Makes a support hold in another way; what it moves by goes on where the new kind still holds it. */
export function supportEdits(document: Written, pointer: Pointer, choice: SupportChoice): Edit[] {
  const { kv: _, kr: __, rotation, rise, ...support } = Object(valueAt(document, pointer));
  const spring =
    choice === 'spring' || choice === 'turning'
      ? newParameter(document, choice === 'spring' ? 'spring' : 'turning')
      : null;
  const kind = KINDS[choice];
  const turnsHeld = kind === 'fixed' || kind === 'guided' || choice === 'turning';
  const liftHeld = kind !== 'guided' && choice !== 'free';
  const value = {
    ...support,
    kind,
    ...(spring && { [choice === 'spring' ? 'kv' : 'kr']: spring.symbol }),
    ...(liftHeld && rise && { rise }),
    ...(turnsHeld && rotation && { rotation }),
  };
  const edits: Edit[] = [...(spring ? [spring.edit] : []), { do: 'set', at: pointer, value }];
  const spoken = new Set(
    [valueAt(document, `${pointer}/kv`), valueAt(document, `${pointer}/kr`)].map((text) => String(text)),
  );
  const after = applyEdits(document, edits).document;
  return withReleases(document, [...edits, ...idleParameters(after, spoken)]);
}

/** Lets a support settle by a parameter of its own, or not any more. */
export function settlementEdits(document: Written, pointer: Pointer): Edit[] {
  const rise = textAt(document, `${pointer}/rise`);
  if (rise === '') {
    const { symbol, edit } = newParameter(document, 'settlement');
    return [edit, { do: 'set', at: `${pointer}/rise`, value: `-${symbol}` }];
  }
  const removed: Edit = { do: 'remove', at: `${pointer}/rise` };
  const after = applyEdits(document, [removed]).document;
  return [removed, ...idleParameters(after, new Set(rise.match(/[A-Za-z][A-Za-z0-9]*/g)))];
}

export interface Handle {
  /** The length that moves the part when it is dragged. */
  readonly symbol: string;
  readonly value: number;
  readonly min: number;
  readonly max: number;
  readonly step: number;
}

/** The parameter that a place ends with, where it is one: c of "L1 + c". Its shown value follows the hand. */
export function handleOf({ template, values }: Sketch, at: Template['beam']['length']): Handle | null {
  const last = [...(linearOf(at.tree) ?? [])].at(-1);
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
