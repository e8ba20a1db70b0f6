import type { Template } from '@/engine/template';
import type { Fault } from '@/lib/app-error';
import { drawnName } from './names';

/** What is wrong, by its place in the fields: "L", "w/G", "loads/1/x"; '' for what has none. */
export type FieldFaults = ReadonlyMap<string, string>;

const UNDER = '/parameters/';

export const fieldFaults = (faults: readonly Fault[]): FieldFaults =>
  new Map(
    faults.map(({ pointer, message }) => [
      pointer.startsWith(UNDER) ? pointer.slice(UNDER.length) : pointer.replace(/^\//, ''),
      message,
    ]),
  );

/** One thing to put right, as the list beside the drawing says it. */
export interface Cause {
  readonly symbol: string | null;
  /** Short: "Span L". */
  readonly title: string;
  readonly message: string;
}

/** What stands beside the parameters. */
const TITLES: Readonly<Record<string, string>> = { '/ei': 'Bending stiffness', '/axial': 'Axial force' };

export const toCauses = ({ parameters }: Pick<Template, 'parameters'>, faults: readonly Fault[]): Cause[] =>
  faults.map(({ pointer, message }) => {
    const [symbol = ''] = pointer.startsWith(UNDER) ? pointer.slice(UNDER.length).split('/') : [];
    const parameter = parameters.find((one) => one.symbol === symbol);
    return {
      symbol: parameter?.symbol ?? null,
      title: parameter?.name ?? TITLES[pointer] ?? 'These values together',
      message,
    };
  });

/** What was given, and what to give instead: the first sentence of a message, and the rest. */
export function saidAndAdvice(message: string): [said: string, advice: string] {
  const end = message.indexOf('. ');
  return end < 0 ? [message, ''] : [message.slice(0, end), message.slice(end + 2)];
}

/** The first length that is wrong, for the cloud over the dimensions of the last good drawing. */
export function toDrawingFault({ parameters }: Pick<Template, 'parameters'>, causes: readonly Cause[]) {
  for (const { symbol, message } of causes) {
    const parameter = parameters.find((one) => one.symbol === symbol);
    if (parameter?.kind !== 'quantity' || parameter.dimension !== 'length') continue;
    const [text, advice] = saidAndAdvice(message);
    return { text, advice, place: drawnName(parameter.tex) };
  }
  return undefined;
}

const NUMBERS = ['No inputs', 'One input', 'Two inputs', 'Three inputs', 'Four inputs', 'Five inputs'];

/** "Two inputs". */
function inputsIn(causes: readonly Cause[]): string {
  const count = new Set(causes.map(({ title }) => title)).size;
  return NUMBERS[count] ?? `${count} inputs`;
}

/** "Two inputs stop the drawing". */
export function stopTitle(causes: readonly Cause[]): string {
  const said = inputsIn(causes);
  return `${said} ${said === NUMBERS[1] ? 'stops' : 'stop'} the drawing`;
}

/** Why nothing goes on from inputs that fail: "Two inputs to put right first". */
export const putRightFirst = (causes: readonly Cause[]): string => `${inputsIn(causes)} to put right first`;
