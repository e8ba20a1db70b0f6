import { useMemo, useState } from 'react';
import { type InfluenceLine, type TrainExtreme, worstTrain } from '@/engine/influence';
import type { Beam } from '@/engine/model';
import type { UnitSystemName } from '@/engine/quantity';
import { solveAbsoluteMoment } from '@/features/beam/further';
import type { StandingTrain } from './influence-layout';
import { DIRECTIONS, firstTrain, readTrain, type Way, type WheelEntry } from './train-entry';

export type End = 'max' | 'min';

/** The train that a person has set up, where it is worst for the line, and the moment it makes anywhere. */
export function useTrain(beam: Beam, influence: InfluenceLine | null, system: UnitSystemName) {
  const [rows, setRows] = useState<readonly WheelEntry[]>(() => firstTrain(system));
  const [way, setWay] = useState<Way>('both');
  const [picked, setPicked] = useState<End | null>(null);
  const reading = useMemo(() => readTrain(rows), [rows]);
  const worst = useMemo(
    () => (influence && reading.ok ? worstTrain(influence.line, reading.wheels, DIRECTIONS[way]) : null),
    [influence, reading, way],
  );
  const absolute = useMemo(
    () =>
      reading.ok
        ? solveAbsoluteMoment({ beam }, { wheels: reading.wheels, directions: DIRECTIONS[way] })
        : null,
    [beam, reading, way],
  );
  const end: End = picked ?? (worst && -worst.min.value > worst.max.value ? 'min' : 'max');
  const shown: TrainExtreme | null = worst?.[end] ?? null;
  const standing = useMemo(
    (): StandingTrain | null =>
      shown && reading.ok ? { forces: reading.wheels.map(({ force }) => force), wheels: shown.wheels } : null,
    [shown, reading],
  );
  return { rows, setRows, way, setWay, end, setEnd: setPicked, reading, worst, absolute, shown, standing };
}

export type TrainState = ReturnType<typeof useTrain>;
