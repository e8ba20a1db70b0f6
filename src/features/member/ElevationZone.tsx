import { useMemo, useState } from 'react';
import { ZoneHeading } from '@/components/ui/ZoneHeading';
import type { UnitSystemName } from '@/engine/quantity';
import { BeamResults } from '@/features/template/BeamResults';
import { loadingOf } from '@/features/why/member-loading';
import type { Live } from './use-member';
import { stripViews } from './views';

interface ElevationZoneProps {
  readonly live: Live;
  readonly system: UnitSystemName;
  readonly notDrawn: string | undefined;
  readonly onEdit: (symbol: string) => void;
}

/** What is judged: slope stands on the template's page, and in the table. */
const QUANTITIES = ['shear', 'moment', 'deflection'] as const;

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
  const loading = useMemo(() => (shown && view ? loadingOf(shown, view) : undefined), [shown, view]);
  const isLive = live.evaluation !== null;
  const drawn = useMemo(() => (isLive ? view?.draw() : undefined), [isLive, view]);
  return (
    <section className="border-b border-ink">
      <div className="flex flex-wrap items-start gap-x-20 px-14 pt-9 max-md:px-(--pad) md:-mb-14">
        <ZoneHeading letter="A">Elevation</ZoneHeading>
        {views.length > 1 && (
          <label className="ml-auto flex items-baseline gap-10 text-schedule text-ink-2 max-md:w-full">
            <span className="whitespace-nowrap">Loads shown</span>
            <select
              value={view?.id}
              onChange={(event) => setId(event.target.value)}
              className="input min-h-28! w-300! py-1! text-schedule! text-ink max-md:w-full! pointer-coarse:min-h-44!"
            >
              {views.map((one) => (
                <option key={one.id} value={one.id}>
                  {one.name}
                </option>
              ))}
            </select>
          </label>
        )}
      </div>
      {view && named ? (
        <BeamResults
          beam={view.beam}
          instance={named}
          solution={drawn?.solution ?? null}
          envelopes={drawn?.envelopes}
          reactions={drawn?.reactions}
          system={system}
          quantities={QUANTITIES}
          depth={shown?.section?.depth}
          notDrawn={notDrawn}
          onEdit={onEdit}
          loading={loading}
        />
      ) : (
        <p className="px-(--pad) pb-20 text-ink-2">{notDrawn}</p>
      )}
    </section>
  );
}
