import { Button } from '@/components/ui/Button';
import { type Cause, saidAndAdvice, stopTitle } from './faults';

interface CausesProps {
  readonly causes: readonly Cause[];
  /** Puts the last good value back; all of them for null. */
  readonly onPutBack: (symbol: string | null) => void;
  /** The last good value of a parameter, as it would be typed. */
  readonly lastGood: (symbol: string) => string | null;
}

/** What stops the drawing, in order, and the repair of each. */
export function Causes({ causes, onPutBack, lastGood }: CausesProps) {
  return (
    <div role="alert" className="border-ink bg-paper px-(--pad) py-14 max-lg:border-t lg:border-l">
      <h3 className="mb-8 flex items-center gap-10 border-b-2 border-ink pb-8 text-zone font-semibold">
        <span
          className="grid size-22 place-items-center rounded-full border border-error text-note text-error"
          aria-hidden="true"
        >
          !
        </span>
        {stopTitle(causes)}
      </h3>
      <ul>
        {causes.map(({ symbol, title, message }) => {
          const [said, advice] = saidAndAdvice(message);
          const isNamed = said.startsWith(title);
          const text = symbol === null ? null : lastGood(symbol);
          return (
            <li key={`${symbol} ${message}`} className="border-b border-rule py-8">
              <b className="font-semibold">{isNamed ? said : title}</b>
              <p className="text-ink-2">{isNamed ? advice : message}</p>
              <div className="mt-6">
                <Button size="small" onClick={() => onPutBack(symbol)}>
                  {text === null ? 'Put the last good values back' : `Put back ${text}`}
                </Button>
              </div>
            </li>
          );
        })}
      </ul>
    </div>
  );
}
