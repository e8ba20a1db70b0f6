import type { Finding } from '@/features/section/import/contract';
import { countWords } from './words';

interface FileScaleProps {
  /** Lines of the file. */
  readonly lines: number;
  readonly findings: readonly Finding[];
  readonly onChoose: (key: string) => void;
}

const WIDTH = 480;
const MOST_MARKS = 60;
const STEPS = [1, 2, 5, 10, 20, 50, 100, 200, 500, 1000, 2000, 5000, 10_000, 20_000, 50_000];

/** One scale for the whole file: a ring where there is a warning, a cross where there is an error. */
export function FileScale({ lines, findings, onChoose }: FileScaleProps) {
  const last = Math.max(lines, 2);
  const x = (line: number) => (WIDTH * (line - 1)) / (last - 1);
  const step = STEPS.find((one) => last / one <= 8) ?? 100_000;
  const small = last <= 120 ? 1 : step / 5;
  const ticks = Array.from({ length: Math.floor(last / small) }, (_, index) => (index + 1) * small);
  const marks = marksOf(findings, last);
  return (
    // biome-ignore lint/a11y/useSemanticElements: a drawing is no field set
    <svg
      viewBox={`-12 0 ${WIDTH + 24} 44`}
      className="mb-4 h-44 w-full overflow-visible"
      role="group"
      aria-label="Lines of the file"
    >
      <path d={`M0 28H${WIDTH}`} className="stroke-ink" strokeWidth="1.3" />
      {ticks.map((line) => (
        <path key={line} d={`M${x(line)} 28v${line % step === 0 ? -9 : -5}`} className="stroke-ink-2" />
      ))}
      {[1, ...ticks.filter((line) => line % step === 0 && line > 1)].map((line) => (
        <text key={line} x={x(line)} y="42" textAnchor="middle" fontSize="12" className="fill-ink-2">
          {countWords(line)}
        </text>
      ))}
      {marks.map(({ key, line, severity }) => (
        // biome-ignore lint/a11y/useSemanticElements: there is no button inside a drawing
        <g
          key={key}
          role="button"
          tabIndex={-1}
          aria-label={`${severity} in line ${line}`}
          transform={`translate(${x(line ?? 1)} 11)`}
          className={`cursor-pointer ${severity === 'error' ? 'stroke-error' : 'stroke-ochre-ink'}`}
          strokeWidth="1.8"
          fill="none"
          onClick={() => onChoose(key)}
          onKeyDown={({ key: pressed }) => pressed === 'Enter' && onChoose(key)}
        >
          <rect x="-8" y="-10" width="16" height="20" stroke="none" fill="transparent" />
          {severity === 'error' ? <path d="M-4-4 4 4M4-4-4 4" /> : <circle r="4.2" />}
        </g>
      ))}
    </svg>
  );
}

/** One mark for each place that can be told from the next; an error hides a warning there. */
function marksOf(findings: readonly Finding[], last: number): Finding[] {
  const places = new Map<number, Finding>();
  for (const finding of findings) {
    if (finding.line === null || finding.severity === 'note') continue;
    const place = Math.round((MOST_MARKS * finding.line) / last);
    const there = places.get(place);
    if (!there || (there.severity !== 'error' && finding.severity === 'error')) places.set(place, finding);
  }
  return [...places.values()];
}
