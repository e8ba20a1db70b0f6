import type { AxialJudgement } from './axial-entry';
import { QuantityInput } from './QuantityInput';
import type { AxialState } from './use-axial';

const SIGNS = {
  none: { sign: '–', said: 'no axial force is stated', tone: 'text-ink-2' },
  within: { sign: '✓', said: 'holds', tone: 'text-issued' },
  beyond: { sign: '×', said: 'does not hold', tone: 'text-error' },
  unknown: { sign: '?', said: 'not known yet', tone: 'text-ochre-ink' },
} as const satisfies Record<AxialJudgement['state'] | 'unknown', object>;

/** The rule that the beam's own values cannot decide: an axial force is stated beside it, or there is none. */
export function AxialRule({ axial }: { readonly axial: AxialState }) {
  const { force, length, judgement } = axial;
  const { sign, said, tone } = SIGNS[judgement?.state ?? 'unknown'];
  return (
    <div className="border-b border-rule py-6">
      <div className="grid grid-cols-[20px_minmax(0,1fr)_auto] items-baseline gap-x-8 gap-y-2">
        <span className={`font-semibold ${tone}`}>
          <span aria-hidden="true">{sign}</span>
          <span className="sr-only">{said}</span>
        </span>
        <span>Axial force at most a tenth of the buckling force</span>
        <span className="text-right whitespace-nowrap">
          {judgement && judgement.state !== 'none' && (
            <>
              <i>N</i>/<i>N</i>
              <sub>cr</sub> = {judgement.ratio}
            </>
          )}
        </span>
        <div className="col-span-2 col-start-2 mt-4 grid grid-cols-2 gap-10">
          <QuantityInput
            label="Axial force"
            dimension="force"
            entry={force}
            help="Compression: +. 0 for none."
            onChange={axial.setForce}
          />
          <QuantityInput
            label="Buckling length"
            dimension="length"
            entry={length}
            error={axial.lengthFault}
            help="In the plane of bending."
            onChange={axial.setLength}
          />
        </div>
        {judgement?.message && (
          <p className="col-span-2 col-start-2 mt-4 text-note text-error">{judgement.message}</p>
        )}
      </div>
    </div>
  );
}
