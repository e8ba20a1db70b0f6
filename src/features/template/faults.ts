import type { Template } from '@/engine/template';
import type { Fault } from '@/lib/app-error';

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

export const toCauses = ({ parameters }: Pick<Template, 'parameters'>, faults: readonly Fault[]): Cause[] =>
  faults.map(({ pointer, message }) => {
    const [symbol = ''] = pointer.startsWith(UNDER) ? pointer.slice(UNDER.length).split('/') : [];
    const parameter = parameters.find((one) => one.symbol === symbol);
    return {
      symbol: parameter?.symbol ?? null,
      title: parameter ? parameter.name : pointer === '/ei' ? 'Bending stiffness' : 'These values together',
      message,
    };
  });

/** "Two inputs stop the drawing". */
export function stopTitle(causes: readonly Cause[]): string {
  const count = new Set(causes.map(({ title }) => title)).size;
  const words = ['Nothing', 'One input', 'Two inputs', 'Three inputs', 'Four inputs', 'Five inputs'];
  const said = words[count] ?? `${count} inputs`;
  return `${said} ${count === 1 ? 'stops' : 'stop'} the drawing`;
}
