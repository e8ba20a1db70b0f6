import { useMemo, useState } from 'react';
import { readQuantity, UNIT_SYSTEMS, type UnitSystemName } from '@/engine/quantity';
import type { TemplateEvaluating } from '../evaluate';
import type { Entry } from '../raw';
import { useRestedValue } from '../use-live';
import type { useTemplatePage } from '../use-template-page';
import { type AxialJudgement, bucklingLengthOf, judgeAxial } from './axial-entry';
import { placeEntry } from './place-entry';

type Page = ReturnType<typeof useTemplatePage>;

export interface AxialState {
  readonly force: Entry;
  readonly length: Entry;
  readonly setForce: (entry: Entry) => void;
  readonly setLength: (entry: Entry) => void;
  /** Null while a field does not read, or the buckling length is not a length. */
  readonly judgement: AxialJudgement | null;
  readonly lengthFault: string | undefined;
}

/**
 * A template's page beside which an axial force may be stated. The beam has none in it: a force that is out of scope
 * stops the page as a value that is wrong does.
 */
export function useAxial(page: Page, system: UnitSystemName): { page: Page; axial: AxialState } {
  const none = useMemo((): Entry => ({ text: '0', unit: UNIT_SYSTEMS[system].force.unit }), [system]);
  const [force, setForce] = useState(none);
  const [typed, setLength] = useState<Entry | null>(null);
  // The rule waits for the hand to rest, so that the frame of a drag is the drawing's.
  const { beam } = useRestedValue(page.good.evaluation);
  const length = useMemo(
    () => typed ?? placeEntry(beam, bucklingLengthOf(beam), system),
    [typed, beam, system],
  );
  const compression = readQuantity(force.text, 'force', force);
  const buckling = readQuantity(length.text, 'length', length);
  const [N, L] = [compression.ok ? compression.value : null, buckling.ok ? buckling.value : null];
  const judgement = useMemo(
    () => (N !== null && L !== null && L > 0 ? judgeAxial(beam, N, L) : null),
    [beam, N, L],
  );
  const outcome = useMemo(
    (): TemplateEvaluating => stopped(page.outcome, judgement),
    [page.outcome, judgement],
  );
  const putBack: Page['putBack'] = (symbol) => {
    if (symbol === null && judgement?.message) setForce(none);
    page.putBack(symbol);
  };
  const lengthFault = L !== null && L <= 0 ? 'The buckling length must be more than zero.' : undefined;
  const axial = useMemo(
    (): AxialState => ({ force, length, setForce, setLength, judgement, lengthFault }),
    [force, length, judgement, lengthFault],
  );
  return { page: { ...page, outcome, putBack }, axial };
}

function stopped(outcome: TemplateEvaluating, judgement: AxialJudgement | null): TemplateEvaluating {
  if (!outcome.ok || !judgement?.message) return outcome;
  return { ok: false, errors: [{ pointer: '/axial', code: 'out_of_scope', message: judgement.message }] };
}
