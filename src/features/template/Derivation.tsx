import { RichHtml } from '@/components/drawing/marks/RichHtml';
import type { DerivationStep } from '@/engine/derivation';
import { unitText } from '@/engine/quantity';
import { WhyGrid } from '@/features/why/WhyGrid';
import { WhyStep } from '@/features/why/WhyStep';
import { WideFormula } from './WideFormula';
import { isLong, type WorkedSteps } from './worked';

/** Worked steps, and the formula of each, set. */
export interface Worked extends Pick<WorkedSteps, 'steps'> {
  readonly formulaOf: (index: number) => string;
}

const ROW =
  'grid grid-cols-[26px_minmax(0,1fr)_132px] items-center border-b py-8 max-md:grid-cols-[28px_minmax(0,1fr)]';
const KEY_ROW = 'border-ink bg-ochre-wash pr-9 pl-9 shadow-[inset_3px_0_0_var(--color-ochre)]';
const FORMULA =
  'col-start-2 min-w-0 overflow-x-auto overflow-y-hidden py-1 max-md:col-span-2 max-md:col-start-1 [&_.base]:my-3';

/** The worked steps, numbered; those that find the redundants are washed. */
export function Derivation({ steps, formulaOf }: Worked) {
  return (
    <WhyGrid>
      <ol className="mt-6 border-t-2 border-ink">
        {steps.map((step, index) => (
          <Step key={step.id} steps={steps} index={index} formulaOf={formulaOf} />
        ))}
      </ol>
    </WhyGrid>
  );
}

interface StepProps {
  readonly steps: readonly DerivationStep[];
  readonly index: number;
  readonly formulaOf: Worked['formulaOf'];
}

function Step({ steps, index, formulaOf }: StepProps) {
  const step = steps[index];
  if (!step) return null;
  const { title, display, unit, note, key, charts = [] } = step;
  return (
    <li data-key-step={key ? '' : undefined} className={`${ROW} ${key ? KEY_ROW : 'border-rule'}`}>
      <span className="self-start font-semibold">{index + 1}</span>
      <span className={`col-span-2 text-schedule max-md:col-span-1 ${key ? '' : 'text-ink-2'}`}>
        <RichHtml text={title} />
      </span>
      <WideFormula
        index={index}
        formulaOf={formulaOf}
        title={title}
        className={`${FORMULA} ${isLong(step) ? 'col-span-2 [&_.katex]:text-[0.95em]!' : '[&_.katex]:text-[1.06em]!'}`}
      />
      {display !== '' && (
        <span
          className={`col-start-3 text-right font-semibold whitespace-nowrap max-md:col-span-2 max-md:col-start-1 ${key ? 'text-[1.1875rem]' : 'text-[1rem]'}`}
        >
          <WhyStep id={step.id}>
            {display} <small className="ml-4 text-schedule font-normal text-ink-2">{unitText(unit)}</small>
          </WhyStep>
        </span>
      )}
      {note && (
        <p className="col-span-2 col-start-2 mt-4 text-note text-ink-2">
          <RichHtml text={note} />
        </p>
      )}
      {charts.map((chart) => (
        <p key={chart.id} className="col-span-2 col-start-2 mt-4 text-note text-ink-2 italic">
          {chart.title}: {originOf(steps, index, chart)}
        </p>
      ))}
    </li>
  );
}

/** Where a closed form comes from, in full where it is first used. */
function originOf(
  steps: readonly DerivationStep[],
  index: number,
  { id, source }: NonNullable<DerivationStep['charts']>[number],
): string {
  const first = steps.findIndex(({ charts }) => charts?.some((chart) => chart.id === id));
  return first < index ? `as in step ${first + 1}` : source;
}
