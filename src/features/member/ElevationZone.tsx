import { useMemo, useState } from 'react';
import { ChoiceField } from '@/components/ui/Field';
import { ZoneHeading } from '@/components/ui/ZoneHeading';
import type { UnitSystemName } from '@/engine/quantity';
import { BeamResults } from '@/features/template/BeamResults';
import type { Live } from './use-member';
import { stripViews } from './views';

interface ElevationZoneProps {
  readonly live: Live;
  readonly system: UnitSystemName;
  readonly notDrawn: string | undefined;
  readonly onEdit: (symbol: string) => void;
}

/** The member to scale with its diagrams, under the loads that are chosen. */
export function ElevationZone({ live, system, notDrawn, onEdit }: ElevationZoneProps) {
  const [id, setId] = useState('total');
  const shown = live.evaluation ?? live.lastGood;
  const views = useMemo(() => (shown ? stripViews(shown) : []), [shown]);
  const view = views.find((one) => one.id === id) ?? views[0];
  const named = useMemo(
    () => shown && view && { dimensions: shown.instance.dimensions, loadNames: view.loadNames },
    [shown, view],
  );
  return (
    <section className="border-b border-ink">
      <div className="flex flex-wrap items-start gap-x-20 px-(--pad) pt-10">
        <ZoneHeading letter="A">Elevation</ZoneHeading>
        {views.length > 1 && (
          <div className="ml-auto w-320 max-w-full max-md:w-full">
            <ChoiceField
              label="Loads shown"
              value={view?.id}
              choices={views.map((one) => ({ value: one.id, label: one.name }))}
              onChange={(event) => setId(event.target.value)}
            />
          </div>
        )}
      </div>
      {view && named ? (
        <BeamResults
          beam={view.beam}
          instance={named}
          solution={live.evaluation ? view.solution : null}
          system={system}
          depth={shown?.section?.depth}
          notDrawn={notDrawn}
          onEdit={onEdit}
        />
      ) : (
        <p className="px-(--pad) pb-20 text-ink-2">{notDrawn}</p>
      )}
    </section>
  );
}
