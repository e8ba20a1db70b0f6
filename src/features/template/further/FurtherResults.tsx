import type { Solution } from '@/engine/beam';
import type { Beam } from '@/engine/model';
import type { UnitSystemName } from '@/engine/quantity';
import { paths } from '@/paths';
import { Deflections } from './Deflections';
import { FrequencyPanel } from './FrequencyPanel';
import { InfluencePanel } from './InfluencePanel';

export interface FurtherResultsProps {
  /** A new object is a new case; it changes when the hand rests. */
  readonly solved: { readonly beam: Beam; readonly solution: Solution };
  readonly system: UnitSystemName;
  /** kg/m of the section, where one gives the stiffness. */
  readonly ownMass: number | null;
  /** Which values these are results of, where they are not the ones in the fields. */
  readonly note?: string | undefined;
}

/** What the analysis gives beyond the diagrams. */
export function FurtherResults({ solved, system, ownMass, note }: FurtherResultsProps) {
  const { beam, solution } = solved;
  return (
    <>
      {note && <p className="mb-8 text-schedule text-ink-2">{note}.</p>}
      <div className="grid gap-20 [&>*+*]:border-t [&>*+*]:border-rule-strong [&>*+*]:pt-14">
        <Deflections beam={beam} solution={solution} system={system} />
        <InfluencePanel beam={beam} system={system} />
        <FrequencyPanel beam={beam} system={system} ownMass={ownMass} />
      </div>
      <p className="mt-20">
        <a className="link" href={paths.helpPage('further')}>
          How these results are found, and what they leave out
        </a>
      </p>
    </>
  );
}
