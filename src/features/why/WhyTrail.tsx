import { Letter } from './Letter';
import type { Path, Row } from './rows';

interface WhyTrailProps {
  readonly trail: readonly Row[];
  readonly onChoose: (path: Path) => void;
}

/** From the number that was asked about to the one that is chosen. */
export function WhyTrail({ trail, onChoose }: WhyTrailProps) {
  return (
    <nav aria-label="Chain" className="flex-none overflow-x-auto border-b border-rule px-(--pad)">
      <ol className="flex items-center gap-6 text-schedule whitespace-nowrap">
        {trail.map(({ path, name, trace }, i) => {
          const isLast = i === trail.length - 1;
          return (
            <li key={path} className="flex items-center gap-6">
              {i > 0 && <span aria-hidden="true">›</span>}
              <button
                type="button"
                aria-current={isLast ? 'step' : undefined}
                aria-label={trace.label}
                onClick={() => onChoose(path)}
                className={`min-h-34 min-w-24 pointer-coarse:min-h-44 ${isLast ? 'font-semibold' : 'link'}`}
              >
                {name === '' ? trace.label : <Letter tex={name} />}
              </button>
            </li>
          );
        })}
      </ol>
    </nav>
  );
}
