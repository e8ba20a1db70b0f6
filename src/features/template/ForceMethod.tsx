import { memo, useMemo, useRef } from 'react';
import { forceMethodPictures } from '@/components/drawing/force-method-pictures';
import { PictureEquation } from '@/components/drawing/PictureEquation';
import { DRAWING_FORMATS } from '@/components/drawing/quantity-format';
import { ZoneHeading } from '@/components/ui/ZoneHeading';
import { forceMethod, type Solution } from '@/engine/beam';
import { type Beam, checkRedundants, type Redundant } from '@/engine/model';
import type { UnitSystemName } from '@/engine/quantity';
import type { Instance } from '@/engine/template';
import { Derivation, type Worked } from './Derivation';
import { RedundantChoice } from './RedundantChoice';
import { type Release, releaseKey, toRedundant, toRelease } from './release';
import { useInSight, useLater, useNear, useRestedValue } from './use-live';
import type { WorkedSteps } from './worked';

/** A beam that was solved, with the letters of its template. */
interface SolvedCase {
  readonly beam: Beam;
  readonly instance: Pick<Instance, 'dimensions' | 'loadNames'>;
  readonly solution: Solution;
}

interface ForceMethodProps {
  /** Changes when the hand rests; a new object is a new case. */
  readonly solved: SolvedCase;
  /** What the person released; null for the template's own choice. */
  readonly releases: readonly Release[] | null;
  /** What it is worked in. */
  readonly system: UnitSystemName;
  readonly onChoose: (releases: readonly Release[]) => void;
  /** Shown until the script that works them is here. */
  readonly initial: WorkedSteps;
  /** Which values it is worked with. */
  readonly note?: string | undefined;
  /** Letters of the two zones. */
  readonly letters?: readonly [string, string];
}

/** After the worked steps. */
const PICTURES_MS = 60;

const loadKit = () => import('./derivation-kit');

/** The choice of redundant, and compatibility worked with it. */
export const ForceMethod = memo(function ForceMethod({
  solved,
  releases,
  system,
  onChoose,
  initial,
  note = 'With these numbers',
  letters = ['C', 'D'],
}: ForceMethodProps) {
  const host = useRef<HTMLDivElement>(null);
  const kit = useLater(loadKit, useNear(host));
  const { beam, solution } = solved;
  const redundants = useMemo(() => redundantsOf(solved, releases), [solved, releases]);
  // The worked steps come first; the pictures follow them.
  const pictured = useInSight(
    host,
    useRestedValue(
      useMemo(() => ({ beam, solution, redundants }), [beam, solution, redundants]),
      PICTURES_MS,
    ),
  );
  const worked = useMemo(
    () => kit && work(kit, solved, redundants, system),
    [kit, solved, redundants, system],
  );
  const shown = worked ?? {
    steps: initial.steps,
    formulaOf: (index: number) => initial.formulas[index] ?? '',
  };
  const chosen = releaseKey(redundants.flatMap((one) => toRelease(beam, one) ?? []));
  return (
    <div ref={host}>
      <ZoneHeading
        letter={letters[0]}
        note={beam.degree > 0 ? 'Every choice gives the same answer.' : undefined}
      >
        Redundant
      </ZoneHeading>
      <Choice beam={pictured.beam} chosen={chosen} onChoose={onChoose} />
      <div className="mt-20">
        <ZoneHeading letter={letters[1]} note={note}>
          {beam.degree > 0 ? 'Compatibility, worked' : 'Worked'}
        </ZoneHeading>
        {beam.degree > 0 && <Equation {...pictured} system={system} />}
        <Derivation steps={shown.steps} formulaOf={shown.formulaOf} />
      </div>
    </div>
  );
});

const Choice = memo(RedundantChoice);

interface EquationProps extends Pick<SolvedCase, 'beam' | 'solution'> {
  readonly redundants: readonly Redundant[];
  readonly system: UnitSystemName;
}

const Equation = memo(function Equation({ beam, solution, redundants, system }: EquationProps) {
  const pictures = useMemo(
    () => forceMethodPictures(beam, forceMethod(beam, redundants), solution, DRAWING_FORMATS[system]),
    [beam, solution, redundants, system],
  );
  return (
    <PictureEquation
      {...pictures}
      label="The released beam under the loads, and each redundant times its unit case, add up to the member as built."
    />
  );
});

/** What is released: the person's choice where it is admissible still, else the template's. */
export function redundantsOf(
  { beam, solution }: Pick<SolvedCase, 'beam' | 'solution'>,
  releases: readonly Release[] | null,
): Redundant[] {
  const own = solution.forceMethod.redundants;
  if (releases === null) return own;
  const asked = releases.map((release) => toRedundant(beam, release));
  return checkRedundants(beam, asked).length === 0 ? asked : own;
}

type Kit = Awaited<ReturnType<typeof loadKit>>;

/** The steps, and their formulas as they are asked for: what is out of sight need not be set at once. */
function work(
  { derive, setStep }: Kit,
  { beam, instance }: SolvedCase,
  redundants: readonly Redundant[],
  system: UnitSystemName,
): Worked {
  const steps = derive({
    beam,
    redundants,
    names: { lengths: instance.dimensions, loads: instance.loadNames },
    system,
  });
  const set = new Map<number, string>();
  const formulaOf = (index: number): string => {
    const step = steps[index];
    const html = set.get(index) ?? (step ? setStep(step) : '');
    set.set(index, html);
    return html;
  };
  return { steps, formulaOf };
}
