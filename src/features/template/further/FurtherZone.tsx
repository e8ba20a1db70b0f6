import { type ComponentType, useEffect, useId, useState } from 'react';
import { ZoneHeading } from '@/components/ui/ZoneHeading';
import { STANDARD_GRAVITY, type UnitSystemName } from '@/engine/quantity';
import { useRestedValue } from '../use-live';
import type { useTemplatePage } from '../use-template-page';
import type { FurtherResultsProps } from './FurtherResults';

interface FurtherZoneProps {
  /** The last values that gave a result. */
  readonly good: ReturnType<typeof useTemplatePage>['good'];
  /** Whether they are the ones in the fields. */
  readonly isNow: boolean;
  readonly system: UnitSystemName;
}

const load = () => import('./FurtherResults');

type Part = ComponentType<FurtherResultsProps> | 'failed' | null;

/**
 * Results that few need each time: closed until somebody asks for them, and their script not fetched before. What was
 * typed in them stays when they are closed again.
 */
export function FurtherZone({ good, isNow, system }: FurtherZoneProps) {
  const [isOpen, setOpen] = useState(false);
  const [part, setPart] = useState<Part>(null);
  const id = useId();
  useEffect(() => {
    if (!isOpen || part !== null) return;
    load().then(
      ({ FurtherResults }) => setPart(() => FurtherResults),
      () => setPart('failed'),
    );
  }, [isOpen, part]);
  const solved = useRestedValue(good.evaluation);
  const weight = good.values.section?.resolved.selfWeight;
  const Results = typeof part === 'function' ? part : null;
  const toggle = (
    <button
      type="button"
      aria-expanded={isOpen}
      aria-controls={id}
      className="link min-h-26 pointer-coarse:min-h-44"
      onClick={() => {
        if (part === 'failed') setPart(null);
        setOpen(!isOpen);
      }}
    >
      {isOpen ? 'Close' : 'Open'}
    </button>
  );
  return (
    <section className="border-t border-ink px-(--pad) pt-12">
      <ZoneHeading letter="J" note={toggle}>
        Further results
        <span className="ml-10 text-schedule font-normal text-ink-2 max-md:hidden">
          deflection by datum, tips, influence lines, a train of wheels, natural frequency
        </span>
      </ZoneHeading>
      <div id={id} hidden={!isOpen} className="pb-(--pad)">
        {Results && (
          <Results
            solved={solved}
            system={system}
            ownMass={weight === undefined ? null : weight / STANDARD_GRAVITY}
            note={isNow ? undefined : 'At the last good values'}
          />
        )}
        {part === null && isOpen && <p className="text-schedule text-ink-2">Drawing</p>}
        {part === 'failed' && (
          <p role="alert" className="text-schedule font-semibold text-error">
            This part of the page did not load. Check the connection, then close it and open it again.
          </p>
        )}
      </div>
    </section>
  );
}
