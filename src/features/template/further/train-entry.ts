/** What stands in the rows of a train, exactly as typed, and the wheels that it says. */
import type { Direction, Wheel } from '@/engine/influence';
import { readQuantity, UNIT_SYSTEMS, type UnitSystemName } from '@/engine/quantity';
import type { Entry } from '../raw';

/** A wheel: how far behind the one ahead of it, and its force. The first has nothing ahead. */
export interface WheelEntry {
  readonly spacing: Entry;
  readonly force: Entry;
}

export type Way = 'right' | 'left' | 'both';
export const DIRECTIONS: Readonly<Record<Way, readonly Direction[]>> = {
  right: ['right'],
  left: ['left'],
  both: ['right', 'left'],
};

export const MOST_WHEELS = 20;

const START = {
  metric: { spacing: '2', force: '50' },
  us: { spacing: `6'`, force: '10' },
} as const;

/** One more wheel, like those that a train begins with. */
export function newWheel(system: UnitSystemName, isFirst: boolean): WheelEntry {
  const { length, force } = UNIT_SYSTEMS[system];
  const start = START[system];
  return {
    spacing: { text: isFirst ? '0' : start.spacing, unit: length.unit },
    force: { text: start.force, unit: force.unit },
  };
}

export const firstTrain = (system: UnitSystemName): WheelEntry[] => [
  newWheel(system, true),
  newWheel(system, false),
];

export interface WheelFaults {
  readonly spacing?: string | undefined;
  readonly force?: string | undefined;
}

export type TrainReading =
  | { readonly ok: true; readonly wheels: readonly Wheel[] }
  | { readonly ok: false; readonly faults: readonly WheelFaults[] };

/** The wheels, each at its distance behind the front; or what is wrong, row by row. */
export function readTrain(rows: readonly WheelEntry[]): TrainReading {
  let offset = 0;
  const read = rows.map((row, i) => {
    const spacing =
      i === 0 ? { ok: true as const, value: 0 } : readQuantity(row.spacing.text, 'length', row.spacing);
    const force = readQuantity(row.force.text, 'force', row.force);
    const faults: WheelFaults = {
      spacing: spacing.ok
        ? spacing.value < 0
          ? 'The spacing is less than zero. Give how far this wheel is behind the one before.'
          : undefined
        : spacing.message,
      force: force.ok
        ? force.value > 0
          ? undefined
          : 'The force of a wheel must be more than zero.'
        : force.message,
    };
    offset += spacing.ok ? spacing.value : 0;
    return { faults, wheel: { offset, force: force.ok ? force.value : 0 } };
  });
  return read.some(({ faults }) => faults.spacing !== undefined || faults.force !== undefined)
    ? { ok: false, faults: read.map(({ faults }) => faults) }
    : { ok: true, wheels: read.map(({ wheel }) => wheel) };
}
