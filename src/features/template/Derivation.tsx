import { RichHtml } from '@/components/drawing/marks/RichHtml';
import { unitText } from '@/engine/quantity';
import { WideFormula } from './WideFormula';
import { isLong, type WorkedSteps } from './worked';

/** The worked steps, numbered; the one that finds the redundant is washed. */
export function Derivation({ steps, formulas }: WorkedSteps) {
  return (
    <ol className="mt-6 border-t-2 border-ink">
      {steps.map((step, index) => {
        const { id, title, display, unit, note, key, charts = [] } = step;
        return (
          <li
            key={id}
            data-key-step={key ? '' : undefined}
            className={`grid grid-cols-[26px_minmax(0,1fr)_116px] items-center border-b py-8 max-md:grid-cols-[22px_minmax(0,1fr)] ${key ? 'border-ink bg-ochre-wash pr-9 pl-9 shadow-[inset_3px_0_0_var(--color-ochre)]' : 'border-rule'}`}
          >
            <span className="self-start font-semibold">{index + 1}</span>
            <span className={`col-span-2 text-schedule max-md:col-span-1 ${key ? '' : 'text-ink-2'}`}>
              <RichHtml text={title} />
            </span>
            <WideFormula
              html={formulas[index] ?? ''}
              title={title}
              className={`col-start-2 min-w-0 overflow-x-auto overflow-y-hidden py-1 ${isLong(step) ? 'col-span-2 [&_.katex]:text-[0.95em]!' : '[&_.katex]:text-[1.06em]!'} max-md:col-span-2 max-md:col-start-1 [&_.katex-display]:m-0! [&_.katex-display]:text-left! [&_.katex-display>.katex]:text-left!`}
            />
            {display !== '' && (
              <span
                className={`col-start-3 text-right font-semibold whitespace-nowrap max-md:col-span-2 max-md:col-start-1 ${key ? 'text-[1.1875rem]' : 'text-[1rem]'}`}
              >
                {display} <small className="text-schedule font-normal text-ink-2">{unitText(unit)}</small>
              </span>
            )}
            {note && (
              <p className="col-span-2 col-start-2 mt-4 text-note text-ink-2">
                <RichHtml text={note} />
              </p>
            )}
            {charts.map((chart) => (
              <p key={chart.id} className="col-span-2 col-start-2 mt-4 text-note text-ink-2 italic">
                {chart.title}: {chart.source}
              </p>
            ))}
          </li>
        );
      })}
    </ol>
  );
}
