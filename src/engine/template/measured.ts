import { formatQuantity, readQuantity, UNIT_SYSTEMS, type UnitSystemName } from '../quantity/index';
import type { QuantityParameter } from './parts';

export type Path = readonly (string | number)[];

/** What is wrong with a parameter: the path starts with its symbol. */
export type ParameterFault = { path: Path; code: string; message: string };
export type Reading<T> = { ok: true; value: T } | { ok: false; faults: ParameterFault[] };

export type ValueOptions = {
  /** For fields: the unit system whose units a text without unit takes. Without it such a text is refused. */
  fields?: UnitSystemName | undefined;
};

export const refuse = (
  path: Path,
  code: string,
  message: string,
): { ok: false; faults: ParameterFault[] } => ({
  ok: false,
  faults: [{ path, code, message }],
});

/** The unit in which a parameter is shown and, in a field, typed. */
export const unitOf = (parameter: QuantityParameter, system: UnitSystemName): string =>
  parameter.units?.[system] ?? UNIT_SYSTEMS[system][parameter.dimension].unit;

/** The numbers behind a parameter's texts, SI. The template is checked: its texts read. */
export function limitsOf({
  dimension,
  ...parameter
}: QuantityParameter): Record<'min' | 'max' | 'default' | 'step', number> {
  const read = (text: string): number => {
    const reading = readQuantity(text, dimension);
    return reading.ok ? reading.value : Number.NaN;
  };
  return {
    min: read(parameter.min),
    max: read(parameter.max),
    default: read(parameter.default),
    step: read(parameter.step),
  };
}

export function readMeasured(
  parameter: QuantityParameter,
  given: unknown,
  path: Path,
  options: ValueOptions,
): Reading<number> {
  if (typeof given === 'number') return inRange(parameter, given, path, options);
  if (typeof given !== 'string')
    return refuse(path, 'wrong_type', `${parameter.name}: give a text with its unit, or a number in SI.`);
  const unit = options.fields && unitOf(parameter, options.fields);
  const reading = readQuantity(given, parameter.dimension, { unit });
  return reading.ok
    ? inRange(parameter, reading.value, path, options)
    : refuse(path, reading.code, reading.message);
}

/** A range ends where the last digit of its text does: 40 ft is within "12.192 m", whatever the conversion leaves. */
const SAME = 1e-12;

export function inRange(
  parameter: QuantityParameter,
  value: number,
  path: Path,
  options: ValueOptions,
): Reading<number> {
  if (!Number.isFinite(value))
    return refuse(path, 'not_finite', `${parameter.name} is not a finite number. Give one.`);
  const { min, max } = limitsOf(parameter);
  const slack = SAME * Math.max(Math.abs(min), Math.abs(max));
  if (value >= min - slack && value <= max + slack) return { ok: true, value };
  const unit = unitOf(parameter, options.fields ?? 'metric');
  const [is, least, most] = [value, min, max].map((number) => formatQuantity(number, unit));
  return refuse(path, 'out_of_range', `${parameter.name} is ${is}. Give ${least} to ${most}.`);
}
