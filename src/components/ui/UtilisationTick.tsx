import { formatUtilisation } from '@/engine/quantity';
import { LIMIT_PLACE, tickPlace, utilisationState } from './utilisation';

interface UtilisationTickProps {
  ratio: number;
  /** Width of the scale, px. */
  width?: number;
}

const HEIGHT = 16;
const TICK = { passes: 'stroke-ink', close: 'stroke-ochre', fails: 'stroke-error' } as const;

/** Figure and hairline scale; a failing bar is broken and runs past the limit line. */
export function UtilisationTick({ ratio, width = 74 }: UtilisationTickProps) {
  const state = utilisationState(ratio);
  const fails = state === 'fails';
  const x = Math.round(tickPlace(ratio) * width * 100) / 100; // where server and browser differ by a last digit, this does not
  const limit = LIMIT_PLACE * width;
  return (
    <span className="inline-flex items-center gap-8 whitespace-nowrap">
      <span className={`min-w-30 text-right ${fails ? 'font-semibold text-error' : ''}`}>
        {formatUtilisation(ratio)}
        {fails && <span className="sr-only"> fails</span>}
      </span>
      <svg width={width} height={HEIGHT} viewBox={`0 0 ${width} ${HEIGHT}`} aria-hidden="true" fill="none">
        <path
          className="stroke-rule-strong"
          d={`M0 11.5H${width}${[0.25, 0.5, 0.75].map((q) => `M${q * limit} 11.5v2.5`).join('')}`}
        />
        <path className="stroke-ink" strokeWidth="1.5" d={`M${limit} 1V15`} />
        <path
          className={fails ? 'stroke-error' : 'stroke-ink-2'}
          strokeWidth="2"
          strokeDasharray={fails ? '3 2' : undefined}
          d={`M0 9.5H${x}`}
        />
        <path className={TICK[state]} strokeWidth="3" d={`M${x} 2V13`} />
      </svg>
    </span>
  );
}
